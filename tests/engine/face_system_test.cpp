#include "engine/face_system.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

TEST(FaceSystem, evaluation_is_ln_k) {
  testing::Random random(1);
  const Mixture mixture = testing::random_nrtl(random, 4);
  const FaceSystem system(mixture, kAtmosphere_Pa);
  const Composition x = random.composition(4);
  LnGammaGradient<double> f;
  system.evaluate(x, 345.0, f);
  const Vec<double> ln_k = mixture.ln_k(345.0, x, std::log(kAtmosphere_Pa));
  for (int i = 0; i < 4; ++i) {
    EXPECT_DOUBLE_EQ(f.value[i], ln_k[i]);
    EXPECT_NEAR(system.boiling_points_K()[i], mixture.boiling_point_K(i, kAtmosphere_Pa), 0.0);
  }
}

TEST(FaceSystem, enclosures_hold_what_doubles_give) {
  testing::Random random(2);
  for (int k = 0; k < 200; ++k) {
    const int n = 2 + random.below(4);
    const FaceSystem system(testing::random_nrtl(random, n), kAtmosphere_Pa);
    const Composition centre = random.composition(n);
    const double radius = std::pow(10.0, random.uniform(-6.0, -0.5));
    SearchBox box{Vec<Interval>(n), Interval(345.0 - 20.0 * radius, 345.0 + 20.0 * radius)};
    for (int i = 0; i < n; ++i) {
      box.x[i] = Interval(std::max(0.0, centre[i] - radius), std::min(1.0, centre[i] + radius));
    }
    FaceEnclosure enclosure;
    system.enclose(box, enclosure);
    const Vec<Interval> value = system.value(box.x, box.T);
    // A second point of the box on the simplex: part of the way to another composition.
    const Composition other = random.composition(n);
    Composition x(n);
    for (int i = 0; i < n; ++i) {
      x[i] = centre[i] + 0.9 * radius * (other[i] - centre[i]);
    }
    const double T = random.uniform(box.T.lower(), box.T.upper());
    LnGammaGradient<double> f;
    system.evaluate(x, T, f);
    for (int i = 0; i < n; ++i) {
      const auto holds = [](const Interval& range, double number) {
        const double room = 1e-12 * (1.0 + std::abs(number));
        return range.lower() - room <= number && number <= range.upper() + room;
      };
      EXPECT_TRUE(holds(value[i], f.value[i]));
      EXPECT_TRUE(holds(enclosure.ln_gamma.value[i] + enclosure.p[i], f.value[i]));
      EXPECT_TRUE(holds(enclosure.ln_gamma.d_dT[i] + enclosure.p_dT[i], f.d_dT[i]));
      for (int j = 0; j < n; ++j) {
        EXPECT_TRUE(holds(enclosure.ln_gamma.d_dx(i, j), f.d_dx(i, j)));
      }
    }
  }
}

TEST(FaceSystem, bracket_holds_every_known_root) {
  for (int k = 0; k < 60; ++k) {
    testing::Random random(static_cast<std::uint64_t>(100 + k));
    const testing::KnownCase known = testing::random_margules(random, 2 + k % 4);
    for (const testing::KnownRoot& root : known.roots) {
      const Interval bracket = temperature_bracket(FaceSystem(known.mixture.face(root.members), kAtmosphere_Pa));
      EXPECT_TRUE(bracket.contains(root.temperature_K));
    }
  }
}

TEST(FaceSystem, bracket_is_derived_from_the_excess_energy) {
  // gE/RT of a symmetric binary is at most A/4 and every ln gamma at most A: the bracket reaches down to where
  // ln(Psat/P) = -A at the latest, and not above the boiling point by more than a slice.
  const double A = 1.6;
  const Interval bracket = temperature_bracket(FaceSystem(testing::symmetric_mixture(2, A), kAtmosphere_Pa));
  const double lowest_root_K = 1.0 / (1.0 / 350.0 + A / 4.0 / 4000.0);
  const double certain_K = 1.0 / (1.0 / 350.0 + A / 4000.0);
  EXPECT_LE(bracket.lower(), lowest_root_K);
  EXPECT_GE(bracket.lower(), certain_K * 0.99);
  EXPECT_GE(bracket.upper(), 350.0);
  // Natural enclosures allow ln gamma somewhat below zero on the whole face: the upper end is not as sharp.
  EXPECT_LE(bracket.upper(), 1.0 / (1.0 / 350.0 - A / 4000.0) * 1.01);
}

TEST(FaceSystem, bracket_of_an_ideal_mixture_is_the_range_of_boiling_points) {
  const Interval bracket =
      temperature_bracket(FaceSystem(testing::simple_mixture({340.0, 360.0}, Ideal(2)), kAtmosphere_Pa));
  EXPECT_NEAR(bracket.lower(), 340.0, 2.0);
  EXPECT_NEAR(bracket.upper(), 360.0, 2.0);
}

}  // namespace
}  // namespace stillshed
