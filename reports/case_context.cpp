#include <algorithm>
#include <cmath>
#include <nlohmann/json.hpp>

#include "reports/case_parts.hpp"

namespace stillshed {

std::string CaseContext::at(const std::string& pointer) const {
  const auto words = spoken.find(pointer);
  if (words != spoken.end()) {
    return source + ": " + words->second;
  }
  return source + ": " + (pointer.empty() ? "/" : pointer);
}

void CaseContext::refuse(const std::string& pointer, const std::string& found, const std::string& allowed,
                         const std::string& remedy) {
  problems.push_back({at(pointer), found, allowed, remedy});
}

std::optional<std::string> read_text(CaseContext& context, const std::string& pointer, const OrderedJson& json,
                                     const std::string& allowed) {
  if (!json.is_string()) {
    context.refuse(pointer, brief_json(json), allowed);
    return std::nullopt;
  }
  return json.get<std::string>();
}

std::optional<double> read_finite(CaseContext& context, const std::string& pointer, const OrderedJson& json) {
  if (!json.is_number() || !std::isfinite(json.get<double>())) {
    context.refuse(pointer, brief_json(json), "a number");
    return std::nullopt;
  }
  return json.get<double>();
}

std::optional<double> read_positive(CaseContext& context, const std::string& pointer, const OrderedJson& json) {
  const bool usable = json.is_number() && std::isfinite(json.get<double>()) && json.get<double>() > 0.0;
  if (!usable) {
    context.refuse(pointer, brief_json(json), "a number above zero");
    return std::nullopt;
  }
  return json.get<double>();
}

std::optional<int> read_whole(CaseContext& context, const std::string& pointer, const OrderedJson& json, int low,
                              int high) {
  if (!json.is_number_integer() || json.get<double>() < low || json.get<double>() > high) {
    context.refuse(pointer, brief_json(json),
                   "a whole number from " + std::to_string(low) + " to " + std::to_string(high));
    return std::nullopt;
  }
  return json.get<int>();
}

const ComponentRecord* find_substance(CaseContext& context, const std::string& pointer, const std::string& name) {
  const Lookup lookup = context.catalog->find(name);
  if (lookup.status != LookupStatus::found) {
    context.problems.push_back(substance_problem(context.at(pointer), name, lookup));
    return nullptr;
  }
  return lookup.component;
}

bool read_object(CaseContext& context, const std::string& pointer, const OrderedJson& json,
                 const std::vector<std::string>& allowed) {
  std::string list;
  for (const std::string& key : allowed) {
    list += (list.empty() ? "" : ", ") + key;
  }
  if (!json.is_object()) {
    context.refuse(pointer, brief_json(json), "an object with the keys " + list);
    return false;
  }
  for (const auto& item : json.items()) {
    if (std::find(allowed.begin(), allowed.end(), item.key()) == allowed.end()) {
      const std::string near = nearest_word(item.key(), allowed);
      context.refuse(pointer_join(pointer, item.key()), "an unknown key", list,
                     near.empty() ? "" : "did you mean " + in_quotes(near) + "?");
    }
  }
  return true;
}

}  // namespace stillshed
