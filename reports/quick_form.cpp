#include "reports/quick_form.hpp"

#include <nlohmann/json.hpp>

namespace stillshed {
namespace {

constexpr const char* kSource = "command line: ";

/// The amount with the unit of --basis when it has none of its own.
std::string with_basis(const std::string& amount, const std::string& basis, bool residue) {
  std::string why;
  const std::optional<Quantity> quantity = read_quantity(amount, why);
  if (!quantity.has_value() || !quantity->unit.empty()) {
    return amount;
  }
  const UnitWord* unit = find_unit(basis);
  const bool by_count =
      unit != nullptr && (unit->dimension == Dimension::mole_fraction || unit->dimension == Dimension::volume_fraction);
  return amount + " " + (residue && by_count ? "wt%" : basis);
}

void write_stream(const QuickForm& form, OrderedJson& json, SpokenWords& spoken, Problems& problems) {
  const UnitWord* unit = find_unit(form.basis);
  if (!form.basis.empty() &&
      (unit == nullptr || unit->dimension == Dimension::pressure || unit->dimension == Dimension::temperature)) {
    const std::string why = why_refused(form.basis);
    problems.push_back({std::string(kSource) + "--basis", in_quotes(form.basis) + (why.empty() ? "" : " (" + why + ")"),
                        "wt%, mol%, vol%, kg, mol, L", ""});
    return;
  }
  OrderedJson stream = OrderedJson::object();
  for (const std::string& word : form.stream) {
    const std::size_t sign = word.rfind('=');
    const std::string name = plain_text(word.substr(0, sign));
    const std::string amount = plain_text(word.substr(sign + 1));
    if (name.empty() || amount.empty()) {
      problems.push_back(
          {kSource + word, name.empty() ? "no name" : "no amount", "NAME=AMOUNT, such as acetone=42", ""});
      continue;
    }
    if (stream.contains(name)) {
      problems.push_back({kSource + word, in_quotes(name) + " twice", "each component once", "add the amounts up"});
      continue;
    }
    const bool residue = name == "residue" || name == "solids";
    stream[name] = form.basis.empty() ? amount : with_basis(amount, form.basis, residue);
    spoken[pointer_join("/stream", name)] = word;
  }
  json["stream"] = stream;
}

/// "acetone >= 99.5 wt%", "acetone: water <= 0.3 wt%", "acetone".
void write_product(const std::string& words, OrderedJson& products, SpokenWords& spoken, Problems& problems) {
  const std::string text = plain_text(words);
  const std::size_t sign = text.find_first_of("<>");
  const std::size_t colon = text.find(": ");
  std::string name = text;
  std::string test;
  if (colon != std::string::npos && (sign == std::string::npos || colon < sign)) {
    name = text.substr(0, colon);
    test = plain_text(text.substr(colon + 1));
  } else if (sign != std::string::npos) {
    name = text.substr(0, sign);
    test = text.substr(sign);
  }
  name = plain_text(name);
  if (name.empty()) {
    problems.push_back(
        {std::string(kSource) + "--product", in_quotes(words), "\"acetone >= 99.5 wt%\"", "say which product"});
    return;
  }
  OrderedJson& list = products[name];
  if (list.is_null()) {
    list = OrderedJson::array();
  }
  if (!test.empty()) {
    list.push_back(test);
  }
  spoken[pointer_join("/products", name)] = "--product " + in_quotes(words);
}

}  // namespace

bool is_stream_word(const std::string& word) {
  return word.find('=') != std::string::npos;
}

void write_quick_form(const QuickForm& form, OrderedJson& json, SpokenWords& spoken, Problems& problems) {
  if (!json.contains("stillshed_case") && json.empty()) {
    json["stillshed_case"] = 1;
  }
  const auto replace = [&](const char* key, const std::string& value, const char* option) {
    if (!value.empty()) {
      json[key] = value;
      spoken[std::string("/") + key] = std::string(option) + " " + in_quotes(value);
    }
  };
  replace("title", form.title, "--title");
  if (!form.stream.empty()) {
    write_stream(form, json, spoken, problems);
  }
  replace("amount", form.amount, "--amount");
  replace("pressure", form.pressure, "--pressure");
  replace("model", form.model, "--model");
  if (!form.products.empty()) {
    OrderedJson products = OrderedJson::object();
    for (const std::string& words : form.products) {
      write_product(words, products, spoken, problems);
    }
    json["products"] = products;
  }
  if (form.stages.has_value()) {
    json["plant"]["stages"] = *form.stages;
    spoken["/plant/stages"] = "--stages " + std::to_string(*form.stages);
  }
}

}  // namespace stillshed
