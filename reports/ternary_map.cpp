#include "reports/ternary_map.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "params/errors.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/plot_marks.hpp"
#include "reports/triangle.hpp"

namespace stillshed {
namespace {

constexpr double kWidth = 760.0;
constexpr double kSide = 540.0;
constexpr Point kLeftCorner{110.0, 590.0};
constexpr double kLegendTop = 672.0;
constexpr double kNameWeight = 6.0;  ///< a label over the name of an edge is worse than one over a curve

constexpr std::array<const char*, 6> kTints = {"#f6efdf", "#e3edf2", "#ece7f3", "#e6efe0", "#f5e6e4", "#edeeee"};

std::string text_style(double size, const char* colour, const char* extra = "") {
  return "font-size=\"" + fixed(size, 0) + "\" fill=\"" + colour + "\" " + extra;
}
/// A white rim keeps text legible where a line passes under it.
constexpr const char* kRim = "paint-order=\"stroke\" stroke=\"#ffffff\" stroke-width=\"3\" stroke-linejoin=\"round\"";

std::string line_style(const char* colour, double width, const char* dash = nullptr) {
  std::string style =
      std::string("stroke=\"") + colour + "\" stroke-width=\"" + fixed(width, 1) + "\" stroke-linejoin=\"round\"";
  if (dash != nullptr) {
    style += std::string(" stroke-dasharray=\"") + dash + "\"";
  }
  return style;
}

const char* dash_of(Confines confines) {
  return confines == Confines::overheads ? "9 4" : nullptr;
}

class MapDrawing {
 public:
  explicit MapDrawing(const Answer& answer)
      : answer_(answer),
        triangle_(kLeftCorner, kSide, corners_by_boiling_point(*answer.survey)),
        placer_({8.0, 60.0, kWidth - 8.0, kLegendTop - 4.0}),
        points_(fixed_points(answer)) {
    make_legend();
  }

  std::string draw() {
    const double height = kLegendTop + legend_.height(2) + 30.0;
    const std::string title = "Residue-curve map of " + member_names(answer_.mixture, {0, 1, 2}, ", ");
    Svg svg(kWidth, height, "map", title, ternary_map_words(answer_));
    svg_ = &svg;
    heading(title);
    regions();
    grid();
    curves();
    boundaries();
    pot_path();
    frame();
    marks();
    labels();
    legend_.draw(svg, {110.0, kLegendTop}, kWidth - 130.0, 2);
    svg.text({110.0, height - 8.0},
             "Corners by rising boiling point: top, left, right. Ticks run along their grid lines.",
             text_style(12, ink::kSoft));
    return svg.finish();
  }

 private:
  std::vector<Point> path(const std::vector<Composition>& points) const {
    std::vector<Point> line;
    for (const Composition& x : points) {
      line.push_back(triangle_.at(x));
    }
    return thinned(line, 0.7);
  }
  const Chart* chart() const { return answer_.chart.has_value() ? &*answer_.chart : nullptr; }

  void heading(const std::string& title) {
    svg_->text({kWidth / 2, 24}, title,
               text_style(fitting_size(title, 17, kWidth - 20), ink::kText, "font-weight=\"600\""), Anchor::middle);
    svg_->text({kWidth / 2, 45},
               "mole fractions · " + pressure_text(answer_.input.pressure_Pa) + " · " + answer_.model_kind,
               text_style(13, ink::kSoft), Anchor::middle);
  }

  void regions() {
    const std::vector<Point> whole = {triangle_.corner(0), triangle_.corner(1), triangle_.corner(2)};
    svg_->polygon(whole, "fill=\"#ffffff\"");
    if (chart() == nullptr) {
      return;
    }
    for (std::size_t k = 0; k < chart()->regions.size(); ++k) {
      const Region& region = chart()->regions[k];
      if (region.polygon.size() >= 3) {
        svg_->polygon(path(region.polygon), std::string("fill=\"") + kTints[k % kTints.size()] + "\"");
      }
    }
  }

  /// Point on the edge that carries the k-th corner's component, at this mole fraction of it.
  Point on_edge(int k, double fraction) const {
    return fraction * triangle_.corner(k) + (1.0 - fraction) * triangle_.corner((k + 1) % 3);
  }
  /// Direction in which the grid lines of the k-th corner's component leave the triangle there.
  Point outwards(int k) const {
    const Point step = triangle_.corner((k + 1) % 3) - triangle_.corner((k + 2) % 3);
    return (1.0 / length(step)) * step;
  }

