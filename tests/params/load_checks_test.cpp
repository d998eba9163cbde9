#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;
using ::testing::IsSupersetOf;

TEST(LoadChecks, EachKindIsPresentAndComplete) {
  std::map<CheckKind, int> counts;
  for (const CheckValue& check : test::loaded_facts().check_values) {
    ++counts[check.kind];
    EXPECT_TRUE(test::loaded_facts().sources.contains(check.source)) << check.id;
  }
  EXPECT_EQ(counts[CheckKind::activity], 13);
  EXPECT_EQ(counts[CheckKind::boiling_point], 28);
  EXPECT_EQ(counts[CheckKind::fenske], 32);
  EXPECT_EQ(counts[CheckKind::azeotropes], 7);
}

// The equation of M. R. Fenske (1932) for a symmetrical split.
TEST(LoadChecks, FenskeRowsFollowTheEquation) {
  for (const CheckValue& check : test::loaded_facts().check_values) {
    if (check.kind == CheckKind::fenske) {
      const double odds = check.purity / (1.0 - check.purity);
      EXPECT_NEAR(2.0 * std::log(odds) / std::log(check.relative_volatility), check.expected.at(0), check.tolerance)
          << check.id;
    }
  }
}

TEST(LoadChecks, EveryClassOfProblem) {
  const test::ParameterFolder folder;
  const std::string file = "check_values.json";
  folder.replace(file, "\"expected\": [4.99, 1.005]", "\"expected\": [4.99]");
  folder.replace(file, "\"relative_tolerance\": 0.0005, ", "");
  folder.replace(file, "\"model\": \"unifac-dortmund\"", "\"model\": \"dortmund\"");
  folder.replace(file, "\"alpha\": [[0, 0.2974], [0.2974, 0]]", "\"alpha\": [[0, 0.2974]]");
  folder.replace(file, "\"component\": \"water\"", "\"component\": \"steam\"");
  folder.replace(file, "\"id\": \"fenske-1.02-99\"", "\"id\": \"fenske-1.02-95\"");
  folder.replace(file, "\"case\": {", "\"cases\": {");
  EXPECT_THAT(
      folder.problems(),
      IsSupersetOf({HasSubstr("/checks/0/expected: found 1 values for 2 mole fractions"),
                    HasSubstr("/checks/1/tolerance: found nothing"), HasSubstr("/model: found \"dortmund\""),
                    HasSubstr("/alpha: found 1 rows"), HasSubstr("/component: found \"steam\""),
                    HasSubstr("/id: found \"fenske-1.02-95\" a second time"), HasSubstr("/case: found nothing")}));
}

}  // namespace
}  // namespace stillshed
