/// What was typed, sorted: task, words, options. The only place that knows the option parser.
#pragma once

#include <string>
#include <vector>

#include "reports/answer.hpp"
#include "reports/quick_form.hpp"

namespace stillshed {

struct Command {
  Task task = Task::report;
  std::vector<std::string> words;  ///< a case file, a quick form, or names
  QuickForm form;                  ///< options of the quick form; its stream is filled from the words
  std::vector<std::string> declared;
  std::string json;  ///< file, "-" or empty
  std::string out;   ///< folder or empty
  bool quiet = false;
  std::uint64_t seed = 1;
  std::string message;  ///< not empty: print this (help, version) and do nothing else
};

/// Throws InputError for words that make no command; a misspelt task is answered with the nearest one.
[[nodiscard]] Command read_command_line(const std::vector<std::string>& words);

/// "report", "survey", ...
[[nodiscard]] const char* to_string(Task task);

}  // namespace stillshed
