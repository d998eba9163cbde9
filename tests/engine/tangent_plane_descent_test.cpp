#include "engine/tangent_plane_descent.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::symmetric_mixture;

constexpr double kTemperature_K = 330.0;

Vec<double> plane_at(const Mixture& mixture, const Composition& x) {
  Vec<double> d = mixture.ln_gamma(kTemperature_K, x);
  for (int i = 0; i < x.size(); ++i) {
    d[i] += std::log(x[i]);
  }
  return d;
}

TEST(TangentPlaneDescent, ends_at_the_other_liquid) {
  const Mixture mixture = symmetric_mixture(2, 3.0);
  const Vec<double> d = plane_at(mixture, {0.5, 0.5});
  const Descent end = TangentPlaneDescent(mixture, kTemperature_K, d).run({1.0, 0.0});
  ASSERT_TRUE(end.converged);
  EXPECT_NEAR(end.w[1], 0.07072018168, 1e-10);  // ln((1 - x)/x) = A (1 - 2x)
  EXPECT_LT(end.tpd, -0.1);
}

TEST(TangentPlaneDescent, the_ends_are_stationary_and_tpd_is_minus_the_log_of_the_amount) {
  // ln w_i + ln g_i(w) - d_i is the same for all i there, and equals tpd.
  const Mixture mixture = symmetric_mixture(3, 2.9);
  const Composition x{0.3, 0.36, 0.34};
  const Vec<double> d = plane_at(mixture, x);
  const TangentPlaneDescent descent(mixture, kTemperature_K, d);
  for (int k = 0; k < 3; ++k) {
    Composition start(3, 0.0);
    start[k] = 1.0;
    const Descent end = descent.run(start);
    ASSERT_TRUE(end.converged);
    const Vec<double> s = plane_at(mixture, end.w);
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(s[i] - d[i], end.tpd, 1e-10);
    }
    EXPECT_NEAR(descent.distance(end.w), end.tpd, 1e-15);
    EXPECT_LE(end.tpd, descent.distance(start));
  }
}

TEST(TangentPlaneDescent, returns_to_a_stable_liquid) {
  const Mixture mixture = symmetric_mixture(3, 1.2);
  const Composition x{0.2, 0.3, 0.5};
  const Vec<double> d = plane_at(mixture, x);
  for (const Composition& start :
       {Composition{1.0, 0.0, 0.0}, Composition{0.0, 0.5, 0.5}, Composition{0.3, 0.3, 0.4}}) {
    const Descent end = TangentPlaneDescent(mixture, kTemperature_K, d).run(start);
    ASSERT_TRUE(end.converged);
    EXPECT_NEAR(end.tpd, 0.0, 1e-15);
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(end.w[i], x[i], 1e-9);
    }
  }
}

TEST(TangentPlaneDescent, very_dilute_components_reach_their_place) {
  // A = 14: the other component is soluble to about exp(-14).
  const Mixture mixture = symmetric_mixture(2, 14.0);
  const Vec<double> d = plane_at(mixture, {0.5, 0.5});
  const Descent end = TangentPlaneDescent(mixture, kTemperature_K, d).run({0.0, 1.0});
  ASSERT_TRUE(end.converged);
  EXPECT_NEAR(std::log((1.0 - end.w[0]) / end.w[0]), 14.0 * (1.0 - 2.0 * end.w[0]), 1e-8);
  EXPECT_LT(end.w[0], 1e-6);
}

TEST(TangentPlaneDescent, exponents_are_bounded) {
  EXPECT_TRUE(std::isfinite(bounded_exp(1e6)));
  EXPECT_GT(bounded_exp(-1e6), 0.0);
  EXPECT_DOUBLE_EQ(bounded_exp(1.0), std::exp(1.0));
}

}  // namespace
}  // namespace stillshed
