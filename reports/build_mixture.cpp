#include "reports/build_mixture.hpp"

#include <algorithm>

#include "engine/limits.hpp"

namespace stillshed {
namespace {

constexpr double kBelowLowest_K = 30.0;
constexpr double kAboveHighest_K = 10.0;

/// Boiling temperatures at this pressure by the first set of every component.
TemperatureRange first_bracket(const Case& input, const std::vector<const ComponentRecord*>& records) {
  TemperatureRange range{1e9, 0.0};
  for (std::size_t i = 0; i < records.size(); ++i) {
    const double boiling_K = records[i] == nullptr
                                 ? input.user_components[i]->pressure.boiling_point_K(input.pressure_Pa)
                                 : PressureCurve(records[i]->pressure_sets.front()).boiling_point_K(input.pressure_Pa);
    range.lower_K = std::min(range.lower_K, boiling_K);
    range.upper_K = std::max(range.upper_K, boiling_K);
  }
  return {range.lower_K - kBelowLowest_K, range.upper_K + kAboveHighest_K};
}

MixtureComponent from_record(const ComponentRecord& record, const PressureSet& set) {
  MixtureComponent component;
  component.id = record.id;
  component.cas = record.cas;
  component.molar_mass_g_mol = record.molar_mass_g_mol;
  component.pressure = PressureCurve(set);
  if (record.critical_temperature_K.has_value()) {
    component.critical_temperature_K = record.critical_temperature_K->value;
  }
  if (record.critical_pressure_Pa.has_value()) {
    component.critical_pressure_Pa = record.critical_pressure_Pa->value;
  }
  if (record.melting_point_K.has_value()) {
    component.melting_point_K = record.melting_point_K->value;
  }
  component.vapour_dimerizes = record.vapour_dimerizes;
  return component;
}

}  // namespace

BuiltMixture build_mixture(const Case& input, const Catalog& catalog) {
  BuiltMixture built;
  std::vector<Problem> problems;
  for (std::size_t i = 0; i < input.stream.size(); ++i) {
    const bool own = input.user_components[i].has_value();
    built.records.push_back(own ? nullptr : catalog.by_id(input.stream[i].id));
    if (!own && (built.records.back() == nullptr || built.records.back()->pressure_sets.empty())) {
      problems.push_back({input.stream[i].given_name, "no vapour pressure on file", "a component with vapour pressure",
                          "define it in \"components\""});
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
  const TemperatureRange bracket = first_bracket(input, built.records);
  std::vector<MixtureComponent> components;
  for (std::size_t i = 0; i < built.records.size(); ++i) {
    const ComponentRecord* record = built.records[i];
    components.push_back(
        record == nullptr ? *input.user_components[i]
                          : from_record(*record, *choose_pressure_set(*record, bracket.lower_K, bracket.upper_K).set));
  }
  built.choice = choose_model(input, built.records, catalog.facts());
  built.mixture = Mixture(std::move(components), built.choice.activity);
  return built;
}

std::vector<Evidence> pressure_evidence(const Mixture& mixture, double pressure_Pa, double lowest_K, double highest_K) {
  std::vector<Evidence> marks;
  for (const MixtureComponent& component : mixture.components()) {
    const PressureSet& set = component.pressure.set();
    if (set.source == "user") {
      marks.push_back(Evidence::user);
    } else if (set.estimated) {
      marks.push_back(Evidence::predicted);
    } else if (pressure_Pa > kPlainVapourUpTo_Pa || !component.pressure.covers(lowest_K) ||
               !component.pressure.covers(highest_K)) {
      marks.push_back(Evidence::stretched);
    } else {
      marks.push_back(Evidence::fitted);
    }
  }
  return marks;
}

}  // namespace stillshed
