/// Wishes and plant: the blocks "/products" and "/plant" of a case.
#include <nlohmann/json.hpp>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

constexpr int kMostStages = 500;
const std::string kTestForms = R"(">= 99.5 wt%", "water <= 0.3 wt%" or "recovery >= 90 %")";

/// The number behind the sign, as a fraction. Recovery is a share of what was charged, so a bare "%" will do there.
bool read_test_value(CaseContext& context, const std::string& pointer, const std::string& text, std::string_view right,
                     ProductTest& test) {
  std::string why;
  const std::optional<Quantity> quantity = read_quantity(right, why);
  if (!quantity.has_value() || quantity->low.has_value()) {
    context.refuse(pointer, in_quotes(text) + (why.empty() ? "" : " (" + why + ")"), kTestForms);
    return false;
  }
  const UnitWord* unit = find_unit(quantity->unit);
  if (test.what == ProductTest::What::recovery && (quantity->unit == "%" || quantity->unit.empty())) {
    test.value = quantity->value * (quantity->unit == "%" ? 0.01 : 1.0);
  } else if (unit != nullptr && unit->dimension == Dimension::mass_fraction) {
    test.value = unit->to_si(quantity->value);
    test.basis = Basis::mass;
  } else if (unit != nullptr && unit->dimension == Dimension::mole_fraction) {
    test.value = unit->to_si(quantity->value);
    test.basis = Basis::mole;
  } else {
    const std::string reason = quantity->unit.empty() ? "no unit" : why_refused(quantity->unit);
    context.refuse(pointer, in_quotes(text) + (reason.empty() ? "" : " (" + reason + ")"),
                   test.what == ProductTest::What::recovery
                       ? "%"
                       : allowed_units(Dimension::mass_fraction) + ", " + allowed_units(Dimension::mole_fraction));
    return false;
  }
  const bool purity = test.what == ProductTest::What::purity;
  const bool below_one = purity ? test.value < 1.0 : test.value <= 1.0;
  if (!(test.value > 0.0) || !below_one) {
    context.refuse(pointer, in_quotes(text),
                   purity ? "a purity above 0 and below 100 %" : "a share above 0, up to 100 %");
    return false;
  }
  return true;
}

std::optional<ProductTest> read_test(CaseContext& context, const std::string& pointer, const std::string& given,
                                     int product, const std::vector<CaseComponent>& components) {
  const std::string text = plain_text(given);
  const std::size_t at = text.find_first_of("<>");
  if (at == std::string::npos || text.substr(at + 1, 1) != "=") {
    context.refuse(pointer, in_quotes(given), kTestForms, "say which side: >= or <=");
    return std::nullopt;
  }
  ProductTest test;
  test.at_least = text[at] == '>';
  test.component = product;
  const std::string left = plain_text(text.substr(0, at));
  if (left == "recovery" || left == "yield") {
    test.what = ProductTest::What::recovery;
  } else if (!left.empty() && left != "purity") {
    const std::optional<int> component = find_component(context, pointer, left, components);
    if (!component.has_value()) {
      return std::nullopt;
    }
    test.component = *component;
    test.what = test.component == product ? ProductTest::What::purity : ProductTest::What::impurity;
  }
  const bool wants_more = test.what != ProductTest::What::impurity;
  if (wants_more != test.at_least) {
    context.refuse(pointer, in_quotes(given), wants_more ? ">= for a purity or a recovery" : "<= for an impurity", "");
    return std::nullopt;
  }
  if (!read_test_value(context, pointer, given, text.substr(at + 2), test)) {
    return std::nullopt;
  }
  return test;
}

}  // namespace

std::optional<int> find_component(CaseContext& context, const std::string& pointer, const std::string& name,
                                  const std::vector<CaseComponent>& components) {
  const std::string plain = plain_text(name);
  std::string list;
  bool any_on_file = false;
  for (std::size_t k = 0; k < components.size(); ++k) {
    if (components[k].entry.given_name == plain || components[k].entry.id == plain) {
      return static_cast<int>(k);
    }
    any_on_file = any_on_file || components[k].record != nullptr;
    list += (list.empty() ? "" : ", ") + components[k].entry.given_name;
  }
  if (any_on_file) {
    CaseContext quiet = context;
    const ComponentRecord* record = find_substance(quiet, pointer, plain);
    for (std::size_t k = 0; k < components.size(); ++k) {
      if (record != nullptr && components[k].record == record) {
        return static_cast<int>(k);
      }
    }
  }
  context.refuse(pointer, in_quotes(plain) + ", which is not in the stream", list);
  return std::nullopt;
}

