#include "params/json_reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <fstream>
#include <iterator>
#include <nlohmann/json.hpp>
#include <set>

namespace stillshed {
namespace {

using Json = nlohmann::ordered_json;

/// A value as it may stand in a message.
std::string shown(const Json& value) {
  std::string text = value.dump(-1, ' ', false, Json::error_handler_t::replace);
  constexpr std::size_t kLongest = 60;
  if (text.size() > kLongest) {
    text.resize(kLongest);
    text += "...";
  }
  return text;
}

/// Escapes "~" and "/" as a JSON pointer wants them.
std::string escaped(std::string_view key) {
  std::string result;
  for (const char c : key) {
    if (c == '~') {
      result += "~0";
    } else if (c == '/') {
      result += "~1";
    } else {
      result += c;
    }
  }
  return result;
}

/// "line 3, column 7" of a byte position counted from 1.
std::string line_and_column(const std::string& text, std::size_t byte) {
  const std::size_t end = std::min(text.size(), byte == 0 ? 0 : byte - 1);
  const auto stop = text.begin() + static_cast<std::ptrdiff_t>(end);
  const auto line = 1 + std::count(text.begin(), stop, '\n');
  const std::size_t last_break = end == 0 ? std::string::npos : text.rfind('\n', end - 1);
  const std::size_t column = last_break == std::string::npos ? end + 1 : end - last_break;
  return fmt::format("line {}, column {}", line, column);
}

std::string bounds_text(Bounds bounds) {
  constexpr double kHuge = std::numeric_limits<double>::max();
  if (bounds.low == std::numeric_limits<double>::min()) {
    return "a number above 0";
  }
  if (bounds.high == kHuge) {
    return bounds.low == -kHuge ? "a number" : fmt::format("a number of at least {:g}", bounds.low);
  }
  return fmt::format("{:g} to {:g}", bounds.low, bounds.high);
}

/// Watches the parser's events: keys that occur twice in one object, with the pointer of that object.
class RepeatedKeys {
 public:
  RepeatedKeys(std::string file, Problems* problems) : file_(std::move(file)), problems_(problems) {}

  bool operator()(int /*depth*/, Json::parse_event_t event, Json& value) {
    using Event = Json::parse_event_t;
    switch (event) {
      case Event::object_start: open(true); break;
      case Event::array_start: open(false); break;
      case Event::object_end:
      case Event::array_end: close(); break;
      case Event::key: add_key(value.get<std::string>()); break;
      case Event::value: next(); break;
    }
    return true;
  }

 private:
  struct Level {
    bool is_object = false;
    std::set<std::string> keys;
    std::string current;
    std::size_t index = 0;
  };

  void open(bool is_object) {
    Level level;
    level.is_object = is_object;
    levels_.push_back(std::move(level));
  }
  void close() {
    levels_.pop_back();
    next();
  }
  void next() {
    if (!levels_.empty() && !levels_.back().is_object) {
      ++levels_.back().index;
    }
  }
  void add_key(const std::string& key) {
    levels_.back().current = key;
    if (!levels_.back().keys.insert(key).second) {
      std::string pointer;
      for (const Level& level : levels_) {
        pointer += '/';
        pointer += level.is_object ? escaped(level.current) : std::to_string(level.index);
      }
      problems_->push_back({file_ + " " + pointer, "the key twice", "each key once", "remove one of them"});
    }
  }

