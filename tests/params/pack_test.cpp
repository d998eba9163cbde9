// The build-time tool: a good folder gives a file equal to a strict load, a bad one gives exit 2 and no file.
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <cstdlib>
#include <fstream>
#include <iterator>

#include "parameter_folder.hpp"
#include "params/compact.hpp"

namespace stillshed {
namespace {

int run_pack(const std::string& words) {
  const int state = std::system((std::string(STILLSHED_PACK) + " " + words).c_str());
  return WIFEXITED(state) ? WEXITSTATUS(state) : -1;
}

TEST(Pack, WritesWhatAStrictLoadGives) {
  const test::ParameterFolder folder;
  const auto target = folder.path() / "out.params";
  ASSERT_EQ(run_pack(folder.path().string() + " " + target.string()), 0);
  EXPECT_TRUE(read_compact_file(target) == test::loaded_facts());
}

TEST(Pack, ABadFileFailsAndLeavesNothing) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"7732-18-5\"", "\"7732-18-4\"");
  const auto target = folder.path() / "out.params";
  const auto messages = folder.path() / "messages";
  EXPECT_EQ(run_pack(folder.path().string() + " " + target.string() + " 2> " + messages.string()), 2);
  EXPECT_FALSE(std::filesystem::exists(target));
  std::ifstream stream(messages);
  const std::string text{std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
  EXPECT_NE(text.find("components.json /components/0/cas: found \"7732-18-4\""), std::string::npos) << text;
}

TEST(Pack, WantsTwoWords) {
  EXPECT_EQ(run_pack("only-one 2> /dev/null"), 2);
}

}  // namespace
}  // namespace stillshed
