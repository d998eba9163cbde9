/// JSON text read strictly: one document, no repeated keys, every problem with its line and column or JSON pointer.
#pragma once

#include <nlohmann/json_fwd.hpp>
#include <string>
#include <string_view>

#include "reports/quantity.hpp"

namespace stillshed {

using OrderedJson = nlohmann::ordered_json;

/// The document, keys in the order written. InputError for malformed text (line and column) and for keys that
/// stand twice in one object (JSON pointer, all of them at once). `source` names the text in messages.
[[nodiscard]] OrderedJson parse_strict_json(std::string_view text, const std::string& source);

/// "/stream/acetone" from "/stream" and "acetone", with ~ and / escaped as JSON pointers ask.
[[nodiscard]] std::string pointer_join(const std::string& pointer, std::string_view key);

/// What stands there, short enough for a message.
[[nodiscard]] std::string brief_json(const OrderedJson& json);

/// Nearest word of a list by edit distance, when it is near; else empty.
[[nodiscard]] std::string nearest_word(std::string_view word, const std::vector<std::string>& words);

}  // namespace stillshed
