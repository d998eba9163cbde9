#include "reports/units.hpp"

#include <gtest/gtest.h>
#include <udunits2.h>

#include <cmath>
#include <map>
#include <set>

namespace stillshed {
namespace {

/// Our words in the words of UDUNITS-2, where it has them. Temperatures and gauge pressures with their offsets.
const std::map<std::string, std::string>& independent_words() {
  static const std::map<std::string, std::string> words = {{"bar", "bar"},
                                                           {"mbar", "mbar"},
                                                           {"Pa", "Pa"},
                                                           {"hPa", "hPa"},
                                                           {"kPa", "kPa"},
                                                           {"MPa", "MPa"},
                                                           {"atm", "atm"},
                                                           {"torr", "torr"},
                                                           {"mmHg", "mmHg"},
                                                           {"inHg", "inHg"},
                                                           {"psi", "psi"},
                                                           {"psia", "psi"},
                                                           {"bara", "bar"},
                                                           {"bar(a)", "bar"},
                                                           {"mbara", "mbar"},
                                                           {"mbar(a)", "mbar"},
                                                           {"millibar", "mbar"},
                                                           {"kPa(a)", "kPa"},
                                                           {"psi(a)", "psi"},
                                                           {"degC", "degC"},
                                                           {"\u00b0C", "degC"},
                                                           {"C", "degC"},
                                                           {"Celsius", "degC"},
                                                           {"K", "K"},
                                                           {"kelvin", "K"},
                                                           {"degF", "degF"},
                                                           {"\u00b0F", "degF"},
                                                           {"F", "degF"},
                                                           {"Fahrenheit", "degF"},
                                                           {"kg", "kg"},
                                                           {"g", "g"},
                                                           {"mg", "mg"},
                                                           {"t", "t"},
                                                           {"tonne", "t"},
                                                           {"tonnes", "t"},
                                                           {"lb", "lb"},
                                                           {"lbs", "lb"},
                                                           {"mol", "mol"},
                                                           {"mmol", "mmol"},
                                                           {"kmol", "kmol"},
                                                           {"moles", "mol"},
                                                           {"L", "L"},
                                                           {"l", "l"},
                                                           {"litre", "litre"},
                                                           {"litres", "litre"},
                                                           {"liter", "litre"},
                                                           {"liters", "litre"},
                                                           {"mL", "mL"},
                                                           {"ml", "mL"},
                                                           {"m3", "m3"},
                                                           {"m\u00b3", "m3"},
                                                           {"gal", "US_liquid_gallon"},
                                                           {"USgal", "US_liquid_gallon"},
                                                           {"w/w", "1"},
                                                           {"wt/wt", "1"},
                                                           {"kg/kg", "kg/kg"},
                                                           {"massfraction", "1"},
                                                           {"weightfraction", "1"},
                                                           {"g/kg", "g/kg"},
                                                           {"ppm", "mg/kg"},
                                                           {"ppmw", "mg/kg"},
                                                           {"mg/kg", "mg/kg"},
                                                           {"mol/mol", "1"},
                                                           {"molefraction", "1"},
                                                           {"molfraction", "1"},
                                                           {"v/v", "1"},
                                                           {"volumefraction", "1"},
                                                           {"wt%", "0.01"},
                                                           {"%wt", "0.01"},
                                                           {"mass%", "0.01"},
                                                           {"w%", "0.01"},
                                                           {"m%", "0.01"},
                                                           {"%w/w", "0.01"},
                                                           {"%(w/w)", "0.01"},
                                                           {"%m/m", "0.01"},
                                                           {"mol%", "0.01"},
                                                           {"%mol", "0.01"},
                                                           {"mole%", "0.01"},
                                                           {"vol%", "0.01"},
                                                           {"%vol", "0.01"},
                                                           {"%v/v", "0.01"},
                                                           {"%(v/v)", "0.01"}};
  return words;
}

/// Gauge and vacuum words: the absolute unit they count in, and the sign.
const std::map<std::string, std::pair<std::string, double>>& gauge_words() {
  static const std::map<std::string, std::pair<std::string, double>> words = {
      {"barg", {"bar", 1.0}},      {"bar(g)", {"bar", 1.0}},      {"mbarg", {"mbar", 1.0}}, {"mbar(g)", {"mbar", 1.0}},
      {"kPag", {"kPa", 1.0}},      {"kPa(g)", {"kPa", 1.0}},      {"psig", {"psi", 1.0}},   {"psi(g)", {"psi", 1.0}},
      {"inHgvac", {"inHg", -1.0}}, {"inHgvacuum", {"inHg", -1.0}}};
  return words;
}

const char* si_unit(Dimension dimension) {
  switch (dimension) {
    case Dimension::pressure: return "Pa";
    case Dimension::temperature: return "K";
    case Dimension::mass: return "kg";
    case Dimension::amount: return "mol";
    case Dimension::volume: return "m3";
    default: return "1";
  }
}

class IndependentUnits {
 public:
  IndependentUnits() {
    ut_set_error_message_handler(ut_ignore);
    system_ = ut_read_xml(nullptr);
  }
  ~IndependentUnits() { ut_free_system(system_); }
  double convert(const std::string& from, const std::string& to, double value) const {
    ut_unit* a = ut_parse(system_, from.c_str(), UT_UTF8);
    ut_unit* b = ut_parse(system_, to.c_str(), UT_UTF8);
    cv_converter* converter = a != nullptr && b != nullptr ? ut_get_converter(a, b) : nullptr;
    const double result = converter != nullptr ? cv_convert_double(converter, value) : std::nan("");
    cv_free(converter);
    ut_free(a);
    ut_free(b);
    return result;
  }

