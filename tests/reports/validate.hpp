/// Lets an independent reader (tests/reports/validate.py) judge what a writer wrote.
#pragma once

#include <gtest/gtest.h>

#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <functional>
#include <string>

namespace stillshed::testing_support {

/// True when `text` is valid under `schema` (a path), or well-formed XML when `schema` is "xml".
inline bool is_valid(const std::string& text, const std::string& schema) {
  const std::string path = ::testing::TempDir() + "stillshed_" +
                           ::testing::UnitTest::GetInstance()->current_test_info()->name() +
                           std::to_string(std::hash<std::string>{}(text)) + ".txt";
  std::ofstream(path) << text;
  const std::string command =
      "/usr/bin/python3 \"" STILLSHED_TEST_DATA "/reports/validate.py\" \"" + schema + "\" \"" + path + "\"";
  const int code = std::system(command.c_str());
  std::remove(path.c_str());
  return code == 0;
}

inline std::string result_schema() {
  return STILLSHED_TEST_DATA "/../reports/schema/result.schema.json";
}

}  // namespace stillshed::testing_support
