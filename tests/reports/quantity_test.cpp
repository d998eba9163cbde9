#include "reports/quantity.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

std::optional<double> number(const std::string& text) {
  std::string why;
  return read_number(text, why);
}

TEST(Number, PointAndUnambiguousComma) {
  EXPECT_EQ(number("41"), 41.0);
  EXPECT_EQ(number("41.5"), 41.5);
  EXPECT_EQ(number("41,5"), 41.5);
  EXPECT_EQ(number("0,125"), 0.125);
  EXPECT_EQ(number("1e-3"), 1e-3);
  EXPECT_EQ(number("+3"), 3.0);
}

TEST(Number, AmbiguousOrBroken) {
  for (const char* text : {"1,234", "1,234,567", "1,234.5", "1.2.3", "", "abc", "1e999", "4x", "5,"}) {
    EXPECT_FALSE(number(text).has_value()) << text;
  }
}

TEST(Quantity, RangesBoundsAndUnits) {
  std::string why;
  const auto range = read_quantity("55 - 75 wt%", why);
  ASSERT_TRUE(range.has_value()) << why;
  EXPECT_EQ(range->value, 65.0);
  EXPECT_EQ(range->low, 55.0);
  EXPECT_EQ(range->high, 75.0);
  EXPECT_EQ(range->unit, "wt%");
  const auto dash = read_quantity("55\u201375 wt%", why);
  ASSERT_TRUE(dash.has_value());
  EXPECT_EQ(dash->high, 75.0);
  const auto words = read_quantity("2 to 6 mol%", why);
  ASSERT_TRUE(words.has_value());
  EXPECT_EQ(words->value, 4.0);
  const auto below = read_quantity("<0.1wt%", why);
  ASSERT_TRUE(below.has_value());
  EXPECT_EQ(below->low, 0.0);
  EXPECT_EQ(below->high, 0.1);
  EXPECT_EQ(below->value, 0.05);
  EXPECT_FALSE(read_quantity("75-55 wt%", why).has_value());
  EXPECT_FALSE(read_quantity("wt%", why).has_value());
  EXPECT_FALSE(read_quantity("NaN wt%", why).has_value());
  EXPECT_EQ(why, "not a finite number");
}

TEST(Pressure, AsPeopleWriteIt) {
  Problems problems;
  EXPECT_EQ(read_pressure_Pa("1 atm", "p", problems), 101325.0);
  EXPECT_EQ(read_pressure_Pa("1atm", "p", problems), 101325.0);
  EXPECT_EQ(read_pressure_Pa("150 mbar", "p", problems), 15000.0);
  EXPECT_EQ(read_pressure_Pa("2 barg", "p", problems), 301325.0);
  EXPECT_NEAR(*read_pressure_Pa("25 inHg vac", "p", problems), 101325.0 - 25.0 * 3386.388640341, 1e-6);
  EXPECT_NEAR(*read_pressure_Pa("1,5 bar", "p", problems), 150000.0, 1e-9);
  EXPECT_TRUE(problems.empty());
}

TEST(Pressure, RefusedWithWhatIsAllowed) {
  for (const char* text :
       {"1", "1 furlong", "0 bar", "-1 bar", "30 inHg vac", "1-2 bar", "25 degC", "nan bar", "1 mPa"}) {
    Problems problems;
    EXPECT_FALSE(read_pressure_Pa(text, "/pressure", problems).has_value()) << text;
    ASSERT_EQ(problems.size(), 1U) << text;
    EXPECT_EQ(problems[0].where, "/pressure");
    EXPECT_NE(problems[0].found.find(text), std::string::npos);
    EXPECT_FALSE(problems[0].allowed.empty());
  }
}

TEST(Temperature, DegreesCelsiusUnlessSaid) {
  Problems problems;
  EXPECT_EQ(read_temperature_K("25", "t", problems), 298.15);
  EXPECT_EQ(read_temperature_K("25 C", "t", problems), 298.15);
  EXPECT_EQ(read_temperature_K("25 \u00b0C", "t", problems), 298.15);
  EXPECT_EQ(read_temperature_K("300 K", "t", problems), 300.0);
  EXPECT_NEAR(*read_temperature_K("212 F", "t", problems), 373.15, 1e-10);
  EXPECT_EQ(read_temperature_K("\u221210 degC", "t", problems), 263.15);
  EXPECT_TRUE(problems.empty());
  EXPECT_FALSE(read_temperature_K("-300 degC", "t", problems).has_value());
  EXPECT_FALSE(read_temperature_K("5 bar", "t", problems).has_value());
  EXPECT_EQ(problems.size(), 2U);
}

TEST(Amount, SharesAbsoluteAmountsAndRest) {
  Problems problems;
  EXPECT_TRUE(read_amount("rest", "a", problems)->rest);
  EXPECT_TRUE(read_amount("Balance", "a", problems)->rest);
  EXPECT_NEAR(read_amount("500 ppm", "a", problems)->value, 5e-4, 1e-18);
  EXPECT_EQ(read_amount("240 kg", "a", problems)->dimension, Dimension::mass);
  EXPECT_EQ(read_amount("2 L", "a", problems)->dimension, Dimension::volume);
  const auto range = read_amount("2-6 wt%", "a", problems);
  EXPECT_NEAR(*range->low, 0.02, 1e-15);
  EXPECT_NEAR(range->value, 0.04, 1e-15);
  EXPECT_TRUE(problems.empty());
  EXPECT_FALSE(read_amount("-3 wt%", "a", problems).has_value());
  EXPECT_FALSE(read_amount("40 %", "a", problems).has_value());
  EXPECT_FALSE(read_amount("40", "a", problems).has_value());
  EXPECT_FALSE(read_amount("40 bar", "a", problems).has_value());
  EXPECT_EQ(problems.size(), 4U);
}

TEST(Total, MassOrAmountOfSubstance) {
  Problems problems;
  EXPECT_EQ(read_total("4.2 t", "a", problems)->value, 4200.0);
  EXPECT_EQ(read_total("3 kmol", "a", problems)->value, 3000.0);
  EXPECT_FALSE(read_total("0 kg", "a", problems).has_value());
  EXPECT_FALSE(read_total("10 wt%", "a", problems).has_value());
  EXPECT_EQ(problems.size(), 2U);
}

TEST(PlainText, TypographicSigns) {
  EXPECT_EQ(plain_text("\u00a0\u2265\u202f99.5\u2009wt% "), ">= 99.5 wt%");
  EXPECT_EQ(in_quotes("a"), "\"a\"");
}

}  // namespace
}  // namespace stillshed
