/// CAS registry numbers: "67-56-1", two to seven digits, two digits, one check digit.
///
///   check digit = (sum of k times the k-th digit counted from the right, check digit excluded) mod 10
#pragma once

#include <string_view>

namespace stillshed {

/// True for the shape ddddddd-dd-d, whatever the check digit.
[[nodiscard]] bool looks_like_cas(std::string_view text);
/// True for a well-formed number whose check digit is right.
[[nodiscard]] bool is_valid_cas(std::string_view text);

}  // namespace stillshed
