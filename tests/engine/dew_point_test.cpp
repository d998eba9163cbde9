#include "engine/dew_point.hpp"

#include <gtest/gtest.h>

#include "engine/bubble_point.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using testing::symmetric_mixture;

const std::vector<std::vector<double>> kModest = {{0.0, 1.4, 0.5}, {1.4, 0.0, -0.8}, {0.5, -0.8, 0.0}};

TEST(DewPoint, inverts_the_bubble_point) {
  const Mixture mixture = margules_mixture({340.0, 350.0, 365.0}, kModest);
  for (double a = 0.05; a < 0.95; a += 0.1) {
    for (double b = 0.05; a + b < 0.98; b += 0.1) {
      const Composition x{a, b, 1.0 - a - b};
      const BubblePoint boiling = bubble_point(mixture, x, kAtmosphere_Pa);
      const DewPoint dew = dew_point(mixture, boiling.y, kAtmosphere_Pa);
      ASSERT_EQ(dew.status, Status::complete);
      EXPECT_NEAR(dew.temperature_K, boiling.temperature_K, 1e-8);
      for (int i = 0; i < 3; ++i) {
        EXPECT_NEAR(dew.x[i], x[i], 1e-9);
      }
    }
  }
}

TEST(DewPoint, absent_components_stay_absent) {
  const Mixture mixture = margules_mixture({340.0, 350.0, 365.0}, kModest);
  const DewPoint dew = dew_point(mixture, {0.4, 0.0, 0.6}, kAtmosphere_Pa);
  ASSERT_EQ(dew.status, Status::complete);
  EXPECT_EQ(dew.x[1], 0.0);
  const BubblePoint boiling = bubble_point(mixture, dew.x, kAtmosphere_Pa, dew.temperature_K);
  EXPECT_NEAR(boiling.y[0], 0.4, 1e-9);
  EXPECT_NEAR(boiling.temperature_K, dew.temperature_K, 1e-8);
}

TEST(DewPoint, pure_vapour) {
  const DewPoint dew = dew_point(symmetric_mixture(2, 1.0), {0.0, 1.0}, kAtmosphere_Pa);
  ASSERT_EQ(dew.status, Status::complete);
  EXPECT_NEAR(dew.temperature_K, 350.0, 1e-9);
  EXPECT_NEAR(dew.x[1], 1.0, 1e-14);
}

TEST(DewPoint, strongly_nonideal_vapour_still_satisfies_the_equations) {
  const Mixture mixture = symmetric_mixture(2, 3.0);
  for (const double y : {0.02, 0.1, 0.3, 0.45, 0.55, 0.9}) {
    const DewPoint dew = dew_point(mixture, {y, 1.0 - y}, kAtmosphere_Pa);
    ASSERT_EQ(dew.status, Status::complete) << y;
    const BubblePoint boiling = bubble_point(mixture, dew.x, kAtmosphere_Pa, dew.temperature_K);
    EXPECT_NEAR(boiling.y[0], y, 1e-8);
    EXPECT_NEAR(boiling.temperature_K, dew.temperature_K, 1e-7);
  }
}

TEST(DewPoint, a_guess_selects_its_solution) {
  // With two liquids the single-liquid equations have three solutions at y = 1/2; by symmetry x = 1/2 is the middle
  // one.
  const Mixture mixture = symmetric_mixture(2, 3.0);
  const DewPoint left = dew_point(mixture, {0.5, 0.5}, kAtmosphere_Pa, 331.6, {0.07, 0.93});
  const DewPoint right = dew_point(mixture, {0.5, 0.5}, kAtmosphere_Pa, 331.6, {0.93, 0.07});
  ASSERT_EQ(left.status, Status::complete);
  ASSERT_EQ(right.status, Status::complete);
  EXPECT_NEAR(left.x[0], 0.07072018168, 1e-9);  // closed form: ln((1-x)/x) = A (1 - 2x)
  EXPECT_NEAR(right.x[1], 0.07072018168, 1e-9);
  EXPECT_NEAR(left.temperature_K, 331.58210291, 1e-7);
}

}  // namespace
}  // namespace stillshed
