#include <algorithm>
#include <cmath>

#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/html_parts.hpp"
#include "reports/html_sections.hpp"
#include "reports/plot_marks.hpp"
#include "reports/ternary_map.hpp"

namespace stillshed {
namespace {

/// Tiers C and D are not shown as facts.
bool shown(const MeasuredMatch& match) {
  return match.tier == 'A' || match.tier == 'B';
}

std::string measured_cell(const Answer& answer, const MeasuredMatch& match) {
  std::string text;
  if (match.says_none) {
    text = "no azeotrope, according to the source";
  } else if (match.temperature_K.has_value()) {
    text = escape_markup(celsius(*match.temperature_K)) + " °C";
  } else {
    text = "temperature not given";
  }
  if (!match.x.empty()) {
    text += "<br/>" + mole_percent_lines(answer, match.x);
  }
  if (match.heterogeneous) {
    text += "<br/>two liquids";
  }
  if (std::abs(match.pressure_Pa / answer.input.pressure_Pa - 1.0) > 0.001) {
    text += "<br/>at " + pressure_text(match.pressure_Pa);
  }
  if (match.dT_K.has_value()) {
    text += "<br/>ours " + fixed(std::abs(*match.dT_K), 2) + (*match.dT_K < 0.0 ? " K lower" : " K higher");
  }
  if (match.dx.has_value()) {
    text += "<br/>apart by " + fixed(100.0 * *match.dx, 1) + " mol%";
  }
  text += "<br/>" + element("span", match.source + (match.tier == 'B' ? " (from memory)" : ""), "source");
  return text;
}

std::string measured_cells(const Answer& answer, std::size_t k) {
  std::string text;
  if (k < answer.measured.size()) {
    for (const MeasuredMatch& match : answer.measured[k]) {
      if (shown(match)) {
        text += (text.empty() ? "" : "<hr/>") + measured_cell(answer, match);
      }
    }
  }
  return text.empty() ? "no measurement on file" : text;
}

std::string stability_words(const StabilityResult& result) {
  switch (result.outcome) {
    case Stability::stable: return result.proved ? "one liquid, proved" : "one liquid, searched";
    case Stability::unstable: return "splits";
    case Stability::not_concluded: return "not concluded";
  }
  return "not concluded";
}

const char* boiling_words(Boiling boiling) {
  switch (boiling) {
    case Boiling::minimum: return "minimum boiling";
    case Boiling::maximum: return "maximum boiling";
    case Boiling::saddle: return "neither minimum nor maximum";
    case Boiling::inflection: return "tangent";
  }
  return "";
}

std::string azeotrope_table(const Answer& answer) {
  HtmlTable table("Azeotropes of the mixture and of all its sub-mixtures");
  table.column("Point");
  table.column("Boils at, °C", true);
  table.column("mol%", true);
  table.column("wt%", true);
  table.column("Kind");
  table.column("Measured");
  table.column("Mark");
  for (std::size_t k = 0; k < answer.survey->azeotropes.size(); ++k) {
    const Azeotrope& azeotrope = answer.survey->azeotropes[k];
    const std::string mark = azeotrope_evidence(answer, k);
    table.row({element("b", short_id(azeotrope.point.id)) + "<br/>" +
                   escape_markup(member_names(answer.mixture, azeotrope.point.members)),
               celsius(azeotrope.point.temperature_K), mole_percent_lines(answer, azeotrope.point.x),
               mass_percent_lines(answer, azeotrope.point.x),
               std::string(azeotrope.cluster ? "not told apart, " : "") + boiling_words(azeotrope.boiling) + "<br/>" +
                   node_words(azeotrope.point.node) + "<br/>" + stability_words(azeotrope.stability),
               measured_cells(answer, k), "<abbr title=\"" + evidence_words(mark) + "\">" + mark + "</abbr>"});
  }
  if (table.empty()) {
    const bool proved = answer.survey->proved() && !answer.survey->splits();
    return std::string("<p>No azeotrope of a single liquid was found") +
           (proved ? ", and its absence is proved for the stored parameters." : ".") + "</p>\n";
  }
  return table.markup();
}

std::string measured_only_table(const Answer& answer) {
  HtmlTable table("On file for these components, without a computed azeotrope beside it");
  table.column("Components");
  table.column("Measured");
  for (const MeasuredMatch& match : answer.measured_only) {
    if (!shown(match)) {
      continue;
    }
    table.row({escape_markup(member_names(answer.mixture, match.members)), measured_cell(answer, match)});
  }
  return table.empty() ? "" : table.markup();
}

std::string pure_table(const Answer& answer) {
  HtmlTable table("Pure components at this pressure");
  table.column("Component");
  table.column("CAS");
  table.column("Boils at, °C", true);
  table.column("Node");
  table.column("Molar mass, g/mol", true);
  for (std::size_t i = 0; i < answer.survey->pure.size(); ++i) {
    const FixedPoint& point = answer.survey->pure[i];
    const MixtureComponent& component = answer.mixture.component(static_cast<int>(i));
    table.row({escape_markup(component.id), component.cas.empty() ? "your own" : escape_markup(component.cas),
               celsius(point.temperature_K), node_words(point.node), significant(component.molar_mass_g_mol, 5)});
  }
  return table.markup();
}

std::string rejected_table(const Answer& answer) {
  if (answer.survey->rejected.empty()) {
    return "";
  }
  HtmlTable table("Roots that are no azeotropes: their liquid splits, or its stability is not concluded");
  table.column("Components");
  table.column("°C", true);
  table.column("mol%", true);
  table.column("Smallest tangent-plane distance, RT", true);
  for (const RejectedRoot& root : answer.survey->rejected) {
    table.row({escape_markup(member_names(answer.mixture, root.members)), celsius(root.temperature_K),
               mole_percent_lines(answer, root.x), significant(root.stability.tpd_min, 3)});
  }
  return table.markup() +
         "<p>Where a liquid splits, the azeotropes of two liquids are not searched yet: what depends on them is NO "
         "CALL.</p>\n";
}

std::string region_table(const Answer& answer) {
  const Chart& chart = *answer.chart;
  HtmlTable table("Distillation regions");
  table.column("Region");
  table.column("Curves start at");
  table.column("Curves end at");
  table.column("Share of the map, %", true);
  table.column("Boundaries");
  for (const Region& region : chart.regions) {
    std::string sides;
    for (const std::string& id : region.boundaries) {
      sides += (sides.empty() ? "" : ", ") + id;
    }
    const std::string share = region.area >= 1.0 - 1e-9 ? "the whole map" : share_percent(region.area);
    table.row({escape_markup(region.id),
               escape_markup(chart.fixed_points[static_cast<std::size_t>(region.unstable_node)].id),
               escape_markup(chart.fixed_points[static_cast<std::size_t>(region.stable_node)].id), share,
               sides.empty() ? "none" : escape_markup(sides)});
  }
  std::string text = table.empty() ? "" : table.markup();
  HtmlTable boundaries("Distillation boundaries");
  boundaries.column("Boundary");
  boundaries.column("From");
  boundaries.column("To");
  boundaries.column("Confines");
  boundaries.column("Position error, mol%", true);
  for (const Boundary& boundary : chart.boundaries) {
    boundaries.row({escape_markup(boundary.id),
                    escape_markup(chart.fixed_points[static_cast<std::size_t>(boundary.from)].id),
                    escape_markup(chart.fixed_points[static_cast<std::size_t>(boundary.to)].id),
                    to_string(boundary.confines), significant(100.0 * boundary.error, 2)});
  }
  return text + (boundaries.empty() ? "<p>No distillation boundary.</p>\n" : boundaries.markup());
}

std::string figure(const std::string& svg, const char* css = "") {
  return std::string("<figure") + (*css != '\0' ? std::string(" class=\"") + css + "\"" : "") + ">\n" + svg +
         "</figure>\n";
}

}  // namespace

std::string azeotrope_section(const Answer& answer, const std::optional<BinaryPhases>& phases) {
  std::string text = azeotrope_table(answer) + measured_only_table(answer) + rejected_table(answer);
  if (answer.mixture.size() == 3) {
    text += figure(ternary_map_svg(answer), "map");
  } else if (answer.mixture.size() == 2 && phases.has_value() && !phases->rows.empty()) {
    text += "<div class=\"pair\">\n" + figure(temperature_composition_svg(answer, *phases)) +
            figure(vapour_liquid_svg(answer, *phases)) + "</div>\n";
  } else if (answer.mixture.size() > 3) {
    text += "<p>Four components or more: no picture is pretended. The points above and their types are the map.</p>\n";
  }
  if (answer.chart.has_value() && answer.chart->status != Status::not_applicable) {
    text += region_table(answer);
  }
  return text + pure_table(answer);
}

}  // namespace stillshed
