#include "reports/name_task.hpp"

#include "tests/reports/input_fixtures.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed::test {
namespace {

TEST(NameTask, TellsWhatANameMeans) {
  const NameAnswer answer = name_text({"MEK", "67-63-0", "residue", "NaCl"}, catalog());
  EXPECT_TRUE(answer.problems.empty());
  for (const char* text : {"78-93-3", "2-propanol", "isopropanol", "vapour pressure", "unifac-dortmund",
                           "residue stands for", "NaCl is a salt"}) {
    EXPECT_NE(answer.text.find(text), std::string::npos) << text;
  }
  EXPECT_TRUE(testing_support::is_valid(answer.json, STILLSHED_TEST_DATA "/../reports/schema/name.schema.json"));
}

TEST(NameTask, RefusesWithChoicesOrSuggestions) {
  const NameAnswer answer = name_text({"TCE", "acetonee"}, catalog());
  ASSERT_EQ(answer.problems.size(), 2U);
  EXPECT_NE(answer.problems[0].text().find("trichloroethylene"), std::string::npos);
  EXPECT_NE(answer.problems[1].text().find("acetone (67-64-1)"), std::string::npos);
  EXPECT_TRUE(answer.text.empty());
}

}  // namespace
}  // namespace stillshed::test
