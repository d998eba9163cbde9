// scripts/check_params.py must see what the loader sees: both are given the same broken files.
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <cstdlib>
#include <fstream>
#include <iterator>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;

struct Outcome {
  int exit = -1;
  std::string text;
};

Outcome second_reader(const test::ParameterFolder& folder) {
  const auto script = test::source_parameters().parent_path() / "scripts" / "check_params.py";
  const auto output = folder.path() / "output";
  const int state = std::system((std::string(STILLSHED_PYTHON) + " " + script.string() + " " + folder.path().string() +
                                 " > " + output.string() + " 2>&1")
                                    .c_str());
  std::ifstream stream(output);
  return {WIFEXITED(state) ? WEXITSTATUS(state) : -1,
          {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()}};
}

TEST(SecondReader, AcceptsACopy) {
  const test::ParameterFolder folder;
  const Outcome outcome = second_reader(folder);
  EXPECT_EQ(outcome.exit, 0) << outcome.text;
  EXPECT_THAT(outcome.text, HasSubstr("341 components, 1007 vapour-pressure sets, 703 measured azeotropes"));
}

TEST(SecondReader, ListsAllProblems) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"7732-18-5\"", "\"7732-18-4\"");
  folder.replace("components.json", "\"formula\": \"CH4O\"", "\"formula\": \"CH4O2\"");
  folder.replace("vapour_pressure.json", "\"C2\": -7258.2", "\"C2\": 7258.2");
  folder.replace("vapour_pressure.json", "\"Pc_Pa\": 22122300.0", "\"Pc_Pa\": 23322300.0");
  folder.replace("unifac.json", "\"R\": 0.9011", "\"R\": -0.9011");
  folder.replace("unifac.json", R"("nm": [-35.36], )", "");
  folder.replace("sources.json", "\"key\": \"mcgarry-1983\"", "\"key\": \"mcgarry\"");
  folder.replace("names.json", "[\"DMA\"]", "[\"DMA\", \"MeOH\"]");
  folder.replace("cautions.json", "\"code\": \"C4\"", "\"code\": \"C4\", \"code\": \"C5\"");
  const Outcome outcome = second_reader(folder);
  EXPECT_EQ(outcome.exit, 1);
  for (const char* part :
       {"water: CAS number 7732-18-4", "methanol: molar mass 32.042", "perry-2008: vapour pressure does not rise",
        "mcgarry-1983: boils at", "subgroup 1: R = -0.9011", "pair 1-2: nm is None", "no entry for 'mcgarry-1983'",
        "'mcgarry' is used nowhere", "'meoh' names methanol", "key 'code' twice", "no C4"}) {
    EXPECT_THAT(outcome.text, HasSubstr(part));
  }
}

TEST(SecondReader, SurvivesMalformedAndMissingFiles) {
  const test::ParameterFolder folder;
  folder.write("unifac.json", "{\"stillshed_groups\": 1, \"subgroups\": [{}]}");
  folder.write("names.json", "{");
  folder.remove("ich_q3c.json");
  const Outcome outcome = second_reader(folder);
  EXPECT_EQ(outcome.exit, 1);
  EXPECT_THAT(outcome.text, HasSubstr("unifac.json: entry of an unexpected shape"));
  EXPECT_THAT(outcome.text, HasSubstr("names.json: "));
  EXPECT_THAT(outcome.text, HasSubstr("ich_q3c.json: "));
  EXPECT_THAT(outcome.text, testing::Not(HasSubstr("Traceback")));
}

}  // namespace
}  // namespace stillshed