 private:
  ut_system* system_ = nullptr;
};

TEST(Units, AgreeWithAnIndependentLibrary) {
  const IndependentUnits independent;
  for (const UnitWord& unit : unit_table()) {
    const std::string word(unit.word);
    SCOPED_TRACE(word);
    const auto gauge = gauge_words().find(word);
    for (const double number : {0.0, 1.0, 37.5}) {
      if (gauge != gauge_words().end()) {
        const double part = independent.convert(gauge->second.first, "Pa", number);
        EXPECT_NEAR(unit.to_si(number), 101325.0 + gauge->second.second * part, 1e-3 + 1e-6 * part);
        continue;
      }
      const auto known = independent_words().find(word);
      ASSERT_NE(known, independent_words().end()) << "a word without an independent witness";
      const double expected = independent.convert(known->second, si_unit(unit.dimension), number);
      // Conventional mercury and the torr differ in the seventh digit between tables.
      EXPECT_NEAR(unit.to_si(number), expected, 2e-6 * std::abs(expected) + 1e-12);
    }
  }
}

TEST(Units, NoWordTwice) {
  std::set<std::string> seen;
  for (const UnitWord& unit : unit_table()) {
    EXPECT_TRUE(seen.insert(std::string(unit.word)).second) << unit.word;
  }
}

TEST(Units, WordsInOtherLetterCase) {
  ASSERT_NE(find_unit("BAR"), nullptr);
  EXPECT_EQ(find_unit("Bar")->factor, 1e5);
  EXPECT_EQ(find_unit("WT%")->dimension, Dimension::mass_fraction);
  EXPECT_EQ(find_unit("in Hg vac")->factor, find_unit("inHgvac")->factor);
  EXPECT_EQ(find_unit("mmhg"), find_unit("mmHg"));
}

TEST(Units, NeverGuessesAPrefix) {
  for (const char* word : {"mPa", "MG", "T", "G", "k", "c", "PA"}) {
    EXPECT_EQ(find_unit(word), nullptr) << word;
  }
  EXPECT_EQ(find_unit("MPa")->factor, 1e6);
}

TEST(Units, WordsRefusedWithAReason) {
  for (const char* word : {"%", "area%", "ppmv", "mg/L", "mPa"}) {
    EXPECT_EQ(find_unit(word), nullptr) << word;
    EXPECT_FALSE(why_refused(word).empty()) << word;
  }
  EXPECT_TRUE(why_refused("furlong").empty());
}

TEST(Units, TheWordsNamedAsAllowedAreUnderstood) {
  for (const char* word : {"bar", "inHg vac", "psig", "wt%", "w/w", "mol%", "mole fraction", "vol%", "gal"}) {
    EXPECT_NE(find_unit(word), nullptr) << word;
  }
}

}  // namespace
}  // namespace stillshed
