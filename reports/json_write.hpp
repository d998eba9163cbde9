/// A small JSON writer: keys stay in the order they are written, numbers survive the round trip,
/// and what is not a finite number is refused instead of becoming "null" behind the reader's back.
///
///   JsonWriter json;
///   json.open_object();
///   json.member("pressure_Pa", 101325.0);
///   json.open_array("points");  ...  json.close();
///   json.close();
///   std::string text = json.finish();
///
/// Layout   containers put one entry per line; those opened `inline_` stay on one line.
/// Numbers  the shortest text that reads back as the same double.
/// Errors   LogicError for NaN or infinity (names the path) and for unbalanced or misplaced calls.
#pragma once

#include <concepts>
#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace stillshed {

class JsonWriter {
 public:
  enum class Layout { lines, inline_ };

  void open_object(Layout layout = Layout::lines);                        ///< an array entry, or the document
  void open_object(std::string_view key, Layout layout = Layout::lines);  ///< a member of an object
  void open_array(Layout layout = Layout::lines);
  void open_array(std::string_view key, Layout layout = Layout::lines);
  void close();  ///< the innermost container

  void value(double number);
  void value(std::int64_t number);
  void value(int number) { value(static_cast<std::int64_t>(number)); }
  void value(std::string_view text);
  void value(const char* text) { value(std::string_view(text)); }
  template <std::same_as<bool> Bool>
  void value(Bool truth) {
    literal(truth ? "true" : "false");
  }
  void null() { literal("null"); }

  template <class T>
  void member(std::string_view key, const T& content) {
    write_key(key);
    value(content);
  }
  void member_null(std::string_view key) {
    write_key(key);
    null();
  }
  /// Null in place of a value that is not known.
  template <class T>
  void member(std::string_view key, const std::optional<T>& content) {
    write_key(key);
    if (content.has_value()) {
      value(*content);
    } else {
      null();
    }
  }
  /// JSON that was checked elsewhere, copied as it is.
  void member_raw(std::string_view key, std::string_view json);

  /// The document; every container must be closed.
  [[nodiscard]] std::string finish();

 private:
  struct Level {
    char closing = '}';
    Layout layout = Layout::lines;
    bool empty = true;
    std::string key;  ///< the member being written, for messages
  };
  void open(char opening, char closing, Layout layout);
  void write_key(std::string_view key);
  void before_value();
  void separate();
  void literal(std::string_view text);
  void write_string(std::string_view text);
  [[nodiscard]] std::string path() const;

  std::string text_;
  std::vector<Level> levels_;
  bool key_pending_ = false;
  bool done_ = false;
};

}  // namespace stillshed
