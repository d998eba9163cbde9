#include "reports/json_write.hpp"

#include <array>
#include <charconv>
#include <cmath>

#include "params/errors.hpp"

namespace stillshed {

void JsonWriter::open_object(Layout layout) {
  open('{', '}', layout);
}

void JsonWriter::open_object(std::string_view key, Layout layout) {
  write_key(key);
  open('{', '}', layout);
}

void JsonWriter::open_array(Layout layout) {
  open('[', ']', layout);
}

void JsonWriter::open_array(std::string_view key, Layout layout) {
  write_key(key);
  open('[', ']', layout);
}

void JsonWriter::open(char opening, char closing, Layout layout) {
  before_value();
  if (!levels_.empty() && levels_.back().layout == Layout::inline_) {
    layout = Layout::inline_;
  }
  text_ += opening;
  levels_.push_back({closing, layout, true, {}});
}

void JsonWriter::close() {
  expects(!levels_.empty() && !key_pending_, "JsonWriter: nothing to close, or a key without a value");
  const Level level = levels_.back();
  levels_.pop_back();
  if (level.layout == Layout::lines && !level.empty) {
    text_ += '\n';
    text_.append(2 * levels_.size(), ' ');
  }
  text_ += level.closing;
  done_ = levels_.empty();
}

void JsonWriter::separate() {
  Level& level = levels_.back();
  if (!level.empty) {
    text_ += ',';
  }
  if (level.layout == Layout::lines) {
    text_ += '\n';
    text_.append(2 * levels_.size(), ' ');
  } else if (!level.empty) {
    text_ += ' ';
  }
  level.empty = false;
}

void JsonWriter::write_key(std::string_view key) {
  expects(!levels_.empty() && levels_.back().closing == '}' && !key_pending_, "JsonWriter: a key outside an object");
  separate();
  levels_.back().key = key;
  write_string(key);
  text_ += ": ";
  key_pending_ = true;
}

void JsonWriter::before_value() {
  expects(!done_, "JsonWriter: the document has ended");
  if (key_pending_) {
    key_pending_ = false;
    return;
  }
  expects(levels_.empty() || levels_.back().closing == ']', "JsonWriter: a member without a key");
  if (!levels_.empty()) {
    separate();
  }
}

void JsonWriter::literal(std::string_view text) {
  before_value();
  text_ += text;
  done_ = levels_.empty();
}

void JsonWriter::value(double number) {
  if (!std::isfinite(number)) {
    throw LogicError("JsonWriter: not a finite number at " + path());
  }
  std::array<char, 32> buffer{};
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(), number);
  literal({buffer.data(), static_cast<std::size_t>(end.ptr - buffer.data())});
}

void JsonWriter::value(std::int64_t number) {
  std::array<char, 24> buffer{};
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(), number);
  literal({buffer.data(), static_cast<std::size_t>(end.ptr - buffer.data())});
}

void JsonWriter::value(std::string_view text) {
  before_value();
  write_string(text);
  done_ = levels_.empty();
}

void JsonWriter::member_raw(std::string_view key, std::string_view json) {
  expects(!json.empty(), "JsonWriter: raw JSON is empty");
  write_key(key);
  literal(json);
}

void JsonWriter::write_string(std::string_view text) {
  static constexpr char kHex[] = "0123456789abcdef";
  text_ += '"';
  for (const char c : text) {
    switch (c) {
      case '"': text_ += "\\\""; break;
      case '\\': text_ += "\\\\"; break;
      case '\n': text_ += "\\n"; break;
      case '\t': text_ += "\\t"; break;
      case '\r': text_ += "\\r"; break;
      default: {
        const auto byte = static_cast<unsigned char>(c);
        if (byte < 0x20) {
          text_ += "\\u00";
          text_ += kHex[byte >> 4U];
          text_ += kHex[byte & 0xFU];
        } else {
          text_ += c;
        }
      }
    }
  }
  text_ += '"';
}

std::string JsonWriter::path() const {
  std::string path;
  for (const Level& level : levels_) {
    path += '/';
    path += level.closing == '}' ? level.key : std::string("[]");
  }
  return path;
}

std::string JsonWriter::finish() {
  expects(done_ && levels_.empty(), "JsonWriter: the document is not complete");
  text_ += '\n';
  return std::move(text_);
}

}  // namespace stillshed
