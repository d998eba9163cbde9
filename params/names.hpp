/// Names of substances as people write them.
#pragma once

#include <string>
#include <string_view>

namespace stillshed {

/// The form in which names are compared: ASCII lower case, without spaces, hyphens, underscores, commas, dots,
/// apostrophes, quotes and brackets. "2-Me THF", "2-methf" and "2-MeTHF" are the same name; a digit never vanishes.
[[nodiscard]] std::string normalised_name(std::string_view name);

/// Least number of single-letter insertions, deletions, replacements and swaps of neighbours that turn one text into
/// the other (restricted Damerau-Levenshtein distance); used to suggest, never to choose.
[[nodiscard]] int edit_distance(std::string_view from, std::string_view to);

}  // namespace stillshed
