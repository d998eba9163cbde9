#include <gtest/gtest.h>

#include "reports/html_sections.hpp"
#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(HtmlReach, CutsWithTheirMass) {
  const std::string markup = reach_section(sample::ternary());
  EXPECT_NE(markup.find("az1 (acetone + methanol)"), std::string::npos);
  EXPECT_NE(markup.find("64.6 to 65.2"), std::string::npos);
  EXPECT_NE(markup.find("along the boundary b1 (az1 to water)"), std::string::npos);
  EXPECT_NE(markup.find("stays in the vessel"), std::string::npos);
  EXPECT_NE(markup.find("unlimited stages and reflux"), std::string::npos);
}

TEST(HtmlReach, BestSequencesOnly) {
  Answer answer = sample::ternary();
  Sequence poor = answer.reach->sequences[0];
  poor.streams = {{{0.4, 0.3, 0.3}, 1.0, 0, true}};
  answer.reach->sequences = {poor, answer.reach->sequences[0], poor};
  EXPECT_EQ(sequences_to_print(answer, 3), (std::vector<std::size_t>{1}));
  const std::string markup = reach_section(answer);
  EXPECT_NE(markup.find("Sequence 2:"), std::string::npos);
  EXPECT_NE(markup.find("The result file has 2 more"), std::string::npos);
}

TEST(HtmlReach, EveryTestWithLimitAndMargin) {
  const std::string markup = hold_section(sample::ternary());
  EXPECT_NE(markup.find("\u2265 99.5 wt%"), std::string::npos);
  EXPECT_NE(markup.find("86.53 wt%"), std::string::npos);
  EXPECT_NE(markup.find("-12.97"), std::string::npos);
  EXPECT_NE(markup.find("azeotrope-ceiling"), std::string::npos);
}

TEST(HtmlReach, PocketIsNamed) {
  Answer answer = sample::ternary();
  EXPECT_EQ(hold_section(answer).find("pocket"), std::string::npos);
  answer.reach->products[0].pocket_width = 0.013;
  EXPECT_NE(hold_section(answer).find("pocket up to 1.3 mol% wide"), std::string::npos);
}

}  // namespace
}  // namespace stillshed
