#include "params/names.hpp"

#include <algorithm>
#include <vector>

namespace stillshed {

std::string normalised_name(std::string_view name) {
  constexpr std::string_view kIgnored = " \t-_,.'\"()[]{}";
  std::string result;
  result.reserve(name.size());
  for (const char c : name) {
    if (kIgnored.find(c) != std::string_view::npos) {
      continue;
    }
    result += c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
  }
  return result;
}

int edit_distance(std::string_view from, std::string_view to) {
  const std::size_t columns = to.size() + 1;
  std::vector<int> before_last(columns, 0);
  std::vector<int> last(columns, 0);
  std::vector<int> row(columns, 0);
  for (std::size_t j = 0; j < columns; ++j) {
    last[j] = static_cast<int>(j);
  }
  for (std::size_t i = 1; i <= from.size(); ++i) {
    row[0] = static_cast<int>(i);
    for (std::size_t j = 1; j < columns; ++j) {
      const int replaced = last[j - 1] + (from[i - 1] == to[j - 1] ? 0 : 1);
      row[j] = std::min({last[j] + 1, row[j - 1] + 1, replaced});
      if (i > 1 && j > 1 && from[i - 1] == to[j - 2] && from[i - 2] == to[j - 1]) {
        row[j] = std::min(row[j], before_last[j - 2] + 1);
      }
    }
    before_last.swap(last);
    last.swap(row);
  }
  return last[columns - 1];
}

}  // namespace stillshed
