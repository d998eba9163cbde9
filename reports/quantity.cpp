#include "reports/quantity.hpp"

#include <array>
#include <cctype>
#include <charconv>
#include <cmath>
#include <utility>

namespace stillshed {
namespace {

bool is_digit(char c) {
  return std::isdigit(static_cast<unsigned char>(c)) != 0;
}

std::string trimmed(std::string_view text) {
  while (!text.empty() && std::isspace(static_cast<unsigned char>(text.front())) != 0) {
    text.remove_prefix(1);
  }
  while (!text.empty() && std::isspace(static_cast<unsigned char>(text.back())) != 0) {
    text.remove_suffix(1);
  }
  return std::string(text);
}

std::string lower(std::string_view text) {
  std::string result;
  for (const char c : text) {
    result += static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  }
  return result;
}

/// Characters of a number: digits, point, comma, exponent with its sign, a sign in front.
std::size_t number_length(std::string_view text) {
  std::size_t k = 0;
  if (k < text.size() && (text[k] == '-' || text[k] == '+')) {
    ++k;
  }
  const std::size_t first_digit = k;
  while (k < text.size() && (is_digit(text[k]) || text[k] == '.' || text[k] == ',')) {
    ++k;
  }
  if (k == first_digit) {
    return 0;
  }
  if (k + 1 < text.size() && (text[k] == 'e' || text[k] == 'E')) {
    std::size_t exponent = k + 1;
    if (text[exponent] == '-' || text[exponent] == '+') {
      ++exponent;
    }
    if (exponent < text.size() && is_digit(text[exponent])) {
      k = exponent;
      while (k < text.size() && is_digit(text[k])) {
        ++k;
      }
    }
  }
  return k;
}

/// A decimal comma made a point; nothing when it could be a thousands separator.
std::optional<std::string> with_decimal_point(std::string_view text, std::string& why) {
  std::string digits(text);
  const std::size_t comma = digits.find(',');
  if (comma == std::string::npos) {
    return digits;
  }
  const bool several = digits.find(',', comma + 1) != std::string::npos || digits.find('.') != std::string::npos;
  std::size_t after = comma + 1;
  while (after < digits.size() && is_digit(digits[after])) {
    ++after;
  }
  const bool leading_zero = comma == 1 && digits[0] == '0';
  if (several || (after - comma - 1 == 3 && !leading_zero) || after == comma + 1) {
    why = "a comma that may separate thousands or decimals";
    return std::nullopt;
  }
  digits[comma] = '.';
  return digits;
}

bool named_not_a_number(std::string_view text) {
  const std::string word = lower(text.substr(0, text.find(' ')));
  return word == "nan" || word == "inf" || word == "-inf" || word == "infinity";
}

/// The unit of a quantity when it belongs to one of the dimensions; otherwise a problem.
const UnitWord* unit_of(const Quantity& quantity, std::string_view text, std::span<const Dimension> dimensions,
                        const std::string& where, Problems& problems) {
  const UnitWord* unit = find_unit(quantity.unit);
  if (unit != nullptr) {
    for (const Dimension dimension : dimensions) {
      if (unit->dimension == dimension) {
        return unit;
      }
    }
  }
  std::string allowed;
  for (const Dimension dimension : dimensions) {
    allowed += (allowed.empty() ? "" : ", ") + allowed_units(dimension);
  }
  std::string found = in_quotes(text);
  if (quantity.unit.empty()) {
    found += " without a unit";
  } else if (const std::string why = why_refused(quantity.unit); !why.empty()) {
    found += " (" + why + ")";
  } else if (unit != nullptr) {
    found += std::string(" (a ") + to_string(unit->dimension) + ")";
  }
  problems.push_back({where, found, allowed, ""});
  return nullptr;
}

std::optional<Quantity> quantity_or_problem(std::string_view text, const std::string& where, const char* allowed,
                                            Problems& problems) {
  std::string why;
  std::optional<Quantity> quantity = read_quantity(text, why);
  if (!quantity.has_value()) {
    problems.push_back({where, in_quotes(text) + " (" + why + ")", allowed, ""});
  }
  return quantity;
}

}  // namespace

std::string in_quotes(std::string_view text) {
  std::string result = "\"";
  result.append(text);
  result.push_back('"');
  return result;
}

std::string plain_text(std::string_view text) {
  static constexpr std::array<std::pair<std::string_view, std::string_view>, 13> kPlain = {{
      {"\u00a0", " "},
      {"\u2009", " "},
      {"\u202f", " "},
      {"\u2007", " "},
      {"\ufeff", ""},
      {"\u2010", "-"},
      {"\u2011", "-"},
      {"\u2012", "-"},
      {"\u2013", "-"},
      {"\u2212", "-"},
      {"\u2265", ">="},
      {"\u2264", "<="},
      {"\u00ba", "\u00b0"},
  }};
  std::string result;
  while (!text.empty()) {
    bool replaced = false;
    for (const auto& [typographic, plain] : kPlain) {
      if (text.substr(0, typographic.size()) == typographic) {
        result += plain;
        text.remove_prefix(typographic.size());
        replaced = true;
        break;
      }
    }
    if (!replaced) {
      result += text.front();
      text.remove_prefix(1);
    }
  }
  return trimmed(result);
}

std::optional<double> read_number(std::string_view text, std::string& why) {
  const std::optional<std::string> digits = with_decimal_point(text, why);
  if (!digits.has_value()) {
    return std::nullopt;
  }
  const char* first = digits->data() + (!digits->empty() && digits->front() == '+' ? 1 : 0);
  const char* last = digits->data() + digits->size();
  double value = 0.0;
  const std::from_chars_result result = std::from_chars(first, last, value);
  if (result.ec == std::errc::result_out_of_range || (result.ec == std::errc() && !std::isfinite(value))) {
    why = "a number too large, or not a number";
    return std::nullopt;
  }
  if (result.ec != std::errc() || result.ptr != last) {
    why = "not a number";
    return std::nullopt;
  }
  return value;
}

std::optional<Quantity> read_quantity(std::string_view given, std::string& why) {
  const std::string text = plain_text(given);
  std::string_view rest = text;
  Quantity quantity;
  const bool below = !rest.empty() && rest.front() == '<';
  if (below) {
    rest.remove_prefix(rest.substr(0, 2) == "<=" ? 2 : 1);
    while (!rest.empty() && rest.front() == ' ') {
      rest.remove_prefix(1);
    }
  }
  const std::size_t length = number_length(rest);
  if (length == 0) {
    why = named_not_a_number(rest) ? "not a finite number" : "no number to start with";
    return std::nullopt;
  }
  std::optional<double> first = read_number(rest.substr(0, length), why);
  if (!first.has_value()) {
    return std::nullopt;
  }
  rest.remove_prefix(length);
  quantity.value = *first;
  std::string_view after = rest;
  while (!after.empty() && after.front() == ' ') {
    after.remove_prefix(1);
  }
  // "55-75", "55 - 75", "55 to 75"
  const std::size_t dash = !after.empty() && after.front() == '-' ? 1 : (after.substr(0, 3) == "to " ? 3 : 0);
  if (dash > 0 && !below) {
    after.remove_prefix(dash);
    while (!after.empty() && after.front() == ' ') {
      after.remove_prefix(1);
    }
    const std::size_t second_length = number_length(after);
    const std::optional<double> second =
        second_length > 0 ? read_number(after.substr(0, second_length), why) : std::nullopt;
    if (!second.has_value() || *second < *first) {
      why = second.has_value() ? "a range that runs backwards" : "a range without its second number";
      return std::nullopt;
    }
    quantity.low = first;
    quantity.high = second;
    quantity.value = 0.5 * (*first + *second);
    after.remove_prefix(second_length);
  } else if (below) {
    quantity.low = 0.0;
    quantity.high = first;
    quantity.value = 0.5 * *first;
  }
  quantity.unit = trimmed(after);
  return quantity;
}

std::optional<double> read_pressure_Pa(std::string_view text, const std::string& where, Problems& problems) {
  const std::optional<Quantity> quantity =
      quantity_or_problem(text, where, "a number with a unit, such as \"1 atm\" or \"150 mbar\"", problems);
  if (!quantity.has_value()) {
    return std::nullopt;
  }
  static constexpr std::array kPressure = {Dimension::pressure};
  const UnitWord* unit = unit_of(*quantity, text, kPressure, where, problems);
  if (unit == nullptr) {
    return std::nullopt;
  }
  const double pressure = unit->to_si(quantity->value);
  if (quantity->low.has_value() || !(pressure > 0.0) || !std::isfinite(pressure)) {
    problems.push_back({where, in_quotes(text), "one absolute pressure above zero", ""});
    return std::nullopt;
  }
  return pressure;
}

std::optional<double> read_temperature_K(std::string_view text, const std::string& where, Problems& problems) {
  std::optional<Quantity> quantity =
      quantity_or_problem(text, where, "a number with a unit, such as \"25 degC\" or \"298 K\"", problems);
  if (!quantity.has_value()) {
    return std::nullopt;
  }
  if (quantity->unit.empty()) {
    quantity->unit = "degC";
  }
  static constexpr std::array kTemperature = {Dimension::temperature};
  const UnitWord* unit = unit_of(*quantity, text, kTemperature, where, problems);
  if (unit == nullptr) {
    return std::nullopt;
  }
  const double temperature = unit->to_si(quantity->value);
  if (quantity->low.has_value() || !(temperature > 0.0) || !std::isfinite(temperature)) {
    problems.push_back({where, in_quotes(text), "one temperature above absolute zero", ""});
    return std::nullopt;
  }
  return temperature;
}

namespace {

std::optional<AmountReading> amount_in(std::string_view text, std::span<const Dimension> dimensions,
                                       const std::string& where, Problems& problems) {
  const std::optional<Quantity> quantity =
      quantity_or_problem(text, where, "a number with a unit, such as \"41 wt%\" or \"240 kg\"", problems);
  if (!quantity.has_value()) {
    return std::nullopt;
  }
  const UnitWord* unit = unit_of(*quantity, text, dimensions, where, problems);
  if (unit == nullptr) {
    return std::nullopt;
  }
  if (quantity->low.value_or(quantity->value) < 0.0) {
    problems.push_back({where, in_quotes(text) + " (below zero)", "an amount of zero or more", ""});
    return std::nullopt;
  }
  AmountReading reading;
  reading.dimension = unit->dimension;
  reading.value = unit->to_si(quantity->value);
  if (quantity->low.has_value()) {
    reading.low = unit->to_si(*quantity->low);
    reading.high = unit->to_si(*quantity->high);
  }
  return reading;
}

}  // namespace

std::optional<AmountReading> read_amount(std::string_view text, const std::string& where, Problems& problems) {
  const std::string word = lower(plain_text(text));
  if (word == "rest" || word == "balance" || word == "bal" || word == "remainder") {
    AmountReading reading;
    reading.rest = true;
    return reading;
  }
  static constexpr std::array kStream = {Dimension::mass_fraction, Dimension::mole_fraction, Dimension::volume_fraction,
                                         Dimension::mass,          Dimension::amount,        Dimension::volume};
  return amount_in(text, kStream, where, problems);
}

std::optional<AmountReading> read_total(std::string_view text, const std::string& where, Problems& problems) {
  static constexpr std::array kTotal = {Dimension::mass, Dimension::amount};
  std::optional<AmountReading> reading = amount_in(text, kTotal, where, problems);
  if (reading.has_value() && (reading->low.has_value() || !(reading->value > 0.0))) {
    problems.push_back({where, in_quotes(text), "one amount above zero", ""});
    return std::nullopt;
  }
  return reading;
}

}  // namespace stillshed
