#include "reports/plot_marks.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "reports/format.hpp"

namespace stillshed {
namespace {

constexpr const char* kOutline = "stroke=\"#1b2b34\" stroke-width=\"1.6\"";

std::string filled(const char* colour) {
  return std::string("fill=\"") + colour + "\" " + kOutline;
}

}  // namespace

void draw_node(Svg& svg, Point at, NodeType node, double radius) {
  const double r = radius * 1.25;
  switch (node) {
    case NodeType::stable_node: svg.circle(at, radius, filled(ink::kText)); return;
    case NodeType::unstable_node: svg.circle(at, radius, filled("#ffffff")); return;
    case NodeType::saddle:
      svg.polygon({at + Point{0, -r}, at + Point{r, 0}, at + Point{0, r}, at + Point{-r, 0}}, filled("#ffffff"));
      svg.polygon({at + Point{0, -r}, at + Point{0, r}, at + Point{-r, 0}}, filled(ink::kText));
      return;
    case NodeType::degenerate:
      svg.rectangle(at + Point{-radius, -radius}, 2 * radius, 2 * radius, filled("#ffffff"));
      svg.line(at + Point{-radius, -radius}, at + Point{radius, radius}, kOutline);
      svg.line(at + Point{-radius, radius}, at + Point{radius, -radius}, kOutline);
      return;
  }
}

void draw_star(Svg& svg, Point at, double radius) {
  std::vector<Point> points;
  for (int k = 0; k < 10; ++k) {
    const double angle = std::numbers::pi * (0.2 * k - 0.5);
    const double r = k % 2 == 0 ? radius : 0.45 * radius;
    points.push_back(at + r * Point{std::cos(angle), std::sin(angle)});
  }
  svg.polygon(points, std::string("fill=\"") + ink::kFeed + "\" stroke=\"#1b2b34\" stroke-width=\"1.2\"");
}

void draw_measured(Svg& svg, Point at, double radius) {
  for (const auto& [colour, width] : {std::pair("#ffffff", "4"), std::pair(ink::kText, "1.6")}) {
    const std::string style = std::string("stroke=\"") + colour + "\" stroke-width=\"" + width + "\"";
    svg.line(at + Point{-radius, -radius}, at + Point{radius, radius}, style);
    svg.line(at + Point{-radius, radius}, at + Point{radius, -radius}, style);
  }
}

void draw_arrow(Svg& svg, Point at, Point direction, double size, const char* colour) {
  const Point across{-direction.y, direction.x};
  svg.polygon({at + 0.5 * size * direction, at - 0.5 * size * direction + 0.42 * size * across,
               at - 0.25 * size * direction, at - 0.5 * size * direction - 0.42 * size * across},
              std::string("fill=\"") + colour + "\"");
}

const char* node_words(NodeType node) {
  switch (node) {
    case NodeType::stable_node: return "stable node";
    case NodeType::unstable_node: return "unstable node";
    case NodeType::saddle: return "saddle";
    case NodeType::degenerate: return "degenerate";
  }
  return "degenerate";
}

namespace {
constexpr double kLegendRow = 22.0;
}

void Legend::add(std::string words, Draw draw) {
  entries_.push_back({std::move(words), std::move(draw)});
}

double Legend::height(int columns) const {
  const auto rows = (static_cast<int>(entries_.size()) + columns - 1) / columns;
  return kLegendRow * rows;
}

void Legend::draw(Svg& svg, Point corner, double width, int columns) const {
  const int rows = (static_cast<int>(entries_.size()) + columns - 1) / columns;
  for (std::size_t k = 0; k < entries_.size(); ++k) {
    const int column = static_cast<int>(k) / rows;
    const int row = static_cast<int>(k) % rows;
    const Point at = corner + Point{column * width / columns, kLegendRow * (row + 0.5)};
    entries_[k].draw(svg, at + Point{17.0, 0.0});
    svg.text(at + Point{42.0, 4.5}, entries_[k].words, std::string("font-size=\"13\" fill=\"") + ink::kText + "\"");
  }
}

double overlap_area(const Rectangle& a, const Rectangle& b) {
  const double width = std::min(a.right, b.right) - std::max(a.left, b.left);
  const double height = std::min(a.bottom, b.bottom) - std::max(a.top, b.top);
  return width > 0.0 && height > 0.0 ? width * height : 0.0;
}

double text_width(std::string_view text, double font_size) {
  return 0.56 * font_size * display_width(text);
}

double fitting_size(std::string_view text, double font_size, double width) {
  return std::clamp(font_size * width / std::max(text_width(text, font_size), 1.0), std::min(9.0, font_size),
                    font_size);
}

void LabelPlacer::keep_clear(const std::vector<Point>& polyline, double weight) {
  constexpr double kStep = 4.0;
  for (std::size_t k = 1; k < polyline.size(); ++k) {
    const Point step = polyline[k] - polyline[k - 1];
    const int pieces = std::max(1, static_cast<int>(length(step) / kStep));
    for (int piece = 0; piece <= pieces; ++piece) {
      spots_.push_back({polyline[k - 1] + (static_cast<double>(piece) / pieces) * step, weight});
    }
  }
}

double LabelPlacer::cost(const Rectangle& area) const {
  const double size = (area.right - area.left) * (area.bottom - area.top);
  double sum = 50.0 * (size - overlap_area(area, canvas_));
  for (const Rectangle& other : areas_) {
    sum += 20.0 * overlap_area(area, other);
  }
  for (const Spot& spot : spots_) {
    if (spot.at.x > area.left - 1 && spot.at.x < area.right + 1 && spot.at.y > area.top - 1 &&
        spot.at.y < area.bottom + 1) {
      sum += 20.0 * spot.weight;
    }
  }
  return sum;
}

LabelPlacer::Place LabelPlacer::place(Point anchor, std::string_view text, double font_size, double gap) {
  const double width = text_width(text, font_size);
  const double height = font_size;
  Place best;
  double least = -1.0;
  for (const double distance : {gap, gap + 8.0, gap + 18.0, gap + 32.0}) {
    for (int k = 0; k < 16; ++k) {
      const double angle = std::numbers::pi * k / 8.0;
      const Point towards{std::cos(angle), std::sin(angle)};
      const Point centre = anchor + Point{towards.x * (distance + 0.5 * width), towards.y * (distance + 0.5 * height)};
      const Rectangle area{centre.x - 0.5 * width, centre.y - 0.5 * height, centre.x + 0.5 * width,
                           centre.y + 0.5 * height};
      const double here = cost(area);
      const double judged = here + 2.0 * (distance - gap);
      if (least < 0.0 || judged < least) {
        least = judged;
        best = {{area.left, area.bottom - 0.2 * height}, area, here};
      }
    }
  }
  areas_.push_back(best.area);
  return best;
}

}  // namespace stillshed