std::vector<ProductWish> read_products(CaseContext& context, const OrderedJson& json,
                                       const std::vector<CaseComponent>& components) {
  std::vector<ProductWish> wishes;
  if (!json.is_object() || json.empty()) {
    context.refuse("/products", brief_json(json),
                   R"(an object such as {"acetone": [">= 99.5 wt%", "water <= 0.3 wt%"]})");
    return wishes;
  }
  for (const auto& item : json.items()) {
    const std::string pointer = pointer_join("/products", item.key());
    const std::optional<int> product = find_component(context, pointer, item.key(), components);
    const OrderedJson list = item.value().is_string() ? OrderedJson::array({item.value()}) : item.value();
    if (!list.is_array()) {
      context.refuse(pointer, brief_json(list), "an array of tests such as " + kTestForms);
      continue;
    }
    if (!product.has_value()) {
      continue;
    }
    ProductWish wish;
    wish.id = components[static_cast<std::size_t>(*product)].entry.id;
    for (const ProductWish& other : wishes) {
      if (other.id == wish.id) {
        context.refuse(pointer, "the same product twice", "each product once");
      }
    }
    for (std::size_t k = 0; k < list.size(); ++k) {
      const std::string where = list.size() == 1 ? pointer : pointer_join(pointer, std::to_string(k));
      const std::optional<std::string> text = read_text(context, where, list[k], "a text such as " + kTestForms);
      if (!text.has_value()) {
        continue;
      }
      wish.given_tests.push_back(*text);
      const std::optional<ProductTest> test = read_test(context, where, *text, *product, components);
      if (test.has_value()) {
        wish.tests.push_back(*test);
      }
    }
    bool purity = false;
    for (const ProductTest& test : wish.tests) {
      purity = purity || test.what != ProductTest::What::recovery;
    }
    if (!purity) {
      ProductTest test;
      test.component = *product;
      wish.tests.insert(wish.tests.begin(), test);
      wish.default_tests = true;
    }
    wishes.push_back(std::move(wish));
  }
  return wishes;
}

Plant read_plant(CaseContext& context, const OrderedJson& json) {
  Plant plant;
  if (!read_object(context, "/plant", json, {"stages", "pressure_window", "coolant", "heating", "decanter"})) {
    return plant;
  }
  if (json.contains("stages")) {
    plant.stages = read_whole(context, "/plant/stages", json.at("stages"), 1, kMostStages);
  }
  if (json.contains("pressure_window")) {
    const OrderedJson& window = json.at("pressure_window");
    if (!window.is_array() || window.size() != 2 || !window[0].is_string() || !window[1].is_string()) {
      context.refuse("/plant/pressure_window", brief_json(window), R"(two pressures such as ["0.1 bar", "4 bar"])");
    } else {
      plant.pressure_low_Pa =
          read_pressure_Pa(window[0].get<std::string>(), context.at("/plant/pressure_window/0"), context.problems);
      plant.pressure_high_Pa =
          read_pressure_Pa(window[1].get<std::string>(), context.at("/plant/pressure_window/1"), context.problems);
      if (plant.pressure_low_Pa.has_value() && plant.pressure_high_Pa.has_value() &&
          !(*plant.pressure_low_Pa <= *plant.pressure_high_Pa)) {
        context.refuse("/plant/pressure_window", brief_json(window), "the lower pressure first");
      }
    }
  }
  const auto temperature = [&](const char* key) -> std::optional<double> {
    const std::string pointer = pointer_join("/plant", key);
    if (!json.contains(key)) {
      return std::nullopt;
    }
    const auto text = read_text(context, pointer, json.at(key), "a text such as \"25 degC\"");
    return text.has_value() ? read_temperature_K(*text, context.at(pointer), context.problems) : std::nullopt;
  };
  plant.coolant_K = temperature("coolant");
  plant.heating_K = temperature("heating");
  plant.decanter_K = temperature("decanter");
  return plant;
}

}  // namespace stillshed
