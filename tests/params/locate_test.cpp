#include "params/locate.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cstdlib>

#include "parameter_folder.hpp"
#include "params/compact.hpp"
#include "params/errors.hpp"

namespace stillshed {
namespace {

/// Sets STILLSHED_PARAMS for one test.
class Variable {
 public:
  explicit Variable(const std::string& value) { ::setenv("STILLSHED_PARAMS", value.c_str(), 1); }
  ~Variable() { ::unsetenv("STILLSHED_PARAMS"); }
  Variable(const Variable&) = delete;
  Variable& operator=(const Variable&) = delete;
};

TEST(Locate, TheBuildTreeHoldsThePackedFiles) {
  ::unsetenv("STILLSHED_PARAMS");
  EXPECT_EQ(find_parameters().filename(), kCompactFileName);
  EXPECT_TRUE(load_facts() == test::loaded_facts());
}

TEST(Locate, TheVariableNamesAFolderOfJsonFiles) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"name\": \"Water\"", "\"name\": \"Aqua\"");
  const Variable variable(folder.path().string());
  EXPECT_EQ(load_facts().components.front().name, "Aqua");
}

TEST(Locate, TheVariableNamesACompactFileOrItsFolder) {
  const test::ParameterFolder folder;
  const auto inner = folder.path() / "packed";
  std::filesystem::create_directories(inner);
  Facts facts;
  facts.sha256 = "here";
  write_compact_file(facts, inner / kCompactFileName);
  {
    const Variable variable((inner / kCompactFileName).string());
    EXPECT_EQ(load_facts().sha256, "here");
  }
  const Variable variable(inner.string());
  EXPECT_EQ(load_facts().sha256, "here");
}

TEST(Locate, AWrongVariableIsAnErrorAndNothingElseIsTried) {
  const Variable variable("/nonexistent/params");
  try {
    (void)load_facts();
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_THAT(error.what(), testing::HasSubstr("STILLSHED_PARAMS: found /nonexistent/params"));
  }
}

}  // namespace
}  // namespace stillshed
