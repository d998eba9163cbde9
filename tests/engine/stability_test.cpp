#include "engine/stability.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <cstdlib>
#include <random>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::margules_mixture;
using testing::simple_mixture;
using testing::square_matrix;
using testing::symmetric_mixture;

constexpr double kTemperature_K = 330.0;  // Margules constants do not depend on it
const Composition kMiddle{1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0};

/// Binodal of gE = A x1 x2: ln((1 - x)/x) = A (1 - 2x), lower solution, by bisection.
double binodal(double A) {
  double low = 1e-12;
  double high = 0.5 - std::sqrt(0.25 - 0.5 / A);  // the spinodal
  for (int k = 0; k < 200; ++k) {
    const double x = 0.5 * (low + high);
    (std::log((1.0 - x) / x) > A * (1.0 - 2.0 * x) ? low : high) = x;
  }
  return 0.5 * (low + high);
}

TEST(Stability, pure_liquid_is_stable) {
  const StabilityResult result = test_stability(symmetric_mixture(2, 3.0), kTemperature_K, {0.0, 1.0});
  EXPECT_EQ(result.outcome, Stability::stable);
  EXPECT_TRUE(result.proved);
}

TEST(Stability, binary_on_both_sides_of_its_binodal) {
  for (const double A : {2.2, 3.0, 5.0}) {
    const Mixture mixture = symmetric_mixture(2, A);
    const double edge = binodal(A);
    for (const double shift : {-0.1, -1e-3, 1e-3, 0.1}) {
      const double x = edge * (1.0 + shift);
      const StabilityResult result = test_stability(mixture, kTemperature_K, {x, 1.0 - x});
      EXPECT_EQ(result.outcome, shift < 0.0 ? Stability::stable : Stability::unstable) << A << " " << shift;
      EXPECT_TRUE(result.proved);
    }
  }
}

TEST(Stability, binary_middle_splits_into_the_binodal_compositions) {
  const double edge = binodal(3.0);
  const StabilityResult result = test_stability(symmetric_mixture(2, 3.0), kTemperature_K, {0.5, 0.5});
  EXPECT_EQ(result.outcome, Stability::unstable);
  EXPECT_NEAR(std::min(result.incipient[0], result.incipient[1]), edge, 1e-8);
  // tpd there: ln x + A (1-x)^2 - ln(1/2) - A/4, the same for both components by symmetry.
  EXPECT_NEAR(result.tpd_min, std::log(2.0 * edge) + 3.0 * (1.0 - edge) * (1.0 - edge) - 0.75, 1e-12);
}

TEST(Stability, a_liquid_on_its_binodal_is_not_concluded) {
  const double edge = binodal(3.0);
  const StabilityResult result = test_stability(symmetric_mixture(2, 3.0), kTemperature_K, {edge, 1.0 - edge});
  EXPECT_EQ(result.outcome, Stability::not_concluded);
  EXPECT_FALSE(result.proved);
  EXPECT_NEAR(result.tpd_min, 0.0, kTpdNoise);
}

TEST(Stability, the_critical_point_itself_is_not_concluded) {
  StabilityOptions options;
  options.max_boxes = 5000;
  const StabilityResult result = test_stability(symmetric_mixture(2, 2.0), kTemperature_K, {0.5, 0.5}, options);
  EXPECT_EQ(result.outcome, Stability::not_concluded);
  EXPECT_FALSE(result.proved);
}

/// gE = A sum x_i x_j at the barycentre of n components: the plane is touched from below when
/// A = 2 (n - 1) ln(n - 1)/(n - 2), at one fraction (n - 1)/n and the others 1/(n (n - 1)); 4 ln 2 for n = 3.
double turning_point(int n) {
  return 2.0 * (n - 1) * std::log(n - 1.0) / (n - 2.0);
}

TEST(Stability, symmetric_barycentre_turns_where_the_closed_form_says) {
  StabilityOptions options;
  options.proof_up_to = 4;
  for (const int n : {3, 4, 5, 8}) {
    const Composition middle(n, 1.0 / n);
    for (const double below : {2.0, 0.5, 1e-2}) {
      const StabilityResult result =
          test_stability(symmetric_mixture(n, turning_point(n) - below), kTemperature_K, middle, options);
      EXPECT_EQ(result.outcome, Stability::stable) << n << " " << below;
      EXPECT_EQ(result.proved, n <= 4) << n << " " << below;
      EXPECT_EQ(result.tpd_min, 0.0);
    }
    for (const double above : {1e-3, 0.05, 0.6}) {
      const StabilityResult result =
          test_stability(symmetric_mixture(n, turning_point(n) + above), kTemperature_K, middle, options);
      EXPECT_EQ(result.outcome, Stability::unstable) << n << " " << above;
      EXPECT_TRUE(result.proved) << n << " " << above;
    }
  }
}

