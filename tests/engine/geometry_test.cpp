#include "engine/geometry.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace stillshed {
namespace {

const std::vector<Composition> kTriangle = {{1.0, 0.0, 0.0}, {0.0, 1.0, 0.0}, {0.0, 0.0, 1.0}};

TEST(Geometry, TriangleIsEquilateralAndHasAreaOne) {
  for (std::size_t k = 0; k < 3; ++k) {
    const PlanePoint a = to_plane(kTriangle[k]);
    const PlanePoint b = to_plane(kTriangle[(k + 1) % 3]);
    EXPECT_NEAR(std::hypot(a.x - b.x, a.y - b.y), 1.0, 1e-15);
  }
  EXPECT_NEAR(area_share(kTriangle), 1.0, 1e-15);
  EXPECT_NEAR(area_share({kTriangle[0], kTriangle[2], kTriangle[1]}), -1.0, 1e-15);
}

TEST(Geometry, InsideAndInteriorPoint) {
  const std::vector<Composition> sliver = {{1.0, 0.0, 0.0}, {0.0, 1.0, 0.0}, {0.49, 0.49, 0.02}};
  EXPECT_TRUE(inside_polygon(sliver, {0.495, 0.495, 0.01}));
  EXPECT_FALSE(inside_polygon(sliver, {0.4, 0.4, 0.2}));
  EXPECT_TRUE(inside_polygon(sliver, interior_point(sliver)));
}

TEST(Geometry, NearestPointOfAPolyline) {
  const std::vector<Composition> line = {{1.0, 0.0, 0.0}, {0.0, 0.5, 0.5}};
  const NearestOnCurve on = nearest_on_curve(line, {0.5, 0.35, 0.15});
  // By symmetry of components 1 and 2 the foot has equal shares of both: (0.5, 0.25, 0.25), distance 0.1 sqrt 2.
  EXPECT_NEAR(on.distance, 0.1 * std::sqrt(2.0), 1e-15);
  EXPECT_NEAR(on.point[1], 0.25, 1e-15);
}

TEST(Geometry, CrossingsOfALineAndAPolyline) {
  const std::vector<Composition> wall = {{1.0, 0.0, 0.0}, {0.5, 0.25, 0.25}, {0.0, 0.5, 0.5}};
  const auto found = crossings({0.2, 0.8, 0.0}, {0.2, 0.0, 0.8}, wall);
  ASSERT_EQ(found.size(), 1U);
  EXPECT_NEAR(found[0].s, 0.5, 1e-14);
  EXPECT_EQ(found[0].segment, 1U);
  EXPECT_TRUE(crossings({0.2, 0.8, 0.0}, {0.2, 0.5, 0.3}, wall).empty());
}

}  // namespace
}  // namespace stillshed
