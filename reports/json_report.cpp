#include "reports/json_report.hpp"

#include "reports/json_blocks.hpp"

namespace stillshed {

void WhyNull::write(JsonWriter& json) const {
  if (reasons_.empty()) {
    return;
  }
  json.open_object("why_null", JsonWriter::Layout::inline_);
  for (const auto& [key, reason] : reasons_) {
    json.member(key, reason);
  }
  json.close();
}

std::string ResultWriter::text() {
  json_.open_object();
  json_.member("stillshed_result", 1);
  head();
  model();
  components();
  if (answer_.survey.has_value()) {
    azeotropes();
    rejected_roots();
    fixed_point_list();
    proof();
  }
  if (answer_.chart.has_value()) {
    chart();
  }
  if (answer_.position.has_value()) {
    feed(*answer_.position);
  }
  if (answer_.reach.has_value()) {
    batch();
    sequences();
    stages();
    products();
  }
  tail();
  json_.close();
  return json_.finish();
}

void ResultWriter::composition(const Composition& x) {
  json_.open_object(Layout::inline_);
  for (int i = 0; i < x.size(); ++i) {
    json_.member(id(i), x[i]);
  }
  json_.close();
}

void ResultWriter::composition(const char* key, const Composition& x) {
  json_.open_object(key, Layout::inline_);
  for (int i = 0; i < x.size(); ++i) {
    json_.member(id(i), x[i]);
  }
  json_.close();
}

void ResultWriter::mass_composition(const char* key, const Composition& x) {
  json_.open_object(key, Layout::inline_);
  const std::vector<double> w = mass_fractions(answer_.mixture, x);
  for (int i = 0; i < x.size(); ++i) {
    json_.member(id(i), w[static_cast<std::size_t>(i)]);
  }
  json_.close();
}

void ResultWriter::compositions(const char* key, const std::vector<Composition>& points) {
  json_.open_array(key);
  for (const Composition& x : points) {
    composition(x);
  }
  json_.close();
}

void ResultWriter::numbers(const char* key, const std::vector<double>& values) {
  json_.open_array(key, Layout::inline_);
  for (const double value : values) {
    json_.value(value);
  }
  json_.close();
}

void ResultWriter::texts(const char* key, const std::vector<std::string>& values, Layout layout) {
  json_.open_array(key, layout);
  for (const std::string& value : values) {
    json_.value(value);
  }
  json_.close();
}

void ResultWriter::member_ids(const char* key, const Members& members) {
  json_.open_array(key, Layout::inline_);
  for (const int i : members) {
    json_.value(id(i));
  }
  json_.close();
}

void ResultWriter::box_members(const Box& box) {
  composition("lower", box.lower);
  composition("upper", box.upper);
  pair_of_numbers("temperature_range_K", box.t_lower_K, box.t_upper_K);
}

void ResultWriter::amount(const char* key, const Composition& x, double share) {
  WhyNull why;
  json_.open_object(key, Layout::inline_);
  composition("mole_fractions", x);
  json_.member("share_of_charge_mole", share);
  const std::optional<double> kg = kilograms(answer_, x, share);
  json_.member("kg", kg);
  if (!kg.has_value()) {
    why.add("kg", "amount not given");
  }
  why.write(json_);
  json_.close();
}

void ResultWriter::head() {
  json_.open_object("status");
  json_.member("exit", answer_.exit_code);
  json_.open_array("incomplete");
  for (const Incomplete& item : answer_.incomplete) {
    json_.open_object(Layout::inline_);
    json_.member("what", item.what);
    json_.member("where", item.where);
    json_.member("why", item.why);
    json_.close();
  }
  json_.close();
  json_.close();
  if (answer_.input.echo_json.empty()) {
    json_.member_null("input");
  } else {
    json_.member_raw("input", answer_.input.echo_json);
  }
  json_.member("seed", static_cast<std::int64_t>(answer_.seed));
  json_.open_object("versions", Layout::inline_);
  json_.member("program", answer_.program_version);
  json_.member("parameters_sha256", answer_.params_sha256);
  json_.close();
  json_.member("pressure_Pa", answer_.input.pressure_Pa);
}

void ResultWriter::model() {
  json_.open_object("model");
  json_.member("kind", answer_.model_kind);
  json_.member("note", answer_.model_note);
  json_.open_array("pairs");
  for (const PairUse& pair : answer_.pairs) {
    json_.open_object(Layout::inline_);
    json_.member("i", id(pair.i));
    json_.member("j", id(pair.j));
    json_.member("record", pair.record);
    json_.member("evidence", to_string(pair.evidence));
    json_.close();
  }
  json_.close();
  json_.open_array("vapour_pressure");
  for (std::size_t i = 0; i < answer_.pressure_set_ids.size(); ++i) {
    pressure_record(static_cast<int>(i));
  }
  json_.close();
  json_.close();
}

void ResultWriter::pressure_record(int i) {
  const auto index = static_cast<std::size_t>(i);
  const PressureSet& set = answer_.mixture.component(i).pressure.set();
  WhyNull why;
  json_.open_object(Layout::inline_);
  json_.member("component", id(i));
  json_.member("record", answer_.pressure_set_ids[index]);
  json_.member("form", to_string(set.form));
  numbers("coefficients", {set.coefficients.begin(), set.coefficients.end()});
  for (const auto& [key, bound] : {std::pair("t_min_K", set.t_min_K), std::pair("t_max_K", set.t_max_K)}) {
    json_.member(key, bound);
    if (!bound.has_value()) {
      why.add(key, "valid everywhere");
    }
  }
  json_.member("source", set.source);
  if (index < answer_.pressure_evidence.size()) {
    json_.member("evidence", to_string(answer_.pressure_evidence[index]));
  } else {
    json_.member_null("evidence");
    why.add("evidence", "not assessed");
  }
  why.write(json_);
  json_.close();
}

void ResultWriter::components() {
  json_.open_array("components");
  for (int i = 0; i < answer_.mixture.size(); ++i) {
    const MixtureComponent& component = answer_.mixture.component(i);
    WhyNull why;
    json_.open_object(Layout::inline_);
    json_.member("id", component.id);
    if (component.cas.empty()) {
      json_.member_null("cas");
      why.add("cas", "the user's own component");
    } else {
      json_.member("cas", component.cas);
    }
    json_.member("molar_mass_g_mol", component.molar_mass_g_mol);
    const auto index = static_cast<std::size_t>(i);
    if (answer_.survey.has_value() && index < answer_.survey->pure.size()) {
      const FixedPoint& point = answer_.survey->pure[index];
      json_.member("boiling_point_K", point.temperature_K);
      json_.member("node", to_string(point.node));
    } else {
      json_.member_null("boiling_point_K");
      json_.member_null("node");
      why.add("boiling_point_K", "no survey in this task");
      why.add("node", "no survey in this task");
    }
    why.write(json_);
    json_.close();
  }
  json_.close();
}

void ResultWriter::azeotropes() {
  json_.open_array("azeotropes");
  for (std::size_t k = 0; k < answer_.survey->azeotropes.size(); ++k) {
    azeotrope(k);
  }
  json_.close();
  measured(answer_.measured_only, "measured_only");
}

void ResultWriter::azeotrope(std::size_t k) {
  const Azeotrope& found = answer_.survey->azeotropes[k];
  WhyNull why;
  json_.open_object();
  json_.member("id", found.point.id);
  member_ids("components", found.point.members);
  composition("mole_fractions", found.point.x);
  mass_composition("mass_fractions", found.point.x);
  json_.member("temperature_K", found.point.temperature_K);
  json_.member("phase", "homogeneous");
  json_.open_array("liquids");
  json_.open_object(Layout::inline_);
  composition("mole_fractions", found.point.x);
  json_.member("fraction", 1.0);
  json_.close();
  json_.close();
  json_.member("boiling", to_string(found.boiling));
  json_.member("node", to_string(found.point.node));
  numbers("eigenvalues", found.point.eigenvalues);
  json_.member("stability", to_string(found.stability.outcome));
  json_.member("stability_proved", found.stability.proved);
  json_.member("tpd_min", found.stability.tpd_min);
  if (found.box.lower.empty()) {
    json_.member_null("box");
    why.add("box", "located, not enclosed");
  } else {
    json_.open_object("box", Layout::inline_);
    box_members(found.box);
    json_.close();
  }
  json_.member("proved", found.proved);
  json_.member("cluster", found.cluster);
  measured(k < answer_.measured.size() ? answer_.measured[k] : std::vector<MeasuredMatch>{}, "measured");
  json_.member("evidence", azeotrope_evidence(answer_, k));
  why.write(json_);
  json_.close();
}

void ResultWriter::measured(const std::vector<MeasuredMatch>& matches, const char* key) {
  json_.open_array(key);
  for (const MeasuredMatch& match : matches) {
    WhyNull why;
    json_.open_object(Layout::inline_);
    json_.member("source", match.source);
    json_.member("tier", std::string_view(&match.tier, 1));
    member_ids("components", match.members);
    json_.member("says_none", match.says_none);
    json_.member("pressure_Pa", match.pressure_Pa);
    json_.member("temperature_K", match.temperature_K);
    if (match.x.empty()) {
      json_.member_null("mole_fractions");
      why.add("mole_fractions", match.says_none ? "no azeotrope measured" : "not given by the source");
    } else {
      composition("mole_fractions", match.x);
    }
    json_.member("heterogeneous", match.heterogeneous);
    json_.member("difference_K", match.dT_K);
    json_.member("difference_mole_fraction", match.dx);
    if (!match.temperature_K.has_value()) {
      why.add("temperature_K", match.says_none ? "no azeotrope measured" : "not given by the source");
    }
    for (const auto& [name, known] : {std::pair("difference_K", match.dT_K.has_value()),
                                      std::pair("difference_mole_fraction", match.dx.has_value())}) {
      if (!known) {
        why.add(name, "nothing to compare at the same pressure");
      }
    }
    why.write(json_);
    json_.close();
  }
  json_.close();
}

void ResultWriter::rejected_roots() {
  json_.open_array("rejected_roots");
  for (const RejectedRoot& root : answer_.survey->rejected) {
    json_.open_object(Layout::inline_);
    member_ids("components", root.members);
    composition("mole_fractions", root.x);
    json_.member("temperature_K", root.temperature_K);
    json_.member("stability", to_string(root.stability.outcome));
    json_.member("tpd_min", root.stability.tpd_min);
    json_.close();
  }
  json_.close();
}

void ResultWriter::fixed_point_list() {
  json_.open_array("fixed_points");
  for (const FixedPoint& point : points_) {
    json_.open_object(Layout::inline_);
    json_.member("id", point.id);
    composition("mole_fractions", point.x);
    json_.member("temperature_K", point.temperature_K);
    json_.member("node", to_string(point.node));
    numbers("eigenvalues", point.eigenvalues);
    json_.close();
  }
  json_.close();
}

void ResultWriter::proof() {
  const Survey& survey = *answer_.survey;
  const char* status = survey.status == Status::complete  ? "complete"
                       : survey.status == Status::not_run ? "not-run"
                                                          : "incomplete";
  json_.open_object("proof");
  json_.member("status", status);
  json_.member("claim", "homogeneous");
  json_.open_array("faces");
  for (const FaceProof& item : survey.faces) {
    face(item);
  }
  json_.close();
  json_.close();
  WhyNull why;
  json_.open_object("index_rule", Layout::inline_);
  json_.member("holds", survey.index_rule_holds);
  if (!survey.index_rule_holds.has_value()) {
    why.add("holds", survey.splits() ? "phase-split" : "a fixed point is degenerate or a face is not complete");
  }
  why.write(json_);
  json_.close();
}

void ResultWriter::face(const FaceProof& item) {
  json_.open_object();
  member_ids("components", item.members);
  json_.member("status", to_string(item.status));
  pair_of_numbers("temperature_range_K", item.t_lower_K, item.t_upper_K);
  json_.member("boxes", item.boxes);
  json_.open_array("undecided");
  for (const Box& box : item.undecided) {
    json_.open_object(Layout::inline_);
    box_members(box);
    json_.close();
  }
  json_.close();
  json_.open_object("index", Layout::inline_);
  WhyNull why;
  const std::string reason = item.note.empty() ? "not evaluated" : item.note;
  if (item.index_sum.has_value()) {
    json_.member("sum", *item.index_sum);
  } else {
    json_.member_null("sum");
    why.add("sum", reason);
  }
  json_.member("expected", item.index_expected);
  json_.member("holds", item.index_holds);
  if (!item.index_holds.has_value()) {
    why.add("holds", reason);
  }
  why.write(json_);
  json_.close();
  json_.close();
}

void ResultWriter::tail() {
  json_.open_array("cautions");
  for (const Caution& caution : answer_.cautions) {
    json_.open_object(Layout::inline_);
    json_.member("code", caution.code);
    json_.member("text", caution.text);
    texts("substances", caution.substances);
    json_.member("above_verdict", caution.above_verdict);
    json_.close();
  }
  json_.close();
  texts("notes", answer_.notes, Layout::lines);
  texts("provenance", answer_.provenance, Layout::lines);
  json_.open_object("timing", Layout::inline_);
  json_.member("elapsed_s", answer_.elapsed_s);
  json_.close();
}

std::string json_text(const Answer& answer) {
  return ResultWriter(answer).text();
}

}  // namespace stillshed