  void grid() {
    for (int k = 0; k < 3; ++k) {
      for (int tick = 1; tick < 10; ++tick) {
        const double fraction = 0.1 * tick;
        const Point far = fraction * triangle_.corner(k) + (1.0 - fraction) * triangle_.corner((k + 2) % 3);
        const bool major = tick % 2 == 0;
        svg_->line(on_edge(k, fraction), far, line_style(major ? "#cbd5da" : ink::kGrid, major ? 0.8 : 0.6));
      }
    }
  }

  void frame() {
    svg_->polygon({triangle_.corner(0), triangle_.corner(1), triangle_.corner(2)},
                  "fill=\"none\" " + line_style(ink::kText, 1.6));
    for (int k = 0; k < 3; ++k) {
      placer_.keep_clear({triangle_.corner(k), triangle_.corner((k + 1) % 3)}, 3.0);
      const Point out = outwards(k);
      for (int tick = 2; tick < 10; tick += 2) {
        const Point at = on_edge(k, 0.1 * tick);
        svg_->line(at, at + 8.0 * out, line_style(ink::kText, 1.2));
        const Anchor anchor = k == 0 ? Anchor::end : Anchor::start;
        const Point place = at + 11.0 * out + Point{0.0, k == 1 ? 10.0 : 4.0};
        svg_->text(place, std::to_string(10 * tick), text_style(12, ink::kSoft), anchor);
        const double x = k == 0 ? place.x - 14.0 : place.x;
        placer_.keep_clear({x, place.y - 10.0, x + 14.0, place.y});
      }
      axis_name(k);
    }
  }

  /// The name along an edge; labels keep clear of it.
  void axis_name(int k) {
    const std::string& id = answer_.mixture.component(triangle_.component(k)).id;
    const std::string words = k == 1 ? "← " + id + ", mol%" : id + ", mol% →";
    const Point middle = on_edge(k, 0.5) + (k == 0   ? Point{-46.0, -24.0}
                                            : k == 1 ? Point{0.0, 40.0}
                                                     : Point{46.0, -24.0});
    const double degrees = k == 0 ? -60.0 : k == 1 ? 0.0 : 60.0;
    svg_->text(middle, words, text_style(13, ink::kText), Anchor::middle, degrees);
    const double half = 0.5 * text_width(words, 13.0);
    const double radians = degrees * std::numbers::pi / 180.0;
    const Point along{half * std::cos(radians), half * std::sin(radians)};
    for (const double above : {0.0, 10.0}) {  // foot and head of the letters
      const Point centre = middle + Point{above * std::sin(radians), -above * std::cos(radians)};
      placer_.keep_clear({centre - along, centre + along}, kNameWeight);
    }
  }

  void curve(const std::vector<Point>& line, const std::string& style, const char* colour, double arrow) {
    if (line.size() < 2) {
      return;
    }
    svg_->polyline(line, style);
    const double size = polyline_length(line);
    const std::vector<double> shares = size > 260.0 ? std::vector<double>{0.33, 0.7} : std::vector<double>{0.55};
    if (size < 30.0) {
      return;
    }
    for (const double share : shares) {
      const PointOnLine spot = point_along(line, share);
      draw_arrow(*svg_, spot.at, spot.direction, arrow, colour);
    }
  }

  void curves() {
    if (chart() != nullptr) {
      for (const ResidueCurve& item : chart()->curves) {
        const std::vector<Point> line = path(item.curve.points);
        placer_.keep_clear(line, 0.4);
        curve(line, line_style(ink::kCurve, 1.1), ink::kCurve, 9.0);
      }
    }
    if (answer_.position.has_value()) {
      const std::vector<Point> line = path(answer_.position->residue_curve.curve.points);
      placer_.keep_clear(line, 0.4);
      curve(line, line_style(ink::kCurve, 1.1), ink::kCurve, 9.0);
    }
  }

  void boundaries() {
    if (chart() == nullptr) {
      return;
    }
    for (const Boundary& boundary : chart()->boundaries) {
      const std::vector<Point> line = path(boundary.curve.points);
      placer_.keep_clear(line, 3.0);
      curve(line, line_style(ink::kBoundary, 3.2, dash_of(boundary.confines)), ink::kBoundary, 13.0);
    }
  }

