/// Runs the program in-process on a case and reads its JSON back: tests go through the front door.
#pragma once

#include <nlohmann/json.hpp>
#include <string>
#include <vector>

namespace stillshed::test {

using Json = nlohmann::ordered_json;

struct RunResult {
  int exit = -1;
  std::string out;
  std::string err;
  Json result;  ///< null when nothing could be parsed from standard output
};

/// A fresh file name below the test's temporary folder.
[[nodiscard]] std::string temporary_path(const std::string& suffix);

/// Words of a command line after the program name, e.g. {"report", "acetone=42", ...}.
[[nodiscard]] RunResult run(const std::vector<std::string>& words);

/// Writes `case_json` to a file and runs `stillshed TASK FILE --json -`.
[[nodiscard]] RunResult run_case(const std::string& task, const Json& case_json,
                                 const std::vector<std::string>& extra = {});

/// The cases of a file in tests/reference.
[[nodiscard]] Json reference_cases(const std::string& file);

/// Azeotropes (or rejected roots) of a result whose component list equals `components`.
[[nodiscard]] std::vector<Json> with_components(const Json& list, const Json& components);

/// Largest difference of mole fractions between a result record and the expected {id: x}.
[[nodiscard]] double composition_difference(const Json& found, const Json& expected);

/// Letters, digits and underscores only: a GoogleTest parameter name.
[[nodiscard]] std::string test_name(const std::string& id);

}  // namespace stillshed::test
