#include <fmt/format.h>

#include <set>

#include "params/load_parts.hpp"

namespace stillshed {
namespace {

constexpr Bounds kFraction{0.0, 1.0};
constexpr Bounds kTemperature_K{1.0, 3000.0};

std::vector<std::vector<double>> read_matrix(const JsonNode& node, const char* key, std::size_t size) {
  std::vector<std::vector<double>> rows;
  for (const JsonNode& row : node.items(key)) {
    rows.push_back(row.as_numbers());
    if (rows.back().size() != size) {
      row.report({}, fmt::format("{} numbers", rows.back().size()), fmt::format("{} numbers", size));
    }
  }
  if (rows.size() != size) {
    node.report(key, fmt::format("{} rows", rows.size()), fmt::format("{} rows", size));
  }
  return rows;
}

void read_activity(const JsonNode& node, CheckValue& check, const Loading& loading) {
  check.model = node.text("model");
  check.temperature_K = node.number("temperature_K", kTemperature_K);
  check.mole_fractions = node.numbers("mole_fractions", kFraction);
  const std::size_t size = check.mole_fractions.size();
  if (check.expected.size() != size || size < 2) {
    node.report("expected", fmt::format("{} values for {} mole fractions", check.expected.size(), size),
                "one activity coefficient per component");
  }
  if (check.model == "nrtl") {
    check.tau = read_matrix(node, "tau", size);
    check.alpha = read_matrix(node, "alpha", size);
    return;
  }
  const bool dortmund = check.model == to_string(GroupModel::dortmund);
  if (!dortmund && check.model != to_string(GroupModel::unifac)) {
    node.report("model", '"' + check.model + '"', "nrtl, unifac or unifac-dortmund");
    return;
  }
  const GroupTable& table = dortmund ? loading.facts.dortmund : loading.facts.unifac;
  for (const JsonNode& component : node.items("components")) {
    if (!component.allow({"name", "groups"})) {
      continue;
    }
    check.names.push_back(component.text("name"));
    const auto rows = component.child("groups");
    check.groups.push_back(rows ? read_group_counts(*rows, &table) : std::vector<GroupCount>{});
  }
  if (check.groups.size() != size) {
    node.report("components", fmt::format("{} components", check.groups.size()), fmt::format("{} components", size));
  }
  for (const JsonNode& pair : node.items("superseded_pairs")) {
    const std::vector<int> groups = pair.as_integers();
    if (groups.size() != 2) {
      pair.report({}, pair.dump(), "two main groups");
      continue;
    }
    check.superseded_pairs.emplace_back(groups[0], groups[1]);
  }
}

void read_azeotropes(const JsonNode& node, CheckValue& check) {
  const auto case_file = node.child("case");
  if (!case_file) {
    node.report("case", "nothing", "a case file", "add it");
    return;
  }
  check.case_json = case_file->dump();
  for (const JsonNode& row : node.items("expected_azeotropes")) {
    if (!row.allow({"components", "mole_fractions", "temperature_K"})) {
      continue;
    }
    CheckAzeotrope azeotrope{row.texts("components"), row.numbers("mole_fractions", kFraction),
                             row.number("temperature_K", kTemperature_K)};
    if (azeotrope.components.size() != azeotrope.mole_fractions.size()) {
      row.report("mole_fractions", fmt::format("{} fractions", azeotrope.mole_fractions.size()), "one per component");
    }
    check.azeotropes.push_back(std::move(azeotrope));
  }
}

void read_check(const JsonNode& node, Loading& loading) {
  CheckValue check;
  check.id = node.text("id");
  check.kind = read_word(node, "kind",
                         {CheckKind::activity, CheckKind::boiling_point, CheckKind::fenske, CheckKind::azeotropes});
  check.source = read_source(node, loading);
  check.note = node.optional_text("note");
  check.tolerance = node.optional_number("tolerance", kPositive).value_or(0.0);
  check.relative_tolerance = node.optional_number("relative_tolerance", kPositive).value_or(0.0);
  if (check.tolerance + check.relative_tolerance == 0.0) {
    node.report("tolerance", "nothing", "a tolerance or a relative_tolerance", "say how closely the value was printed");
  }
  check.expected = node.numbers("expected");
  switch (check.kind) {
    case CheckKind::activity: read_activity(node, check, loading); break;
    case CheckKind::boiling_point:
      check.component = node.text("component");
      expect_components(node, "component", {check.component}, loading);
      check.pressure_Pa = node.number("pressure_Pa", kPositive);
      break;
    case CheckKind::fenske:
      check.relative_volatility = node.number("relative_volatility", {1.0, 1000.0});
      check.purity = node.number("purity", {0.5, 1.0});
      break;
    case CheckKind::azeotropes: read_azeotropes(node, check); break;
  }
  const bool single = check.kind == CheckKind::boiling_point || check.kind == CheckKind::fenske;
  if (single && check.expected.size() != 1) {
    node.report("expected", fmt::format("{} values", check.expected.size()), "one value");
  }
  loading.facts.check_values.push_back(std::move(check));
}

}  // namespace

void read_check_values(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_check_values", "checks"})) {
    return;
  }
  read_format(root, "stillshed_check_values");
  std::set<std::string> ids;
  for (const JsonNode& node : root.items("checks")) {
    if (!node.allow({"id",
                     "kind",
                     "source",
                     "note",
                     "tolerance",
                     "relative_tolerance",
                     "expected",
                     "model",
                     "components",
                     "temperature_K",
                     "mole_fractions",
                     "tau",
                     "alpha",
                     "superseded_pairs",
                     "component",
                     "pressure_Pa",
                     "relative_volatility",
                     "purity",
                     "case",
                     "expected_azeotropes"})) {
      continue;
    }
    read_check(node, loading);
    if (!ids.insert(loading.facts.check_values.back().id).second) {
      node.report("id", '"' + loading.facts.check_values.back().id + "\" a second time", "each id once");
    }
  }
}

}  // namespace stillshed
