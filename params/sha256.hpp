/// SHA-256 of a byte string (FIPS 180-4), to name the parameter files a result rests on.
#pragma once

#include <string>
#include <string_view>

namespace stillshed {

/// 64 lower-case hexadecimal digits.
[[nodiscard]] std::string sha256_hex(std::string_view bytes);

}  // namespace stillshed
