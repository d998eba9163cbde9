#include "reports/terminal.hpp"

#include <algorithm>
#include <cmath>

#include "params/errors.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"

namespace stillshed {
namespace {

constexpr std::size_t kMostAzeotropes = 8;  ///< more would not fit one screen
constexpr std::size_t kMostNotes = 4;

const char* colour_of(Verdict verdict) {
  switch (verdict) {
    case Verdict::open: return "\033[1;32m";
    case Verdict::tight: return "\033[1;33m";
    case Verdict::capped: return "\033[1;35m";
    case Verdict::shut: return "\033[1;31m";
    case Verdict::no_call: return "\033[1;36m";
  }
  return "";
}

class Screen {
 public:
  Screen(const Answer& answer, const TerminalOptions& options) : answer_(answer), options_(options) {
    expects(options.width >= 40, "terminal: at least 40 columns needed");
  }

  std::string text() {
    heading();
    cautions();
    verdicts();
    azeotropes();
    map();
    proof();
    incomplete();
    notes();
    blank();
    paragraph("Screening aid: site rules, local codes and licensed practice decide.");
    return text_;
  }

 private:
  void blank() { text_ += '\n'; }
  void paragraph(const std::string& words, std::string_view first = "", std::string_view indent = "") {
    for (const std::string& line : wrap(words, options_.width, first, indent)) {
      text_ += line + '\n';
    }
  }
  std::string painted(const std::string& words, const char* colour) const {
    return options_.colour ? colour + words + "\033[0m" : words;
  }

  void heading();
  void cautions();
  void verdicts();
  void verdict(const ProductOutcome& outcome, std::size_t k);
  void azeotropes();
  void azeotrope(std::size_t k);
  void map();
  void proof();
  void incomplete();
  void notes();
  [[nodiscard]] std::string asked(const ProductOutcome& outcome) const;

