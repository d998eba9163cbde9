#include "reports/html_report.hpp"

#include <gtest/gtest.h>

#include <regex>

#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(HtmlReport, IsWellFormed) {
  EXPECT_TRUE(testing_support::is_valid(html_text(sample::ternary(), {"2026-01-02"}), "xml"));
  EXPECT_TRUE(testing_support::is_valid(html_text(sample::binary()), "xml"));
}

TEST(HtmlReport, SectionsStandInTheirOrder) {
  const std::string page = html_text(sample::ternary());
  std::size_t last = 0;
  for (const char* heading :
       {"In short", "Before you heat anything", "Your stream", "Azeotropes and map", "What you can reach",
        "What holds you back", "How sure are we", "Where every number comes from"}) {
    const std::size_t at = page.find(std::string(heading) + "</h2>");
    ASSERT_NE(at, std::string::npos) << heading;
    EXPECT_GT(at, last);
    last = at;
  }
}

TEST(HtmlReport, CautionsStandAboveTheVerdicts) {
  const std::string page = html_text(sample::ternary());
  EXPECT_LT(page.find("class=\"warning\""), page.find("class=\"verdict"));
  EXPECT_NE(page.find("acetone &lt;with chloroform&gt;"), std::string::npos);
}

TEST(HtmlReport, NothingFromOutsideIsMarkup) {
  Answer answer = sample::ternary();
  const std::string evil = "<script>alert(1)</script>";
  answer.input.title = evil;
  answer.notes = {evil};
  answer.provenance = {evil};
  answer.incomplete = {{evil, evil, evil}};
  answer.cautions = {{evil, evil, {evil}, true}, {evil, evil, {evil}, false}};
  answer.input.stream[0].given_name = evil;
  answer.input.stream[0].given_amount = evil;
  answer.measured[0][0].source = evil;
  answer.pairs[0].record = evil;
  answer.reach->products[0].sentence = evil;
  answer.reach->products[0].limited_by = evil;
  answer.reach->batch[0].message = evil;
  const std::string page = html_text(answer, {evil});
  EXPECT_EQ(page.find("<script"), std::string::npos);
  EXPECT_TRUE(testing_support::is_valid(page, "xml"));
}

TEST(HtmlReport, NeedsNoNetworkAndNoScript) {
  const std::string page = html_text(sample::ternary());
  EXPECT_FALSE(std::regex_search(page, std::regex("(src|href)=\"|@import|url\\(|<script|<link")));
}

TEST(HtmlReport, NeverPromisesEverything) {
  Answer answer = sample::ternary();
  for (ProductOutcome& outcome : answer.reach->products) {
    outcome.verdict = Verdict::open;
    outcome.purity_limit_mass = outcome.purity_limit_mole = outcome.recovery = 1.0;
  }
  const std::string page = html_text(answer);
  const std::string body = page.substr(page.find("</style>"));
  EXPECT_FALSE(std::regex_search(body, std::regex("(^|[^0-9.#])100(\\.0+)? ?(%|wt%|mol%)")));
}

TEST(HtmlReport, LastLineDefers) {
  const std::string page = html_text(sample::ternary());
  const std::string foot = page.substr(page.find("<footer>"));
  EXPECT_NE(foot.find("not a measurement"), std::string::npos);
  EXPECT_NE(foot.find("Site rules, local codes and licensed practice"), std::string::npos);
}

TEST(HtmlReport, StreamKeepsResidueAside) {
  const std::string page = html_text(sample::ternary());
  EXPECT_NE(page.find("set aside"), std::string::npos);
  EXPECT_NE(page.find(">MeOH<"), std::string::npos);
  EXPECT_NE(page.find(">1722<"), std::string::npos);  // 41 % of 4200 kg
}

}  // namespace
}  // namespace stillshed
