#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <numeric>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;
using ::testing::IsSupersetOf;

TEST(LoadMeasured, TiersAreKept) {
  const auto& records = test::loaded_facts().measured_azeotropes;
  const auto count = [&](char tier) {
    return std::count_if(records.begin(), records.end(), [&](const auto& record) { return record.tier == tier; });
  };
  EXPECT_EQ(count('A'), 164);
  EXPECT_EQ(count('B'), 359);
  EXPECT_EQ(count('C'), 156);
  EXPECT_EQ(count('D'), 24);
}

// Lange's Handbook: water with 95.5 wt% ethanol boils at 78.1 degC; 95.5 wt% are 89.2 mol%.
TEST(LoadMeasured, MassFractionsBecomeMoleFractions) {
  const MeasuredAzeotrope& record = test::loaded_facts().measured_azeotropes.front();
  EXPECT_EQ(record.components, (std::vector<std::string>{"water", "ethanol"}));
  EXPECT_DOUBLE_EQ(record.temperature_K.value(), 78.1 + 273.15);
  EXPECT_DOUBLE_EQ(record.pressure_Pa, 101325.0);
  const double moles_water = 0.045 / 18.015;
  const double moles_ethanol = 0.955 / 46.069;
  EXPECT_NEAR(record.mole_fractions.at(1), moles_ethanol / (moles_water + moles_ethanol), 1e-9);
  EXPECT_THAT(record.source, HasSubstr("Lange"));
  EXPECT_EQ(record.printed, "95.5 wt% ethanol");
}

TEST(LoadMeasured, CompositionsAddUp) {
  for (const MeasuredAzeotrope& record : test::loaded_facts().measured_azeotropes) {
    if (!record.mole_fractions.empty()) {
      EXPECT_EQ(record.mole_fractions.size(), record.components.size());
      EXPECT_NEAR(std::accumulate(record.mole_fractions.begin(), record.mole_fractions.end(), 0.0), 1.0, 1e-12);
    }
    EXPECT_TRUE(record.kind != AzeotropeKind::none || record.mole_fractions.empty()) << record.id;
  }
}

TEST(LoadMeasured, EveryClassOfProblem) {
  const test::ParameterFolder folder;
  const std::string file = "measured_azeotropes.json";
  folder.replace(file, "\"id\": \"az-0002\", \"tier\": \"A\"", "\"id\": \"az-0001\", \"tier\": \"E\"");
  folder.replace(file, "[\"water\", \"1-propanol\"]", "[\"water\", \"water\"]");
  folder.replace(file, "[0.045, 0.955]", "[0.045, 0.9]");
  folder.replace(file, "\"kind\": \"maximum\"", "\"kind\": \"highest\"");
  folder.replace(file, "\"cas\": \"7697-37-2\"", "\"cas\": \"7697-37-3\"");
  folder.replace(file, "\"id\": \"dipentene\"", "\"id\": \"water\"");
  EXPECT_THAT(
      folder.problems(),
      IsSupersetOf({HasSubstr("/records/0/mass_fractions: found 2 fractions with the sum 0.945"),
                    HasSubstr("/records/1/tier: found \"E\""), HasSubstr("/records/1/id: found \"az-0001\" a second"),
                    HasSubstr("/components: found 1 different components"), HasSubstr("/kind: found \"highest\""),
                    HasSubstr("/cas: found \"7697-37-3\""),
                    HasSubstr("found \"water\", allowed an id that is not yet in use"),
                    HasSubstr("found \"dipentene\", allowed an id of components.json or of others")}));
}

}  // namespace
}  // namespace stillshed
