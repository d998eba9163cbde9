#include "reports/findings.hpp"

#include <gtest/gtest.h>

#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

TEST(Findings, MassOfACutFollowsFromItsMoles) {
  Answer answer = sample::ternary();
  // Taking everything gives the volatile charge back.
  EXPECT_NEAR(*kilograms(answer, answer.feed, 1.0), 4200.0 * 0.98, 1e-9);
  answer.input.amount_kg.reset();
  EXPECT_FALSE(kilograms(answer, answer.feed, 1.0).has_value());
}

TEST(Findings, MassFractions) {
  const Answer answer = sample::ternary();
  const std::vector<double> w = mass_fractions(answer.mixture, {0.5, 0.5, 0.0});
  EXPECT_NEAR(w[0], 58.08 / (58.08 + 32.04), 1e-15);
  EXPECT_NEAR(w[0] + w[1] + w[2], 1.0, 1e-15);
}

TEST(Findings, Names) {
  EXPECT_EQ(short_id("az12(acetone,methanol)"), "az12");
  EXPECT_EQ(short_id("azulene"), "azulene");
  EXPECT_EQ(short_id("2-methyl(oxolane)"), "2-methyl(oxolane)");
  EXPECT_EQ(member_names(sample::ternary().mixture, {0, 2}), "acetone + water");
}

TEST(Findings, ReadingsInWords) {
  const Answer answer = sample::ternary();
  EXPECT_EQ(reading_words(answer, "batch[0].cuts[1]"), "batch rectifier, cut 2");
  EXPECT_EQ(reading_words(answer, "batch[0].heel"), "batch rectifier, heel");
  EXPECT_EQ(reading_words(answer, "sequences[0].streams[1]"), "sequence 1, bottoms of column 1");
  EXPECT_EQ(reading_words(answer, "sequences[7].streams[1]"), "sequences[7].streams[1]");
  EXPECT_EQ(reading_words(answer, ""), "");
}

TEST(Findings, WeakestEvidenceOfTheMembersOnly) {
  Answer answer = sample::ternary();
  answer.pairs[0].evidence = Evidence::fitted;
  EXPECT_EQ(weakest_evidence(answer, {0, 1}), Evidence::fitted);
  EXPECT_EQ(weakest_evidence(answer, {0, 1, 2}), Evidence::predicted);
  answer.pairs[2].evidence = Evidence::none;
  EXPECT_EQ(weakest_evidence(answer, {0, 1, 2}), Evidence::none);
}

TEST(Findings, MeasuredNeedsBothTemperatureAndComposition) {
  Answer answer = sample::ternary();
  EXPECT_EQ(azeotrope_evidence(answer, 0), "M");
  answer.measured[0][0].dx = 0.02;
  EXPECT_EQ(azeotrope_evidence(answer, 0), "P");
  answer.measured[0][0].dx.reset();
  EXPECT_EQ(azeotrope_evidence(answer, 0), "P");
}

TEST(Findings, BestStreamIsThePurest) {
  const Answer answer = sample::ternary();
  const auto best = best_stream(answer.reach->sequences[0], answer.feed, 1);
  ASSERT_TRUE(best.has_value());
  EXPECT_EQ(best->stream, 1U);
  EXPECT_NEAR(best->recovery, 0.65 * 0.45 / 0.45, 1e-12);
}

}  // namespace
}  // namespace stillshed
