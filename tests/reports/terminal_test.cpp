#include "reports/terminal.hpp"

#include <gtest/gtest.h>

#include <regex>
#include <sstream>

#include "reports/format.hpp"
#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream stream(text);
  for (std::string line; std::getline(stream, line);) {
    lines.push_back(line);
  }
  return lines;
}

TEST(Terminal, NoLineIsWiderThanAsked) {
  for (const int width : {40, 60, 80, 120}) {
    for (const std::string& line : lines_of(terminal_text(sample::ternary(), {false, width}))) {
      EXPECT_LE(display_width(line), width) << line;
    }
  }
}

TEST(Terminal, FitsOneScreen) {
  Answer answer = sample::ternary();
  answer.survey->azeotropes.assign(12, answer.survey->azeotropes[0]);
  answer.measured.assign(12, answer.measured[0]);
  answer.notes.assign(20, "a note");
  EXPECT_LE(lines_of(terminal_text(answer)).size(), 60U);
  EXPECT_LE(lines_of(terminal_text(sample::ternary())).size(), 40U);
}

TEST(Terminal, CautionsComeBeforeVerdictsAndTheLastLineDefers) {
  const std::string text = terminal_text(sample::ternary());
  const std::size_t caution = text.find("! acetone <with chloroform>");
  const std::size_t verdict = text.find("CAPPED");
  ASSERT_NE(caution, std::string::npos);
  ASSERT_NE(verdict, std::string::npos);
  EXPECT_LT(caution, verdict);
  const std::string last = lines_of(text).back();
  EXPECT_NE(last.find("site rules"), std::string::npos);
  EXPECT_NE(last.find("licensed practice"), std::string::npos);
}

TEST(Terminal, ColourOnlyWhenAsked) {
  EXPECT_EQ(terminal_text(sample::ternary()).find('\033'), std::string::npos);
  const std::string coloured = terminal_text(sample::ternary(), {true, 80});
  EXPECT_NE(coloured.find("\033["), std::string::npos);
  EXPECT_EQ(std::regex_replace(coloured, std::regex("\033\\[[0-9;]*m"), ""), terminal_text(sample::ternary()));
}

TEST(Terminal, NeverPromisesEverything) {
  Answer answer = sample::ternary();
  for (ProductOutcome& outcome : answer.reach->products) {
    outcome.verdict = Verdict::open;
    outcome.purity_limit_mass = outcome.purity_limit_mole = outcome.recovery = 1.0;
    outcome.purity_at_stages = 1.0;
  }
  const std::string text = terminal_text(answer);
  EXPECT_FALSE(std::regex_search(text, std::regex("(^|[^0-9.])100(\\.0+)? ?%"))) << text;
  EXPECT_NE(text.find("> 99.99 wt%"), std::string::npos);
  EXPECT_EQ(text.find("pure"), std::string::npos);
}

TEST(Terminal, MeasurementOrItsAbsenceIsSaid) {
  Answer answer = sample::ternary();
  EXPECT_NE(terminal_text(answer).find("measured 55.50 degC, 79.00 / 21.00 mol%"), std::string::npos);
  answer.measured[0][0].tier = 'D';
  EXPECT_NE(terminal_text(answer).find("no measurement on file"), std::string::npos);
}

TEST(Terminal, ProofIsNotOversold) {
  Answer answer = sample::ternary();
  EXPECT_NE(terminal_text(answer).find("proof: complete for one liquid"), std::string::npos);
  answer.survey->status = Status::undecided;
  EXPECT_NE(terminal_text(answer).find("NOT complete"), std::string::npos);
  answer.survey->status = Status::not_run;
  EXPECT_NE(terminal_text(answer).find("others may exist"), std::string::npos);
}

}  // namespace
}  // namespace stillshed
