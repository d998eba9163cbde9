#include "reports/svg.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "params/errors.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(Svg, IsWellFormedWithTitleAndDescription) {
  Svg svg(100, 50, "p\"1", "Title <1> & more", "What it \"shows\"");
  svg.line({0, 0}, {10.123, 20.5}, "stroke=\"#000\"");
  svg.polyline({{0, 0}, {1, 2}}, "stroke=\"#000\"");
  svg.polygon({{0, 0}, {1, 2}, {3, 4}}, "fill=\"#fff\"");
  svg.circle({5, 5}, 2, "");
  svg.rectangle({1, 1}, 2, 3, "");
  svg.text({1, 2}, "a < b", "font-size=\"12\"", Anchor::middle, -60.0);
  const std::string text = svg.finish();
  EXPECT_TRUE(testing_support::is_valid(text, "xml")) << text;
  EXPECT_NE(text.find("Title &lt;1&gt; &amp; more</title>"), std::string::npos);
  EXPECT_NE(text.find("aria-labelledby"), std::string::npos);
  EXPECT_NE(text.find("x2=\"10.12\" y2=\"20.5\""), std::string::npos) << text;
  EXPECT_NE(text.find("rotate(-60 1 2)"), std::string::npos) << text;
}

TEST(Svg, RefusesBrokenCoordinates) {
  Svg svg(10, 10, "p", "t", "d");
  EXPECT_THROW(svg.circle({std::nan(""), 0}, 1, ""), LogicError);
}

TEST(Svg, ThinningKeepsBothEnds) {
  std::vector<Point> points;
  for (int k = 0; k <= 100; ++k) {
    points.push_back({0.1 * k, 0.0});
  }
  const std::vector<Point> kept = thinned(points, 1.0);
  EXPECT_LE(kept.size(), 12U);
  EXPECT_DOUBLE_EQ(kept.front().x, 0.0);
  EXPECT_DOUBLE_EQ(kept.back().x, 10.0);
  EXPECT_EQ(thinned({{0, 0}, {0.1, 0}}, 1.0).size(), 2U);
}

TEST(Svg, PointAlongALine) {
  const std::vector<Point> line = {{0, 0}, {3, 0}, {3, 0}, {3, 1}};
  EXPECT_DOUBLE_EQ(polyline_length(line), 4.0);
  const PointOnLine middle = point_along(line, 0.5);
  EXPECT_DOUBLE_EQ(middle.at.x, 2.0);
  EXPECT_DOUBLE_EQ(middle.direction.x, 1.0);
  const PointOnLine end = point_along(line, 1.0);
  EXPECT_DOUBLE_EQ(end.at.y, 1.0);
  EXPECT_DOUBLE_EQ(end.direction.y, 1.0);
}

}  // namespace
}  // namespace stillshed
