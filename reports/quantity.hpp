/// Numbers with units as people write them: "41 wt%", "55-75 wt%", "<0.1 wt%", "1 atm", "30 °C", "1,5 bar".
///
/// A decimal comma is accepted where it can mean nothing else; "1,234" is refused (one thousand or one and a bit?).
/// Typographic blanks, dashes and the signs for "at least" and "at most" are read like their plain forms.
/// Every reader adds a Problem and returns nothing when the text does not say one thing.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "params/errors.hpp"
#include "reports/units.hpp"

namespace stillshed {

using Problems = std::vector<Problem>;

/// One number, or a range with its midpoint, and the unit word behind it.
struct Quantity {
  double value = 0.0;
  std::optional<double> low;  ///< of "55-75"; 0 of "<0.1"
  std::optional<double> high;
  std::string unit;  ///< as written; may be empty
};

/// The text between double quotes.
[[nodiscard]] std::string in_quotes(std::string_view text);

/// Plain ASCII for typographic blanks, dashes, minus signs and comparison signs; outer blanks removed.
[[nodiscard]] std::string plain_text(std::string_view text);

/// A number as written; `why` says what is wrong when there is none.
[[nodiscard]] std::optional<double> read_number(std::string_view text, std::string& why);

/// Number or range and unit word, nothing judged but the number. Text such as "rest" gives nothing.
[[nodiscard]] std::optional<Quantity> read_quantity(std::string_view text, std::string& why);

/// Positive absolute pressure.
[[nodiscard]] std::optional<double> read_pressure_Pa(std::string_view text, const std::string& where,
                                                     Problems& problems);
/// A number without unit is in degrees Celsius.
[[nodiscard]] std::optional<double> read_temperature_K(std::string_view text, const std::string& where,
                                                       Problems& problems);

/// Amount of one component of a stream in SI of its dimension.
struct AmountReading {
  bool rest = false;  ///< "rest", "balance": what is missing to the whole
  Dimension dimension = Dimension::mass_fraction;
  double value = 0.0;
  std::optional<double> low;
  std::optional<double> high;
};
[[nodiscard]] std::optional<AmountReading> read_amount(std::string_view text, const std::string& where,
                                                       Problems& problems);

/// Total amount: a mass or an amount of substance.
[[nodiscard]] std::optional<AmountReading> read_total(std::string_view text, const std::string& where,
                                                      Problems& problems);

}  // namespace stillshed
