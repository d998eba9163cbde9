#include "reports/vouch_task.hpp"

#include "reports/format.hpp"
#include "reports/provenance.hpp"

namespace stillshed {
namespace {

void paragraph(std::string& text, const std::string& words, int width, std::string_view first = "",
               std::string_view indent = "") {
  for (const std::string& line : wrap(words, width, first, indent)) {
    text += line + "\n";
  }
}

/// The mark stands before the line.
std::string first(Evidence evidence) {
  return "  " + std::string(to_string(evidence)) + "  ";
}

}  // namespace

std::string vouch_text(const Answer& answer, int width) {
  std::string text;
  paragraph(text,
            "model " + answer.model_kind + " (" + answer.model_note + "), " + pressure_text(answer.input.pressure_Pa),
            width);
  text += "\nvapour pressure\n";
  for (int i = 0; i < answer.mixture.size(); ++i) {
    const auto at = static_cast<std::size_t>(i);
    const PressureSet& set = answer.mixture.component(i).pressure.set();
    paragraph(text,
              answer.mixture.component(i).id + ": " +
                  (set.source == "user" ? std::string(to_string(set.form)) + ", the user's own" : set.id) + ", " +
                  range_text(set),
              width, first(answer.pressure_evidence[at]), "     ");
  }
  text += "\npairs\n";
  for (const PairUse& pair : answer.pairs) {
    paragraph(text,
              answer.mixture.component(pair.i).id + " + " + answer.mixture.component(pair.j).id + ": " + pair.record,
              width, first(pair.evidence), "     ");
  }
  text +=
      "\nevidence: F fitted, inside its range; X stretched beyond it; P predicted from groups; U the user's own; 0 "
      "none\n";
  text += "\nsources\n";
  for (const std::string& line : answer.provenance) {
    paragraph(text, line, width, "  ", "    ");
  }
  if (!answer.notes.empty() || !answer.incomplete.empty() || !answer.input.notes.empty()) {
    text += "\nnotes\n";
    for (const Incomplete& item : answer.incomplete) {
      paragraph(text, item.what + ": " + item.where + " (" + item.why + ")", width, "  ", "    ");
    }
    for (const std::vector<std::string>* notes : {&answer.input.notes, &answer.notes}) {
      for (const std::string& note : *notes) {
        paragraph(text, note, width, "  ", "    ");
      }
    }
  }
  return text;
}

}  // namespace stillshed
