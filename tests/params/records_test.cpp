#include "params/records.hpp"

#include <gtest/gtest.h>

#include <set>
#include <string>

namespace stillshed {
namespace {

TEST(Records, WordsOfEachEnumerationDiffer) {
  std::set<std::string> words;
  for (int k = 0; k <= static_cast<int>(PressureForm::clausius_clapeyron); ++k) {
    words.insert(to_string(static_cast<PressureForm>(k)));
  }
  EXPECT_EQ(words.size(), 6U);
  for (int k = 0; k <= static_cast<int>(AzeotropeKind::heterogeneous_minimum); ++k) {
    words.insert(to_string(static_cast<AzeotropeKind>(k)));
  }
  EXPECT_EQ(words.size(), 11U);
  for (int k = 0; k <= static_cast<int>(CautionTrigger::extrapolated); ++k) {
    words.insert(to_string(static_cast<CautionTrigger>(k)));
  }
  EXPECT_EQ(words.size(), 26U);
  for (int k = 0; k <= static_cast<int>(CheckKind::azeotropes); ++k) {
    words.insert(to_string(static_cast<CheckKind>(k)));
  }
  EXPECT_EQ(words.size(), 30U);
  EXPECT_FALSE(words.contains("unknown"));
  EXPECT_STRNE(to_string(GroupModel::unifac), to_string(GroupModel::dortmund));
}

TEST(Records, EqualityLooksAtEveryLevel) {
  ComponentRecord a;
  a.pressure_sets.emplace_back();
  ComponentRecord b = a;
  EXPECT_EQ(a, b);
  b.pressure_sets.front().coefficients[7] = 1.0;
  EXPECT_NE(a, b);
}

}  // namespace
}  // namespace stillshed
