#include "reports/binary_plots.hpp"

#include <algorithm>
#include <cmath>

#include "engine/bubble_point.hpp"
#include "params/errors.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/plot_marks.hpp"

namespace stillshed {
namespace {

constexpr double kWidth = 520.0;
constexpr double kLeft = 76.0;
constexpr double kTop = 64.0;
constexpr double kPlotWidth = 414.0;
constexpr double kPlotHeight = 360.0;
constexpr double kLegendTop = kTop + kPlotHeight + 62.0;

std::string text_style(double size, const char* colour, const char* extra = "") {
  return "font-size=\"" + fixed(size, 0) + "\" fill=\"" + colour + "\" " + extra;
}
std::string line_style(const char* colour, double width, const char* extra = "") {
  return std::string("stroke=\"") + colour + "\" stroke-width=\"" + fixed(width, 1) + "\" stroke-linejoin=\"round\" " +
         extra;
}
constexpr const char* kRim =
    "paint-order=\"stroke\" stroke=\"#ffffff\" stroke-width=\"3\" stroke-linejoin=\"round\" font-weight=\"600\"";

/// A square plot with linear axes; x always runs from 0 to 1.
class Frame {
 public:
  Frame(Svg& svg, double low, double high) : svg_(svg), low_(low), high_(high) {}

  Point at(double x, double value) const {
    return {kLeft + kPlotWidth * x, kTop + kPlotHeight * (1.0 - (value - low_) / (high_ - low_))};
  }

  void axes(const std::string& x_name, const std::string& y_name, const TickSteps& ticks, double scale, double offset) {
    svg_.rectangle({kLeft, kTop}, kPlotWidth, kPlotHeight, "fill=\"#ffffff\" " + line_style(ink::kText, 1.4));
    for (int k = 0; k <= 5; ++k) {
      const Point foot = at(0.2 * k, low_);
      if (k > 0 && k < 5) {
        svg_.line(foot, at(0.2 * k, high_), line_style(ink::kGrid, 0.8));
      }
      svg_.line(foot, foot + Point{0, 6}, line_style(ink::kText, 1.2));
      svg_.text(foot + Point{0, 20}, std::to_string(20 * k), text_style(12, ink::kSoft), Anchor::middle);
    }
    const int decimals = ticks.step < 0.1 ? 2 : ticks.step < 1.0 ? 1 : 0;
    for (double tick = ticks.first; tick <= high_ * scale + offset + 1e-9 * ticks.step; tick += ticks.step) {
      const double value = (tick - offset) / scale;
      const Point foot = at(0.0, value);
      if (foot.y < kTop - 0.5 || foot.y > kTop + kPlotHeight + 0.5) {
        continue;
      }
      if (foot.y > kTop + 1.0 && foot.y < kTop + kPlotHeight - 1.0) {
        svg_.line(foot, at(1.0, value), line_style(ink::kGrid, 0.8));
      }
      svg_.line(foot, foot - Point{6, 0}, line_style(ink::kText, 1.2));
      svg_.text(foot + Point{-9, 4}, fixed(tick, decimals), text_style(12, ink::kSoft), Anchor::end);
    }
    svg_.text({kLeft + 0.5 * kPlotWidth, kTop + kPlotHeight + 42.0}, x_name, text_style(13, ink::kText),
              Anchor::middle);
    svg_.text({22.0, kTop + 0.5 * kPlotHeight}, y_name, text_style(13, ink::kText), Anchor::middle, -90.0);
  }

  void curve(const std::vector<Point>& values, const std::string& style) {
    std::vector<Point> line;
    for (const Point& value : values) {
      line.push_back(at(value.x, value.y));
    }
    svg_.polyline(thinned(line, 0.5), style);
  }

