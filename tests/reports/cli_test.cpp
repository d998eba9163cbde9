/// The program through its front door: exit codes, where text goes, the bad inputs a person can give.
#include "reports/cli.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <signal.h>

#include <filesystem>
#include <fstream>
#include <thread>

#include "reports/write_file.hpp"
#include "tests/support/front_door.hpp"

namespace stillshed::test {
namespace {

using testing::HasSubstr;
using testing::Not;

const std::vector<std::string> kQuick = {"acetone=42", "methanol=33", "water=25", "--basis",
                                         "wt%",        "--pressure",  "1atm"};

std::vector<std::string> quick(const std::string& task, const std::vector<std::string>& more = {}) {
  std::vector<std::string> words = {task};
  words.insert(words.end(), kQuick.begin(), kQuick.end());
  words.insert(words.end(), more.begin(), more.end());
  return words;
}

std::string case_file(const std::string& text) {
  const std::string path = temporary_path(".json");
  std::ofstream(path) << text;
  return path;
}

/// Bad input: exit 2, nothing on standard output, the message tells this.
void expect_refused(const std::vector<std::string>& words, const std::vector<std::string>& tells) {
  const RunResult result = run(words);
  EXPECT_EQ(result.exit, 2);
  EXPECT_TRUE(result.out.empty()) << result.out;
  for (const std::string& text : tells) {
    EXPECT_THAT(result.err, HasSubstr(text));
  }
}

TEST(Cli, QuickFormToTerminalText) {
  const RunResult result = run(quick("survey"));
  EXPECT_EQ(result.exit, 0) << result.err;
  EXPECT_THAT(result.out, HasSubstr("acetone + methanol"));
  EXPECT_THAT(result.out, Not(HasSubstr("\033[")));  // not a terminal: no colour
  EXPECT_TRUE(result.err.empty());
}

TEST(Cli, JsonToStandardOutputAndNothingElse) {
  const RunResult result = run(quick("survey", {"--json", "-"}));
  EXPECT_EQ(result.exit, 0);
  ASSERT_TRUE(result.result.is_object());
  EXPECT_EQ(result.result.at("azeotropes").size(), 1U);
  EXPECT_EQ(result.result.at("input").at("stream").at("water"), "25 wt%");
}

TEST(Cli, ReportWritesPageAndJson) {
  const std::string folder = temporary_path("");
  const RunResult result = run(quick("report", {"--out", folder, "--quiet"}));
  EXPECT_TRUE(result.exit == 0 || result.exit == 3) << result.err;
  EXPECT_TRUE(result.out.empty());
  EXPECT_THAT(read_file(folder + "/report.html"), HasSubstr("acetone"));
  EXPECT_EQ(Json::parse(read_file(folder + "/result.json")).at("status").at("exit"), result.exit);
  EXPECT_EQ(std::distance(std::filesystem::directory_iterator(folder), std::filesystem::directory_iterator()), 2);
}

TEST(Cli, EveryTaskHasHelpAndRuns) {
  for (const char* task : {"report", "survey", "chart", "reach", "vouch"}) {
    EXPECT_EQ(run({task, "--help"}).exit, 0);
    const RunResult result = run(quick(task));
    EXPECT_TRUE(result.exit == 0 || result.exit == 3) << task << result.err;
    EXPECT_FALSE(result.out.empty());
  }
  EXPECT_EQ(run({"name", "MEK"}).exit, 0);
  EXPECT_EQ(run({"name", "MEK", "--json", "-"}).result.at("names").at(0).at("id"), "2-butanone");
  EXPECT_EQ(run({"check", "--json", "-"}).result.at("mismatches"), 0);
  EXPECT_EQ(run({}).exit, 2);
  EXPECT_EQ(run({"--version"}).exit, 0);
}

TEST(BadInput, MalformedJsonHasLineAndColumn) {
  expect_refused({"survey", case_file("{\n \"stillshed_case\": 1,,\n}")}, {"line 2, column 22", "malformed JSON"});
}

TEST(BadInput, UnknownKey) {
  expect_refused(
      {"survey",
       case_file(R"({"stillshed_case": 1, "stream": {"acetone": "1 kg", "water": "1 kg"}, "presure": "1 atm"})")},
      {"/presure", "did you mean \"pressure\"?"});
}

TEST(BadInput, WrongUnit) {
  expect_refused({"survey", "acetone=42 furlong", "water=58 wt%"}, {"command line: acetone=42 furlong", "wt%"});
  expect_refused({"survey", "acetone=42", "water=58"}, {"without a unit"});
}

TEST(BadInput, NegativeAndNotANumber) {
  expect_refused({"survey", "acetone=-42", "water=142", "--basis", "wt%"}, {"below zero"});
  expect_refused({"survey", "acetone=nan", "water=58", "--basis", "wt%"}, {"not a finite number"});
}

TEST(BadInput, OneComponentAndThirteen) {
  expect_refused({"survey", "acetone=100", "--basis", "wt%"}, {"one component"});
  std::vector<std::string> words = {"survey", "--basis", "mol"};
  for (const char* name : {"acetone", "methanol", "ethanol", "water", "1-propanol", "2-propanol", "toluene", "benzene",
                           "n-hexane", "n-heptane", "THF", "chloroform", "acetonitrile"}) {
    words.push_back(std::string(name) + "=1");
  }
  expect_refused(words, {"13 components"});
}

TEST(BadInput, DuplicateBySynonym) {
  expect_refused({"survey", "IPA=50", "isopropanol=50", "--basis", "wt%"}, {"the same as \"IPA\""});
}

TEST(BadInput, MissingParametersOfAUsersModel) {
  expect_refused({"survey", case_file(R"({"stillshed_case": 1, "components": ["acetone", "water"],
                  "stream": {"acetone": "1 kg", "water": "1 kg"}, "model": {"kind": "nrtl"}})")},
                 {"/model/alpha", "/model"});
}

TEST(BadInput, PressureThatIsNone) {
  expect_refused({"survey", "acetone=42", "water=58", "--basis", "wt%", "--pressure", "30 inHg vac"}, {"above zero"});
  expect_refused(quick("survey", {"--pressure", "2 atm"}), {"--pressure"});  // given twice
}

/// A pressure no data reach is an answer, not bad input: NO CALL with the reason.
TEST(Limits, PressureOutsideEveryRange) {
  for (const auto& [pressure, reason] : {std::pair("200 bar", "above-critical"), std::pair("1 Pa", "outside-data")}) {
    const RunResult result =
        run({"reach", "acetone=42", "methanol=58", "--basis", "wt%", "--pressure", pressure, "--json", "-"});
    EXPECT_EQ(result.exit, 3) << pressure << result.err;
    EXPECT_THAT(result.result.at("status").dump(), HasSubstr(reason));
    for (const Json& product : result.result.at("products")) {
      EXPECT_EQ(product.at("verdict"), "no-call");
    }
  }
}

TEST(BadInput, UnreadableFiles) {
  expect_refused({"survey", "/nonexistent/case.json"}, {"/nonexistent/case.json", "No such file"});
  expect_refused({"survey", std::filesystem::temp_directory_path().string()}, {"a folder"});
}

TEST(BadInput, UnwritableFilesLeaveNothing) {
  const std::string folder = temporary_path("");
  std::filesystem::create_directories(folder);
  expect_refused(quick("survey", {"--json", folder + "/missing/r.json"}), {"missing/r.json"});
  expect_refused(quick("survey", {"--json", folder}), {"a folder"});
  write_file(folder + "/file", "x");
  expect_refused(quick("report", {"--out", folder + "/file"}), {"folder"});
  EXPECT_EQ(read_file(folder + "/file"), "x");
  EXPECT_EQ(std::distance(std::filesystem::directory_iterator(folder), std::filesystem::directory_iterator()), 1);
}

TEST(BadInput, AllProblemsAtOnce) {
  expect_refused({"survey", "acetonee=42", "water=58 furlong", "--pressure", "1 parsec", "--product", "water 99"},
                 {"4 problems", "acetonee", "furlong", "parsec"});
}

TEST(BadInput, MisspeltTask) {
  expect_refused({"reprot"}, {"did you mean \"report\"?"});
}

TEST(BadInput, NamesAreRefusedWithChoices) {
  const RunResult result = run({"name", "MEK", "TCE"});
  EXPECT_EQ(result.exit, 2);
  EXPECT_THAT(result.out, HasSubstr("78-93-3"));
  EXPECT_THAT(result.err, HasSubstr("trichloroethylene"));
}

TEST(BadInput, ParametersThatAreNotThere) {
  setenv("STILLSHED_PARAMS", "/nonexistent/params", 1);
  const RunResult result = run({"name", "MEK"});
  unsetenv("STILLSHED_PARAMS");
  EXPECT_EQ(result.exit, 2);
  EXPECT_THAT(result.err, HasSubstr("/nonexistent/params"));
}

void ignore_signal(int /*number*/) {}

/// Twelve components keep the survey busy; the signal comes as soon as the run listens for it.
TEST(Interrupted, ExitsWith130AndAWholeResult) {
  Json problem = {{"stillshed_case", 1}, {"pressure", "1 atm"}};
  Json rows = Json::array();
  for (int i = 0; i < 12; ++i) {
    const std::string id = "c" + std::to_string(i);
    problem["components"].push_back(
        {{"id", id},
         {"molar_mass_g_mol", 60},
         {"vapour_pressure", {{"form", "clausius-clapeyron"}, {"boiling_point_K", 350.0 + i}, {"H_K", 4000.0}}}});
    problem["stream"][id] = "1 mol";
    Json row = Json::array();
    for (int j = 0; j < 12; ++j) {
      row.push_back(i == j ? 0.0 : 1.2);
    }
    rows.push_back(row);
  }
  problem["model"] = {{"kind", "margules"}, {"A", rows}};
  const std::string path = case_file(problem.dump());
  const std::string target = temporary_path(".json");
  struct sigaction ignore {};
  struct sigaction former {};
  ignore.sa_handler = ignore_signal;
  sigaction(SIGINT, &ignore, &former);
  std::thread sender([] {
    struct sigaction current {};
    do {
      std::this_thread::yield();
      sigaction(SIGINT, nullptr, &current);
    } while (current.sa_handler == ignore_signal);
    kill(getpid(), SIGINT);
  });
  const RunResult result = run({"survey", path, "--json", target, "--quiet"});
  sender.join();
  sigaction(SIGINT, &former, nullptr);
  EXPECT_EQ(result.exit, 130) << result.err;
  EXPECT_THAT(result.err, HasSubstr("interrupted"));
  const Json written = Json::parse(read_file(target));
  EXPECT_EQ(written.at("status").at("exit"), 130);
  EXPECT_THAT(written.at("status").dump(), HasSubstr("stopped"));
}

}  // namespace
}  // namespace stillshed::test
