#include "models/mixture.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

MixtureComponent component(const char* id, double boiling_point_K, double H_K, double molar_mass_g_mol) {
  MixtureComponent c;
  c.id = id;
  c.molar_mass_g_mol = molar_mass_g_mol;
  c.pressure = PressureCurve({id, PressureForm::clausius_clapeyron, {boiling_point_K, H_K}, {}, {}, "", "", false, ""});
  return c;
}

std::vector<MixtureComponent> three() {
  return {component("A", 350.0, 4000.0, 46.0), component("B", 353.0, 3700.0, 78.0),
          component("C", 373.0, 4900.0, 18.0)};
}

Mixture full() {
  return {three(), Nrtl(samples::nrtl_full()), RedlichKister(3, {{0, 2, {0.4, -0.1}}})};
}

constexpr double kLnP = 11.526;  // about 1 atm

TEST(Mixture, LnKIsActivityPlusPressure) {
  const Mixture mixture = full();
  const Composition x{0.2, 0.5, 0.3};
  const auto ln_k = mixture.ln_k(340.0, x, kLnP);
  const auto model = Nrtl(samples::nrtl_full()).ln_gamma(340.0, x);
  const auto extra = RedlichKister(3, {{0, 2, {0.4, -0.1}}}).ln_gamma(340.0, x);
  for (int i = 0; i < 3; ++i) {
    EXPECT_NEAR(ln_k[i], model[i] + extra[i] + mixture.ln_psat(i, 340.0) - kLnP, 1e-14);
  }
}

TEST(Mixture, GradientMatchesJetsAndEnclosesThem) {
  const Mixture mixture = full();
  std::mt19937_64 random(3);
  const auto f = [&mixture](const auto& T, const auto& x) { return mixture.ln_k(T, x, kLnP); };
  for (int draw = 0; draw < 50; ++draw) {
    const Composition x = laws::random_composition(random, 3, draw);
    const double T = laws::uniform(random, 300.0, 400.0);
    LnGammaGradient<double> exact;
    mixture.ln_k_with_gradient(T, x, kLnP, exact);
    const auto jets = gradient_by_jets(T, x, f);
    const laws::CompositionBox box = laws::box_around(x, T, 0.05, 2.0);
    LnGammaGradient<Interval> wide;
    mixture.ln_k_with_gradient(box.T, box.x, kLnP, wide);
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(exact.value[i], jets.value[i], 1e-13);
      EXPECT_NEAR(exact.d_dT[i], jets.d_dT[i], 1e-13);
      EXPECT_TRUE(laws::encloses(wide.value[i], exact.value[i], 10.0));
      EXPECT_TRUE(laws::encloses(wide.d_dT[i], exact.d_dT[i], 1.0));
      for (int j = 1; j < 3; ++j) {
        EXPECT_NEAR(exact.d_dx(i, j) - exact.d_dx(i, 0), jets.d_dx(i, j) - jets.d_dx(i, 0), 1e-11);
        EXPECT_TRUE(laws::encloses(wide.d_dx(i, j), exact.d_dx(i, j), 10.0));
      }
    }
  }
}

TEST(Mixture, AFaceIsASmallerMixture) {
  const Mixture mixture = full();
  const Mixture face = mixture.face({0, 2});
  EXPECT_EQ(face.component(1).id, "C");
  const auto whole = mixture.ln_k(345.0, Composition{0.4, 0.0, 0.6}, kLnP);
  const auto part = face.ln_k(345.0, Composition{0.4, 0.6}, kLnP);
  EXPECT_NEAR(part[0], whole[0], 1e-14);
  EXPECT_NEAR(part[1], whole[2], 1e-14);
}

TEST(Mixture, FractionsThatStickOutByRoundingStillBound) {
  const Mixture mixture = full();
  const Vec<Interval> x{Interval(-1e-17, 0.1), Interval(0.3, 0.4), Interval(0.5, 0.7)};
  for (const Interval& value : mixture.ln_k(Interval(340.0, 341.0), x, kLnP)) {
    EXPECT_TRUE(value.is_bounded());
  }
}

TEST(Mixture, MassAndMoleFractionsInvert) {
  const Mixture mixture = full();
  const Composition x{0.2, 0.5, 0.3};
  const Composition w = to_mass_fractions(mixture, x);
  EXPECT_NEAR(w[0], 0.2 * 46.0 / (0.2 * 46.0 + 0.5 * 78.0 + 0.3 * 18.0), 1e-15);
  const Composition back = to_mole_fractions(mixture, w);
  for (int i = 0; i < 3; ++i) {
    EXPECT_NEAR(back[i], x[i], 1e-15);
  }
}

TEST(Mixture, KnowsItsBoilingPointsAndDependence) {
  const Mixture mixture = full();
  EXPECT_NEAR(mixture.boiling_point_K(0, 101325.0), 350.0, 1e-10);
  EXPECT_TRUE(mixture.depends_on_temperature());
  EXPECT_FALSE(Mixture(three(), Ideal(3)).depends_on_temperature());
}

TEST(Mixture, SizesMustAgree) {
  EXPECT_THROW(Mixture(three(), Ideal(2)), LogicError);
  EXPECT_THROW(Mixture(three(), Ideal(3), RedlichKister(2, {})), LogicError);
  EXPECT_THROW(Mixture({}, Ideal(0)), LogicError);
}

}  // namespace
}  // namespace stillshed
