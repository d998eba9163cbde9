#include <array>
#include <nlohmann/json.hpp>
#include <utility>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

struct FormKeys {
  PressureForm form;
  std::vector<std::string> keys;  ///< coefficients in the order of PressureSet::coefficients
};

const std::vector<FormKeys>& form_table() {
  static const std::vector<FormKeys> table = {
      {PressureForm::clausius_clapeyron, {"boiling_point_K", "H_K"}},
      {PressureForm::antoine_log10, {"A", "B", "C"}},
      {PressureForm::wagner_25, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
      {PressureForm::wagner_36, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
      {PressureForm::wagner_water, {"a1", "a2", "a3", "a4", "a5", "a6", "Tc_K", "Pc_Pa"}},
      {PressureForm::perry_101, {"C1", "C2", "C3", "C4", "C5"}},
  };
  return table;
}

const FormKeys* find_form(const std::string& name) {
  for (const FormKeys& entry : form_table()) {
    if (name == to_string(entry.form)) {
      return &entry;
    }
  }
  return nullptr;
}

std::string form_names() {
  std::string names;
  for (const FormKeys& entry : form_table()) {
    names += (names.empty() ? "" : ", ") + std::string(to_string(entry.form));
  }
  return names;
}

/// The published range; every form but clausius-clapeyron needs one.
void read_range(CaseContext& context, const std::string& pointer, const OrderedJson& json, PressureSet& set) {
  for (const auto& [key, bound] : {std::pair("t_min_K", &set.t_min_K), std::pair("t_max_K", &set.t_max_K)}) {
    if (json.contains(key)) {
      *bound = read_positive(context, pointer_join(pointer, key), json.at(key));
    } else if (set.form != PressureForm::clausius_clapeyron) {
      context.refuse(pointer_join(pointer, key), "nothing", "the range in which the coefficients hold, in K");
    }
  }
  if (set.t_min_K.has_value() && set.t_max_K.has_value() && !(*set.t_min_K < *set.t_max_K)) {
    context.refuse(pointer, "t_min_K not below t_max_K", "a range of temperatures");
  }
}

std::optional<PressureCurve> read_pressure_curve(CaseContext& context, const std::string& pointer,
                                                 const OrderedJson& json) {
  if (!json.is_object() || !json.contains("form")) {
    context.refuse(pointer, brief_json(json), "an object with \"form\": " + form_names());
    return std::nullopt;
  }
  const std::optional<std::string> name =
      read_text(context, pointer_join(pointer, "form"), json.at("form"), form_names());
  const FormKeys* form = name.has_value() ? find_form(*name) : nullptr;
  if (form == nullptr) {
    if (name.has_value()) {
      context.refuse(pointer_join(pointer, "form"), in_quotes(*name), form_names());
    }
    return std::nullopt;
  }
  const std::size_t before = context.problems.size();
  std::vector<std::string> allowed = {"form", "t_min_K", "t_max_K"};
  allowed.insert(allowed.end(), form->keys.begin(), form->keys.end());
  read_object(context, pointer, json, allowed);
  PressureSet set;
  set.id = "user";
  set.form = form->form;
  set.source = "user";
  for (std::size_t k = 0; k < form->keys.size(); ++k) {
    const std::string& key = form->keys[k];
    const std::string where = pointer_join(pointer, key);
    if (!json.contains(key)) {
      context.refuse(where, "nothing", "a number", "form " + *name + " needs it");
      continue;
    }
    const bool positive = key == "boiling_point_K" || key == "H_K" || key == "Tc_K" || key == "Pc_Pa";
    set.coefficients[k] =
        (positive ? read_positive(context, where, json.at(key)) : read_finite(context, where, json.at(key)))
            .value_or(1.0);
  }
  read_range(context, pointer, json, set);
  if (context.problems.size() > before) {
    return std::nullopt;
  }
  try {
    return PressureCurve(set);
  } catch (const InputError& error) {
    for (const Problem& problem : error.problems()) {
      context.refuse(pointer, problem.found, problem.allowed, problem.remedy);
    }
    return std::nullopt;
  }
}

std::optional<CaseComponent> read_own_component(CaseContext& context, const std::string& pointer,
                                                const OrderedJson& json) {
  const std::size_t before = context.problems.size();
  read_object(context, pointer, json,
              {"id", "molar_mass_g_mol", "vapour_pressure", "critical_temperature_K", "critical_pressure_Pa",
               "melting_point_K", "liquid_density_kg_m3"});
  CaseComponent component;
  MixtureComponent own;
  for (const char* key : {"id", "molar_mass_g_mol", "vapour_pressure"}) {
    if (!json.contains(key)) {
      context.refuse(pointer_join(pointer, key), "nothing", "a component defined outright needs it");
    }
  }
  if (json.contains("id")) {
    own.id = read_text(context, pointer_join(pointer, "id"), json.at("id"), "a name").value_or("?");
    if (own.id.empty() || nonvolatile_kind(own.id) == NonvolatileKind::residue) {
      context.refuse(pointer_join(pointer, "id"), in_quotes(own.id), "a name that is not reserved");
    }
  }
  const auto optional_positive = [&](const char* key) -> std::optional<double> {
    return json.contains(key) ? read_positive(context, pointer_join(pointer, key), json.at(key)) : std::nullopt;
  };
  own.molar_mass_g_mol = optional_positive("molar_mass_g_mol").value_or(1.0);
  own.critical_temperature_K = optional_positive("critical_temperature_K");
  own.critical_pressure_Pa = optional_positive("critical_pressure_Pa");
  own.melting_point_K = optional_positive("melting_point_K");
  component.density_kg_m3 = optional_positive("liquid_density_kg_m3");
  component.density_note = "given in the case";
  if (json.contains("vapour_pressure")) {
    const auto curve =
        read_pressure_curve(context, pointer_join(pointer, "vapour_pressure"), json.at("vapour_pressure"));
    if (curve.has_value()) {
      own.pressure = *curve;
    }
  }
  if (context.problems.size() > before) {
    return std::nullopt;
  }
  component.entry.id = own.id;
  component.entry.given_name = own.id;
  component.molar_mass_g_mol = own.molar_mass_g_mol;
  component.own = std::move(own);
  return component;
}

}  // namespace

std::vector<CaseComponent> read_components(CaseContext& context, const OrderedJson& json) {
  std::vector<CaseComponent> components;
  if (!json.is_array()) {
    context.refuse("/components", brief_json(json),
                   "an array: names on file, or components defined outright; its order is the order of every matrix");
    return components;
  }
  for (std::size_t k = 0; k < json.size(); ++k) {
    const std::string pointer = pointer_join("/components", std::to_string(k));
    std::optional<CaseComponent> component;
    if (json[k].is_string()) {
      const std::string name = json[k].get<std::string>();
      const ComponentRecord* record = find_substance(context, pointer, name);
      if (record != nullptr) {
        component.emplace();
        component->entry.given_name = name;
        component->entry.id = record->id;
        component->record = record;
        component->molar_mass_g_mol = record->molar_mass_g_mol;
      }
    } else if (json[k].is_object()) {
      component = read_own_component(context, pointer, json[k]);
    } else {
      context.refuse(pointer, brief_json(json[k]), "a name on file, or an object that defines a component");
    }
    if (!component.has_value()) {
      continue;
    }
    for (const CaseComponent& other : components) {
      if (other.entry.id == component->entry.id) {
        context.refuse(pointer,
                       in_quotes(component->entry.given_name) + ", the same as " + in_quotes(other.entry.given_name),
                       "each component once");
      }
    }
    components.push_back(std::move(*component));
  }
  return components;
}

}  // namespace stillshed
