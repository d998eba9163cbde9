#include "reports/format.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>

#include "params/errors.hpp"

namespace stillshed {
namespace {

/// Above any rounding noise of a fraction computed in double precision, below any printed digit.
constexpr double kNoise = 1e-11;

std::string print(const char* format, int digits, double value) {
  std::array<char, 64> buffer{};
  std::snprintf(buffer.data(), buffer.size(), format, digits, value);
  return buffer.data();
}

bool is_continuation(char c) {
  return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U;
}

/// Byte length of the first `columns` code points.
std::size_t prefix_bytes(std::string_view text, int columns) {
  std::size_t bytes = 0;
  int seen = 0;
  while (bytes < text.size()) {
    if (!is_continuation(text[bytes])) {
      if (seen == columns) {
        break;
      }
      ++seen;
    }
    ++bytes;
  }
  return bytes;
}

}  // namespace

std::string fixed(double value, int decimals) {
  std::string text = print("%.*f", decimals, value);
  if (text.find_first_not_of("-0.") == std::string::npos && text.front() == '-') {
    text.erase(0, 1);
  }
  return text;
}

std::string significant(double value, int digits) {
  if (value == 0.0) {
    return "0";
  }
  const double magnitude = std::floor(std::log10(std::abs(value)));
  if (magnitude < -6.0 || magnitude >= 7.0) {
    return print("%.*g", digits, value);
  }
  return fixed(value, std::max(0, digits - 1 - static_cast<int>(magnitude)));
}

std::string celsius(double temperature_K, int decimals) {
  return fixed(temperature_K - 273.15, decimals);
}

std::string pressure_text(double pressure_Pa) {
  return significant(pressure_Pa / 1e5, 4) + " bar";
}

std::string kilogram_text(double kg) {
  return significant(kg, 3) + " kg";
}

std::string share_percent(double fraction) {
  const double percent = 100.0 * fraction;
  if (percent <= 0.0) {
    return "0";
  }
  for (int decimals = 2; decimals <= 8; ++decimals) {
    std::string text = fixed(percent, decimals);
    const double shown = std::strtod(text.c_str(), nullptr);
    const bool on_an_end = shown <= 0.0 || shown >= 100.0;
    const double end_distance = std::min(percent, 100.0 - percent);
    const double shown_distance = std::min(shown, 100.0 - shown);
    if (!on_an_end && std::abs(shown_distance - end_distance) <= 0.06 * end_distance) {
      return text;
    }
  }
  return percent < 50.0 ? "< 0.00000001" : "> 99.99999999";
}

std::string limit_percent(double fraction, int decimals) {
  const double scale = std::pow(10.0, decimals);
  const double down = std::floor((100.0 * fraction + kNoise) * scale) / scale;
  if (down >= 100.0) {
    return "> " + fixed(100.0 - 1.0 / scale, decimals);
  }
  return fixed(std::max(down, 0.0), decimals);
}

std::string impurity_percent(double fraction, int decimals) {
  const double scale = std::pow(10.0, decimals);
  const double up = std::ceil((100.0 * fraction - kNoise) * scale) / scale;
  if (up <= 0.0) {
    return "< " + fixed(1.0 / scale, decimals);
  }
  return fixed(up, decimals);
}

namespace {

const char* unit_of(const ProductTest& test) {
  if (test.what == ProductTest::What::recovery) {
    return " %";
  }
  return test.basis == Basis::mass ? " wt%" : " mol%";
}

std::string plain_percent(double fraction) {
  return print("%.*g", 10, 100.0 * fraction);
}

/// One digit more than the specification shows, two at least.
int digits_against(double value) {
  const std::string text = plain_percent(value);
  const std::size_t point = text.find('.');
  const int shown = point == std::string::npos ? 0 : static_cast<int>(text.size() - point) - 1;
  return std::clamp(shown + 1, 2, 8);
}

}  // namespace

std::string test_text(const ProductTest& test, const Mixture& mixture) {
  std::string subject;
  if (test.what == ProductTest::What::impurity) {
    subject = mixture.component(test.component).id + " ";
  } else if (test.what == ProductTest::What::recovery) {
    subject = "recovery ";
  }
  return subject + (test.at_least ? ">= " : "<= ") + plain_percent(test.value) + unit_of(test);
}

std::string reached_text(const TestOutcome& outcome) {
  const int decimals = digits_against(outcome.test.value);
  return (outcome.test.at_least ? limit_percent(outcome.limit, decimals) : impurity_percent(outcome.limit, decimals)) +
         unit_of(outcome.test);
}

std::string purity_limit_text(const ProductOutcome& outcome) {
  for (const TestOutcome& item : outcome.tests) {
    if (item.test.what == ProductTest::What::purity && item.test.basis == Basis::mole) {
      return limit_percent(outcome.purity_limit_mole, digits_against(item.test.value)) + " mol%";
    }
    if (item.test.what == ProductTest::What::purity) {
      return limit_percent(outcome.purity_limit_mass, digits_against(item.test.value)) + " wt%";
    }
  }
  return limit_percent(outcome.purity_limit_mass) + " wt%";
}

const char* verdict_word(Verdict verdict) {
  switch (verdict) {
    case Verdict::open: return "OPEN";
    case Verdict::tight: return "TIGHT";
    case Verdict::capped: return "CAPPED";
    case Verdict::shut: return "SHUT";
    case Verdict::no_call: return "NO CALL";
  }
  return "NO CALL";
}

const char* verdict_meaning(Verdict verdict) {
  switch (verdict) {
    case Verdict::open: return "the specification is inside reach, with room";
    case Verdict::tight: return "inside reach, with little room";
    case Verdict::capped: return "stops below the specification";
    case Verdict::shut: return "cannot leave as a product from here, at total reflux";
    case Verdict::no_call: return "the evidence is too thin to call";
  }
  return "";
}

int display_width(std::string_view text) {
  return static_cast<int>(std::count_if(text.begin(), text.end(), [](char c) { return !is_continuation(c); }));
}

std::vector<std::string> wrap(std::string_view text, int width, std::string_view first, std::string_view indent) {
  expects(width > display_width(first) + 1 && width > display_width(indent) + 1, "wrap: too narrow");
  std::vector<std::string> lines;
  std::string line(first);
  bool line_has_word = false;
  std::size_t at = 0;
  while (at < text.size()) {
    if (text[at] == ' ' || text[at] == '\n') {
      ++at;
      continue;
    }
    std::string_view word = text.substr(at, std::min(text.find_first_of(" \n", at), text.size()) - at);
    const int room = width - display_width(line) - (line_has_word ? 1 : 0);
    if (display_width(word) > room && line_has_word) {
      lines.push_back(line);
      line = indent;
      line_has_word = false;
      continue;
    }
    word = word.substr(0, prefix_bytes(word, room));
    if (line_has_word) {
      line += ' ';
    }
    line += word;
    line_has_word = true;
    at += word.size();
  }
  if (line_has_word || lines.empty()) {
    lines.push_back(line);
  }
  return lines;
}

void TextTable::column(std::string heading, Align align) {
  headings_.push_back(std::move(heading));
  aligns_.push_back(align);
}

void TextTable::row(std::vector<std::string> cells) {
  expects(cells.size() == headings_.size(), "TextTable: a row needs one cell per column");
  rows_.push_back(std::move(cells));
}

std::vector<std::string> TextTable::lines(int width, std::string_view indent) const {
  std::vector<int> widths;
  int total = display_width(indent);
  for (std::size_t c = 0; c < headings_.size(); ++c) {
    int widest = display_width(headings_[c]);
    for (const auto& cells : rows_) {
      widest = std::max(widest, display_width(cells[c]));
    }
    widths.push_back(widest);
    total += widest + (c > 0 ? 2 : 0);
  }
  while (total > width) {
    int& widest = *std::max_element(widths.begin(), widths.end());
    if (widest <= 4) {
      break;
    }
    --widest;
    --total;
  }
  std::vector<std::string> lines;
  const auto add = [&](const std::vector<std::string>& cells) {
    std::string line(indent);
    for (std::size_t c = 0; c < cells.size(); ++c) {
      std::string cell = cells[c];
      if (display_width(cell) > widths[c]) {
        cell = cell.substr(0, prefix_bytes(cell, widths[c] - 1)) + "~";
      }
      const std::string padding(static_cast<std::size_t>(widths[c] - display_width(cell)), ' ');
      line += c > 0 ? "  " : "";
      line += aligns_[c] == Align::right ? padding + cell : cell + padding;
    }
    line.erase(line.find_last_not_of(' ') + 1);
    lines.push_back(std::move(line));
  };
  add(headings_);
  for (const auto& cells : rows_) {
    add(cells);
  }
  return lines;
}

std::string escape_markup(std::string_view text) {
  std::string safe;
  safe.reserve(text.size());
  for (const char c : text) {
    switch (c) {
      case '&': safe += "&amp;"; break;
      case '<': safe += "&lt;"; break;
      case '>': safe += "&gt;"; break;
      case '"': safe += "&quot;"; break;
      case '\'': safe += "&#39;"; break;
      default:
        // Control characters are not allowed in XML at all.
        safe += static_cast<unsigned char>(c) < 0x20 && c != '\n' && c != '\t' ? ' ' : c;
    }
  }
  return safe;
}

}  // namespace stillshed
