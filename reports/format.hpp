/// Numbers, names and tables as people read them; shared by the terminal and the page.
///
/// Rounding follows one rule: a limit is never printed better than it is. Purities and recoveries are rounded
/// down and never shown as 100 %, impurities are rounded up and never shown as 0.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "engine/reach.hpp"
#include "models/mixture.hpp"

namespace stillshed {

/// "12.30" with exactly `decimals` digits after the point; "-0.00" is written "0.00".
[[nodiscard]] std::string fixed(double value, int decimals);
/// "0.0123", "12.3", "4200": that many significant digits, no exponent between 1e-6 and 1e7.
[[nodiscard]] std::string significant(double value, int digits);
/// Degrees Celsius with `decimals` digits, without the unit.
[[nodiscard]] std::string celsius(double temperature_K, int decimals = 2);
/// "1.013 bar".
[[nodiscard]] std::string pressure_text(double pressure_Pa);
/// "4200 kg", "3.52 kg".
[[nodiscard]] std::string kilogram_text(double kg);

/// A composition entry in percent, without the sign: two decimals, more beside 0 and 100 so that it is
/// never rounded onto either; exactly nothing is "0".
[[nodiscard]] std::string share_percent(double fraction);
/// A purity or recovery limit in percent, rounded down: "97.31", or "> 99.99" when it would round to 100.
[[nodiscard]] std::string limit_percent(double fraction, int decimals = 2);
/// An impurity limit in percent, rounded up: "0.13", or "< 0.01" when it would round to 0.
[[nodiscard]] std::string impurity_percent(double fraction, int decimals = 2);

/// ">= 99.5 wt%", "water <= 0.3 wt%", "recovery >= 90 %".
[[nodiscard]] std::string test_text(const ProductTest& test, const Mixture& mixture);
/// The value reached in such a test, rounded against us, with its unit.
[[nodiscard]] std::string reached_text(const TestOutcome& outcome);

/// Purity limit of a product on the basis its purity is asked for (mass when it is not): "86.53 wt%".
[[nodiscard]] std::string purity_limit_text(const ProductOutcome& outcome);

/// "OPEN", "TIGHT", "CAPPED", "SHUT", "NO CALL".
[[nodiscard]] const char* verdict_word(Verdict verdict);
/// What the word means, in a few words.
[[nodiscard]] const char* verdict_meaning(Verdict verdict);

/// Columns of text a UTF-8 string takes (one per code point).
[[nodiscard]] int display_width(std::string_view text);
/// Breaks at spaces into lines of at most `width` columns; `indent` goes before every line but the first, and a
/// word longer than a line is cut.
[[nodiscard]] std::vector<std::string> wrap(std::string_view text, int width, std::string_view first = "",
                                            std::string_view indent = "");

/// A table of plain text: columns as wide as their widest entry, two spaces between them.
class TextTable {
 public:
  enum class Align { left, right };
  void column(std::string heading, Align align = Align::left);
  void row(std::vector<std::string> cells);
  [[nodiscard]] bool empty() const { return rows_.empty(); }
  /// Lines without trailing spaces; the column with the longest entries is shortened with "~" to fit `width`.
  [[nodiscard]] std::vector<std::string> lines(int width, std::string_view indent = "") const;

 private:
  std::vector<std::string> headings_;
  std::vector<Align> aligns_;
  std::vector<std::vector<std::string>> rows_;
};

/// Text safe inside HTML and SVG, attribute values included.
[[nodiscard]] std::string escape_markup(std::string_view text);

}  // namespace stillshed
