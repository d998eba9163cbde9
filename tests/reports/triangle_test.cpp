#include "reports/triangle.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(TriangleTest, CornersAndCentreAreExact) {
  const Triangle triangle({0.0, 0.0}, 2.0, {0, 1, 2});
  EXPECT_DOUBLE_EQ(triangle.at({1.0, 0.0, 0.0}).x, 1.0);
  EXPECT_DOUBLE_EQ(triangle.at({1.0, 0.0, 0.0}).y, -std::sqrt(3.0));
  EXPECT_DOUBLE_EQ(triangle.at({0.0, 1.0, 0.0}).x, 0.0);
  EXPECT_DOUBLE_EQ(triangle.at({0.0, 0.0, 1.0}).x, 2.0);
  const Point centre = triangle.at({1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0});
  EXPECT_NEAR(centre.x, 1.0, 1e-15);
  EXPECT_NEAR(centre.y, -std::sqrt(3.0) / 3.0, 1e-15);
}

TEST(TriangleTest, TransformAndItsInverseAgree) {
  const Triangle triangle({110.0, 590.0}, 540.0, {2, 0, 1});
  std::mt19937_64 random(3);
  std::exponential_distribution<double> share;
  for (int k = 0; k < 200; ++k) {
    Composition x{share(random), share(random), share(random)};
    const double sum = x[0] + x[1] + x[2];
    for (int i = 0; i < 3; ++i) {
      x[i] /= sum;
    }
    const Composition back = triangle.composition(triangle.at(x));
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(back[i], x[i], 1e-13);
    }
  }
}

TEST(TriangleTest, LowestBoilingComponentOnTop) {
  Survey survey = sample::ternary_survey();
  EXPECT_EQ(corners_by_boiling_point(survey), (std::array<int, 3>{0, 1, 2}));
  survey.pure[0].temperature_K = 400.0;
  EXPECT_EQ(corners_by_boiling_point(survey), (std::array<int, 3>{1, 2, 0}));
}

}  // namespace
}  // namespace stillshed
