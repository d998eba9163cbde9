#include "reports/strict_json.hpp"

#include <algorithm>
#include <nlohmann/json.hpp>
#include <set>

#include "params/names.hpp"

namespace stillshed {
namespace {

/// Watches the parser's events for keys that come twice.
class RepeatedKeys {
 public:
  explicit RepeatedKeys(std::string source) : source_(std::move(source)) {}

  void see(OrderedJson::parse_event_t event, const OrderedJson& parsed) {
    using Event = OrderedJson::parse_event_t;
    if (event == Event::object_start || event == Event::array_start) {
      count_child();
      levels_.push_back({event == Event::array_start, {}, "", -1});
    } else if (event == Event::object_end || event == Event::array_end) {
      levels_.pop_back();
    } else if (event == Event::value) {
      count_child();
    } else {
      Level& level = levels_.back();
      level.key = parsed.get<std::string>();
      if (!level.keys.insert(level.key).second) {
        problems_.push_back({source_ + ": " + pointer(), "the same key twice", "each key once", ""});
      }
    }
  }
  [[nodiscard]] const Problems& problems() const { return problems_; }

 private:
  struct Level {
    bool array = false;
    std::set<std::string> keys;
    std::string key;
    int index = -1;
  };
  void count_child() {
    if (!levels_.empty() && levels_.back().array) {
      ++levels_.back().index;
    }
  }
  [[nodiscard]] std::string pointer() const {
    std::string text;
    for (const Level& level : levels_) {
      text = pointer_join(text, level.array ? std::to_string(level.index) : level.key);
    }
    return text;
  }

  std::string source_;
  std::vector<Level> levels_;
  Problems problems_;
};

struct LineColumn {
  std::size_t line = 1;
  std::size_t column = 1;
};

LineColumn line_and_column(std::string_view text, std::size_t byte) {
  LineColumn at;
  for (std::size_t k = 0; k < std::min(byte, text.size()); ++k) {
    if (text[k] == '\n') {
      ++at.line;
      at.column = 1;
    } else {
      ++at.column;
    }
  }
  return at;
}

/// The library's sentence without its own prefix and position.
std::string reason(const std::string& what) {
  const std::size_t colon = what.find(": ", what.find("column"));
  return colon == std::string::npos ? what : what.substr(colon + 2);
}

}  // namespace

OrderedJson parse_strict_json(std::string_view text, const std::string& source) {
  RepeatedKeys repeated(source);
  OrderedJson document;
  try {
    document = OrderedJson::parse(text, [&repeated](int, OrderedJson::parse_event_t event, OrderedJson& parsed) {
      repeated.see(event, parsed);
      return true;
    });
  } catch (const OrderedJson::parse_error& error) {
    const LineColumn at = line_and_column(text, error.byte > 0 ? error.byte - 1 : 0);
    throw InputError(Problem{source + ": line " + std::to_string(at.line) + ", column " + std::to_string(at.column),
                             "malformed JSON (" + reason(error.what()) + ")", "one JSON document", ""});
  } catch (const OrderedJson::exception& error) {
    throw InputError(
        Problem{source, std::string("a number out of range (") + error.what() + ")", "finite numbers", ""});
  }
  if (!repeated.problems().empty()) {
    throw InputError(repeated.problems());
  }
  return document;
}

std::string pointer_join(const std::string& pointer, std::string_view key) {
  std::string result = pointer + "/";
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

std::string brief_json(const OrderedJson& json) {
  std::string text = json.dump(-1, ' ', false, OrderedJson::error_handler_t::replace);
  constexpr std::size_t kLongest = 60;
  if (text.size() > kLongest) {
    text.resize(kLongest);
    while (!text.empty() && (static_cast<unsigned char>(text.back()) & 0x80U) != 0) {
      text.pop_back();  // no half characters
    }
    text += "...";
  }
  return text;
}

std::string nearest_word(std::string_view word, const std::vector<std::string>& words) {
  std::string best;
  int best_distance = std::max(2, static_cast<int>(word.size()) / 3) + 1;
  for (const std::string& candidate : words) {
    const int distance = edit_distance(word, candidate);
    if (distance < best_distance) {
      best_distance = distance;
      best = candidate;
    }
  }
  return best;
}

}  // namespace stillshed
