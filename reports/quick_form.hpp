/// The quick form: a case typed on the command line, turned into the same JSON as a case file.
///
///   stillshed report acetone=42 methanol=33 water=25 --basis wt% --pressure 1atm --product "acetone >= 99.5 wt%"
///
/// A bare number takes the unit of --basis; a number with a unit keeps it; "rest" stands for what is missing. "residue"
/// is a name like any other; beside a basis by mole or volume its bare number is in wt%. Products: "NAME TEST",
/// "NAME: OTHER TEST", or "NAME" alone for the default test; the same name may come several times.
/// The options also replace the blocks of a case file.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "reports/strict_json.hpp"

namespace stillshed {

struct QuickForm {
  std::vector<std::string> stream;  ///< "acetone=42"
  std::string basis;
  std::string pressure;
  std::string model;
  std::string amount;
  std::string title;
  std::vector<std::string> products;
  std::optional<int> stages;
};

/// True when a word of the command line is part of a stream rather than the name of a file.
[[nodiscard]] bool is_stream_word(const std::string& word);

/// JSON pointers and the words of the command line they came from, for messages.
using SpokenWords = std::map<std::string, std::string>;

/// Writes the quick form into `json` (an empty object, or a case file whose blocks are replaced) and the words used
/// into `spoken`. Adds problems for words that cannot be split.
void write_quick_form(const QuickForm& form, OrderedJson& json, SpokenWords& spoken, Problems& problems);

}  // namespace stillshed
