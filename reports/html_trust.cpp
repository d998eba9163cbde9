#include <set>

#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/html_parts.hpp"
#include "reports/html_sections.hpp"

namespace stillshed {
namespace {

std::string face_table(const Answer& answer) {
  HtmlTable table("Search for azeotropes, face by face");
  table.column("Components");
  table.column("Proof");
  table.column("Temperature bracket, °C", true);
  table.column("Boxes", true);
  table.column("Undecided boxes", true);
  table.column("Index rule");
  for (const FaceProof& face : answer.survey->faces) {
    std::string index = "not evaluated";
    if (face.index_holds.has_value()) {
      index = std::string(*face.index_holds ? "holds" : "fails") +
              (face.index_sum.has_value()
                   ? " (" + std::to_string(*face.index_sum) + " of " + std::to_string(face.index_expected) + ")"
                   : "");
    } else if (!face.note.empty()) {
      index += ": " + face.note;
    }
    table.row({escape_markup(member_names(answer.mixture, face.members)), to_string(face.status),
               celsius(face.t_lower_K, 1) + " to " + celsius(face.t_upper_K, 1), std::to_string(face.boxes),
               std::to_string(face.undecided.size()), escape_markup(index)});
  }
  return table.empty() ? "" : table.markup();
}

std::string proof_words(const Survey& survey) {
  switch (survey.status) {
    case Status::complete:
      return "The list of azeotropes is proved complete. That means: for the stored parameters, this model and the "
             "temperature brackets "
             "below, every solution of the single-liquid equations lies in one of the listed boxes, and each box holds "
             "exactly one.";
    case Status::degenerate:
      return "The search is complete, but some points could not be told apart by any test: they are listed as one "
             "degenerate record each.";
    case Status::undecided:
      return "The list of azeotropes is not proved complete: faces or boxes remain that could not be decided.";
    case Status::stopped: return "The search was stopped early: the list of azeotropes may be incomplete.";
    case Status::not_run:
    case Status::not_applicable: return "No proof was run: the azeotropes listed were located, and others may exist.";
  }
  return "";
}

std::string position_words(const Answer& answer) {
  const Position& position = *answer.position;
  std::string text;
  if (position.on_boundary) {
    text = "The feed lies on a distillation boundary: the smallest change of it decides. ";
  } else if (position.nearest.has_value()) {
    text = "The feed lies " + significant(position.nearest->distance, 3) +
           " in mole fraction from the nearest boundary (" + position.nearest->boundary + "). ";
  } else {
    text = "No boundary parts the feed from the rest of the map. ";
  }
  if (position.flip_component.has_value()) {
    const double kg = position.flip_kg_per_100kg;
    text += std::string(kg >= 0.0 ? "Adding " : "Taking out ") + significant(std::abs(kg), 3) + " kg of " +
            answer.mixture.component(*position.flip_component).id + " per 100 kg moves it into another region.";
  }
  return text;
}

std::string unchecked_list(const Answer& answer) {
  std::vector<std::string> items = {
      "a second model and the spread of the parameters", "azeotropes of two liquids, and decanting",
      "reaction, salts, foaming, fouling and hold-up", "heating and cooling media against the temperatures"};
  if (!answer.input.plant.stages.has_value()) {
    items.insert(items.begin(), "the number of stages (none was given)");
  }
  if (!answer.input.amount_kg.has_value()) {
    items.insert(items.begin(), "amounts in kg (none was given)");
  }
  std::string text = "<h3>Not checked</h3>\n<ul>\n";
  for (const std::string& item : items) {
    text += element("li", item) + "\n";
  }
  return text + "</ul>\n";
}

std::string mark_list(const Answer& answer) {
  std::set<std::string> marks;
  for (const PairUse& pair : answer.pairs) {
    marks.insert(to_string(pair.evidence));
  }
  for (const Evidence evidence : answer.pressure_evidence) {
    marks.insert(to_string(evidence));
  }
  for (const Evidence evidence : answer.product_evidence) {
    marks.insert(to_string(evidence));
  }
  for (std::size_t k = 0; answer.survey.has_value() && k < answer.survey->azeotropes.size(); ++k) {
    marks.insert(azeotrope_evidence(answer, k));
  }
  std::string text = "<p class=\"marks\">Marks: ";
  bool first = true;
  for (const std::string& mark : marks) {
    text += (first ? "<b>" : "; <b>") + mark + "</b> " + evidence_words(mark);
    first = false;
  }
  return text + ". A verdict carries the weakest mark of what it rests on.</p>\n";
}

}  // namespace

std::string trust_section(const Answer& answer) {
  std::string text;
  if (answer.survey.has_value()) {
    text += element("p", proof_words(*answer.survey));
    text +=
        "\n<p>Nothing is claimed about nature, about temperatures outside the brackets, or about azeotropes of two "
        "liquids. Whether each "
        "liquid is stable is a separate test, shown with each azeotrope.</p>\n";
    text += face_table(answer);
  }
  if (answer.position.has_value()) {
    text += element("p", position_words(answer)) + "\n";
  }
  return text + mark_list(answer) + unchecked_list(answer);
}

std::string source_section(const Answer& answer, const std::string& date) {
  std::string text = element("p", "Model: " + answer.model_kind +
                                      (answer.model_note.empty() ? "." : " (" + answer.model_note + ").")) +
                     "\n";
  HtmlTable parameters("Parameters in use");
  parameters.column("What");
  parameters.column("Record");
  parameters.column("Mark");
  for (std::size_t i = 0; i < answer.pressure_set_ids.size(); ++i) {
    const std::string mark = i < answer.pressure_evidence.size() ? to_string(answer.pressure_evidence[i]) : "–";
    parameters.row({escape_markup("vapour pressure of " + answer.mixture.component(static_cast<int>(i)).id),
                    escape_markup(answer.pressure_set_ids[i]), mark});
  }
  for (const PairUse& pair : answer.pairs) {
    parameters.row({escape_markup(member_names(answer.mixture, {pair.i, pair.j})), escape_markup(pair.record),
                    to_string(pair.evidence)});
  }
  if (!parameters.empty()) {
    text += parameters.markup();
  }
  if (!answer.provenance.empty()) {
    text += "<h3>Sources</h3>\n<ul class=\"sources\">\n";
    for (const std::string& line : answer.provenance) {
      text += element("li", line) + "\n";
    }
    text += "</ul>\n";
  }
  if (!answer.notes.empty()) {
    text += "<h3>Notes</h3>\n<ul>\n";
    for (const std::string& note : answer.notes) {
      text += element("li", note) + "\n";
    }
    text += "</ul>\n";
  }
  text += "<h3>To repeat this run</h3>\n<dl>\n";
  const auto entry = [&text](const std::string& what, const std::string& value) {
    if (!value.empty()) {
      text += element("dt", what) + element("dd", value) + "\n";
    }
  };
  entry("Program", "stillshed " + answer.program_version);
  entry("Parameter files, SHA-256", answer.params_sha256);
  entry("Seed", std::to_string(answer.seed));
  entry("Date", date);
  return text + "</dl>\n";
}

}  // namespace stillshed
