#include "reports/case_reader.hpp"

#include <algorithm>
#include <nlohmann/json.hpp>
#include <set>

#include "reports/case_parts.hpp"
#include "reports/cautions_rules.hpp"

namespace stillshed {
namespace {

const std::vector<std::string> kModels = {"auto", "unifac-dortmund", "unifac", "ideal"};
const std::string kModelForms = "auto, unifac-dortmund, unifac, ideal, or an object with \"kind\" and your own numbers";

void read_version(CaseContext& context, const OrderedJson& json) {
  if (!json.contains("stillshed_case")) {
    context.refuse("/stillshed_case", "nothing", "1, the version of the case format");
  } else if (json.at("stillshed_case") != 1) {
    context.refuse("/stillshed_case", brief_json(json.at("stillshed_case")), "1, the version of the case format");
  }
}

void read_declared(CaseContext& context, const OrderedJson& json, Case& result) {
  const std::vector<std::string>& words = declarable_words();
  std::string allowed;
  for (const std::string& word : words) {
    allowed += (allowed.empty() ? "" : ", ") + word;
  }
  if (!json.is_array()) {
    context.refuse("/declared", brief_json(json), "an array of " + allowed);
    return;
  }
  for (std::size_t k = 0; k < json.size(); ++k) {
    const std::string pointer = pointer_join("/declared", std::to_string(k));
    const std::string word = read_text(context, pointer, json[k], allowed).value_or("");
    if (std::find(words.begin(), words.end(), word) != words.end()) {
      result.declared.push_back(word);
    } else if (!word.empty()) {
      context.refuse(pointer, in_quotes(word), allowed);
    }
  }
}

void read_pressure(CaseContext& context, const OrderedJson& json, Case& result) {
  if (!json.contains("pressure")) {
    context.notes.push_back("no pressure given: 1 atm");
    return;
  }
  const auto text = read_text(context, "/pressure", json.at("pressure"), "a text such as \"1 atm\"");
  if (text.has_value()) {
    result.given_pressure = *text;
    result.pressure_Pa = read_pressure_Pa(*text, context.at("/pressure"), context.problems).value_or(101325.0);
  }
}

void read_model_choice(CaseContext& context, const OrderedJson& json, const std::vector<CaseComponent>& components,
                       Case& result) {
  bool own = false;
  for (const CaseComponent& component : components) {
    own = own || component.own.has_value();
  }
  if (json.contains("model") && json.at("model").is_object()) {
    if (!json.contains("components")) {
      context.refuse("/components", "nothing", "an array of every stream name, in the order of the model's matrices");
    } else if (!components.empty() && components.size() <= static_cast<std::size_t>(kMaxComponents)) {
      result.user_model = read_model(context, "/model", json.at("model"), components);
      result.model = "user";
    }
    return;
  }
  if (json.contains("model")) {
    const auto name = read_text(context, "/model", json.at("model"), kModelForms);
    if (!name.has_value()) {
      return;
    }
    if (std::find(kModels.begin(), kModels.end(), *name) == kModels.end()) {
      const bool needs_numbers = *name == "nrtl" || *name == "wilson" || *name == "uniquac" || *name == "margules";
      const std::string near = nearest_word(*name, kModels);
      context.refuse("/model", in_quotes(*name), kModelForms,
                     needs_numbers ? "no " + *name + " records are on file: give the parameters as an object"
                                   : (near.empty() ? "" : "did you mean " + in_quotes(near) + "?"));
      return;
    }
    result.model = *name;
  }
  if (own && result.model != "ideal") {
    context.refuse("/model", in_quotes(result.model) + " with components defined outright",
                   "\"ideal\", or an object with your own parameters",
                   "the groups of a component defined outright are not known");
  }
}

void read_total_amount(CaseContext& context, const OrderedJson& json, const std::vector<CaseComponent>& components,
                       Case& result) {
  if (!json.contains("amount")) {
    return;
  }
  const auto text = read_text(context, "/amount", json.at("amount"), "a text such as \"4200 kg\"");
  const auto total = text.has_value() ? read_total(*text, context.at("/amount"), context.problems) : std::nullopt;
  if (!total.has_value() || result.stream.empty()) {
    return;
  }
  double kilograms = total->value;
  if (total->dimension == Dimension::amount) {  // of what boils
    double mean_g_mol = 0.0;
    for (const StreamEntry& entry : result.stream) {
      for (const CaseComponent& component : components) {
        mean_g_mol += component.entry.id == entry.id ? entry.mole_fraction * component.molar_mass_g_mol : 0.0;
      }
    }
    kilograms = total->value * mean_g_mol * 1e-3 / (1.0 - result.residue_mass_fraction);
  }
  if (result.amount_kg.has_value()) {
    context.notes.push_back("amount " + *text + " replaces the sum of the stream");
  }
  result.amount_kg = kilograms;
}

void take_products(CaseContext& context, const OrderedJson& json, const std::vector<CaseComponent>& kept,
                   Case& result) {
  if (json.contains("products")) {
    result.products = read_products(context, json.at("products"), kept);
    return;
  }
  for (std::size_t k = 0; k < kept.size(); ++k) {
    ProductWish wish;
    wish.id = kept[k].entry.id;
    wish.default_tests = true;
    ProductTest test;
    test.component = static_cast<int>(k);
    wish.tests.push_back(test);
    result.products.push_back(wish);
  }
}

/// Components that stay, and the user's model without the rows of the others.
std::vector<CaseComponent> keep(const std::vector<CaseComponent>& all, const std::vector<int>& kept, Case& result) {
  std::vector<CaseComponent> components;
  Members members;
  for (const int k : kept) {
    components.push_back(all[static_cast<std::size_t>(k)]);
    result.user_components.push_back(components.back().own);
    members.push_back(k);
  }
  if (result.user_model.has_value() && kept.size() < all.size()) {
    result.user_model =
        std::visit([&](const auto& model) -> ActivityModel { return model.face(members); }, *result.user_model);
  }
  return components;
}

}  // namespace

Case read_case(std::string_view text, const std::string& source, const Catalog& catalog) {
  return read_case(parse_strict_json(text, source), source, catalog, {});
}

Case read_case(const OrderedJson& json, const std::string& source, const Catalog& catalog,
               const std::map<std::string, std::string>& spoken) {
  CaseContext context;
  context.source = source;
  context.catalog = &catalog;
  context.spoken = spoken;
  Case result;
  if (!read_object(context, "", json,
                   {"stillshed_case", "title", "stream", "amount", "pressure", "model", "components", "products",
                    "plant", "declared"})) {
    throw InputError(context.problems);
  }
  read_version(context, json);
  if (json.contains("title")) {
    result.title = read_text(context, "/title", json.at("title"), "a text").value_or("");
  }
  std::vector<CaseComponent> declared;
  const std::size_t before = context.problems.size();
  if (json.contains("components")) {
    declared = read_components(context, json.at("components"));
  }
  const bool components_read = context.problems.size() == before;
  CaseStream stream;
  std::vector<int> kept;
  if (!json.contains("stream")) {
    context.refuse("/stream", "nothing", R"(an object such as {"acetone": "41 wt%", "water": "59 wt%"})");
  } else if (components_read) {
    stream = read_stream(context, json.at("stream"), std::move(declared));
    kept = settle_amounts(context, stream, result);
  }
  read_pressure(context, json, result);
  if (components_read) {
    read_model_choice(context, json, stream.components, result);
  }
  const bool mixture_read = kept.size() >= 2 && kept.size() <= static_cast<std::size_t>(kMaxComponents);
  if (mixture_read) {
    const std::vector<CaseComponent> components = keep(stream.components, kept, result);
    read_total_amount(context, json, components, result);
    take_products(context, json, components, result);
  } else if (!stream.components.empty() && json.contains("products")) {
    static_cast<void>(read_products(context, json.at("products"), stream.components));  // for its problems
  }
  if (json.contains("plant")) {
    result.plant = read_plant(context, json.at("plant"));
  }
  if (json.contains("declared")) {
    read_declared(context, json.at("declared"), result);
  }
  if (!context.problems.empty()) {
    throw InputError(context.problems);
  }
  result.notes = context.notes;
  result.echo_json = json.dump(-1, ' ', false, OrderedJson::error_handler_t::replace);
  return result;
}

}  // namespace stillshed
