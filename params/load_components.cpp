#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "params/cas.hpp"
#include "params/load_parts.hpp"
#include "params/names.hpp"
#include "params/pressure_check.hpp"

namespace stillshed {
namespace {

constexpr Bounds kTemperature_K{1.0, 3000.0};
constexpr double kAtmosphere_Pa = 101325.0;

/// {"value", "source", "note"?, "temperature_K"?}; the temperature only where `at_K` is wanted.
std::optional<Sourced> read_sourced(const JsonNode& component, const char* key, Bounds bounds, const Loading& loading,
                                    std::optional<double>* at_K = nullptr) {
  const auto node = component.child(key);
  if (!node) {
    return std::nullopt;
  }
  const bool known = at_K == nullptr ? node->allow({"value", "source", "note"})
                                     : node->allow({"value", "temperature_K", "source", "note"});
  if (!known) {
    return std::nullopt;
  }
  if (at_K != nullptr) {
    *at_K = node->number("temperature_K", kTemperature_K);
  }
  return Sourced{node->number("value", bounds), read_source(*node, loading), node->optional_text("note")};
}

GroupAssignment read_groups(const JsonNode& component, const char* key, const GroupTable& table) {
  GroupAssignment result;
  const auto node = component.child(key);
  if (!node || !node->allow({"groups", "approximate", "note", "alternatives"})) {
    return result;
  }
  if (const auto rows = node->child("groups")) {
    result.groups = read_group_counts(*rows, &table);
  }
  if (result.groups.empty()) {
    node->report("groups", "no groups", "at least one [subgroup, count]",
                 "leave the whole entry out when there are none");
  }
  result.approximate = node->flag("approximate", false);
  result.note = node->optional_text("note");
  for (const JsonNode& other : node->items("alternatives")) {
    result.alternatives.push_back(read_group_counts(other, &table));
  }
  return result;
}

/// Claims a name for a component; two owners are a problem.
void claim_name(const JsonNode& node, const char* key, const std::string& name, const std::string& id,
                Loading& loading) {
  const auto [entry, fresh] = loading.owner_of_name.emplace(normalised_name(name), id);
  if (!fresh && entry->second != id) {
    node.report(key, fmt::format("\"{}\", which also names {}", name, entry->second), "names of one component only",
                "move it to names.json as an ambiguous name");
  }
}

void read_identity(const JsonNode& node, ComponentRecord& component, Loading& loading) {
  component.id = node.text("id");
  const auto plain = [](char c) { return (c >= 'a' && c <= 'z') || (c >= '0' && c <= '9') || c == '-'; };
  if (!std::all_of(component.id.begin(), component.id.end(), plain)) {
    node.report("id", '"' + component.id + '"', "lower-case letters, digits and hyphens");
  }
  component.name = node.text("name");
  component.synonyms = node.texts("synonyms");
  component.cas = node.text("cas");
  if (!component.cas.empty() && !is_valid_cas(component.cas)) {
    node.report("cas", '"' + component.cas + '"', "a CAS number with a correct check digit", "compare with the source");
  }
  component.formula = node.text("formula");
  component.smiles = node.text("smiles");
  component.molar_mass_g_mol = node.number("molar_mass_g_mol", {1.0, 2000.0});
  claim_name(node, "id", component.id, component.id, loading);
  claim_name(node, "name", component.name, component.id, loading);
  for (const std::string& synonym : component.synonyms) {
    claim_name(node, "synonyms", synonym, component.id, loading);
  }
}

void read_constants(const JsonNode& node, ComponentRecord& component, const Loading& loading) {
  component.normal_boiling_point_K = read_sourced(node, "normal_boiling_point_K", kTemperature_K, loading);
  component.melting_point_K = read_sourced(node, "melting_point_K", kTemperature_K, loading);
  component.critical_temperature_K = read_sourced(node, "critical_temperature_K", kTemperature_K, loading);
  component.critical_pressure_Pa = read_sourced(node, "critical_pressure_Pa", {1e5, 1e8}, loading);
  component.acentric_factor = read_sourced(node, "acentric_factor", {-0.5, 3.0}, loading);
  component.flash_point_K = read_sourced(node, "flash_point_K", kTemperature_K, loading);
  component.autoignition_K = read_sourced(node, "autoignition_K", kTemperature_K, loading);
  component.liquid_density_kg_m3 =
      read_sourced(node, "liquid_density_kg_m3", {100.0, 5000.0}, loading, &component.liquid_density_T_K);
  component.heat_of_vaporization_J_mol =
      read_sourced(node, "heat_of_vaporization_J_mol", {1e3, 1e6}, loading, &component.heat_of_vaporization_T_K);
  if (component.normal_boiling_point_K && component.critical_temperature_K &&
      component.normal_boiling_point_K->value >= component.critical_temperature_K->value) {
    node.report("normal_boiling_point_K", fmt::format("{:g}", component.normal_boiling_point_K->value),
                fmt::format("less than the critical temperature {:g}", component.critical_temperature_K->value));
  }
}

char read_grade(const JsonNode& node) {
  const std::string grade = node.text("pressure_grade");
  if (grade.size() != 1 || std::string("ABCDE-").find(grade) == std::string::npos) {
    if (!grade.empty()) {
      node.report("pressure_grade", '"' + grade + '"', "A, B, C, D, E or -");
    }
    return '-';
  }
  return grade[0];
}

struct FormShape {
  PressureForm form;
  std::vector<const char*> names;
};

const FormShape& shape_of(PressureForm form) {
  static const std::vector<FormShape> kShapes = {
      {PressureForm::antoine_log10, {"A", "B", "C"}},
      {PressureForm::wagner_25, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
      {PressureForm::wagner_36, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
      {PressureForm::wagner_water, {"a1", "a2", "a3", "a4", "a5", "a6", "Tc_K", "Pc_Pa"}},
      {PressureForm::perry_101, {"C1", "C2", "C3", "C4", "C5"}},
      {PressureForm::clausius_clapeyron, {"boiling_point_K", "H_K"}}};
  return *std::find_if(kShapes.begin(), kShapes.end(), [&](const FormShape& shape) { return shape.form == form; });
}

void read_coefficients(const JsonNode& node, PressureSet& set) {
  const auto values = node.child("coefficients");
  if (!values) {
    node.report("coefficients", "nothing", "an object with the coefficients of the form", "add it");
    return;
  }
  const FormShape& shape = shape_of(set.form);
  for (std::size_t k = 0; k < shape.names.size(); ++k) {
    set.coefficients[k] = values->number(shape.names[k]);
  }
  for (const std::string& key : values->keys()) {
    if (std::none_of(shape.names.begin(), shape.names.end(), [&](const char* name) { return key == name; })) {
      values->report(key, "an unknown key", std::string("a coefficient of the form ") + to_string(set.form));
    }
  }
}

/// Antoine constants stand in the units of their source; from here on they are for Pa and K.
void convert_antoine(const JsonNode& node, PressureSet& set) {
  const auto units = node.child("units");
  if (set.form != PressureForm::antoine_log10) {
    if (units) {
      node.report("units", "units", "no units: the form is written for K and Pa");
    }
    return;
  }
  if (!units || !units->allow({"pressure", "temperature"})) {
    if (!units) {
      node.report("units", "nothing", "pressure and temperature unit of the printed constants", "add them");
    }
    return;
  }
  const std::string pressure = units->text("pressure");
  const std::string temperature = units->text("temperature");
  constexpr double kMillimetreOfMercury_Pa = 133.322387415;
  if (pressure == "bar") {
    set.coefficients[0] += 5.0;
  } else if (pressure == "kPa") {
    set.coefficients[0] += 3.0;
  } else if (pressure == "mmHg") {
    set.coefficients[0] += std::log10(kMillimetreOfMercury_Pa);
  } else if (pressure != "Pa") {
    units->report("pressure", '"' + pressure + '"', "Pa, kPa, bar or mmHg");
  }
  if (temperature == "degC") {
    set.coefficients[2] -= 273.15;
  } else if (temperature != "K") {
    units->report("temperature", '"' + temperature + '"', "K or degC");
  }
}

void check_curve(const JsonNode& node, const PressureSet& set, const ComponentRecord& component) {
  if (const auto T = falls_at_K(set)) {
    node.report("coefficients", fmt::format("a vapour pressure that does not rise at {:.1f} K", *T),
                "one that rises over range_K", "compare the coefficients and the range with the source");
    return;
  }
  if (!component.normal_boiling_point_K) {
    return;
  }
  constexpr double kLargestMiss_K = 1.0;
  constexpr double kStatedWithin_K = 0.02;
  const double boiling_K = component.normal_boiling_point_K->value;
  const auto found_K = boiling_point_in_range_K(set, kAtmosphere_Pa);
  const bool covered = *set.t_min_K + kLargestMiss_K < boiling_K && boiling_K < *set.t_max_K - kLargestMiss_K;
  const auto stated_K = node.optional_number("misses_boiling_point_by_K");
  if (stated_K && found_K && std::abs(*found_K - boiling_K - *stated_K) <= kStatedWithin_K) {
    return;  // a conflict between two published numbers, kept as published and declared
  }
  if (stated_K || (!found_K && covered) || (found_K && std::abs(*found_K - boiling_K) > kLargestMiss_K)) {
    node.report(stated_K ? "misses_boiling_point_by_K" : "coefficients",
                found_K ? fmt::format("a boiling point of {:.2f} K at 101325 Pa", *found_K)
                        : std::string("no boiling point at 101325 Pa within range_K"),
                fmt::format("{:.2f} K within 1 K, or the difference stated", boiling_K),
                "compare coefficients, units and range with the source");
  }
}

void read_pressure_set(const JsonNode& node, std::set<std::string>& ids, Loading& loading) {
  PressureSet set;
  const std::string owner = node.text("component");
  set.id = node.text("id");
  set.form = read_word(node, "form",
                       {PressureForm::antoine_log10, PressureForm::wagner_25, PressureForm::wagner_36,
                        PressureForm::wagner_water, PressureForm::perry_101, PressureForm::clausius_clapeyron});
  const std::size_t problems_before = loading.problems.size();
  read_coefficients(node, set);
  convert_antoine(node, set);
  const std::vector<double> range_K = node.numbers("range_K", kTemperature_K);
  if (range_K.size() != 2 || range_K[0] >= range_K[1]) {
    node.report("range_K", fmt::format("{} numbers", range_K.size()), "[low, high] in K with low below high");
  } else {
    set.t_min_K = range_K[0];
    set.t_max_K = range_K[1];
  }
  set.source = read_source(node, loading);
  set.where = node.optional_text("where");
  set.estimated = node.flag("estimated", false);
  set.note = node.optional_text("note");
  if (!ids.insert(set.id).second) {
    node.report("id", '"' + set.id + "\" a second time", "each id once");
  }
  expect_components(node, "component", {owner}, loading);
  const auto found = loading.component_of_id.find(owner);
  if (found == loading.component_of_id.end()) {
    return;
  }
  ComponentRecord& component = loading.facts.components[found->second];
  if (loading.problems.size() == problems_before) {
    check_curve(node, set, component);
  }
  component.pressure_sets.push_back(std::move(set));
}

}  // namespace

void read_components(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_components", "components"})) {
    return;
  }
  read_format(root, "stillshed_components");
  std::set<std::string> numbers;
  for (const JsonNode& node : root.items("components")) {
    if (!node.allow({"id",
                     "name",
                     "cas",
                     "formula",
                     "molar_mass_g_mol",
                     "synonyms",
                     "smiles",
                     "normal_boiling_point_K",
                     "melting_point_K",
                     "critical_temperature_K",
                     "critical_pressure_Pa",
                     "acentric_factor",
                     "flash_point_K",
                     "autoignition_K",
                     "liquid_density_kg_m3",
                     "heat_of_vaporization_J_mol",
                     "pressure_grade",
                     "vapour_dimerizes",
                     "association",
                     "hazards",
                     "remarks",
                     "unifac",
                     "dortmund"})) {
      continue;
    }
    ComponentRecord component;
    read_identity(node, component, loading);
    read_constants(node, component, loading);
    component.pressure_grade = read_grade(node);
    component.vapour_dimerizes = node.flag("vapour_dimerizes", false);
    component.association_remark = node.optional_text("association");
    component.hazard_flags = node.texts("hazards");
    expect_hazards(node, "hazards", component.hazard_flags);
    component.remarks = node.optional_text("remarks");
    component.unifac = read_groups(node, "unifac", loading.facts.unifac);
    component.dortmund = read_groups(node, "dortmund", loading.facts.dortmund);
    if (!numbers.insert(component.cas).second) {
      node.report("cas", '"' + component.cas + "\" a second time", "each CAS number once");
    }
    if (!loading.component_of_id.emplace(component.id, loading.facts.components.size()).second) {
      node.report("id", '"' + component.id + "\" a second time", "each id once");
    }
    loading.facts.components.push_back(std::move(component));
  }
}

void read_pressure_sets(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_vapour_pressure", "sets"})) {
    return;
  }
  read_format(root, "stillshed_vapour_pressure");
  std::set<std::string> ids;
  for (const JsonNode& node : root.items("sets")) {
    if (node.allow({"component", "id", "form", "units", "coefficients", "range_K", "source", "where", "estimated",
                    "misses_boiling_point_by_K", "note"})) {
      read_pressure_set(node, ids, loading);
    }
  }
  for (const ComponentRecord& component : loading.facts.components) {
    if (component.pressure_sets.empty() != (component.pressure_grade == '-')) {
      root.report("sets",
                  fmt::format("{} sets for {}, grade {}", component.pressure_sets.size(), component.id,
                              component.pressure_grade),
                  "grade - exactly when there is no set", "correct pressure_grade in components.json");
    }
  }
}

}  // namespace stillshed
