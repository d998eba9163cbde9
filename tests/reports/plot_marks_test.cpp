#include "reports/plot_marks.hpp"

#include <gtest/gtest.h>

#include <set>

#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(PlotMarks, EveryNodeTypeHasItsOwnShape) {
  std::set<std::string> pictures;
  for (const NodeType node : {NodeType::stable_node, NodeType::unstable_node, NodeType::saddle, NodeType::degenerate}) {
    Svg svg(20, 20, "m", "t", "d");
    draw_node(svg, {10, 10}, node);
    pictures.insert(svg.finish());
  }
  EXPECT_EQ(pictures.size(), 4U);
}

TEST(PlotMarks, LegendIsWellFormedAndHoldsItsWords) {
  Legend legend;
  legend.add("stable <node>", [](Svg& svg, Point at) { draw_node(svg, at, NodeType::stable_node); });
  legend.add("feed", [](Svg& svg, Point at) { draw_star(svg, at); });
  legend.add("measured", [](Svg& svg, Point at) { draw_measured(svg, at); });
  EXPECT_DOUBLE_EQ(legend.height(2), legend.height(1) / 3.0 * 2.0);
  Svg svg(200, 100, "m", "t", "d");
  legend.draw(svg, {0, 0}, 200, 2);
  draw_arrow(svg, {5, 5}, {1, 0}, 8, ink::kCurve);
  const std::string text = svg.finish();
  EXPECT_TRUE(testing_support::is_valid(text, "xml"));
  EXPECT_NE(text.find("stable &lt;node&gt;"), std::string::npos);
}

TEST(PlotMarks, OverlapArea) {
  EXPECT_DOUBLE_EQ(overlap_area({0, 0, 2, 2}, {1, 1, 3, 3}), 1.0);
  EXPECT_DOUBLE_EQ(overlap_area({0, 0, 1, 1}, {1, 0, 2, 1}), 0.0);
}

TEST(PlotMarks, LongTextIsSetSmaller) {
  EXPECT_DOUBLE_EQ(fitting_size("short", 17, 700), 17.0);
  const std::string name(120, 'x');
  EXPECT_LT(fitting_size(name, 17, 700), 17.0);
  EXPECT_LE(text_width(name, fitting_size(name, 17, 700)), 700.0 + 1e-9);
  EXPECT_DOUBLE_EQ(fitting_size(std::string(1000, 'x'), 17, 700), 9.0);
}

TEST(PlotMarks, LabelsKeepApart) {
  LabelPlacer placer({0, 0, 400, 400});
  placer.keep_clear(Rectangle{190, 190, 210, 210});
  placer.keep_clear({{0, 200}, {400, 200}}, 3.0);
  std::vector<Rectangle> areas;
  for (int k = 0; k < 8; ++k) {
    const LabelPlacer::Place place = placer.place({200, 200}, "az1 55.2", 13, 11);
    EXPECT_DOUBLE_EQ(place.cost, 0.0) << k;
    EXPECT_GE(place.area.left, 0.0);
    EXPECT_LE(place.area.right, 400.0);
    for (const Rectangle& other : areas) {
      EXPECT_DOUBLE_EQ(overlap_area(place.area, other), 0.0);
    }
    areas.push_back(place.area);
  }
}

}  // namespace
}  // namespace stillshed