 private:
  Svg& svg_;
  double low_;
  double high_;
};

void heading(Svg& svg, const Answer& answer, const std::string& title) {
  svg.text({kLeft + 0.5 * kPlotWidth, 24}, title,
           text_style(fitting_size(title, 16, kWidth - 20), ink::kText, "font-weight=\"600\""), Anchor::middle);
  svg.text({kLeft + 0.5 * kPlotWidth, 44},
           "mole fractions · " + pressure_text(answer.input.pressure_Pa) + " · " + answer.model_kind,
           text_style(13, ink::kSoft), Anchor::middle);
}

const std::string& name(const Answer& answer, int i) {
  return answer.mixture.component(i).id;
}

/// Measured points that can be drawn: given with a composition, near the pressure of the plot.
std::vector<MeasuredMatch> measured_points(const Answer& answer) {
  std::vector<MeasuredMatch> points;
  const auto take = [&points, &answer](const std::vector<MeasuredMatch>& matches) {
    for (const MeasuredMatch& match : matches) {
      const bool near = std::abs(match.pressure_Pa / answer.input.pressure_Pa - 1.0) <= 0.05;
      if (near && !match.says_none && match.x.size() == 2) {
        points.push_back(match);
      }
    }
  };
  for (const auto& matches : answer.measured) {
    take(matches);
  }
  take(answer.measured_only);
  return points;
}

std::string words(const Answer& answer) {
  std::string text =
      name(answer, 0) + " and " + name(answer, 1) + " at " + pressure_text(answer.input.pressure_Pa) + ". ";
  if (answer.survey->azeotropes.empty()) {
    text += "No azeotrope computed.";
  }
  for (const Azeotrope& azeotrope : answer.survey->azeotropes) {
    text += "Azeotrope at " + share_percent(azeotrope.point.x[0]) + " mol% " + name(answer, 0) + ", " +
            celsius(azeotrope.point.temperature_K) + " °C. ";
  }
  return text;
}

}  // namespace

std::optional<BinaryPhases> binary_phases(const Answer& answer) {
  constexpr int kPieces = 100;
  if (answer.mixture.size() != 2 || !answer.survey.has_value()) {
    return std::nullopt;
  }
  BinaryPhases phases;
  double guess_K = 0.0;
  for (int k = 0; k <= kPieces; ++k) {
    const double x = static_cast<double>(k) / kPieces;
    const BubblePoint point = bubble_point(answer.mixture, {x, 1.0 - x}, answer.input.pressure_Pa, guess_K);
    if (point.status != Status::complete) {
      return std::nullopt;
    }
    phases.rows.push_back({x, point.y[0], point.temperature_K});
    guess_K = point.temperature_K;
  }
  return phases;
}

TickSteps tick_steps(double low, double high, int wanted) {
  expects(high > low && wanted > 0, "tick_steps: empty range");
  const double raw = (high - low) / wanted;
  const double power = std::pow(10.0, std::floor(std::log10(raw)));
  double step = 10.0 * power;
  for (const double nice : {1.0, 2.0, 5.0}) {
    if (raw <= nice * power * (1.0 + 1e-9)) {
      step = nice * power;
      break;
    }
  }
  return {std::ceil(low / step - 1e-9) * step, step};
}

std::string temperature_composition_svg(const Answer& answer, const BinaryPhases& phases) {
  expects(answer.mixture.size() == 2 && answer.survey.has_value() && !phases.rows.empty(),
          "T-x-y: two components needed");
  const std::vector<MeasuredMatch> measured = measured_points(answer);
  double low = phases.rows.front().temperature_K;
  double high = low;
  const auto widen = [&](double t) {
    low = std::min(low, t);
    high = std::max(high, t);
  };
  for (const BinaryPhases::Row& row : phases.rows) {
    widen(row.temperature_K);
  }
  for (const MeasuredMatch& match : measured) {
    widen(match.temperature_K.value_or(low));
  }
  const double margin = std::max(0.08 * (high - low), 0.05);
  low -= margin;
  high += margin;

  Legend legend;
  legend.add("liquid at its bubble point", [](Svg& s, Point p) {
    s.line(p - Point{17, 0}, p + Point{17, 0}, line_style(ink::kText, 2.2));
  });
  legend.add("vapour in equilibrium", [](Svg& s, Point p) {
    s.line(p - Point{17, 0}, p + Point{17, 0}, line_style(ink::kBoundary, 2.2, "stroke-dasharray=\"7 4\""));
  });
  if (!answer.survey->azeotropes.empty()) {
    const NodeType node = answer.survey->azeotropes.front().point.node;
    legend.add(std::string("azeotrope, ") + node_words(node), [node](Svg& s, Point p) { draw_node(s, p, node); });
  }
  if (!answer.feed.empty()) {
    legend.add("feed at its bubble point", [](Svg& s, Point p) { draw_star(s, p); });
  }
  if (!measured.empty()) {
    legend.add("measured azeotrope", [](Svg& s, Point p) { draw_measured(s, p); });
  }

  const std::string title = "T-x-y of " + name(answer, 0) + " + " + name(answer, 1);
  Svg svg(kWidth, kLegendTop + legend.height(2) + 8.0, "txy", title, words(answer));
  heading(svg, answer, title);
  Frame frame(svg, low, high);
  frame.axes(name(answer, 0) + ", mol%", "temperature, °C", tick_steps(low - 273.15, high - 273.15, 6), 1.0, -273.15);
  std::vector<Point> liquid;
  std::vector<Point> vapour;
  for (const BinaryPhases::Row& row : phases.rows) {
    liquid.push_back({row.x, row.temperature_K});
    vapour.push_back({row.y, row.temperature_K});
  }
  frame.curve(vapour, line_style(ink::kBoundary, 2.2, "stroke-dasharray=\"7 4\""));
  frame.curve(liquid, line_style(ink::kText, 2.2));

  LabelPlacer placer({kLeft, kTop, kLeft + kPlotWidth, kTop + kPlotHeight});
  for (const std::vector<Point>& values : {liquid, vapour}) {
    std::vector<Point> line;
    for (const Point& value : values) {
      line.push_back(frame.at(value.x, value.y));
    }
    placer.keep_clear(line, 2.0);
  }
  for (const MeasuredMatch& match : measured) {
    if (match.temperature_K.has_value()) {
      const Point at = frame.at(match.x[0], *match.temperature_K);
      draw_measured(svg, at);
      placer.keep_clear({at.x - 6, at.y - 6, at.x + 6, at.y + 6});
    }
  }
  for (const Azeotrope& azeotrope : answer.survey->azeotropes) {
    const Point at = frame.at(azeotrope.point.x[0], azeotrope.point.temperature_K);
    draw_node(svg, at, azeotrope.point.node);
    placer.keep_clear({at.x - 8, at.y - 8, at.x + 8, at.y + 8});
    const std::string label = short_id(azeotrope.point.id) + "  " + celsius(azeotrope.point.temperature_K, 1) + " °C";
    svg.text(placer.place(at, label, 13, 11).baseline, label, text_style(13, ink::kText, kRim));
  }
  if (answer.position.has_value() && !answer.feed.empty()) {
    const Point at = frame.at(answer.feed[0], answer.position->bubble_temperature_K);
    draw_star(svg, at);
    svg.text(placer.place(at, "feed", 13, 12).baseline, "feed", text_style(13, ink::kText, kRim));
  }
  legend.draw(svg, {kLeft - 20.0, kLegendTop}, kPlotWidth + 40.0, 2);
  return svg.finish();
}

std::string vapour_liquid_svg(const Answer& answer, const BinaryPhases& phases) {
  expects(answer.mixture.size() == 2 && answer.survey.has_value() && !phases.rows.empty(),
          "x-y: two components needed");
  const std::vector<MeasuredMatch> measured = measured_points(answer);
  Legend legend;
  legend.add("equilibrium", [](Svg& s, Point p) {
    s.line(p - Point{17, 0}, p + Point{17, 0}, line_style(ink::kText, 2.2));
  });
  legend.add("vapour like the liquid", [](Svg& s, Point p) {
    s.line(p - Point{17, 0}, p + Point{17, 0}, line_style(ink::kSoft, 1.2, "stroke-dasharray=\"3 3\""));
  });
  if (!answer.survey->azeotropes.empty()) {
    const NodeType node = answer.survey->azeotropes.front().point.node;
    legend.add(std::string("azeotrope, ") + node_words(node), [node](Svg& s, Point p) { draw_node(s, p, node); });
  }
  if (!measured.empty()) {
    legend.add("measured azeotrope", [](Svg& s, Point p) { draw_measured(s, p); });
  }
  const std::string title = "x-y of " + name(answer, 0) + " + " + name(answer, 1);
  Svg svg(kWidth, kLegendTop + legend.height(2) + 8.0, "xy", title, words(answer));
  heading(svg, answer, title);
  Frame frame(svg, 0.0, 1.0);
  frame.axes(name(answer, 0) + " in the liquid, mol%", name(answer, 0) + " in the vapour, mol%", {0.0, 20.0}, 100.0,
             0.0);
  frame.curve({{0.0, 0.0}, {1.0, 1.0}}, line_style(ink::kSoft, 1.2, "stroke-dasharray=\"3 3\""));
  std::vector<Point> equilibrium;
  for (const BinaryPhases::Row& row : phases.rows) {
    equilibrium.push_back({row.x, row.y});
  }
  frame.curve(equilibrium, line_style(ink::kText, 2.2));
  for (const MeasuredMatch& match : measured) {
    draw_measured(svg, frame.at(match.x[0], match.x[0]));
  }
  for (const Azeotrope& azeotrope : answer.survey->azeotropes) {
    draw_node(svg, frame.at(azeotrope.point.x[0], azeotrope.point.x[0]), azeotrope.point.node);
  }
  legend.draw(svg, {kLeft - 20.0, kLegendTop}, kPlotWidth + 40.0, 2);
  return svg.finish();
}

}  // namespace stillshed
