#include "reports/html_parts.hpp"

#include <algorithm>
#include <cmath>

#include "params/errors.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/plot_marks.hpp"

namespace stillshed {

std::string element(std::string_view tag, std::string_view text, std::string_view css_class) {
  std::string markup(1, '<');
  markup += tag;
  if (!css_class.empty()) {
    markup.append(" class=\"").append(css_class).append("\"");
  }
  markup.append(">").append(escape_markup(text)).append("</").append(tag).append(">");
  return markup;
}

void HtmlTable::column(std::string heading, bool number) {
  headings_.push_back(std::move(heading));
  numeric_.push_back(number);
}

void HtmlTable::row(std::vector<std::string> cells) {
  expects(cells.size() == headings_.size(), "HtmlTable: a row needs one cell per column");
  rows_.push_back(std::move(cells));
}

std::string HtmlTable::markup() const {
  std::string text = "<table>\n<caption>" + escape_markup(caption_) + "</caption>\n<thead><tr>";
  const auto css = [this](std::size_t c) { return numeric_[c] ? " class=\"number\"" : ""; };
  for (std::size_t c = 0; c < headings_.size(); ++c) {
    text += std::string("<th scope=\"col\"") + css(c) + ">" + escape_markup(headings_[c]) + "</th>";
  }
  text += "</tr></thead>\n<tbody>\n";
  for (const auto& cells : rows_) {
    text += "<tr>";
    for (std::size_t c = 0; c < cells.size(); ++c) {
      text += c == 0 ? "<th scope=\"row\"" : "<td";
      text += css(c);
      text += ">" + cells[c] + (c == 0 ? "</th>" : "</td>");
    }
    text += "</tr>\n";
  }
  return text + "</tbody>\n</table>\n";
}

namespace {

std::string percent_lines(const Answer& answer, const Composition& x, const std::vector<double>& fractions) {
  std::string lines;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      lines += lines.empty() ? "" : "<br/>";
      lines += escape_markup(answer.mixture.component(i).id) + "&#160;" +
               escape_markup(share_percent(fractions[static_cast<std::size_t>(i)]));
    }
  }
  return lines;
}

bool only_one(const Composition& x) {
  return std::count_if(x.begin(), x.end(), [](double v) { return v > 0.0; }) == 1;
}

}  // namespace

std::string mole_percent_lines(const Answer& answer, const Composition& x) {
  if (only_one(x)) {
    const auto i = static_cast<int>(std::max_element(x.begin(), x.end()) - x.begin());
    return escape_markup(answer.mixture.component(i).id + "\u00a0> 99.99");
  }
  return percent_lines(answer, x, {x.begin(), x.end()});
}

std::string mass_percent_lines(const Answer& answer, const Composition& x) {
  if (only_one(x)) {
    return mole_percent_lines(answer, x);
  }
  return percent_lines(answer, x, mass_fractions(answer.mixture, x));
}

std::string test_markup(const ProductTest& test, const Mixture& mixture) {
  std::string text = test_text(test, mixture);
  const std::string sign = test.at_least ? ">=" : "<=";
  return escape_markup(text.replace(text.rfind(sign), 2, test.at_least ? "\u2265" : "\u2264"));
}

std::string verdict_badge(Verdict verdict) {
  return "<span class=\"badge " + std::string(to_string(verdict)) + "\">" + verdict_word(verdict) + "</span>";
}

std::string place_words(const Answer& answer, const std::string& id) {
  for (const FixedPoint& point : fixed_points(answer)) {
    if (point.id == id && !point.pure()) {
      return "the azeotrope " + short_id(id) + " (" + member_names(answer.mixture, point.members) + ", " +
             celsius(point.temperature_K) + " °C)";
    }
  }
  if (answer.chart.has_value()) {
    for (const Boundary& boundary : answer.chart->boundaries) {
      if (boundary.id == id) {
        const auto& points = answer.chart->fixed_points;
        return "the boundary " + id + " (" + short_id(points[static_cast<std::size_t>(boundary.from)].id) + " to " +
               short_id(points[static_cast<std::size_t>(boundary.to)].id) + ")";
      }
    }
  }
  return id;
}

double nines(double purity) {
  constexpr double kMost = 5.0;
  return purity >= 1.0 - std::pow(10.0, -kMost) ? kMost : std::max(0.0, -std::log10(1.0 - purity));
}

