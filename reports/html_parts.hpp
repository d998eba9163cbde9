/// Pieces of the page: tables with scoped heads, compositions, verdict badges and the purity gauge.
/// Every function that takes plain text escapes it; those that take markup say so.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "reports/answer.hpp"

namespace stillshed {

/// Markup "<tag>content</tag>" around plain text.
[[nodiscard]] std::string element(std::string_view tag, std::string_view text, std::string_view css_class = "");

/// A table; cells are markup, headings and the caption are plain text.
class HtmlTable {
 public:
  explicit HtmlTable(std::string caption) : caption_(std::move(caption)) {}
  void column(std::string heading, bool number = false);
  /// The first cell becomes the head of its row.
  void row(std::vector<std::string> cells);
  [[nodiscard]] bool empty() const { return rows_.empty(); }
  [[nodiscard]] std::string markup() const;

 private:
  std::string caption_;
  std::vector<std::string> headings_;
  std::vector<bool> numeric_;
  std::vector<std::vector<std::string>> rows_;
};

/// One line per component that is present: name and percent.
[[nodiscard]] std::string mole_percent_lines(const Answer& answer, const Composition& x);
[[nodiscard]] std::string mass_percent_lines(const Answer& answer, const Composition& x);

/// A test of a product as markup, with the proper signs for "at least" and "at most".
[[nodiscard]] std::string test_markup(const ProductTest& test, const Mixture& mixture);

/// The verdict word in its own shape (readable in grey).
[[nodiscard]] std::string verdict_badge(Verdict verdict);

/// "the azeotrope az1 (acetone + methanol, 55.25 °C)", "the boundary b1", or the id itself.
[[nodiscard]] std::string place_words(const Answer& answer, const std::string& id);

/// Picture of how far a product gets: feed, limit and the purity asked for on a scale of nines.
[[nodiscard]] std::string purity_gauge(const Answer& answer, const ProductOutcome& outcome);

/// Position of a purity on the scale of nines: 0 at 0 %, 1 at 90 %, 2 at 99 %, capped at 5.
[[nodiscard]] double nines(double purity);

/// What an evidence mark means, in words.
[[nodiscard]] std::string evidence_words(std::string_view mark);

}  // namespace stillshed
