#include "engine/bubble_point.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using testing::simple_mixture;
using testing::square_matrix;
using testing::symmetric_mixture;

/// NRTL whose ln gamma moves with temperature.
Mixture warm_nrtl() {
  NrtlParameters parameters(3);
  parameters.tau.a = square_matrix({{0.0, 0.6, 0.2}, {-0.7, 0.0, 0.1}, {0.4, 1.6, 0.0}});
  parameters.tau.b_K = square_matrix({{0.0, 100.0, 50.0}, {30.0, 0.0, 200.0}, {60.0, 300.0, 0.0}});
  parameters.alpha = square_matrix({{0.0, 0.3, 0.3}, {0.3, 0.0, 0.2}, {0.3, 0.2, 0.0}});
  return simple_mixture({329.0, 334.0, 352.0}, Nrtl(parameters), {3700.0, 3900.0, 4600.0});
}

Composition random_composition(std::mt19937_64& random, int n) {
  Composition x(n);
  double sum = 0.0;
  std::uniform_real_distribution<double> uniform(1e-9, 1.0);
  for (double& value : x) {
    value = -std::log(uniform(random));
    sum += value;
  }
  for (double& value : x) {
    value /= sum;
  }
  return x;
}

double boiling_residual(const Mixture& mixture, const Composition& x, double temperature_K, double pressure_Pa) {
  const Vec<double> ln_k = mixture.ln_k(temperature_K, x, std::log(pressure_Pa));
  double sum = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    sum += x[i] * std::exp(ln_k[i]);
  }
  return sum - 1.0;
}

TEST(BubblePoint, symmetric_azeotrope_in_closed_form) {
  // gE = A x1 x2, equal components: at x = 1/2, ln gamma = A/4, so 1/T = 1/350 + A/(4 * 4000).
  const BubblePoint point = bubble_point(symmetric_mixture(2, 1.2), {0.5, 0.5}, kAtmosphere_Pa);
  ASSERT_EQ(point.status, Status::complete);
  EXPECT_NEAR(point.temperature_K, 1.0 / (1.0 / 350.0 + 1.2 / 16000.0), 1e-9);
  EXPECT_NEAR(point.y[0], 0.5, 1e-13);
  EXPECT_NEAR(point.k[1], 1.0, 1e-12);
  EXPECT_GT(point.slope, 0.0);
}

TEST(BubblePoint, pure_component_boils_at_its_boiling_point_and_absent_ones_have_a_k) {
  const Mixture mixture = margules_mixture({350.0, 340.0, 360.0}, {{0.0, 1.0, 0.5}, {1.0, 0.0, 0.3}, {0.5, 0.3, 0.0}});
  const BubblePoint point = bubble_point(mixture, {1.0, 0.0, 0.0}, kAtmosphere_Pa);
  ASSERT_EQ(point.status, Status::complete);
  EXPECT_NEAR(point.temperature_K, 350.0, 1e-9);
  EXPECT_EQ(point.y[1], 0.0);
  EXPECT_NEAR(point.k[1], std::exp(1.0 + 4000.0 * (1.0 / 340.0 - 1.0 / 350.0)), 1e-9);
}

TEST(BubblePoint, solves_the_equation_at_random_compositions_pressures_and_guesses) {
  const Mixture mixture = warm_nrtl();
  std::mt19937_64 random(11);
  for (int k = 0; k < 300; ++k) {
    const Composition x = random_composition(random, 3);
    const double pressure = std::exp(std::uniform_real_distribution<double>(std::log(1e3), std::log(1e6))(random));
    const double guess = std::uniform_real_distribution<double>(220.0, 480.0)(random);
    const BubblePoint point = bubble_point(mixture, x, pressure, k % 2 == 0 ? guess : 0.0);
    ASSERT_EQ(point.status, Status::complete);
    EXPECT_NEAR(boiling_residual(mixture, x, point.temperature_K, pressure), 0.0, 3e-12);
    const Vec<double> ln_k = mixture.ln_k(point.temperature_K, x, std::log(pressure));
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(point.k[i], std::exp(ln_k[i]), 3e-12 * point.k[i]);
      EXPECT_NEAR(point.y[i], x[i] * point.k[i], 3e-12);
    }
  }
}

TEST(BubblePoint, few_evaluations_from_a_close_guess) {
  const Mixture mixture = warm_nrtl();
  const Composition x{0.3, 0.3, 0.4};
  const double temperature_K = bubble_point(mixture, x, kAtmosphere_Pa).temperature_K;
  EXPECT_LE(bubble_point(mixture, x, kAtmosphere_Pa, temperature_K + 0.5).evaluations, 3);
  EXPECT_LE(bubble_point(symmetric_mixture(3, 1.2), x, kAtmosphere_Pa, 339.0).evaluations, 3);
}

