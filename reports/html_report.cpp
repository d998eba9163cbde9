#include "reports/html_report.hpp"

#include <algorithm>

#include "page_css.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/html_parts.hpp"
#include "reports/html_sections.hpp"

namespace stillshed {
namespace {

std::string section(const char* id, const char* heading, const std::string& content) {
  return std::string("<section id=\"") + id + "\" aria-labelledby=\"" + id + "-head\">\n<h2 id=\"" + id + "-head\">" +
         heading + "</h2>\n" + content + "</section>\n";
}

std::string page_title(const Answer& answer) {
  if (!answer.input.title.empty()) {
    return answer.input.title;
  }
  std::string names;
  for (const MixtureComponent& component : answer.mixture.components()) {
    names += (names.empty() ? "" : " + ") + component.id;
  }
  return names;
}

std::string caution_item(const Caution& caution) {
  std::string substances;
  for (const std::string& substance : caution.substances) {
    substances += (substances.empty() ? "" : ", ") + substance;
  }
  return "<li>" + (substances.empty() ? "" : element("b", substances) + ": ") + escape_markup(caution.text) + " " +
         element("span", caution.code, "code") + "</li>\n";
}

std::string cautions(const Answer& answer, bool above) {
  std::string items;
  for (const Caution& caution : answer.cautions) {
    if (caution.above_verdict == above) {
      items += caution_item(caution);
    }
  }
  return items;
}

std::string fact(const std::string& what, const std::string& value) {
  return "<div>" + element("dt", what) + element("dd", value) + "</div>\n";
}

/// The tests as judged, or as written when nothing could be judged; markup.
std::string asked_markup(const Answer& answer, const ProductOutcome& outcome) {
  std::string asked;
  const auto add = [&asked](const std::string& test) { asked += (asked.empty() ? "" : ", ") + test; };
  for (const TestOutcome& item : outcome.tests) {
    add(test_markup(item.test, answer.mixture));
  }
  for (const ProductWish& wish : answer.input.products) {
    if (outcome.tests.empty() && wish.id == answer.mixture.component(outcome.component).id) {
      for (const std::string& test : wish.given_tests) {
        add(escape_markup(test));
      }
    }
  }
  return asked;
}

std::string verdict_card(const Answer& answer, const ProductOutcome& outcome, std::size_t k) {
  const std::string& name = answer.mixture.component(outcome.component).id;
  std::string text = "<article class=\"verdict " + std::string(to_string(outcome.verdict)) + "\">\n<h3>" +
                     verdict_badge(outcome.verdict) + " " + element("span", name, "product") + "</h3>\n";
  text +=
      element("p", outcome.sentence.empty() ? std::string(verdict_meaning(outcome.verdict)) + "." : outcome.sentence) +
      "\n";
  if (outcome.verdict != Verdict::no_call && outcome.component < answer.feed.size()) {
    text += purity_gauge(answer, outcome);
  }
  text += "<dl class=\"facts\">\n";
  const std::string asked = asked_markup(answer, outcome);
  if (!asked.empty()) {
    text += "<div>" + element("dt", "asked") + "<dd>" + asked + "</dd></div>\n";
  }
  if (outcome.verdict != Verdict::no_call) {
    text += fact("limit at unlimited stages", limit_percent(outcome.purity_limit_mass, 3) + " wt%, " +
                                                  limit_percent(outcome.purity_limit_mole, 3) + " mol%");
    text += fact("recovery there", limit_percent(outcome.recovery, 1) + " %");
    if (!outcome.reading.empty()) {
      text += fact("by", reading_words(answer, outcome.reading));
    }
    if (outcome.purity_at_stages.has_value() && answer.input.plant.stages.has_value()) {
      text += fact("first drop with " + std::to_string(*answer.input.plant.stages) + " stages",
                   limit_percent(*outcome.purity_at_stages) + " mol%");
    }
  }
  if (k < answer.product_evidence.size()) {
    const std::string mark = to_string(answer.product_evidence[k]);
    text += fact("rests on", mark + ", " + evidence_words(mark));
  }
  return text + "</dl>\n</article>\n";
}

std::string in_short(const Answer& answer) {
  std::string text;
  const std::string warnings = cautions(answer, true);
  if (!warnings.empty()) {
    text += "<div class=\"warning\" role=\"note\">\n<p>First, before anything is heated:</p>\n<ul>\n" + warnings +
            "</ul>\n</div>\n";
  }
  if (answer.reach.has_value() && !answer.reach->products.empty()) {
    for (std::size_t k = 0; k < answer.reach->products.size(); ++k) {
      text += verdict_card(answer, answer.reach->products[k], k);
    }
  } else if (answer.survey.has_value()) {
    const std::size_t count = answer.survey->azeotropes.size();
    text +=
        element("p", (count == 0 ? std::string("No azeotrope")
                                 : std::to_string(count) + (count == 1 ? " azeotrope" : " azeotropes")) +
                         " at " + pressure_text(answer.input.pressure_Pa) + "; no product was judged in this task.");
  }
  if (!answer.incomplete.empty()) {
    text += "<div class=\"missing\">\n<p>This answer is not complete:</p>\n<ul>\n";
    for (const Incomplete& item : answer.incomplete) {
      text += "<li>" + escape_markup(item.what) + (item.where.empty() ? "" : ", " + escape_markup(item.where)) + ": " +
              element("code", item.why) + "</li>\n";
    }
    text += "</ul>\n</div>\n";
  }
  return text;
}

std::string before_heating(const Answer& answer) {
  std::string text;
  if (!cautions(answer, true).empty()) {
    text += "<p>The cautions above the verdicts come first. Besides:</p>\n";
  }
  const std::string others = cautions(answer, false);
  if (!others.empty()) {
    text += "<ul>\n" + others + "</ul>\n";
  }
  return text +
         "<p>This is a screening aid. Your site's hazard assessment and the local fire, explosion, pressure, waste and "
         "exposure rules "
         "come first; have the design checked by a qualified, where required licensed, person.</p>\n";
}

std::string stream_section(const Answer& answer) {
  const Case& input = answer.input;
  HtmlTable table("The stream as given, and as it is calculated");
  table.column("Component");
  table.column("Given as");
  table.column("Amount given", true);
  table.column("wt% of the whole", true);
  table.column("wt% without residue", true);
  table.column("mol% without residue", true);
  table.column("kg", true);
  const auto kilogram_cell = [&input](double fraction) {
    return input.amount_kg.has_value() ? significant(*input.amount_kg * fraction, 4) : std::string("–");
  };
  const double volatile_share = 1.0 - input.residue_mass_fraction;
  for (const StreamEntry& entry : input.stream) {
    table.row({escape_markup(entry.id), escape_markup(entry.given_name), escape_markup(entry.given_amount),
               escape_markup(share_percent(entry.mass_fraction)),
               escape_markup(share_percent(entry.mass_fraction / volatile_share)),
               escape_markup(share_percent(entry.mole_fraction)), kilogram_cell(entry.mass_fraction)});
  }
  if (input.residue_mass_fraction > 0.0) {
    table.row({"residue", "residue", "–", share_percent(input.residue_mass_fraction), "set aside", "set aside",
               kilogram_cell(input.residue_mass_fraction)});
  }
  std::string text = table.markup() + "<dl class=\"facts\">\n";
  text += fact("pressure",
               (input.given_pressure.empty() ? "" : input.given_pressure + " = ") + pressure_text(input.pressure_Pa));
  if (answer.position.has_value()) {
    text += fact("starts to boil at", celsius(answer.position->bubble_temperature_K, 1) + " °C (without residue)");
  }
  if (answer.feed_stability.has_value()) {
    const Stability outcome = answer.feed_stability->outcome;
    text += fact("liquid at that point", outcome == Stability::stable     ? "one phase"
                                         : outcome == Stability::unstable ? "splits into two"
                                                                          : "stability not concluded");
  }
  if (answer.position.has_value() && answer.position->region.has_value() && answer.chart.has_value()) {
    text += fact("region", answer.chart->regions[static_cast<std::size_t>(*answer.position->region)].id);
  }
  text += "</dl>\n";
  for (const std::string& note : input.notes) {
    text += element("p", note, "note") + "\n";
  }
  return text;
}

const char* const kFootLine =
    "A model result, not a measurement: do not set cut points from it without a trial and an analysis. Site rules, "
    "local codes and "
    "licensed practice decide.";

}  // namespace

std::string html_text(const Answer& answer, const PageOptions& options) {
  const std::string title = page_title(answer);
  std::string page =
      "<!DOCTYPE html>\n<html lang=\"en\" xmlns=\"http://www.w3.org/1999/xhtml\">\n<head>\n<meta charset=\"utf-8\"/>\n"
      "<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"/>\n" +
      element("title", title + " – stillshed report") + "\n<style>\n" + kPageCss + "</style>\n</head>\n<body>\n";
  page += "<header>\n<p class=\"brand\">stillshed · what distillation can reach</p>\n" + element("h1", title) + "\n";
  std::string line = pressure_text(answer.input.pressure_Pa) + " · " + answer.model_kind;
  if (answer.input.amount_kg.has_value()) {
    line = kilogram_text(*answer.input.amount_kg) + " · " + line;
  }
  page += element("p", options.date.empty() ? line : line + " · " + options.date, "line") + "\n</header>\n<main>\n";
  page += section("short", "In short", in_short(answer));
  page += section("cautions", "Before you heat anything", before_heating(answer));
  if (!answer.input.stream.empty()) {
    page += section("stream", "Your stream", stream_section(answer));
  }
  if (answer.survey.has_value()) {
    const std::optional<BinaryPhases> phases = binary_phases(answer);
    page += section("azeotropes", "Azeotropes and map", azeotrope_section(answer, phases));
  }
  if (answer.reach.has_value()) {
    page += section("reach", "What you can reach", reach_section(answer));
    page += section("hold", "What holds you back", hold_section(answer));
  }
  page += section("trust", "How sure are we", trust_section(answer));
  page += section("sources", "Where every number comes from", source_section(answer, options.date));
  page += "</main>\n<footer>" + element("p", kFootLine) + "</footer>\n</body>\n</html>\n";
  return page;
}

}  // namespace stillshed
