/// Strict reading of one JSON file: every problem is collected with file and JSON pointer, none stops the reading.
///
/// A JsonNode asks for what it expects and reports what differs: missing, unknown and repeated keys, wrong types,
/// numbers out of bounds. Missing values come back as a neutral value, so that reading goes on to the next problem.
/// Internal to params/: not installed.
#pragma once

#include <filesystem>
#include <initializer_list>
#include <limits>
#include <memory>
#include <nlohmann/json_fwd.hpp>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "params/errors.hpp"

namespace stillshed {

using Problems = std::vector<Problem>;

/// Inclusive bounds of a number.
struct Bounds {
  double low = -std::numeric_limits<double>::max();
  double high = std::numeric_limits<double>::max();
};
inline constexpr Bounds kAnyNumber{};
inline constexpr Bounds kPositive{std::numeric_limits<double>::min(), std::numeric_limits<double>::max()};
inline constexpr Bounds kNotNegative{0.0, std::numeric_limits<double>::max()};

class JsonNode {
 public:
  JsonNode(const nlohmann::ordered_json* json, std::string file, std::string pointer, Problems* problems)
      : json_(json), file_(std::move(file)), pointer_(std::move(pointer)), problems_(problems) {}

  /// "components.json /components/12/cas" for messages; `key` may be empty.
  [[nodiscard]] std::string where(std::string_view key = {}) const;
  void report(std::string_view key, std::string found, std::string allowed, std::string remedy = {}) const;

  /// Reports every key that is not in the list. False when this is no object (reported too).
  [[nodiscard]] bool allow(std::initializer_list<const char*> keys) const;
  [[nodiscard]] bool has(const char* key) const;

  [[nodiscard]] std::string text(const char* key) const;  ///< required, not empty
  [[nodiscard]] std::string optional_text(const char* key) const;
  [[nodiscard]] double number(const char* key, Bounds bounds = kAnyNumber) const;
  [[nodiscard]] std::optional<double> optional_number(const char* key, Bounds bounds = kAnyNumber) const;
  [[nodiscard]] int integer(const char* key, int low, int high) const;
  [[nodiscard]] bool flag(const char* key, bool otherwise) const;       ///< optional
  [[nodiscard]] std::vector<std::string> texts(const char* key) const;  ///< optional array of strings
  [[nodiscard]] std::vector<double> numbers(const char* key, Bounds bounds = kAnyNumber) const;  ///< optional
  [[nodiscard]] std::optional<JsonNode> child(const char* key) const;                            ///< optional object
  [[nodiscard]] std::vector<JsonNode> items(const char* key) const;                              ///< optional array
  [[nodiscard]] std::vector<std::string> keys() const;  ///< of an object, in file order

  [[nodiscard]] std::vector<JsonNode> elements() const;  ///< of this array
  [[nodiscard]] std::vector<double> as_numbers() const;  ///< this array of numbers
  [[nodiscard]] std::vector<int> as_integers() const;    ///< this array of whole numbers
  [[nodiscard]] std::string dump() const;                ///< this value as compact JSON

 private:
  [[nodiscard]] const nlohmann::ordered_json* find(const char* key) const;
  void report_missing(const char* key, const char* allowed) const;

  const nlohmann::ordered_json* json_;
  std::string file_;
  std::string pointer_;
  Problems* problems_;
};

/// One parsed file. Malformed text gives one problem with line and column and no root.
class JsonFile {
 public:
  JsonFile(const std::string& file, const std::string& text, Problems* problems);
  ~JsonFile();
  JsonFile(const JsonFile&) = delete;
  JsonFile& operator=(const JsonFile&) = delete;

  [[nodiscard]] std::optional<JsonNode> root() const;

 private:
  std::unique_ptr<nlohmann::ordered_json> json_;
  std::string file_;
  Problems* problems_;
};

/// Whole file as text; a problem and an empty text when it cannot be read.
[[nodiscard]] std::string read_text_file(const std::filesystem::path& path, Problems* problems);

}  // namespace stillshed