TEST(BubblePoint, gradient_equals_central_differences_along_the_simplex) {
  const Mixture mixture = warm_nrtl();
  std::mt19937_64 random(5);
  for (int k = 0; k < 20; ++k) {
    const Composition x = random_composition(random, 3);
    const BubblePoint point = bubble_point(mixture, x, kAtmosphere_Pa);
    const BubbleGradient gradient = bubble_gradient(mixture, x, kAtmosphere_Pa, point);
    const double h = 1e-5 * std::min(std::min(x[0], x[1]), x[2]);
    for (int a = 1; a < 3; ++a) {
      Composition up = x;
      Composition down = x;
      up[a] += h;
      up[0] -= h;
      down[a] -= h;
      down[0] += h;
      const BubblePoint above = bubble_point(mixture, up, kAtmosphere_Pa);
      const BubblePoint below = bubble_point(mixture, down, kAtmosphere_Pa);
      const double scale = 1e-11 / h;
      EXPECT_NEAR(gradient.dT_dx[a] - gradient.dT_dx[0], (above.temperature_K - below.temperature_K) / (2.0 * h),
                  1e-4 + scale);
      for (int i = 0; i < 3; ++i) {
        EXPECT_NEAR(gradient.dy_dx(i, a) - gradient.dy_dx(i, 0), (above.y[i] - below.y[i]) / (2.0 * h), 1e-6 + scale);
      }
    }
  }
}

TEST(BubblePoint, gradient_at_a_vertex_gives_the_infinite_dilution_k) {
  const Mixture mixture = warm_nrtl();
  const Composition x{1.0, 0.0, 0.0};
  const BubblePoint point = bubble_point(mixture, x, kAtmosphere_Pa);
  const BubbleGradient gradient = bubble_gradient(mixture, x, kAtmosphere_Pa, point);
  EXPECT_NEAR(gradient.dy_dx(1, 1) - gradient.dy_dx(1, 0), point.k[1], 1e-11);
  EXPECT_NEAR(gradient.dy_dx(2, 2) - gradient.dy_dx(2, 0), point.k[2], 1e-11);
}

TEST(BubblePoint, several_boiling_temperatures_are_reported_not_hidden) {
  // ln gamma that falls steeply with T (tau = a + f T): F rises to a maximum near 350 K and falls again.
  NrtlParameters parameters(2);
  parameters.tau.a = square_matrix({{0.0, 23.46}, {23.46, 0.0}});
  parameters.tau.f_per_K = square_matrix({{0.0, -0.0653}, {-0.0653, 0.0}});
  parameters.alpha = square_matrix({{0.0, 0.01}, {0.01, 0.0}});
  const Mixture mixture = simple_mixture({350.0, 350.0}, Nrtl(parameters));
  const Composition x{0.5, 0.5};
  int changes = 0;
  double previous = -1.0;
  for (double temperature_K = 211.0; temperature_K < 559.0; temperature_K += 0.5) {
    const double residual = boiling_residual(mixture, x, temperature_K, kAtmosphere_Pa);
    changes += (residual > 0.0) != (previous > 0.0) ? 1 : 0;
    previous = residual;
  }
  ASSERT_GT(changes, 1) << "the example must have several roots";
  const BubblePoint point = bubble_point_scanned(mixture, x, kAtmosphere_Pa);
  EXPECT_EQ(point.status, Status::undecided);
  EXPECT_EQ(point.reason, Reason::multiple_bubble_points);
}

TEST(BubblePoint, scan_agrees_with_the_fast_path_where_the_root_is_alone) {
  const Mixture mixture = warm_nrtl();
  const Composition x{0.2, 0.3, 0.5};
  const BubblePoint scanned = bubble_point_scanned(mixture, x, kAtmosphere_Pa);
  ASSERT_EQ(scanned.status, Status::complete);
  EXPECT_NEAR(scanned.temperature_K, bubble_point(mixture, x, kAtmosphere_Pa).temperature_K, 1e-9);
}

TEST(BubblePoint, wrong_sizes_are_our_own_fault) {
  EXPECT_THROW((void)bubble_point(symmetric_mixture(2, 1.0), {1.0}, kAtmosphere_Pa), LogicError);
  EXPECT_THROW((void)bubble_point(symmetric_mixture(2, 1.0), {0.5, 0.5}, 0.0), LogicError);
}

}  // namespace
}  // namespace stillshed
