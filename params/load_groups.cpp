#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "params/load_parts.hpp"

namespace stillshed {
namespace {

constexpr int kMaxGroupNumber = 999;

GroupInteraction read_interaction(const JsonNode& row, const char* key, bool temperature_dependent) {
  const std::vector<double> values = row.numbers(key);
  const std::size_t wanted = temperature_dependent ? 3 : 1;
  if (values.size() != wanted) {
    row.report(key, fmt::format("{} numbers", values.size()), temperature_dependent ? "a [K], b [-], c [1/K]" : "a [K]",
               "give the pair both ways, \"mn\" and \"nm\", as printed");
    return {};
  }
  return temperature_dependent ? GroupInteraction{values[0], values[1], values[2]}
                               : GroupInteraction{values[0], 0.0, 0.0};
}

/// The two main groups of a row; reports unknown ones and wrong order.
std::pair<int, int> read_pair(const JsonNode& row, const GroupTable& table) {
  const int m = row.integer("m", 1, kMaxGroupNumber);
  const int n = row.integer("n", 1, kMaxGroupNumber);
  for (const auto& [key, group] : {std::pair{"m", m}, std::pair{"n", n}}) {
    if (!table.main_groups.contains(group)) {
      row.report(key, std::to_string(group), "an id of main_groups");
    }
  }
  if (m >= n) {
    row.report("m", fmt::format("{} with n = {}", m, n), "m below n", "each pair once; pairs of one group are zero");
  }
  return {m, n};
}

void read_main_groups(const JsonNode& root, GroupTable& table) {
  for (const JsonNode& row : root.items("main_groups")) {
    if (!row.allow({"id", "name", "ionic"})) {
      continue;
    }
    const int id = row.integer("id", 1, kMaxGroupNumber);
    (void)row.flag("ionic", false);
    if (!table.main_groups.emplace(id, row.text("name")).second) {
      row.report("id", std::to_string(id) + " a second time", "each main group once");
    }
  }
}

void read_subgroups(const JsonNode& root, GroupTable& table) {
  std::set<int> used;
  for (const JsonNode& row : root.items("subgroups")) {
    if (!row.allow({"id", "main_group", "name", "R", "Q"})) {
      continue;
    }
    Subgroup group;
    group.id = row.integer("id", 1, kMaxGroupNumber);
    group.main_group = row.integer("main_group", 1, kMaxGroupNumber);
    group.name = row.text("name");
    group.R = row.number("R", kPositive);
    group.Q = row.number("Q", kNotNegative);
    used.insert(group.main_group);
    if (!table.main_groups.contains(group.main_group)) {
      row.report("main_group", std::to_string(group.main_group), "an id of main_groups");
    }
    const int id = group.id;
    if (!table.subgroups.emplace(id, std::move(group)).second) {
      row.report("id", std::to_string(id) + " a second time", "each subgroup once");
    }
  }
  for (const auto& [id, name] : table.main_groups) {
    if (!used.contains(id)) {
      root.report("main_groups", fmt::format("group {} ({}) without a subgroup", id, name), "at least one subgroup");
    }
  }
}

void read_interactions(const JsonNode& root, bool temperature_dependent, GroupTable& table) {
  for (const JsonNode& row : root.items("interactions")) {
    if (!row.allow({"m", "n", "mn", "nm", "class"})) {
      continue;
    }
    const auto [m, n] = read_pair(row, table);
    const GroupInteraction mn = read_interaction(row, "mn", temperature_dependent);
    const GroupInteraction nm = read_interaction(row, "nm", temperature_dependent);
    const int value_class = row.integer("class", 1, 99);
    if (!table.class_texts.contains(value_class)) {
      row.report("class", std::to_string(value_class), "a key of classes");
    }
    if (!table.interactions.emplace(std::pair{m, n}, mn).second) {
      row.report({}, fmt::format("pair {}-{} a second time", m, n), "each pair once");
      continue;
    }
    table.interactions.emplace(std::pair{n, m}, nm);
    table.classes.emplace(std::pair{m, n}, value_class);
  }
}

void read_extras(const JsonNode& root, bool temperature_dependent, GroupTable& table) {
  for (const JsonNode& row : root.items("superseded")) {
    if (!row.allow({"m", "n", "mn", "nm", "edition"})) {
      continue;
    }
    const auto [m, n] = read_pair(row, table);
    table.superseded.push_back({m, n, read_interaction(row, "mn", temperature_dependent),
                                read_interaction(row, "nm", temperature_dependent), row.text("edition")});
  }
  for (const JsonNode& row : root.items("notes")) {
    if (row.allow({"where", "note"})) {
      table.notes.push_back({row.text("where"), row.text("note")});
    }
  }
  if (const auto range = root.child("recommended_range_K"); range && range->allow({"low", "high", "note"})) {
    table.recommended_low_K = range->number("low", kPositive);
    table.recommended_high_K = range->number("high", kPositive);
    if (*table.recommended_low_K >= *table.recommended_high_K) {
      range->report("low", fmt::format("{:g}", *table.recommended_low_K), "less than high");
    }
  }
}

void read_classes(const JsonNode& root, GroupTable& table) {
  const auto classes = root.child("classes");
  if (!classes) {
    root.report("classes", "nothing", "an object: class number -> what is known of its origin", "add it");
    return;
  }
  for (const std::string& key : classes->keys()) {
    if (key.size() != 1 || key[0] < '1' || key[0] > '9') {
      classes->report(key, '"' + key + '"', "a digit from 1 to 9");
      continue;
    }
    table.class_texts.emplace(key[0] - '0', classes->text(key.c_str()));
  }
}

}  // namespace

void read_group_table(const JsonNode& root, GroupModel model, Loading& loading) {
  GroupTable& table = model == GroupModel::unifac ? loading.facts.unifac : loading.facts.dortmund;
  if (!root.allow({"stillshed_groups", "model", "title", "combinatorial_exponent", "recommended_range_K", "sources",
                   "classes", "main_groups", "subgroups", "interactions", "superseded", "notes"})) {
    return;
  }
  read_format(root, "stillshed_groups");
  table.model = model;
  (void)read_word(root, "model", {model});
  table.title = root.text("title");
  table.combinatorial_exponent = root.number("combinatorial_exponent", {0.5, 1.0});
  table.sources = root.texts("sources");
  for (const std::string& key : table.sources) {
    if (!loading.facts.sources.contains(key)) {
      root.report("sources", '"' + key + '"', "a key of sources.json", "add the citation to sources.json");
    }
  }
  if (table.sources.empty()) {
    root.report("sources", "nothing", "at least one key of sources.json", "name the papers");
  }
  const bool temperature_dependent = model == GroupModel::dortmund;
  read_classes(root, table);
  read_main_groups(root, table);
  read_subgroups(root, table);
  read_interactions(root, temperature_dependent, table);
  read_extras(root, temperature_dependent, table);
}

std::vector<GroupCount> read_group_counts(const JsonNode& rows, const GroupTable* table) {
  std::vector<GroupCount> counts;
  for (const JsonNode& row : rows.elements()) {
    const std::vector<int> values = row.as_integers();
    if (values.size() != 2 || values[1] < 1) {
      row.report({}, row.dump(), "[subgroup, count] with a count of at least 1");
      continue;
    }
    if (table != nullptr && !table->subgroups.contains(values[0])) {
      row.report({}, std::to_string(values[0]), "a subgroup of the " + std::string(to_string(table->model)) + " table");
    }
    const auto same = [&](const GroupCount& other) { return other.subgroup == values[0]; };
    if (std::any_of(counts.begin(), counts.end(), same)) {
      row.report({}, std::to_string(values[0]) + " a second time", "each subgroup once");
    }
    counts.push_back({values[0], values[1]});
  }
  return counts;
}

}  // namespace stillshed
