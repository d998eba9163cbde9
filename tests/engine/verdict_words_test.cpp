#include "engine/verdict_words.hpp"

#include <gtest/gtest.h>

#include "models/ideal.hpp"
#include "tests/engine/hand_charts.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

TEST(VerdictWords, PercentagesAreRoundedDownAndNeverReachAHundred) {
  EXPECT_EQ(percent_down(0.95639), "95.63");
  EXPECT_EQ(percent_down(0.5), "50");
  EXPECT_EQ(percent_down(0.98), "98");
  EXPECT_EQ(percent_down(0.99989), "99.98");
  EXPECT_EQ(percent_down(0.99995), "more than 99.99");
  EXPECT_EQ(percent_down(1.0), "more than 99.99");
  EXPECT_EQ(percent_down(0.0), "0");
}

TEST(VerdictWords, LimitsAreNamedInWords) {
  const Chart chart = testing::symmetric_chart();
  const Mixture mixture = testing::simple_mixture({350.0, 350.0, 350.0}, Ideal(3));
  const ReachOptions options;
  const Names names{mixture, chart, options};
  EXPECT_EQ(limit_words(names, "az1(A,B)", 0), "the azeotrope with B at 67.9 degC");
  EXPECT_EQ(limit_words(names, "az4(A,B,C)", 1), "the azeotrope with A and C at 64.9 degC");
  EXPECT_EQ(limit_words(names, "az4(A,B,C)", -1), "the azeotrope of A, B and C at 64.9 degC");
  EXPECT_EQ(
      limit_words(names, "b1", 0),
      "the distillation boundary from the azeotrope of A, B and C at 64.9 degC to the azeotrope of A and B at 67.9 "
      "degC");
}

}  // namespace
}  // namespace stillshed
