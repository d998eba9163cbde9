#include "params/cas.hpp"

#include <algorithm>

namespace stillshed {
namespace {

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

}  // namespace

bool looks_like_cas(std::string_view text) {
  constexpr std::size_t kTail = 5;  // "-dd-d"
  if (text.size() < kTail + 2 || text.size() > kTail + 7) {
    return false;
  }
  const std::size_t first = text.size() - kTail;
  return text[first] == '-' && text[first + 3] == '-' && is_digit(text[first + 1]) && is_digit(text[first + 2]) &&
         is_digit(text[first + 4]) &&
         std::all_of(text.begin(), text.begin() + static_cast<std::ptrdiff_t>(first), is_digit);
}

bool is_valid_cas(std::string_view text) {
  if (!looks_like_cas(text)) {
    return false;
  }
  int sum = 0;
  int weight = 1;
  for (std::size_t i = text.size() - 2; i-- > 0;) {
    if (is_digit(text[i])) {
      sum += weight * (text[i] - '0');
      ++weight;
    }
  }
  return sum % 10 == text.back() - '0';
}

}  // namespace stillshed