TEST(Stability, at_the_turn_nothing_is_concluded) {
  StabilityOptions options;
  options.max_boxes = 20000;
  const StabilityResult result =
      test_stability(symmetric_mixture(3, turning_point(3)), kTemperature_K, kMiddle, options);
  EXPECT_EQ(result.outcome, Stability::not_concluded);
}

TEST(Stability, locally_convex_and_yet_unstable) {
  // gE = 2.9 (x1 x2 + x1 x3 + x2 x3) at the barycentre: curvature 1 - A/3 > 0, three other liquids below the plane.
  const Mixture mixture = symmetric_mixture(3, 2.9);
  EXPECT_NEAR(softest_direction(mixture, kTemperature_K, kMiddle).curvature, 1.0 - 2.9 / 3.0, 1e-12);
  const StabilityResult result = test_stability(mixture, kTemperature_K, kMiddle);
  EXPECT_EQ(result.outcome, Stability::unstable);
  EXPECT_NEAR(result.tpd_min, -0.0148135601, 1e-9);
  double largest = 0.0;
  for (const double w : result.incipient) {
    largest = std::max(largest, w);
  }
  EXPECT_NEAR(largest, 0.76847413, 1e-7);
}

TEST(Stability, locally_convex_and_yet_unstable_without_symmetry) {
  const Mixture mixture =
      margules_mixture({350.0, 350.0, 350.0}, {{0.0, 2.86, 2.8}, {2.86, 0.0, 2.84}, {2.8, 2.84, 0.0}});
  const Composition x{0.335, 0.34, 0.325};
  EXPECT_GT(softest_direction(mixture, kTemperature_K, x).curvature, 0.0);
  const StabilityResult result = test_stability(mixture, kTemperature_K, x);
  EXPECT_EQ(result.outcome, Stability::unstable);
  EXPECT_NEAR(result.tpd_min, -0.010849, 1e-6);
}

TEST(Stability, absent_components_are_left_out) {
  // A and B alone are stable; a little of C would split them.
  const Mixture mixture = margules_mixture({350.0, 350.0, 350.0}, {{0.0, 1.0, 6.0}, {1.0, 0.0, 6.0}, {6.0, 6.0, 0.0}});
  const StabilityResult face = test_stability(mixture, kTemperature_K, {0.5, 0.5, 0.0});
  EXPECT_EQ(face.outcome, Stability::stable);
  EXPECT_EQ(face.incipient.size(), 3);
  const StabilityResult with_c = test_stability(mixture, kTemperature_K, {0.45, 0.45, 0.1});
  EXPECT_EQ(with_c.outcome, Stability::unstable);
  EXPECT_GT(with_c.incipient[2], 0.8);
}

TEST(Stability, mixed_faces_give_the_incipient_in_mixture_order) {
  const Mixture mixture = margules_mixture({350.0, 350.0, 350.0}, {{0.0, 1.0, 3.0}, {1.0, 0.0, 1.0}, {3.0, 1.0, 0.0}});
  const StabilityResult result = test_stability(mixture, kTemperature_K, {0.5, 0.0, 0.5});
  EXPECT_EQ(result.outcome, Stability::unstable);
  EXPECT_EQ(result.incipient[1], 0.0);
  EXPECT_NEAR(std::min(result.incipient[0], result.incipient[2]), binodal(3.0), 1e-8);
}

TEST(Stability, traces_do_not_disturb_the_answer) {
  const Mixture mixture = symmetric_mixture(3, 1.5);
  const StabilityResult result = test_stability(mixture, kTemperature_K, {1e-9, 0.4, 0.6 - 1e-9});
  EXPECT_EQ(result.outcome, Stability::stable);
  EXPECT_TRUE(result.proved);
}

