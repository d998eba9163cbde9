#include <gtest/gtest.h>

#include "reports/html_sections.hpp"
#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(HtmlTrust, TheProofIsWordedAsFarAsItGoes) {
  Answer answer = sample::ternary();
  std::string markup = trust_section(answer);
  EXPECT_NE(markup.find("proved complete"), std::string::npos);
  EXPECT_NE(markup.find("Nothing is claimed about nature"), std::string::npos);
  EXPECT_NE(markup.find("azeotropes of two liquids"), std::string::npos);
  answer.survey->status = Status::undecided;
  EXPECT_NE(trust_section(answer).find("not proved complete"), std::string::npos);
}

TEST(HtmlTrust, FacesWithBracketAndIndex) {
  Answer answer = sample::ternary();
  answer.survey->faces[3].index_holds.reset();
  answer.survey->faces[3].index_sum.reset();
  answer.survey->faces[3].note = "phase-split";
  const std::string markup = trust_section(answer);
  EXPECT_NE(markup.find("36.9 to 101.9"), std::string::npos);
  EXPECT_NE(markup.find("holds (0 of 0)"), std::string::npos);
  EXPECT_NE(markup.find("not evaluated: phase-split"), std::string::npos);
}

TEST(HtmlTrust, WhatWasNotCheckedIsListed) {
  Answer answer = sample::ternary();
  EXPECT_EQ(trust_section(answer).find("number of stages"), std::string::npos);
  answer.input.plant.stages.reset();
  EXPECT_NE(trust_section(answer).find("number of stages"), std::string::npos);
}

TEST(HtmlTrust, RunCanBeRepeated) {
  const std::string markup = source_section(sample::ternary(), "2026-01-02");
  for (const char* words :
       {"stillshed 0.1.0", "0123456789abcdef", "2026-01-02", "acetone/wagner-25/a", "unifac-dortmund groups 7-15"}) {
    EXPECT_NE(markup.find(words), std::string::npos) << words;
  }
}

}  // namespace
}  // namespace stillshed
