#include <nlohmann/json.hpp>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

std::string amount_text(CaseContext& context, const std::string& pointer, const OrderedJson& json) {
  return read_text(context, pointer, json, "a text with a number and a unit, such as \"41 wt%\"").value_or("");
}

/// The declared component a stream name means: by its own id, or through the names on file.
std::optional<std::size_t> find_declared(CaseContext& context, const std::string& pointer, const std::string& name,
                                         const std::vector<CaseComponent>& declared) {
  for (std::size_t k = 0; k < declared.size(); ++k) {
    if (declared[k].entry.id == name || declared[k].entry.given_name == name) {
      return k;
    }
  }
  bool any_on_file = false;
  for (const CaseComponent& component : declared) {
    any_on_file = any_on_file || component.record != nullptr;
  }
  std::string list;
  for (const CaseComponent& component : declared) {
    list += (list.empty() ? "" : ", ") + component.entry.given_name;
  }
  if (any_on_file) {
    const ComponentRecord* record = find_substance(context, pointer, name);
    if (record == nullptr) {
      return std::nullopt;
    }
    for (std::size_t k = 0; k < declared.size(); ++k) {
      if (declared[k].record == record) {
        return k;
      }
    }
  }
  context.refuse(pointer, in_quotes(name), "the names in \"components\": " + list,
                 "add it to \"components\", which fixes the order of every matrix");
  return std::nullopt;
}

void add_amount(CaseContext& context, CaseComponent& component, const std::string& name, const std::string& pointer,
                const OrderedJson& json) {
  if (!component.pointer.empty()) {
    context.refuse(pointer, in_quotes(name) + ", the same as " + in_quotes(component.entry.given_name),
                   "each component once", "add the amounts up");
    return;
  }
  component.entry.given_name = name;
  component.entry.given_amount = amount_text(context, pointer, json);
  component.pointer = pointer;
}

}  // namespace

CaseStream read_stream(CaseContext& context, const OrderedJson& json, std::vector<CaseComponent> declared) {
  CaseStream stream;
  const bool closed = !declared.empty();  // "components" names everything
  stream.components = std::move(declared);
  if (!json.is_object() || json.empty()) {
    context.refuse("/stream", brief_json(json), R"(an object such as {"acetone": "41 wt%", "water": "59 wt%"})");
    return stream;
  }
  for (const auto& item : json.items()) {
    const std::string pointer = pointer_join("/stream", item.key());
    const std::string name = plain_text(item.key());
    std::optional<std::size_t> index;
    bool declared_id = false;
    for (const CaseComponent& component : stream.components) {
      declared_id = declared_id || component.entry.id == name;
    }
    if (const auto kind = declared_id ? std::nullopt : nonvolatile_kind(name); kind.has_value()) {
      stream.nonvolatile.push_back({*kind, name, amount_text(context, pointer, item.value()), pointer});
      continue;
    }
    if (closed) {
      index = find_declared(context, pointer, name, stream.components);
    } else if (const ComponentRecord* record = find_substance(context, pointer, name); record != nullptr) {
      for (std::size_t k = 0; k < stream.components.size(); ++k) {
        if (stream.components[k].record == record) {
          index = k;
        }
      }
      if (!index.has_value()) {
        index = stream.components.size();
        CaseComponent& added = stream.components.emplace_back();
        added.entry.id = record->id;
        added.record = record;
        added.molar_mass_g_mol = record->molar_mass_g_mol;
      }
    }
    if (index.has_value()) {
      add_amount(context, stream.components[*index], name, pointer, item.value());
    }
  }
  return stream;
}

}  // namespace stillshed
