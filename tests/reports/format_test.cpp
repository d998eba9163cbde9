#include "reports/format.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <cstdlib>
#include <random>

#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(Format, Numbers) {
  EXPECT_EQ(fixed(12.3, 2), "12.30");
  EXPECT_EQ(fixed(-0.001, 2), "0.00");
  EXPECT_EQ(fixed(-0.01, 2), "-0.01");
  EXPECT_EQ(significant(0.012345, 3), "0.0123");
  EXPECT_EQ(significant(4200.4, 3), "4200");
  EXPECT_EQ(significant(0.0, 3), "0");
  EXPECT_EQ(significant(1.5e-9, 2), "1.5e-09");
  EXPECT_EQ(celsius(328.4), "55.25");
  EXPECT_EQ(pressure_text(101325.0), "1.013 bar");
  EXPECT_EQ(kilogram_text(0.1234), "0.123 kg");
}

TEST(Format, ALimitIsNeverPrintedBetterThanItIs) {
  EXPECT_EQ(limit_percent(0.97319), "97.31");
  EXPECT_EQ(limit_percent(0.9999999), "99.99");
  EXPECT_EQ(limit_percent(1.0), "> 99.99");
  EXPECT_EQ(limit_percent(1.0, 4), "> 99.9999");
  EXPECT_EQ(limit_percent(0.995), "99.50");  // not 99.49: the nearest double lies below 0.995
  EXPECT_EQ(impurity_percent(0.001201), "0.13");
  EXPECT_EQ(impurity_percent(0.0), "< 0.01");
  EXPECT_EQ(impurity_percent(0.003), "0.30");
  std::mt19937_64 random(11);
  std::uniform_real_distribution<double> exponent(-12.0, 0.0);
  for (int k = 0; k < 5000; ++k) {
    const double impurity = std::pow(10.0, exponent(random));
    const std::string text = limit_percent(1.0 - impurity, 1 + k % 4);
    EXPECT_NE(text.substr(0, 3), "100") << text;
    if (text.front() != '>') {
      EXPECT_LE(std::strtod(text.c_str(), nullptr), 100.0 * (1.0 - impurity) + 1e-9);
    }
    EXPECT_GE(std::strtod(impurity_percent(impurity, 1 + k % 4).c_str(), nullptr), 100.0 * impurity - 1e-9);
  }
}

TEST(Format, SharesNeverRoundOntoTheEnds) {
  EXPECT_EQ(share_percent(0.0), "0");
  EXPECT_EQ(share_percent(0.78), "78.00");
  EXPECT_EQ(share_percent(3.48133e-6), "0.00035");
  EXPECT_EQ(share_percent(1.0 - 3.48133e-6), "99.99965");
  EXPECT_EQ(share_percent(1e-12), "< 0.00000001");
  EXPECT_EQ(share_percent(1.0), "> 99.99999999");
}

TEST(Format, TestsReadAsTheyAreWritten) {
  const Mixture mixture = sample::ternary().mixture;
  const ProductTest purity{ProductTest::What::purity, 0, true, 0.995, Basis::mass};
  const ProductTest impurity{ProductTest::What::impurity, 2, false, 0.003, Basis::mole};
  const ProductTest recovery{ProductTest::What::recovery, 0, true, 0.9, Basis::mass};
  EXPECT_EQ(test_text(purity, mixture), ">= 99.5 wt%");
  EXPECT_EQ(test_text(impurity, mixture), "water <= 0.3 mol%");
  EXPECT_EQ(test_text(recovery, mixture), "recovery >= 90 %");
  EXPECT_EQ(reached_text({purity, 1.0, 0.005, true}), "> 99.99 wt%");
  EXPECT_EQ(reached_text({impurity, 0.0, 0.003, true}), "< 0.01 mol%");
  EXPECT_EQ(reached_text({{ProductTest::What::purity, 0, true, 0.99995, Basis::mass}, 0.999999, 0.0, true}),
            "99.9999 wt%");
}

TEST(Format, WrapKeepsTheWidth) {
  const std::string text = "one two three °C-four five six seven averyverylongwordthatmustbecut end";
  const auto lines = wrap(text, 16, "- ", "  ");
  std::string joined;
  for (const std::string& line : lines) {
    EXPECT_LE(display_width(line), 16) << line;
    joined += line;
  }
  EXPECT_EQ(lines.front().substr(0, 5), "- one");
  EXPECT_NE(joined.find("end"), std::string::npos);
  EXPECT_EQ(wrap("", 20).size(), 1U);
}

TEST(Format, TableFitsItsWidth) {
  TextTable table;
  table.column("name");
  table.column("T", TextTable::Align::right);
  table.row({"acetone µ", "56.05"});
  table.row({"a very long name of a component that nobody would print", "100.00"});
  const auto wide = table.lines(120);
  EXPECT_EQ(wide[1].substr(wide[1].size() - 5), "56.05");
  for (const std::string& line : table.lines(30, "  ")) {
    EXPECT_LE(display_width(line), 30) << line;
  }
  EXPECT_NE(table.lines(30)[2].find('~'), std::string::npos);
}

TEST(Format, MarkupIsEscaped) {
  EXPECT_EQ(escape_markup("<b a=\"x\" b='y'>&\x01"), "&lt;b a=&quot;x&quot; b=&#39;y&#39;&gt;&amp; ");
}

}  // namespace
}  // namespace stillshed
