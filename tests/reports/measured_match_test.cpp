#include "reports/measured_match.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

Answer answer_at(double pressure_Pa) {
  std::vector<MixtureComponent> components(3);
  components[0].id = "a";
  components[1].id = "b";
  components[2].id = "c";
  for (MixtureComponent& component : components) {
    component.cas = "1-1-1";
    component.molar_mass_g_mol = 50.0;
  }
  Answer answer;
  answer.mixture = Mixture(components, Ideal(3));
  answer.input.pressure_Pa = pressure_Pa;
  Azeotrope azeotrope;
  azeotrope.point.members = {0, 1};
  azeotrope.point.x = {0.6, 0.4, 0.0};
  azeotrope.point.temperature_K = 330.0;
  answer.survey.emplace();
  answer.survey->azeotropes.push_back(azeotrope);
  return answer;
}

MeasuredAzeotrope record(char tier, double pressure_Pa, std::vector<std::string> components, std::vector<double> x,
                         std::optional<double> temperature_K) {
  MeasuredAzeotrope result;
  result.tier = tier;
  result.pressure_Pa = pressure_Pa;
  result.components = std::move(components);
  result.mole_fractions = std::move(x);
  result.temperature_K = temperature_K;
  result.kind = AzeotropeKind::minimum;
  result.source = "book " + std::string(1, tier);
  return result;
}

TEST(MeasuredMatch, DifferencesAtTheSamePressureInMixtureOrder) {
  Facts facts;
  facts.measured_azeotropes = {record('A', 101000.0, {"b", "a"}, {0.41, 0.59}, 329.5)};
  Answer answer = answer_at(101325.0);
  match_measurements(facts, answer);
  ASSERT_EQ(answer.measured.at(0).size(), 1U);
  const MeasuredMatch& match = answer.measured[0][0];
  EXPECT_EQ(match.members, (Members{0, 1}));
  EXPECT_NEAR(match.x[0], 0.59, 1e-15);
  EXPECT_NEAR(*match.dT_K, 0.5, 1e-12);
  EXPECT_NEAR(*match.dx, 0.01, 1e-12);
  EXPECT_TRUE(answer.measured_only.empty());
}

TEST(MeasuredMatch, DoubtfulTiersAndOtherComponentsAreNotFacts) {
  Facts facts;
  facts.measured_azeotropes = {
      record('C', 101325.0, {"a", "b"}, {0.6, 0.4}, 330.0), record('D', 101325.0, {"a", "b"}, {0.6, 0.4}, 330.0),
      record('A', 101325.0, {"a", "z"}, {0.6, 0.4}, 330.0), record('A', 0.0, {"a", "b"}, {0.6, 0.4}, 330.0)};
  Answer answer = answer_at(101325.0);
  match_measurements(facts, answer);
  EXPECT_TRUE(answer.measured.at(0).empty());
  EXPECT_TRUE(answer.measured_only.empty());
}

TEST(MeasuredMatch, OnlyTheNearestPressureAndNoDifferencesThere) {
  Facts facts;
  facts.measured_azeotropes = {record('A', 2e5, {"a", "b"}, {0.5, 0.5}, 350.0),
                               record('B', 9e5, {"a", "b"}, {0.4, 0.6}, 400.0)};
  Answer answer = answer_at(101325.0);
  match_measurements(facts, answer);
  ASSERT_EQ(answer.measured.at(0).size(), 1U);
  EXPECT_EQ(answer.measured[0][0].pressure_Pa, 2e5);
  EXPECT_FALSE(answer.measured[0][0].dT_K.has_value());
}

TEST(MeasuredMatch, RecordsOfOtherFacesStandAlone) {
  Facts facts;
  MeasuredAzeotrope none = record('A', 101325.0, {"a", "c"}, {}, std::nullopt);
  none.kind = AzeotropeKind::none;
  facts.measured_azeotropes = {none, record('A', 101325.0, {"b", "c"}, {0.2, 0.8}, 340.0)};
  Answer answer = answer_at(101325.0);
  match_measurements(facts, answer);
  ASSERT_EQ(answer.measured_only.size(), 2U);
  EXPECT_TRUE(answer.measured_only[0].says_none);
  EXPECT_EQ(answer.measured_only[1].members, (Members{1, 2}));
}

TEST(MeasuredMatch, TheNearestOfTwoOnOneFace) {
  Answer answer = answer_at(101325.0);
  Azeotrope second = answer.survey->azeotropes[0];
  second.point.x = {0.1, 0.9, 0.0};
  answer.survey->azeotropes.push_back(second);
  Facts facts;
  facts.measured_azeotropes = {record('A', 101325.0, {"a", "b"}, {0.12, 0.88}, 331.0)};
  match_measurements(facts, answer);
  EXPECT_TRUE(answer.measured.at(0).empty());
  EXPECT_EQ(answer.measured.at(1).size(), 1U);
}

}  // namespace
}  // namespace stillshed
