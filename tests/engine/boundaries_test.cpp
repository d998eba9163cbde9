#include "engine/boundaries.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "engine/bubble_point.hpp"
#include "engine/geometry.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

Mixture curved() {
  return testing::margules_mixture({330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}},
                                   {3700.0, 4800.0, 4900.0});
}

TEST(Boundaries, SymmetricMixtureHasThreeStraightOnes) {
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const BoundarySet set = find_boundaries(mixture, kAtmosphere_Pa, points, 1e-4);
  ASSERT_EQ(set.status, Status::complete);
  ASSERT_EQ(set.boundaries.size(), 3U);
  for (const Boundary& boundary : set.boundaries) {
    EXPECT_EQ(boundary.confines, Confines::bottoms);
    const Composition& a = boundary.curve.points.front();
    const Composition& b = boundary.curve.points.back();
    for (const Composition& x : boundary.curve.points) {
      EXPECT_LT(nearest_on_curve({a, b}, x).distance, 1e-9);  // by symmetry
    }
  }
}

TEST(Boundaries, CurvedOneFollowsTheField) {
  const Mixture mixture = curved();
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const BoundarySet set = find_boundaries(mixture, kAtmosphere_Pa, points, 1e-4);
  ASSERT_EQ(set.boundaries.size(), 1U);
  const auto& curve = set.boundaries[0].curve.points;
  for (std::size_t k = 1; k + 1 < curve.size(); k += 20) {
    const BubblePoint bubble = bubble_point(mixture, curve[k], kAtmosphere_Pa);
    double dot = 0.0;
    double step = 0.0;
    double field = 0.0;
    for (int i = 0; i < 3; ++i) {
      const double d = curve[k + 1][i] - curve[k - 1][i];
      const double v = curve[k][i] - bubble.y[i];
      dot += d * v;
      step += d * d;
      field += v * v;
    }
    if (field > 1e-6) {  // away from the fixed points the direction of the field is well defined
      EXPECT_GT(dot / std::sqrt(step * field), 0.9999);
    }
  }
}

TEST(Boundaries, StatedErrorIsHonest) {
  const Mixture mixture = curved();
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const auto coarse = find_boundaries(mixture, kAtmosphere_Pa, points, 1e-4).boundaries[0].curve.points;
  const auto fine = find_boundaries(mixture, kAtmosphere_Pa, points, 1e-6).boundaries[0].curve.points;
  for (std::size_t k = 0; k < coarse.size(); k += 7) {
    EXPECT_LT(nearest_on_curve(fine, coarse[k]).distance, 1e-4);
  }
}

}  // namespace
}  // namespace stillshed
