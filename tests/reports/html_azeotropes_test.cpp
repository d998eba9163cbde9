#include <gtest/gtest.h>

#include "reports/html_sections.hpp"
#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(HtmlAzeotropes, MeasuredValueOrItsAbsenceBesideEach) {
  Answer answer = sample::ternary();
  std::string markup = azeotrope_section(answer, {});
  EXPECT_NE(markup.find("55.50 °C"), std::string::npos);
  EXPECT_NE(markup.find("ours 0.25 K lower"), std::string::npos);
  EXPECT_NE(markup.find("Somebody &amp; Other"), std::string::npos);
  EXPECT_EQ(markup.find("no measurement on file"), std::string::npos);
  answer.measured[0][0].tier = 'C';  // not shown as a fact
  markup = azeotrope_section(answer, {});
  EXPECT_NE(markup.find("no measurement on file"), std::string::npos);
  EXPECT_EQ(markup.find("Somebody"), std::string::npos);
}

TEST(HtmlAzeotropes, BothBasesAndTheSourceThatSaysNone) {
  const std::string markup = azeotrope_section(sample::ternary(), {});
  EXPECT_NE(markup.find("acetone&#160;78.00"), std::string::npos);
  EXPECT_NE(markup.find("acetone&#160;86.5"), std::string::npos);
  EXPECT_NE(markup.find("no azeotrope, according to the source"), std::string::npos);
}

TEST(HtmlAzeotropes, RejectedRootsAreShownApart) {
  Answer answer = sample::ternary();
  answer.survey->rejected = {{{0, 1}, {0.5, 0.5, 0.0}, 330.0, {Stability::unstable, true, -0.02, {0.9, 0.1, 0.0}}}};
  const std::string markup = azeotrope_section(answer, {});
  EXPECT_NE(markup.find("Roots that are no azeotropes"), std::string::npos);
  EXPECT_NE(markup.find("-0.0200"), std::string::npos);
}

TEST(HtmlAzeotropes, AbsenceIsClaimedOnlyWhenProved) {
  Answer answer = sample::ternary();
  answer.survey->azeotropes.clear();
  answer.measured.clear();
  EXPECT_NE(azeotrope_section(answer, {}).find("its absence is proved"), std::string::npos);
  answer.survey->status = Status::not_run;
  EXPECT_EQ(azeotrope_section(answer, {}).find("its absence is proved"), std::string::npos);
}

}  // namespace
}  // namespace stillshed