  std::string file_;
  Problems* problems_;
  std::vector<Level> levels_;
};

}  // namespace

std::string JsonNode::where(std::string_view key) const {
  std::string pointer = pointer_;
  if (!key.empty()) {
    pointer += '/';
    pointer += escaped(key);
  }
  return pointer.empty() ? file_ : file_ + " " + pointer;
}

void JsonNode::report(std::string_view key, std::string found, std::string allowed, std::string remedy) const {
  problems_->push_back({where(key), std::move(found), std::move(allowed), std::move(remedy)});
}

void JsonNode::report_missing(const char* key, const char* allowed) const {
  report(key, "nothing", allowed, "add it");
}

const Json* JsonNode::find(const char* key) const {
  if (!json_->is_object()) {
    return nullptr;
  }
  const auto found = json_->find(key);
  return found == json_->end() ? nullptr : &*found;
}

bool JsonNode::allow(std::initializer_list<const char*> allowed) const {
  if (!json_->is_object()) {
    report({}, shown(*json_), "an object");
    return false;
  }
  for (const auto& [key, value] : json_->items()) {
    const std::string& name = key;
    if (std::none_of(allowed.begin(), allowed.end(), [&](const char* known) { return name == known; })) {
      std::string list;
      for (const char* known : allowed) {
        list += list.empty() ? "" : ", ";
        list += known;
      }
      report(key, "an unknown key", "one of " + list, "check the spelling");
    }
  }
  return true;
}

bool JsonNode::has(const char* key) const {
  return find(key) != nullptr;
}

std::string JsonNode::text(const char* key) const {
  std::string result = optional_text(key);
  if (!has(key)) {
    report_missing(key, "a text");
  } else if (result.empty() && find(key)->is_string()) {
    report(key, "an empty text", "a text");
  }
  return result;
}

std::string JsonNode::optional_text(const char* key) const {
  const Json* value = find(key);
  if (value == nullptr) {
    return {};
  }
  if (!value->is_string()) {
    report(key, shown(*value), "a text");
    return {};
  }
  return value->get<std::string>();
}

double JsonNode::number(const char* key, Bounds bounds) const {
  if (!has(key)) {
    report_missing(key, bounds_text(bounds).c_str());
    return 0.0;
  }
  return optional_number(key, bounds).value_or(0.0);
}

std::optional<double> JsonNode::optional_number(const char* key, Bounds bounds) const {
  const Json* value = find(key);
  if (value == nullptr) {
    return std::nullopt;
  }
  const double number = value->is_number() ? value->get<double>() : std::numeric_limits<double>::quiet_NaN();
  if (!std::isfinite(number) || number < bounds.low || number > bounds.high) {
    report(key, shown(*value), bounds_text(bounds));
    return std::nullopt;
  }
  return number;
}

int JsonNode::integer(const char* key, int low, int high) const {
  const Json* value = find(key);
  const std::string allowed = fmt::format("a whole number from {} to {}", low, high);
  if (value == nullptr) {
    report_missing(key, allowed.c_str());
    return low;
  }
  if (!value->is_number_integer() || value->get<double>() < low || value->get<double>() > high) {
    report(key, shown(*value), allowed);
    return low;
  }
  return value->get<int>();
}

bool JsonNode::flag(const char* key, bool otherwise) const {
  const Json* value = find(key);
  if (value == nullptr) {
    return otherwise;
  }
  if (!value->is_boolean()) {
    report(key, shown(*value), "true or false");
    return otherwise;
  }
  return value->get<bool>();
}

std::vector<std::string> JsonNode::texts(const char* key) const {
  std::vector<std::string> result;
  for (const JsonNode& item : items(key)) {
    if (!item.json_->is_string() || item.json_->get_ref<const std::string&>().empty()) {
      item.report({}, shown(*item.json_), "a text");
      continue;
    }
    result.push_back(item.json_->get<std::string>());
  }
  return result;
}

std::vector<double> JsonNode::numbers(const char* key, Bounds bounds) const {
  std::vector<double> result;
  for (const JsonNode& item : items(key)) {
    const double number = item.json_->is_number() ? item.json_->get<double>() : std::nan("");
    if (!std::isfinite(number) || number < bounds.low || number > bounds.high) {
      item.report({}, shown(*item.json_), bounds_text(bounds));
      continue;
    }
    result.push_back(number);
  }
  return result;
}

std::optional<JsonNode> JsonNode::child(const char* key) const {
  const Json* value = find(key);
  if (value == nullptr) {
    return std::nullopt;
  }
  return JsonNode(value, file_, pointer_ + '/' + escaped(key), problems_);
}

std::vector<JsonNode> JsonNode::items(const char* key) const {
  const std::optional<JsonNode> array = child(key);
  return array ? array->elements() : std::vector<JsonNode>{};
}

std::vector<std::string> JsonNode::keys() const {
  std::vector<std::string> result;
  if (json_->is_object()) {
    for (const auto& [key, value] : json_->items()) {
      result.push_back(key);
    }
  }
  return result;
}

std::vector<JsonNode> JsonNode::elements() const {
  std::vector<JsonNode> result;
  if (!json_->is_array()) {
    report({}, shown(*json_), "an array");
    return result;
  }
  result.reserve(json_->size());
  for (std::size_t i = 0; i < json_->size(); ++i) {
    result.emplace_back(&(*json_)[i], file_, pointer_ + '/' + std::to_string(i), problems_);
  }
  return result;
}

std::vector<double> JsonNode::as_numbers() const {
  std::vector<double> result;
  for (const JsonNode& item : elements()) {
    if (!item.json_->is_number()) {
      item.report({}, shown(*item.json_), "a number");
      continue;
    }
    result.push_back(item.json_->get<double>());
  }
  return result;
}

std::vector<int> JsonNode::as_integers() const {
  std::vector<int> result;
  for (const JsonNode& item : elements()) {
    if (!item.json_->is_number_integer() || std::abs(item.json_->get<double>()) > 1e6) {
      item.report({}, shown(*item.json_), "a whole number");
      continue;
    }
    result.push_back(item.json_->get<int>());
  }
  return result;
}

std::string JsonNode::dump() const {
  return json_->dump();
}

JsonFile::JsonFile(const std::string& file, const std::string& text, Problems* problems)
    : file_(file), problems_(problems) {
  try {
    RepeatedKeys watch(file, problems);
    json_ = std::make_unique<Json>(Json::parse(text, std::ref(watch)));
  } catch (const Json::parse_error& error) {
    problems->push_back({fmt::format("{} {}", file, line_and_column(text, error.byte)), "malformed JSON",
                         "JSON as in RFC 8259 (numbers only finite, no comments, no trailing commas)",
                         "correct the text at or just before this place"});
  } catch (const Json::exception& error) {
    problems->push_back(
        {file, error.what(), "JSON numbers within the range of double precision", "correct the number"});
  }
}

JsonFile::~JsonFile() = default;

std::optional<JsonNode> JsonFile::root() const {
  if (json_ == nullptr) {
    return std::nullopt;
  }
  return JsonNode(json_.get(), file_, "", problems_);
}

std::string read_text_file(const std::filesystem::path& path, Problems* problems) {
  std::ifstream stream(path, std::ios::binary);
  if (!stream) {
    problems->push_back({path.string(), "no readable file", "a readable file", "check the path and its permissions"});
    return {};
  }
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

}  // namespace stillshed