namespace {

constexpr double kGaugeLeft = 14.0;
constexpr double kGaugeWidth = 600.0;

double gauge_x(double purity) {
  return kGaugeLeft + kGaugeWidth * nines(purity) / 5.0;
}

const TestOutcome* purity_test(const ProductOutcome& outcome) {
  for (const TestOutcome& item : outcome.tests) {
    if (item.test.what == ProductTest::What::purity && item.test.at_least) {
      return &item;
    }
  }
  return nullptr;
}

}  // namespace

std::string purity_gauge(const Answer& answer, const ProductOutcome& outcome) {
  const TestOutcome* asked = purity_test(outcome);
  const bool by_mole = asked != nullptr && asked->test.basis == Basis::mole;
  const double limit = by_mole ? outcome.purity_limit_mole : outcome.purity_limit_mass;
  const auto index = static_cast<std::size_t>(outcome.component);
  const double feed = by_mole ? answer.feed[outcome.component] : mass_fractions(answer.mixture, answer.feed)[index];
  const std::string unit = by_mole ? " mol%" : " wt%";
  const std::string& name = answer.mixture.component(outcome.component).id;
  std::string words = "Feed " + share_percent(feed) + unit + ", limit " + limit_percent(limit) + unit;
  if (asked != nullptr) {
    words += ", asked " + significant(100.0 * asked->test.value, 6) + unit;
  }
  Svg svg(kGaugeLeft + kGaugeWidth + 60.0, 58.0, "gauge-" + std::to_string(outcome.component),
          "How far " + name + " gets", words + ".");
  constexpr double kBar = 24.0;
  const std::string label = std::string("font-size=\"12\" fill=\"") + ink::kSoft + "\"";
  svg.rectangle({kGaugeLeft, kBar - 6}, kGaugeWidth, 12, "fill=\"#eef2f3\" stroke=\"#b8c4ca\" stroke-width=\"1\"");
  const double end = gauge_x(limit);
  if (end > kGaugeLeft) {
    svg.rectangle({kGaugeLeft, kBar - 6}, end - kGaugeLeft, 12, std::string("fill=\"") + ink::kCurve + "\"");
  }
  const char* ticks[] = {"0", "90", "99", "99.9", "99.99", "99.999"};
  for (int k = 0; k <= 5; ++k) {
    const double x = kGaugeLeft + kGaugeWidth * k / 5.0;
    svg.line({x, kBar + 6}, {x, kBar + 12}, std::string("stroke=\"") + ink::kSoft + "\"");
    svg.text({x, kBar + 25}, std::string(ticks[k]) + (k == 5 ? unit : ""), label,
             k == 0 ? Anchor::start : Anchor::middle);
  }
  if (limit >= 1.0 - 1e-5) {
    draw_arrow(svg, {kGaugeLeft + kGaugeWidth + 6, kBar}, {1.0, 0.0}, 14.0, ink::kCurve);
  } else {
    svg.line({end, kBar - 12}, {end, kBar + 8}, std::string("stroke=\"") + ink::kBoundary + "\" stroke-width=\"4\"");
  }
  if (asked != nullptr) {
    const double x = gauge_x(asked->test.value);
    svg.line({x, kBar - 18}, {x, kBar + 6}, std::string("stroke=\"") + ink::kText + "\" stroke-width=\"1.6\"");
    svg.polygon({{x, kBar - 20}, {x + 12, kBar - 15}, {x, kBar - 10}}, std::string("fill=\"") + ink::kText + "\"");
    svg.text({x + 16, kBar - 11}, "asked", label);
  }
  draw_star(svg, {gauge_x(feed), kBar}, 8.0);
  return svg.finish();
}

std::string evidence_words(std::string_view mark) {
  if (mark == "M") {
    return "measured within 0.5 K and 1 mol% at this pressure";
  }
  if (mark == "F") {
    return "fitted to data, inside its range";
  }
  if (mark == "X") {
    return "fitted, stretched beyond its range";
  }
  if (mark == "P") {
    return "predicted from groups";
  }
  if (mark == "U") {
    return "your own number, unjudged";
  }
  return "nothing: a parameter is missing";
}

}  // namespace stillshed
