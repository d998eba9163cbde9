#include "engine/flow_map.hpp"

#include <gtest/gtest.h>

#include "tests/engine/hand_charts.hpp"

namespace stillshed {
namespace {

using testing::curved_chart;
using testing::symmetric_chart;
using testing::walled_chart;

TEST(FlowMap, EdgesRunTowardHigherTemperature) {
  const Chart chart = symmetric_chart();
  const FlowMap map(chart, Direction::heating);
  int edges = 0;
  for (const Arc& arc : map.arcs()) {
    edges += arc.boundary.has_value() ? 0 : 1;
    EXPECT_LE(map.nodes()[static_cast<std::size_t>(arc.tail)].temperature_K,
              map.nodes()[static_cast<std::size_t>(arc.head)].temperature_K);
    EXPECT_FALSE(arc.wall);  // every boundary starts at the unstable node
  }
  EXPECT_EQ(edges, 6);
  const FlowMap reversed(chart, Direction::cooling);
  for (const Arc& arc : reversed.arcs()) {
    EXPECT_EQ(arc.wall, arc.boundary.has_value());
  }
}

TEST(FlowMap, SidesOfAWallLeadToTheirSources) {
  const Chart chart = walled_chart({{0.3, 0.3}});
  const FlowMap map(chart, Direction::heating);
  const Arc& wall = map.arcs().back();
  ASSERT_TRUE(wall.wall);
  const auto sides = map.sides(wall);
  ASSERT_TRUE(sides.has_value());
  // In the plane (x_A, x_B) the wall runs from (0.5, 0.5) toward the origin: A = (1, 0) lies on its left.
  EXPECT_EQ(map.nodes()[static_cast<std::size_t>(sides->left_source)].id, "A");
  EXPECT_EQ(map.nodes()[static_cast<std::size_t>(sides->right_source)].id, "B");
  EXPECT_EQ(sides->left.front(), wall.points.front());
}

TEST(FlowMap, FarthestPointMayLieBeyondALeap) {
  // A ray that leaves a dented polygon and comes back.
  const std::vector<Composition> polygon = {{0.0, 0.0, 1.0}, {0.4, 0.0, 0.6}, {0.4, 0.3, 0.3}, {0.6, 0.3, 0.1},
                                            {0.6, 0.0, 0.4}, {1.0, 0.0, 0.0}, {0.0, 1.0, 0.0}};
  const auto end = farthest_on_ray(polygon, {0.0, 0.0, 1.0}, {0.2, 0.1, 0.7});
  ASSERT_TRUE(end.has_value());
  EXPECT_NEAR(end->t, 10.0 / 3.0, 1e-12);
  EXPECT_LT(separation(end->point, {2.0 / 3.0, 1.0 / 3.0, 0.0}), 1e-12);
  EXPECT_EQ(end->point[2], 0.0);
}

TEST(FlowMap, CurveToAnEdgePassesTheSaddle) {
  const Chart chart = curved_chart();
  const FlowMap map(chart, Direction::heating);
  const auto curve = map.curve_to(chart.regions[1], {0.0, 0.5, 0.5});
  ASSERT_TRUE(curve.has_value());
  EXPECT_EQ(curve->size(), chart.boundaries[0].curve.points.size() + 1);
  EXPECT_EQ(curve->front(), chart.fixed_points[0].x);
  // Not on the rim of the other region.
  EXPECT_FALSE(map.curve_to(chart.regions[0], {0.0, 0.5, 0.5}).has_value());
}

TEST(FlowMap, RegionsAreFoundFromTheInsideAndTheRim) {
  const Chart chart = symmetric_chart();
  EXPECT_EQ(region_at(chart, {0.6, 0.25, 0.15}), 0);
  EXPECT_EQ(region_at(chart, {0.15, 0.6, 0.25}), 1);
  EXPECT_EQ(region_at(chart, {0.15, 0.25, 0.6}), 2);
  EXPECT_TRUE(region_at(chart, {0.4, 0.4, 0.2}).has_value());
  EXPECT_EQ(region_at(testing::binary_chart(0.3, true), {0.9, 0.1}), 0);
  EXPECT_EQ(region_at(testing::binary_chart(0.3, true), {0.1, 0.9}), 1);
}

}  // namespace
}  // namespace stillshed
