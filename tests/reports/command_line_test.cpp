#include "reports/command_line.hpp"

#include <gtest/gtest.h>

#include "params/errors.hpp"

namespace stillshed {
namespace {

Problem problem_of(const std::vector<std::string>& words) {
  try {
    static_cast<void>(read_command_line(words));
  } catch (const InputError& error) {
    return error.problems().front();
  }
  return {};
}

TEST(CommandLine, QuickFormWithEveryOption) {
  const Command command = read_command_line({"report",
                                             "acetone=42",
                                             "water=58",
                                             "--basis",
                                             "wt%",
                                             "--pressure",
                                             "1atm",
                                             "--product",
                                             "acetone >= 99 wt%",
                                             "--product",
                                             "water",
                                             "--stages",
                                             "9",
                                             "--json",
                                             "-",
                                             "--out",
                                             "d",
                                             "--quiet",
                                             "--declare",
                                             "EU",
                                             "--seed",
                                             "7",
                                             "--model=unifac",
                                             "--amount",
                                             "3 t"});
  EXPECT_EQ(command.task, Task::report);
  EXPECT_EQ(command.form.stream, (std::vector<std::string>{"acetone=42", "water=58"}));
  EXPECT_EQ(command.form.products.size(), 2U);
  EXPECT_EQ(command.form.stages, 9);
  EXPECT_EQ(command.json, "-");
  EXPECT_EQ(command.out, "d");
  EXPECT_TRUE(command.quiet);
  EXPECT_EQ(command.seed, 7U);
  EXPECT_EQ(command.form.model, "unifac");
  EXPECT_EQ(command.declared, std::vector<std::string>{"EU"});
}

TEST(CommandLine, OptionsBetweenTheWords) {
  const Command command = read_command_line({"survey", "--product", "acetone", "acetone=42", "water=58"});
  EXPECT_EQ(command.form.stream.size(), 2U);
  EXPECT_EQ(command.form.products.size(), 1U);
}

TEST(CommandLine, CaseFile) {
  const Command command = read_command_line({"survey", "tank.json", "--pressure", "2 bar"});
  EXPECT_EQ(command.words, std::vector<std::string>{"tank.json"});
  EXPECT_EQ(command.form.pressure, "2 bar");
}

TEST(CommandLine, HelpOfEveryTaskShowsAnExample) {
  for (const char* task : {"report", "survey", "chart", "reach", "vouch", "name", "check"}) {
    const std::string help = read_command_line({task, "--help"}).message;
    EXPECT_NE(help.find("example\n  stillshed " + std::string(task)), std::string::npos) << help;
  }
  EXPECT_NE(read_command_line({}).message.find("survey"), std::string::npos);
  EXPECT_NE(read_command_line({"--version"}).message.find("stillshed "), std::string::npos);
}

TEST(CommandLine, MisspeltTasksAndOptions) {
  EXPECT_EQ(problem_of({"surwey", "x.json"}).remedy, "did you mean \"survey\"?");
  EXPECT_FALSE(problem_of({"xyzzy"}).allowed.empty());
  EXPECT_NE(problem_of({"survey", "x.json", "--presure", "1 atm"}).found.find("--presure"), std::string::npos);
  EXPECT_FALSE(problem_of({"survey", "x.json", "--stages", "many"}).found.empty());
  EXPECT_FALSE(problem_of({"survey", "x.json", "--out", "d"}).found.empty());  // only report writes a folder
}

TEST(CommandLine, OneCaseOrOneQuickForm) {
  EXPECT_FALSE(problem_of({"survey"}).found.empty());
  EXPECT_FALSE(problem_of({"survey", "a.json", "b.json"}).found.empty());
  EXPECT_FALSE(problem_of({"survey", "a.json", "acetone=4"}).found.empty());
  EXPECT_FALSE(problem_of({"name"}).found.empty());
}

}  // namespace
}  // namespace stillshed
