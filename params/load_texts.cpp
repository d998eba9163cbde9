#include <fmt/format.h>

#include "params/cas.hpp"
#include "params/load_parts.hpp"
#include "params/names.hpp"

namespace stillshed {
namespace {

CautionTrigger read_trigger(const JsonNode& node) {
  using enum CautionTrigger;
  return read_word(node, "trigger",
                   {always, substance, hazard, pair, declared, near_dry, unknowns, low_ignition, flash_point, region,
                    use, pressure, vacuum, two_liquids, extrapolated});
}

void read_caution(const JsonNode& node, Loading& loading) {
  CautionRecord caution;
  caution.code = node.text("code");
  caution.trigger = read_trigger(node);
  caution.above_verdict = node.flag("above_verdict", false);
  caution.text = node.text("text");
  caution.substances = node.texts("substances");
  caution.with = node.texts("with");
  caution.hazards = node.texts("hazards");
  caution.sources = node.texts("sources");
  caution.note = node.optional_text("note");
  expect_components(node, "substances", caution.substances, loading);
  expect_components(node, "with", caution.with, loading);
  expect_hazards(node, "hazards", caution.hazards);
  for (const std::string& key : caution.sources) {
    if (!loading.facts.sources.contains(key)) {
      node.report("sources", '"' + key + '"', "a key of sources.json", "add the citation to sources.json");
    }
  }
  if (caution.sources.empty()) {
    node.report("sources", "nothing", "at least one key of sources.json", "name the source");
  }
  const bool wants_pair = caution.trigger == CautionTrigger::pair;
  if (wants_pair != !caution.with.empty() || (wants_pair && caution.substances.empty())) {
    node.report("with", fmt::format("{} entries", caution.with.size()), "partners exactly for the trigger pair");
  }
  if (caution.trigger == CautionTrigger::substance && caution.substances.empty()) {
    node.report("substances", "nothing", "at least one component for the trigger substance");
  }
  if (caution.trigger == CautionTrigger::hazard && caution.hazards.empty()) {
    node.report("hazards", "nothing", "at least one flag for the trigger hazard");
  }
  loading.facts.cautions.push_back(std::move(caution));
}

}  // namespace

void read_names(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_names", "ambiguous"})) {
    return;
  }
  read_format(root, "stillshed_names");
  for (const JsonNode& node : root.items("ambiguous")) {
    if (!node.allow({"names", "choices", "why"})) {
      continue;
    }
    const std::vector<std::string> choices = node.texts("choices");
    const std::string why = node.text("why");
    expect_components(node, "choices", choices, loading);
    for (const std::string& name : node.texts("names")) {
      const std::string plain = normalised_name(name);
      if (const auto owner = loading.owner_of_name.find(plain); owner != loading.owner_of_name.end()) {
        node.report("names", fmt::format("\"{}\", which names {}", name, owner->second), "names of no single component",
                    "remove the synonym from components.json");
      }
      if (!loading.facts.ambiguous_names.emplace(plain, AmbiguousName{name, choices, why}).second) {
        node.report("names", '"' + name + "\" a second time", "each name once");
      }
    }
  }
}

void read_cautions(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_cautions", "closing", "cautions"})) {
    return;
  }
  read_format(root, "stillshed_cautions");
  loading.facts.caution_closing = root.text("closing");
  for (const JsonNode& node : root.items("cautions")) {
    if (node.allow({"code", "trigger", "above_verdict", "text", "substances", "with", "hazards", "sources", "note"})) {
      read_caution(node, loading);
    }
  }
}

void read_residual_limits(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_ich_q3c", "limits"})) {
    return;
  }
  read_format(root, "stillshed_ich_q3c");
  for (const JsonNode& node : root.items("limits")) {
    if (!node.allow({"name", "component", "cas", "class", "pde_mg_per_day", "limit_ppm", "status", "note", "source"})) {
      continue;
    }
    ResidualLimit limit;
    limit.name = node.text("name");
    limit.component = node.optional_text("component");
    limit.cas = node.optional_text("cas");
    limit.solvent_class = node.text("class");
    limit.pde_mg_per_day = node.optional_number("pde_mg_per_day", kPositive);
    limit.limit_ppm = node.optional_number("limit_ppm", kPositive);
    limit.status = node.text("status");
    limit.note = node.optional_text("note");
    limit.source = read_source(node, loading);
    if (!limit.cas.empty() && !is_valid_cas(limit.cas)) {
      node.report("cas", '"' + limit.cas + '"', "a CAS number with a correct check digit", "compare with the source");
    }
    if (limit.solvent_class != "1" && limit.solvent_class != "2" && limit.solvent_class != "3" &&
        limit.solvent_class != "no adequate data") {
      node.report("class", '"' + limit.solvent_class + '"', "1, 2, 3 or \"no adequate data\"");
    }
    if (!limit.component.empty()) {
      expect_components(node, "component", {limit.component}, loading);
      const auto found = loading.component_of_id.find(limit.component);
      if (found != loading.component_of_id.end() && loading.facts.components[found->second].cas != limit.cas) {
        node.report("cas", '"' + limit.cas + '"', "the CAS number of the component " + limit.component);
      }
    }
    loading.facts.residual_limits.push_back(std::move(limit));
  }
}

}  // namespace stillshed
