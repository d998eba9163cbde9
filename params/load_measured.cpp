#include <fmt/format.h>

#include <array>
#include <cmath>
#include <numeric>
#include <set>

#include "params/cas.hpp"
#include "params/load_parts.hpp"

namespace stillshed {
namespace {

constexpr double kZeroCelsius_K = 273.15;

void read_other_substances(const JsonNode& root, Loading& loading, std::map<std::string, double>& molar_masses) {
  for (const JsonNode& node : root.items("others")) {
    if (!node.allow({"id", "name", "cas", "molar_mass_g_mol"})) {
      continue;
    }
    OtherSubstance other{node.text("id"), node.text("name"), node.text("cas"),
                         node.number("molar_mass_g_mol", {1.0, 2000.0})};
    if (!other.cas.empty() && !is_valid_cas(other.cas)) {
      node.report("cas", '"' + other.cas + '"', "a CAS number with a correct check digit", "compare with the source");
    }
    if (!molar_masses.emplace(other.id, other.molar_mass_g_mol).second) {
      node.report("id", '"' + other.id + '"', "an id that is not yet in use", "use the component record");
    }
    loading.facts.other_substances.push_back(std::move(other));
  }
}

/// Fractions as printed (mass or mole) -> mole fractions.
std::vector<double> read_fractions(const JsonNode& node, const std::vector<std::string>& components,
                                   const std::map<std::string, double>& molar_masses) {
  const bool by_mass = node.has("mass_fractions");
  if (by_mass && node.has("mole_fractions")) {
    node.report("mole_fractions", "mass and mole fractions", "the basis that was printed, once");
  }
  const char* key = by_mass ? "mass_fractions" : "mole_fractions";
  if (!node.has(key)) {
    return {};
  }
  std::vector<double> fractions = node.numbers(key, {0.0, 1.0});
  const double sum = std::accumulate(fractions.begin(), fractions.end(), 0.0);
  constexpr double kRounding = 2e-4;
  if (fractions.size() != components.size() || std::abs(sum - 1.0) > kRounding) {
    node.report(key, fmt::format("{} fractions with the sum {:g}", fractions.size(), sum),
                "one per component with the sum 1");
    return {};
  }
  double moles = 0.0;
  for (std::size_t k = 0; k < fractions.size(); ++k) {
    const auto mass = molar_masses.find(components[k]);
    if (by_mass && mass != molar_masses.end() && mass->second > 0.0) {
      fractions[k] /= mass->second;
    }
    moles += fractions[k];
  }
  for (double& fraction : fractions) {
    fraction /= moles;
  }
  return fractions;
}

char read_tier(const JsonNode& node) {
  const std::string tier = node.text("tier");
  if (tier.size() == 1 && tier[0] >= 'A' && tier[0] <= 'D') {
    return tier[0];
  }
  if (!tier.empty()) {
    node.report("tier", '"' + tier + '"', "A, B, C or D");
  }
  return 'D';
}

void read_record(const JsonNode& node, const std::map<std::string, double>& molar_masses, Loading& loading) {
  MeasuredAzeotrope azeotrope;
  azeotrope.id = node.text("id");
  azeotrope.tier = read_tier(node);
  azeotrope.components = node.texts("components");
  for (const std::string& id : azeotrope.components) {
    if (!molar_masses.contains(id)) {
      node.report("components", '"' + id + '"', "an id of components.json or of others");
    }
  }
  const std::set<std::string> distinct(azeotrope.components.begin(), azeotrope.components.end());
  if (azeotrope.components.size() < 2 || distinct.size() != azeotrope.components.size()) {
    node.report("components", fmt::format("{} different components", distinct.size()), "at least two, each once");
  }
  azeotrope.kind = read_word(node, "kind",
                             {AzeotropeKind::none, AzeotropeKind::minimum, AzeotropeKind::maximum,
                              AzeotropeKind::saddle, AzeotropeKind::heterogeneous_minimum});
  azeotrope.pressure_Pa = 1000.0 * node.optional_number("pressure_kPa", {0.01, 1e5}).value_or(0.0);
  if (const auto celsius = node.optional_number("temperature_degC", {-200.0, 500.0})) {
    azeotrope.temperature_K = *celsius + kZeroCelsius_K;
  }
  azeotrope.mole_fractions = read_fractions(node, azeotrope.components, molar_masses);
  azeotrope.heterogeneous = node.flag("heterogeneous", azeotrope.kind == AzeotropeKind::heterogeneous_minimum);
  if (azeotrope.kind == AzeotropeKind::none && (azeotrope.heterogeneous || !azeotrope.mole_fractions.empty())) {
    node.report("kind", "\"none\" with a composition or two liquids", "a composition only where there is an azeotrope");
  }
  azeotrope.printed = node.text("printed");
  azeotrope.source_key = read_source(node, loading);
  if (const auto source = loading.facts.sources.find(azeotrope.source_key); source != loading.facts.sources.end()) {
    azeotrope.source = source->second.citation;
  }
  azeotrope.record = node.text("record");
  azeotrope.confidence = node.optional_text("confidence");
  azeotrope.note = node.optional_text("note");
  if (azeotrope.tier == 'A' && azeotrope.record != "read in print") {
    node.report("record", '"' + azeotrope.record + '"', "\"read in print\" for tier A");
  }
  loading.facts.measured_azeotropes.push_back(std::move(azeotrope));
}

}  // namespace

void read_measured_azeotropes(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_measured_azeotropes", "tiers", "others", "records"})) {
    return;
  }
  read_format(root, "stillshed_measured_azeotropes");
  if (const auto tiers = root.child("tiers")) {
    (void)tiers->allow({"A", "B", "C", "D"});
  }
  std::map<std::string, double> molar_masses;
  for (const ComponentRecord& component : loading.facts.components) {
    molar_masses.emplace(component.id, component.molar_mass_g_mol);
  }
  read_other_substances(root, loading, molar_masses);
  std::set<std::string> ids;
  for (const JsonNode& node : root.items("records")) {
    if (!node.allow({"id", "tier", "components", "kind", "pressure_kPa", "temperature_degC", "mass_fractions",
                     "mole_fractions", "heterogeneous", "printed", "source", "record", "confidence", "note"})) {
      continue;
    }
    read_record(node, molar_masses, loading);
    if (!ids.insert(loading.facts.measured_azeotropes.back().id).second) {
      node.report("id", '"' + loading.facts.measured_azeotropes.back().id + "\" a second time", "each id once");
    }
  }
}

}  // namespace stillshed
