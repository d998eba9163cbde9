/// The parameters on file, read once, and short ways to read cases in the tests of the input side.
#pragma once

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "params/locate.hpp"
#include "reports/case_reader.hpp"

namespace stillshed::test {

inline const Catalog& catalog() {
  static const Catalog shared(load_facts());
  return shared;
}

inline Case case_from(const std::string& text) {
  return read_case(text, "case.json", catalog());
}

inline std::vector<Problem> problems_of(const std::string& text) {
  try {
    static_cast<void>(case_from(text));
  } catch (const InputError& error) {
    return error.problems();
  }
  return {};
}

/// A case with one block replaced: the stream, or further keys with a leading comma.
inline std::string with_stream(const std::string& stream, const std::string& more = "") {
  return R"({"stillshed_case": 1, "stream": )" + stream + more + "}";
}

/// True when one of the problems stands at this place and tells this.
inline bool tells(const std::vector<Problem>& problems, const std::string& where, const std::string& text) {
  for (const Problem& problem : problems) {
    if (problem.where == "case.json: " + where && problem.text().find(text) != std::string::npos) {
      return true;
    }
  }
  return false;
}

inline bool any_contains(const std::vector<std::string>& lines, const std::string& text) {
  for (const std::string& line : lines) {
    if (line.find(text) != std::string::npos) {
      return true;
    }
  }
  return false;
}

}  // namespace stillshed::test