  void pot_path() {
    if (!answer_.reach.has_value()) {
      return;
    }
    for (const Batch& batch : answer_.reach->batch) {
      if (batch.mode != Batch::Mode::rectifier || batch.cuts.empty()) {
        continue;
      }
      std::vector<Point> line = {triangle_.at(batch.cuts.front().pot_start)};
      for (const Cut& cut : batch.cuts) {
        line.push_back(triangle_.at(cut.pot_end));
      }
      placer_.keep_clear(line, 1.0);
      svg_->polyline(line, line_style("#ffffff", 4.4));
      svg_->polyline(line, line_style(ink::kText, 2.2, "2 4"));
    }
  }

  void marks() {
    const auto mark = [this](const Composition& x, const auto& draw, double clear) {
      const Point at = triangle_.at(x);
      draw(at);
      placer_.keep_clear({at.x - clear, at.y - clear, at.x + clear, at.y + clear});
    };
    for (const FixedPoint& point : points_) {
      mark(
          point.x, [&](Point at) { draw_node(*svg_, at, point.node); }, 8.0);
    }
    for (const auto& matches : answer_.measured) {
      for (const MeasuredMatch& match : matches) {
        if (drawn(match)) {
          mark(
              match.x, [&](Point at) { draw_measured(*svg_, at, 4.5); }, 6.0);
        }
      }
    }
    if (!answer_.feed.empty()) {
      mark(
          answer_.feed, [&](Point at) { draw_star(*svg_, at); }, 9.0);
    }
  }
  /// Measured near the pressure of the map, and with a composition.
  static bool drawn(const MeasuredMatch& match) { return !match.x.empty() && match.dx.has_value(); }

  void corner_labels() {
    for (int k = 0; k < 3; ++k) {
      const int i = triangle_.component(k);
      const std::string name = answer_.mixture.component(i).id;
      const std::string boils = celsius(answer_.survey->pure[static_cast<std::size_t>(i)].temperature_K, 1) + " °C";
      const Point corner = triangle_.corner(k);
      const double wide = std::max(text_width(name, 15), 60.0);
      Point at = corner + Point{0.0, -30.0};
      if (k == 1) {
        at = {std::max(corner.x, 12.0 + 0.5 * wide), corner.y + 30.0};
      } else if (k == 2) {
        at = {std::min(corner.x, kWidth - 12.0 - 0.5 * wide), corner.y + 30.0};
      }
      svg_->text(at, name, text_style(15, ink::kText, "font-weight=\"600\""), Anchor::middle);
      svg_->text(at + Point{0.0, 17.0}, boils, text_style(13, ink::kText), Anchor::middle);
      placer_.keep_clear({at.x - 0.5 * wide, at.y - 14.0, at.x + 0.5 * wide, at.y + 20.0});
    }
  }

  void labels() {
    corner_labels();
    const auto label = [this](Point anchor, const std::string& words, double size, double gap,
                              const std::string& style) {
      svg_->text(placer_.place(anchor, words, size, gap).baseline, words, style);
    };
    for (const FixedPoint& point : points_) {
      if (!point.pure()) {
        label(triangle_.at(point.x), short_id(point.id) + "  " + celsius(point.temperature_K, 1) + " °C", 13.0, 11.0,
              text_style(13, ink::kText, kRim) + " font-weight=\"600\"");
      }
    }
    if (!answer_.feed.empty()) {
      label(triangle_.at(answer_.feed), "feed", 13.0, 12.0, text_style(13, ink::kText, kRim) + " font-weight=\"600\"");
    }
    if (chart() == nullptr) {
      return;
    }
    for (const Boundary& boundary : chart()->boundaries) {
      const std::vector<Point> line = path(boundary.curve.points);
      if (line.size() >= 2) {
        label(point_along(line, 0.5).at, boundary.id, 13.0, 7.0,
              text_style(13, ink::kBoundary, kRim) + " font-weight=\"600\"");
      }
    }
    for (const Region& region : chart()->regions) {
      if (region.polygon.size() >= 3 && chart()->regions.size() > 1) {
        label(middle_of(path(region.polygon)), region.id, 13.0, 0.0,
              text_style(13, ink::kSoft, kRim) + " font-style=\"italic\"");
      }
    }
  }

