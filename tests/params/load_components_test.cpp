#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>

#include "parameter_folder.hpp"
#include "params/catalog.hpp"

namespace stillshed {
namespace {

using ::testing::AllOf;
using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::IsSupersetOf;

const ComponentRecord& component(const std::string& id) {
  static const Catalog catalog(test::loaded_facts());
  return *catalog.by_id(id);
}

TEST(LoadComponents, WaterAsPublished) {
  const ComponentRecord& water = component("water");
  EXPECT_EQ(water.cas, "7732-18-5");
  EXPECT_DOUBLE_EQ(water.molar_mass_g_mol, 18.015);
  EXPECT_DOUBLE_EQ(water.critical_temperature_K->value, 647.096);
  EXPECT_DOUBLE_EQ(water.critical_pressure_Pa->value, 22.064e6);
  EXPECT_EQ(water.pressure_grade, 'A');
  EXPECT_EQ(water.pressure_sets.size(), 6U);
  EXPECT_EQ(water.unifac.groups, (std::vector<GroupCount>{{16, 1}}));
}

// B. E. Poling et al. (2001), Appendix A, prints for water log10(P/bar) = 5.11564 - 1687.537/(T - 273.15 + 230.17).
TEST(LoadComponents, PrintedAntoineUnitsAreConverted) {
  const auto& sets = component("water").pressure_sets;
  const auto set = std::find_if(sets.begin(), sets.end(), [](const auto& s) { return s.source == "poling-antoine"; });
  ASSERT_NE(set, sets.end());
  const double T = 373.15;
  const double printed_bar = std::pow(10.0, 5.11564 - 1687.537 / (T - 273.15 + 230.17));
  const double ours_Pa = std::pow(10.0, set->coefficients[0] - set->coefficients[1] / (T + set->coefficients[2]));
  EXPECT_NEAR(ours_Pa, printed_bar * 1e5, 1e-6 * ours_Pa);
}

TEST(LoadComponents, MillimetresOfMercuryAndCelsius) {
  const test::ParameterFolder folder;
  // The same Antoine set of water in mmHg: A grows by log10(1e5 / 133.322387415).
  const double A = 5.11564 + std::log10(1e5 / 133.322387415);
  folder.replace("vapour_pressure.json",
                 R"("units": {"pressure": "bar", "temperature": "degC"}, "coefficients": {"A": 5.11564)",
                 R"("units": {"pressure": "mmHg", "temperature": "degC"}, "coefficients": {"A": )" + std::to_string(A));
  EXPECT_THAT(folder.problems(), ElementsAre());
}

TEST(LoadComponents, WrongUnitShowsInTheBoilingPoint) {
  const test::ParameterFolder folder;
  folder.replace("vapour_pressure.json", R"("units": {"pressure": "bar", "temperature": "degC"})",
                 R"("units": {"pressure": "kPa", "temperature": "degC"})");
  EXPECT_THAT(folder.problems(), ElementsAre(AllOf(HasSubstr("vapour_pressure.json /sets/3/coefficients"),
                                                   HasSubstr("boiling point"), HasSubstr("373.12 K within 1 K"))));
}

TEST(LoadComponents, FallingPressureAndBoilingPointAndRange) {
  const test::ParameterFolder folder;
  folder.replace("vapour_pressure.json", "\"C2\": -7258.2", "\"C2\": 7258.2");
  folder.replace("vapour_pressure.json", "\"Pc_Pa\": 22122300.0", "\"Pc_Pa\": 23322300.0");
  folder.replace("vapour_pressure.json", "\"range_K\": [273.15, 647.1]", "\"range_K\": [647.1, 273.15]");
  EXPECT_THAT(folder.problems(),
              IsSupersetOf({HasSubstr("/sets/1/coefficients: found a boiling point of 371."),
                            HasSubstr("/sets/2/coefficients: found a vapour pressure that does not rise"),
                            HasSubstr("/sets/4/range_K: found")}));
}

TEST(LoadComponents, AStatedConflictMustBeTrue) {
  const test::ParameterFolder folder;
  folder.replace("vapour_pressure.json", "\"misses_boiling_point_by_K\": -1.03", "\"misses_boiling_point_by_K\": -0.5");
  EXPECT_THAT(folder.problems(),
              ElementsAre(HasSubstr("/misses_boiling_point_by_K: found a boiling point of 424.92 K")));
}

TEST(LoadComponents, LinksAndShapesOfPressureSets) {
  const test::ParameterFolder folder;
  folder.replace("vapour_pressure.json", "\"component\": \"water\"", "\"component\": \"steam\"");
  folder.replace("vapour_pressure.json", "\"source\": \"mcgarry-1983\"", "\"source\": \"mcgarry\"");
  folder.replace("vapour_pressure.json", "\"form\": \"perry-101\"", "\"form\": \"dippr\"");
  folder.replace("vapour_pressure.json", "\"a\": -7.86975, ", "");
  folder.replace("vapour_pressure.json", "\"id\": \"water/antoine-log10/dykyj-1999\"",
                 "\"id\": \"water/antoine-log10/poling-antoine\"");
  EXPECT_THAT(folder.problems(),
              IsSupersetOf({HasSubstr("/sets/0/component: found \"steam\""),
                            HasSubstr("/sets/1/source: found \"mcgarry\""), HasSubstr("/sets/2/form: found \"dippr\""),
                            HasSubstr("/sets/4/coefficients/a: found nothing, allowed a number"),
                            HasSubstr("/sets/5/id: found \"water/antoine-log10/poling-antoine\" a second time")}));
}

TEST(LoadComponents, IdentityProblems) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"id\": \"methanol\"", "\"id\": \"Methanol!\"");
  folder.replace("components.json", "\"cas\": \"64-17-5\"", "\"cas\": \"67-56-1\"");
  folder.replace("components.json", "\"EtOH\"", "\"MeOH\"");
  folder.replace("components.json", "\"molar_mass_g_mol\": 60.096", "\"molar_mass_g_mol\": -60");
  folder.replace("components.json", "\"hazards\": []", "\"hazards\": [\"glows\"]");
  folder.replace("components.json", "\"unifac\": {\"groups\": [[16, 1]]}",
                 "\"unifac\": {\"groups\": [[16, 0], [999, 1]]}");
  folder.replace("components.json", "{\"value\": 373.124, \"source\": \"crc-inorganic\"}", "{\"value\": 373.124}");
  EXPECT_THAT(
      folder.problems(),
      IsSupersetOf({HasSubstr("/components/1/id: found \"Methanol!\""),
                    HasSubstr("/components/2/cas: found \"67-56-1\" a second time"),
                    HasSubstr("/components/2/synonyms: found \"MeOH\", which also names Methanol!"),
                    HasSubstr("/molar_mass_g_mol: found -60"), HasSubstr("/components/0/hazards: found \"glows\""),
                    HasSubstr("/components/0/unifac/groups/0: found [16,0]"),
                    HasSubstr("/components/0/unifac/groups/1: found 999"),
                    HasSubstr("/components/0/normal_boiling_point_K/source: found nothing")}));
}

TEST(LoadComponents, BoilingPointBelowTheCriticalOne) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"critical_temperature_K\": {\"value\": 647.096",
                 "\"critical_temperature_K\": {\"value\": 347.096");
  EXPECT_THAT(folder.problems(),
              ElementsAre(HasSubstr("/components/0/normal_boiling_point_K: found 373.124, allowed less")));
}

TEST(LoadComponents, GradeDashMeansNoSet) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"pressure_grade\": \"-\"", "\"pressure_grade\": \"B\"");
  EXPECT_THAT(folder.problems(), ElementsAre(HasSubstr("0 sets for ")));
}

}  // namespace
}  // namespace stillshed