TEST(Stability, convex_models_need_no_search) {
  PairParameters lambda(3);
  lambda.a = square_matrix({{0.0, -2.0, -1.5}, {-2.5, 0.0, -2.0}, {-1.0, -3.0, 0.0}});
  const std::vector<double> boiling_points(3, 350.0);
  const Mixture wilson = simple_mixture(boiling_points, Wilson(lambda));
  EXPECT_TRUE(never_splits(wilson));
  const StabilityResult result = test_stability(wilson, kTemperature_K, kMiddle);
  EXPECT_EQ(result.outcome, Stability::stable);
  EXPECT_TRUE(result.proved);
  // The theorem against the general proof, and on a grid.
  for (double a = 0.05; a < 1.0; a += 0.1) {
    for (double b = 0.05; a + b < 1.0; b += 0.1) {
      const Composition x{a, b, 1.0 - a - b};
      EXPECT_GT(softest_direction(wilson, kTemperature_K, x).curvature, 0.0);
      EXPECT_GE(tangent_plane_distance(wilson, kTemperature_K, kMiddle, x), -1e-14);
    }
  }
  EXPECT_FALSE(never_splits(symmetric_mixture(3, 0.1)));
  // A correction on top is no longer convex: here it splits.
  std::vector<MixtureComponent> components = wilson.components();
  const Mixture corrected(components, Wilson(lambda), RedlichKister(3, {{0, 1, {6.0}}}));
  EXPECT_FALSE(never_splits(corrected));
  EXPECT_EQ(test_stability(corrected, kTemperature_K, {0.5, 0.45, 0.05}).outcome, Stability::unstable);
}

TEST(Stability, mixtures_beyond_the_proof_say_so) {
  StabilityOptions options;
  options.proof_up_to = 2;
  const StabilityResult result = test_stability(symmetric_mixture(3, 1.2), kTemperature_K, kMiddle, options);
  EXPECT_EQ(result.outcome, Stability::stable);
  EXPECT_FALSE(result.proved);
}

TEST(Stability, an_unstable_liquid_is_never_called_stable) {
  // Oracle: a fine grid over the triangle. Random NRTL mixtures, half of them strongly nonideal.
  std::mt19937_64 random(2024);
  std::uniform_real_distribution<double> tau(-0.5, 3.2);
  std::uniform_real_distribution<double> share(0.02, 1.0);
  int unstable = 0;
  int proved = 0;
  const int cases = std::getenv("STILLSHED_FULL") != nullptr ? 2000 : 120;
  for (int k = 0; k < cases; ++k) {
    NrtlParameters parameters(3);
    for (int i = 0; i < 3; ++i) {
      for (int j = 0; j < 3; ++j) {
        parameters.tau.a(i, j) = i == j ? 0.0 : tau(random);
        parameters.alpha(i, j) = i == j ? 0.0 : 0.25;
      }
    }
    const Mixture mixture = simple_mixture({350.0, 350.0, 350.0}, Nrtl(parameters));
    Composition x{share(random), share(random), share(random)};
    const double sum = x[0] + x[1] + x[2];
    for (double& value : x) {
      value /= sum;
    }
    double lowest = 0.0;
    constexpr int kGrid = 60;
    for (int a = 1; a < kGrid; ++a) {
      for (int b = 1; a + b < kGrid; ++b) {
        const Composition w{a / static_cast<double>(kGrid), b / static_cast<double>(kGrid),
                            1.0 - (a + b) / static_cast<double>(kGrid)};
        lowest = std::min(lowest, tangent_plane_distance(mixture, kTemperature_K, x, w));
      }
    }
    const StabilityResult result = test_stability(mixture, kTemperature_K, x);
    if (lowest < -1e-10) {
      EXPECT_EQ(result.outcome, Stability::unstable) << "case " << k << ", grid minimum " << lowest;
    }
    EXPECT_LE(result.tpd_min, lowest + 1e-9) << "case " << k;
    unstable += result.outcome == Stability::unstable ? 1 : 0;
    proved += result.proved ? 1 : 0;
  }
  EXPECT_GT(unstable, cases / 10);
  EXPECT_LT(unstable, cases - cases / 10);
  EXPECT_GT(proved, cases - cases / 20);
}

TEST(Stability, softest_direction_points_along_the_split) {
  const Mixture mixture = margules_mixture({350.0, 350.0, 350.0}, {{0.0, 1.8, 0.2}, {1.8, 0.0, 0.2}, {0.2, 0.2, 0.0}});
  const Softness softness = softest_direction(mixture, kTemperature_K, {0.4, 0.4, 0.2});
  EXPECT_NEAR(softness.curvature, 1.0 - 1.8 * 0.4, 1e-12);
  EXPECT_NEAR(softness.direction[0], -softness.direction[1], 1e-12);
  EXPECT_NEAR(softness.direction[2], 0.0, 1e-12);
}

}  // namespace
}  // namespace stillshed