  /// Centre of area of a polygon; for a bent region it may lie outside, then the placer moves the label little.
  static Point middle_of(const std::vector<Point>& polygon) {
    double area = 0.0;
    Point sum{};
    for (std::size_t k = 0; k < polygon.size(); ++k) {
      const Point a = polygon[k];
      const Point b = polygon[(k + 1) % polygon.size()];
      const double cross = a.x * b.y - b.x * a.y;
      area += cross;
      sum = sum + cross * (a + b);
    }
    return std::abs(area) > 1e-9 ? (1.0 / (3.0 * area)) * sum : polygon.front();
  }

  bool shows(NodeType node) const {
    return std::any_of(points_.begin(), points_.end(), [node](const FixedPoint& p) { return p.node == node; });
  }

  void make_legend() {
    for (const NodeType node :
         {NodeType::stable_node, NodeType::saddle, NodeType::unstable_node, NodeType::degenerate}) {
      if (shows(node)) {
        std::string words = node_words(node);
        words += node == NodeType::stable_node     ? ": curves end here"
                 : node == NodeType::unstable_node ? ": curves start here"
                 : node == NodeType::saddle        ? ": curves pass by"
                                                   : ": type not decided";
        legend_.add(words, [node](Svg& svg, Point at) { draw_node(svg, at, node); });
      }
    }
    const auto any_boundary = [this](Confines confines) {
      return chart() != nullptr && std::any_of(chart()->boundaries.begin(), chart()->boundaries.end(),
                                               [confines](const Boundary& b) { return b.confines == confines; });
    };
    for (const Confines confines : {Confines::bottoms, Confines::overheads}) {
      if (any_boundary(confines)) {
        legend_.add(std::string("boundary, confines ") + to_string(confines), [confines](Svg& svg, Point at) {
          svg.line(at - Point{17, 0}, at + Point{17, 0}, line_style(ink::kBoundary, 3.2, dash_of(confines)));
        });
      }
    }
    if ((chart() != nullptr && !chart()->curves.empty()) || answer_.position.has_value()) {
      legend_.add("residue curve, to higher temperature", [](Svg& svg, Point at) {
        svg.line(at - Point{17, 0}, at + Point{17, 0}, line_style(ink::kCurve, 1.1));
        draw_arrow(svg, at, {1.0, 0.0}, 9.0, ink::kCurve);
      });
    }
    if (!answer_.feed.empty()) {
      legend_.add("feed", [](Svg& svg, Point at) { draw_star(svg, at); });
    }
    if (answer_.reach.has_value() && !answer_.reach->batch.empty()) {
      legend_.add("way of the pot, batch rectifier", [](Svg& svg, Point at) {
        svg.line(at - Point{17, 0}, at + Point{17, 0}, line_style(ink::kText, 2.2, "2 4"));
      });
    }
    for (const auto& matches : answer_.measured) {
      if (std::any_of(matches.begin(), matches.end(), drawn)) {
        legend_.add("measured azeotrope", [](Svg& svg, Point at) { draw_measured(svg, at, 4.5); });
        break;
      }
    }
  }

  const Answer& answer_;
  Triangle triangle_;
  LabelPlacer placer_;
  std::vector<FixedPoint> points_;
  Legend legend_;
  Svg* svg_ = nullptr;
};

}  // namespace

std::string ternary_map_svg(const Answer& answer) {
  expects(answer.mixture.size() == 3 && answer.survey.has_value(), "ternary map: three components and a survey needed");
  return MapDrawing(answer).draw();
}

std::string ternary_map_words(const Answer& answer) {
  std::string words =
      "Triangle in mole fractions at " + pressure_text(answer.input.pressure_Pa) + ". Points by temperature: ";
  const std::vector<FixedPoint> points = fixed_points(answer);
  for (std::size_t k = 0; k < points.size(); ++k) {
    words += (k > 0 ? "; " : "") + points[k].id + " " + celsius(points[k].temperature_K, 1) + " °C, " +
             node_words(points[k].node);
  }
  words += ".";
  if (!answer.chart.has_value()) {
    return words;
  }
  for (const Boundary& boundary : answer.chart->boundaries) {
    words += " Boundary " + boundary.id + " runs from " + points[static_cast<std::size_t>(boundary.from)].id + " to " +
             points[static_cast<std::size_t>(boundary.to)].id + " and confines " + to_string(boundary.confines) + ".";
  }
  words += " Regions: " + std::to_string(answer.chart->regions.size()) + ".";
  if (answer.position.has_value() && answer.position->region.has_value()) {
    words += " The feed lies in region " +
             answer.chart->regions[static_cast<std::size_t>(*answer.position->region)].id + ".";
  }
  return words;
}

}  // namespace stillshed
