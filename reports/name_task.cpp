#include "reports/name_task.hpp"

#include "reports/format.hpp"
#include "reports/json_write.hpp"
#include "reports/provenance.hpp"
#include "reports/substance.hpp"

namespace stillshed {
namespace {

std::string joined(const std::vector<std::string>& words) {
  std::string text;
  for (const std::string& word : words) {
    text += (text.empty() ? "" : ", ") + word;
  }
  return text;
}

std::string fact(const std::string& what, const std::string& value) {
  constexpr std::size_t kColumn = 18;
  return "  " + what + std::string(what.size() < kColumn ? kColumn - what.size() : 1, ' ') + value + "\n";
}

std::string group_text(const ComponentRecord& record) {
  std::string text;
  for (const GroupModel model : {GroupModel::dortmund, GroupModel::unifac}) {
    if (!groups_of(record, model).groups.empty()) {
      text += (text.empty() ? "" : ", ") + std::string(to_string(model));
    }
  }
  return text.empty() ? "none" : text;
}

std::string describe(const std::string& name, const ComponentRecord& record, const Catalog& catalog) {
  std::string text = name + " is " + record.name + "\n";
  text += fact("id", record.id);
  text += fact("CAS", record.cas);
  text += fact("formula", record.formula + ", " + significant(record.molar_mass_g_mol, 6) + " g/mol");
  if (!record.synonyms.empty()) {
    text += fact("also", joined(record.synonyms));
  }
  if (record.normal_boiling_point_K.has_value()) {
    text += fact("boils at 1 atm", celsius(record.normal_boiling_point_K->value) + " degC; " +
                                       catalog.citation(record.normal_boiling_point_K->source));
  }
  for (const PressureSet& set : record.pressure_sets) {
    text += fact("vapour pressure", set.id + ", " + range_text(set));
  }
  text += fact("groups in", group_text(record));
  if (!record.hazard_flags.empty()) {
    text += fact("hazards", joined(record.hazard_flags));
  }
  if (const ResidualLimit* limit = catalog.residual_limit(record.id); limit != nullptr) {
    text +=
        fact("ICH Q3C", "class " + limit->solvent_class +
                            (limit->limit_ppm.has_value() ? ", " + significant(*limit->limit_ppm, 4) + " ppm" : ""));
  }
  return text;
}

void write_texts(JsonWriter& json, const char* key, const std::vector<std::string>& texts) {
  json.open_array(key, JsonWriter::Layout::inline_);
  for (const std::string& text : texts) {
    json.value(text);
  }
  json.close();
}

void write_record(JsonWriter& json, const std::string& given, const ComponentRecord& record, const Catalog& catalog) {
  json.open_object();
  json.member("given", given);
  json.member("kind", "component");
  json.member("id", record.id);
  json.member("name", record.name);
  json.member("cas", record.cas);
  json.member("formula", record.formula);
  json.member("molar_mass_g_mol", record.molar_mass_g_mol);
  write_texts(json, "synonyms", record.synonyms);
  json.member("normal_boiling_point_K", record.normal_boiling_point_K.has_value()
                                            ? std::optional<double>(record.normal_boiling_point_K->value)
                                            : std::nullopt);
  json.open_array("vapour_pressure");
  for (const PressureSet& set : record.pressure_sets) {
    json.open_object(JsonWriter::Layout::inline_);
    json.member("record", set.id);
    json.member("t_min_K", set.t_min_K);
    json.member("t_max_K", set.t_max_K);
    json.member("source", catalog.citation(set.source));
    json.close();
  }
  json.close();
  json.open_array("groups_in", JsonWriter::Layout::inline_);
  for (const GroupModel model : {GroupModel::dortmund, GroupModel::unifac}) {
    if (!groups_of(record, model).groups.empty()) {
      json.value(to_string(model));
    }
  }
  json.close();
  write_texts(json, "hazards", record.hazard_flags);
  json.close();
}

void write_nonvolatile(JsonWriter& json, const std::string& given, NonvolatileKind kind) {
  json.open_object(JsonWriter::Layout::inline_);
  json.member("given", given);
  json.member("kind", kind == NonvolatileKind::salt      ? "salt"
                      : kind == NonvolatileKind::unknown ? "unknown"
                                                         : "residue");
  json.close();
}

}  // namespace

NameAnswer name_text(const std::vector<std::string>& names, const Catalog& catalog) {
  NameAnswer answer;
  JsonWriter json;
  json.open_object();
  json.member("stillshed_names", 1);
  json.open_array("names");
  for (const std::string& name : names) {
    const Lookup lookup = catalog.find(name);
    if (lookup.status == LookupStatus::found) {
      answer.text += (answer.text.empty() ? "" : "\n") + describe(name, *lookup.component, catalog);
      write_record(json, name, *lookup.component, catalog);
    } else if (const auto kind = nonvolatile_kind(name); kind.has_value()) {
      answer.text += (answer.text.empty() ? "" : "\n") + name +
                     (*kind == NonvolatileKind::salt ? " is a salt: kept in the balance, outside the model\n"
                                                     : " stands for what does not boil: kept in the balance\n");
      write_nonvolatile(json, name, *kind);
    } else {
      answer.problems.push_back(substance_problem("name", name, lookup));
    }
  }
  json.close();
  json.close();
  answer.json = json.finish();
  return answer;
}

}  // namespace stillshed
