#include "models/wagner.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(Wagner, HalfPowersArePowers) {
  for (const double k : {0.0, 0.5, 1.0, 1.5, 2.5, 3.0, 7.5}) {
    EXPECT_NEAR(half_power(0.37, k), std::pow(0.37, k), 1e-15) << k;
    EXPECT_TRUE(half_power(Interval(0.37), k).contains(half_power(0.37, k)));
    EXPECT_EQ(half_power(0.0, k), k == 0.0 ? 1.0 : 0.0);
  }
}

TEST(Wagner, BracketRisesAndIsEnclosedByItsEndPoints) {
  for (const double k : {1.0, 1.5, 2.5, 3.0, 6.0, 7.5}) {
    double before = wagner_bracket(0.0, k);
    const Interval whole = wagner_bracket(Interval(0.0, 1.0), k);
    for (double t = 0.01; t <= 1.0; t += 0.01) {
      const double now = wagner_bracket(t, k);
      EXPECT_NEAR(now, k * std::pow(t, k - 1.0) - (k - 1.0) * std::pow(t, k), 1e-14);
      EXPECT_GE(now, before - 1e-15);
      EXPECT_TRUE(whole.contains(now));
      before = now;
    }
    EXPECT_NEAR(whole.upper(), 1.0, 1e-14);
  }
}

TEST(Wagner, FormsWithoutTermsAreNotWagner) {
  EXPECT_FALSE(is_wagner(PressureForm::antoine_log10));
  EXPECT_TRUE(is_wagner(PressureForm::wagner_water));
  PressureSet set;
  set.form = PressureForm::wagner_25;
  set.coefficients = {1, 2, 3, 4, 647.1, 2.2e7};
  EXPECT_EQ(critical_K(set), 647.1);
  EXPECT_EQ(critical_Pa(set), 2.2e7);
  EXPECT_GE(reduced(Interval(647.1), 647.1).lower(), 0.0);
}

}  // namespace
}  // namespace stillshed