  const Answer& answer_;
  TerminalOptions options_;
  std::string text_;
};

void Screen::heading() {
  if (!answer_.input.title.empty()) {
    paragraph(answer_.input.title);
  }
  std::string stream;
  for (const StreamEntry& entry : answer_.input.stream) {
    stream += (stream.empty() ? "" : ", ") + entry.id + " " + entry.given_amount;
  }
  if (answer_.input.residue_mass_fraction > 0.0) {
    stream += ", residue " + share_percent(answer_.input.residue_mass_fraction) + " wt%";
  }
  if (!stream.empty()) {
    paragraph(stream, "", "  ");
  }
  std::string line = pressure_text(answer_.input.pressure_Pa) + ", " + answer_.model_kind;
  if (answer_.input.amount_kg.has_value()) {
    line = kilogram_text(*answer_.input.amount_kg) + ", " + line;
  }
  paragraph(line);
}

void Screen::cautions() {
  bool first = true;
  for (const Caution& caution : answer_.cautions) {
    if (!caution.above_verdict) {
      continue;
    }
    if (first) {
      blank();
    }
    first = false;
    for (const std::string& line : wrap(caution.text + " [" + caution.code + "]", options_.width, "! ", "  ")) {
      text_ += painted(line, "\033[1m") + '\n';
    }
  }
}

std::string Screen::asked(const ProductOutcome& outcome) const {
  std::string tests;
  for (const TestOutcome& item : outcome.tests) {
    tests += (tests.empty() ? "" : ", ") + test_text(item.test, answer_.mixture);
  }
  return tests;
}

void Screen::verdicts() {
  if (!answer_.reach.has_value()) {
    return;
  }
  blank();
  for (std::size_t k = 0; k < answer_.reach->products.size(); ++k) {
    verdict(answer_.reach->products[k], k);
  }
}

void Screen::verdict(const ProductOutcome& outcome, std::size_t k) {
  const std::string word = verdict_word(outcome.verdict);
  std::string line = answer_.mixture.component(outcome.component).id;
  const std::string tests = asked(outcome);
  if (!tests.empty()) {
    line += ": asked " + tests;
  }
  if (outcome.verdict != Verdict::no_call) {
    line += "; limit " + purity_limit_text(outcome) + ", recovery " + limit_percent(outcome.recovery, 1) + " %";
    if (outcome.purity_at_stages.has_value() && answer_.input.plant.stages.has_value()) {
      line += "; first drop with " + std::to_string(*answer_.input.plant.stages) + " stages " +
              limit_percent(*outcome.purity_at_stages) + " mol%";
    }
  }
  if (k < answer_.product_evidence.size()) {
    line += std::string(" (mark ") + to_string(answer_.product_evidence[k]) + ")";
  }
  std::vector<std::string> lines = wrap(line, options_.width, word + std::string(9 - word.size(), ' '), "         ");
  lines.front().replace(0, word.size(), painted(word, colour_of(outcome.verdict)));
  for (const std::string& piece : lines) {
    text_ += piece + '\n';
  }
  paragraph(outcome.sentence.empty() ? std::string(verdict_meaning(outcome.verdict)) + "." : outcome.sentence,
            "         ", "         ");
}

void Screen::azeotropes() {
  if (!answer_.survey.has_value()) {
    return;
  }
  blank();
  const std::size_t count = answer_.survey->azeotropes.size();
  if (count == 0) {
    paragraph("No azeotrope of a single liquid found.");
  }
  for (std::size_t k = 0; k < std::min(count, kMostAzeotropes); ++k) {
    azeotrope(k);
  }
  if (count > kMostAzeotropes) {
    paragraph("and " + std::to_string(count - kMostAzeotropes) + " more azeotropes: see the result file or the page.");
  }
  if (!answer_.survey->rejected.empty()) {
    paragraph(std::to_string(answer_.survey->rejected.size()) +
              " more root(s) where the liquid splits: no azeotropes; those of two liquids are not searched yet.");
  }
}

/// "78.00 / 22.00" for the members of a point.
std::string shares(const Members& members, const std::vector<double>& fractions) {
  std::string text;
  for (const int i : members) {
    text += (text.empty() ? "" : " / ") + share_percent(fractions[static_cast<std::size_t>(i)]);
  }
  return text;
}

void Screen::azeotrope(std::size_t k) {
  const Azeotrope& found = answer_.survey->azeotropes[k];
  const FixedPoint& point = found.point;
  paragraph(short_id(point.id) + " " + member_names(answer_.mixture, point.members) + ": " +
                celsius(point.temperature_K) + " degC, " + to_string(found.boiling) + ", " + to_string(point.node) +
                (found.cluster ? ", not told apart" : "") + " (mark " + azeotrope_evidence(answer_, k) + ")",
            "", "    ");
  paragraph(shares(point.members, {point.x.begin(), point.x.end()}) +
                " mol% = " + shares(point.members, mass_fractions(answer_.mixture, point.x)) + " wt%",
            "    ", "    ");
  std::string measured;
  if (k < answer_.measured.size()) {
    for (const MeasuredMatch& match : answer_.measured[k]) {
      if (match.tier != 'A' && match.tier != 'B') {
        continue;
      }
      measured += measured.empty() ? "measured " : "; ";
      measured += match.says_none                   ? "none"
                  : match.temperature_K.has_value() ? celsius(*match.temperature_K) + " degC"
                                                    : "temperature not given";
      if (!match.x.empty()) {
        measured += ", " + shares(point.members, {match.x.begin(), match.x.end()}) + " mol%";
      }
      if (std::abs(match.pressure_Pa / answer_.input.pressure_Pa - 1.0) > 0.001) {
        measured += " at " + pressure_text(match.pressure_Pa);
      }
    }
  }
  paragraph(measured.empty() ? "no measurement on file" : measured, "    ", "    ");
}

void Screen::map() {
  if (!answer_.chart.has_value() || answer_.chart->status == Status::not_applicable) {
    return;
  }
  const Chart& chart = *answer_.chart;
  std::string line =
      "map: " + std::to_string(chart.regions.size()) + (chart.regions.size() == 1 ? " region, " : " regions, ") +
      std::to_string(chart.boundaries.size()) + (chart.boundaries.size() == 1 ? " boundary" : " boundaries");
  if (answer_.position.has_value()) {
    const Position& position = *answer_.position;
    if (position.on_boundary) {
      line += "; the feed lies on a boundary";
    } else if (position.region.has_value()) {
      const Region& region = chart.regions[static_cast<std::size_t>(*position.region)];
      line += "; feed in " + region.id + " (" +
              short_id(chart.fixed_points[static_cast<std::size_t>(region.unstable_node)].id) + " to " +
              short_id(chart.fixed_points[static_cast<std::size_t>(region.stable_node)].id) + ")";
    }
    if (position.nearest.has_value()) {
      line +=
          ", " + significant(position.nearest->distance, 3) + " in mole fraction from " + position.nearest->boundary;
    }
    if (position.flip_component.has_value()) {
      const double kg = position.flip_kg_per_100kg;
      line += "; " + significant(std::abs(kg), 3) + " kg " + answer_.mixture.component(*position.flip_component).id +
              (kg >= 0.0 ? " added to" : " taken out of") + " 100 kg changes the region";
    }
  }
  paragraph(line, "", "     ");
}

void Screen::proof() {
  if (!answer_.survey.has_value()) {
    return;
  }
  const Survey& survey = *answer_.survey;
  const std::string faces = std::to_string(survey.faces.size()) + (survey.faces.size() == 1 ? " face" : " faces");
  std::string line;
  switch (survey.status) {
    case Status::complete:
      line = "proof: complete for one liquid, stored parameters and this model (" + faces +
             "); azeotropes of two liquids not searched";
      break;
    case Status::degenerate: line = "proof: complete, but some points cannot be told apart (" + faces + ")"; break;
    case Status::undecided: line = "proof: NOT complete, faces or boxes remain open; azeotropes may be missing"; break;
    case Status::stopped: line = "proof: stopped early; azeotropes may be missing"; break;
    case Status::not_run:
    case Status::not_applicable: line = "proof: not run; azeotropes were located, others may exist"; break;
  }
  if (survey.index_rule_holds.has_value()) {
    line += *survey.index_rule_holds ? "; index rule holds" : "; index rule FAILS";
  }
  paragraph(line, "", "       ");
}

void Screen::incomplete() {
  for (const Incomplete& item : answer_.incomplete) {
    paragraph("not complete: " + item.what + (item.where.empty() ? "" : " " + item.where) + ": " + item.why, "", "  ");
  }
}

void Screen::notes() {
  std::vector<std::string> lines = answer_.notes;
  for (const std::string& note : answer_.input.notes) {
    if (std::find(lines.begin(), lines.end(), note) == lines.end()) {
      lines.push_back(note);
    }
  }
  for (std::size_t k = 0; k < std::min(lines.size(), kMostNotes); ++k) {
    paragraph("note: " + lines[k], "", "      ");
  }
  if (lines.size() > kMostNotes) {
    paragraph("and " + std::to_string(lines.size() - kMostNotes) + " more notes in the result file.");
  }
}

}  // namespace

std::string terminal_text(const Answer& answer, const TerminalOptions& options) {
  return Screen(answer, options).text();
}

}  // namespace stillshed
