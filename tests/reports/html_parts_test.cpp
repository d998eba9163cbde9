#include "reports/html_parts.hpp"

#include <gtest/gtest.h>

#include <set>

#include "params/errors.hpp"
#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(HtmlParts, ElementEscapes) {
  EXPECT_EQ(element("p", "a < b", "note"), "<p class=\"note\">a &lt; b</p>");
}

TEST(HtmlParts, TableHeadsAreScoped) {
  HtmlTable table("Caption & more");
  table.column("Name");
  table.column("Number", true);
  EXPECT_TRUE(table.empty());
  table.row({"x", "1"});
  const std::string markup = table.markup();
  EXPECT_TRUE(testing_support::is_valid(markup, "xml"));
  EXPECT_NE(markup.find("<th scope=\"col\" class=\"number\">Number</th>"), std::string::npos);
  EXPECT_NE(markup.find("<th scope=\"row\">x</th>"), std::string::npos);
  EXPECT_THROW(table.row({"too few"}), LogicError);
}

TEST(HtmlParts, CompositionsLeaveOutWhatIsAbsent) {
  const Answer answer = sample::ternary();
  EXPECT_EQ(mole_percent_lines(answer, {0.78, 0.22, 0.0}), "acetone&#160;78.00<br/>methanol&#160;22.00");
  EXPECT_EQ(mole_percent_lines(answer, {0.0, 0.0, 1.0}), "water\u00a0&gt; 99.99");
  EXPECT_NE(mass_percent_lines(answer, {0.78, 0.22, 0.0}).find("86.5"), std::string::npos);
}

TEST(HtmlParts, NinesScale) {
  EXPECT_DOUBLE_EQ(nines(0.0), 0.0);
  EXPECT_NEAR(nines(0.9), 1.0, 1e-12);
  EXPECT_NEAR(nines(0.995), 2.30103, 1e-5);
  EXPECT_DOUBLE_EQ(nines(1.0), 5.0);
}

TEST(HtmlParts, GaugeIsAPictureWithWords) {
  const Answer answer = sample::ternary();
  for (const ProductOutcome& outcome : answer.reach->products) {
    EXPECT_TRUE(testing_support::is_valid(purity_gauge(answer, outcome), "xml"));
  }
  EXPECT_NE(purity_gauge(answer, answer.reach->products[0]).find("limit 86.53 wt%, asked 99.5"), std::string::npos);
}

TEST(HtmlParts, SignsOfTests) {
  const Mixture mixture = sample::ternary().mixture;
  EXPECT_EQ(test_markup({ProductTest::What::impurity, 2, false, 0.003, Basis::mass}, mixture), "water \u2264 0.3 wt%");
  EXPECT_EQ(test_markup({ProductTest::What::purity, 2, true, 0.995, Basis::mole}, mixture), "\u2265 99.5 mol%");
}

TEST(HtmlParts, PlacesAreNamed) {
  const Answer answer = sample::ternary();
  EXPECT_EQ(place_words(answer, "az1(acetone,methanol)"), "the azeotrope az1 (acetone + methanol, 55.25 °C)");
  EXPECT_EQ(place_words(answer, "b1"), "the boundary b1 (az1 to water)");
  EXPECT_EQ(place_words(answer, "water"), "water");
}

TEST(HtmlParts, BadgesDiffer) {
  std::set<std::string> badges;
  for (const Verdict verdict : {Verdict::open, Verdict::tight, Verdict::capped, Verdict::shut, Verdict::no_call}) {
    badges.insert(verdict_badge(verdict));
  }
  EXPECT_EQ(badges.size(), 5U);
}

}  // namespace
}  // namespace stillshed
