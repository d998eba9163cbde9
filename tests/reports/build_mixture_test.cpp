#include "reports/build_mixture.hpp"

#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

BuiltMixture built(const std::string& stream, const std::string& more = "") {
  return build_mixture(case_from(with_stream(stream, more)), catalog());
}

TEST(BuildMixture, OneSetPerComponentThatCoversTheBracket) {
  const BuiltMixture result = built(R"({"acetone": "50 wt%", "water": "50 wt%"})");
  ASSERT_EQ(result.mixture.size(), 2);
  for (const MixtureComponent& component : result.mixture.components()) {
    EXPECT_TRUE(component.pressure.covers(329.3 - 30.0)) << component.pressure.set().id;
    EXPECT_TRUE(component.pressure.covers(373.1 + 10.0)) << component.pressure.set().id;
    EXPECT_TRUE(component.critical_pressure_Pa.has_value());
    EXPECT_FALSE(component.cas.empty());
  }
  EXPECT_NEAR(result.mixture.boiling_point_K(1, 101325.0), 373.12, 0.05);
}

TEST(BuildMixture, AWideBracketNeedsAWideSet) {
  const BuiltMixture result = built(R"({"diethyl ether": "50 wt%", "DMSO": "50 wt%"})");
  const double hottest = result.mixture.boiling_point_K(1, 101325.0);
  EXPECT_TRUE(result.mixture.component(0).pressure.covers(hottest - 5.0) ||
              result.mixture.component(0).pressure.set().t_max_K > 440.0)
      << result.mixture.component(0).pressure.set().id;
}

TEST(BuildMixture, EvidenceOfThePressureSets) {
  const Mixture mixture = built(R"({"acetone": "50 wt%", "water": "50 wt%"})").mixture;
  EXPECT_EQ(pressure_evidence(mixture, 101325.0, 320.0, 380.0)[0], Evidence::fitted);
  EXPECT_EQ(pressure_evidence(mixture, 101325.0, 320.0, 2000.0)[0], Evidence::stretched);
  EXPECT_EQ(pressure_evidence(mixture, 5e5, 320.0, 380.0)[1], Evidence::stretched);
  const std::string own =
      R"(, "model": "ideal", "components": ["water", {"id": "X", "molar_mass_g_mol": 60, "vapour_pressure": {"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000}}])";
  const BuiltMixture mixed = built(R"({"X": "50 wt%", "water": "50 wt%"})", own);
  EXPECT_EQ(mixed.records[1], nullptr);
  EXPECT_EQ(pressure_evidence(mixed.mixture, 101325.0, 320.0, 380.0)[1], Evidence::user);
}

}  // namespace
}  // namespace stillshed::test
