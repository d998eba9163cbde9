#include "engine/sequences.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "engine/flow_map.hpp"
#include "tests/engine/hand_charts.hpp"

namespace stillshed {
namespace {

using testing::binary_chart;
using testing::curved_chart;
using testing::symmetric_chart;
using testing::walled_chart;
using testing::zeotropic_chart;

double best_recovery(const std::vector<Sequence>& sequences, const Composition& feed, int component, double purity) {
  double best = 0.0;
  for (const Sequence& sequence : sequences) {
    for (const Sequence::Stream& stream : sequence.streams) {
      if (stream.x[component] >= purity) {
        best = std::max(best, stream.share * stream.x[component] / feed[component]);
      }
    }
  }
  return best;
}

const Column* first_column(const std::vector<Sequence>& sequences, const Composition& distillate,
                           const Composition& bottoms, double tolerance) {
  for (const Sequence& sequence : sequences) {
    const Column& column = sequence.columns.front();
    if (separation(column.distillate, distillate) < tolerance && separation(column.bottoms, bottoms) < tolerance) {
      return &column;
    }
  }
  return nullptr;
}

/// Balances, collinearity, witness ends, and streams that add up to the charge.
void expect_consistent(const std::vector<Sequence>& sequences, const Composition& feed) {
  for (const Sequence& sequence : sequences) {
    Composition total(feed.size());
    for (const Sequence::Stream& stream : sequence.streams) {
      EXPECT_GT(stream.share, 0.0);
      for (int i = 0; i < feed.size(); ++i) {
        total[i] += stream.share * stream.x[i];
      }
    }
    EXPECT_LT(separation(total, feed), 1e-11);
    for (const Column& column : sequence.columns) {
      EXPECT_LT(separation(between(column.bottoms, column.distillate, column.distillate_to_feed), column.feed), 1e-11);
      ASSERT_GE(column.witness.size(), 2U);
      EXPECT_EQ(column.witness.front(), column.distillate);
      EXPECT_EQ(column.witness.back(), column.bottoms);
    }
  }
}

TEST(Sequences, SymmetricTernaryBottomsIsOneOfTheNodes) {
  const Composition feed = {0.6, 0.25, 0.15};
  const std::vector<Sequence> sequences = column_sequences(symmetric_chart(), feed, 5);
  const double t = 0.3846153846153846;
  const Column* column = first_column(sequences, {t, t, 1.0 - 2.0 * t}, {1.0, 0.0, 0.0}, 1e-9);
  ASSERT_NE(column, nullptr);
  EXPECT_FALSE(column->direct);
  EXPECT_NEAR(1.0 - column->distillate_to_feed, 0.35, 1e-12);
  EXPECT_NEAR(best_recovery(sequences, feed, 0, 0.999), 0.35 / 0.6, 1e-12);
  expect_consistent(sequences, feed);
}

TEST(Sequences, ZeotropicTernaryIsSplitCompletelyBothWays) {
  const Composition feed = {0.2, 0.3, 0.5};
  const std::vector<Sequence> sequences = column_sequences(zeotropic_chart(), feed, 2);
  ASSERT_EQ(sequences.size(), 2U);
  EXPECT_TRUE(sequences[0].columns[0].direct);
  EXPECT_FALSE(sequences[1].columns[0].direct);
  for (int i = 0; i < 3; ++i) {
    EXPECT_NEAR(best_recovery(sequences, feed, i, 1.0 - 1e-12), 1.0, 1e-12);
  }
  // The witness of A | BC follows A - B - C: through the saddle B, in the limit.
  EXPECT_EQ(sequences[0].columns[0].witness.size(), 3U);
  expect_consistent(sequences, feed);
}

TEST(Sequences, ProductsMayLieInAnotherRegionThanTheFeed) {
  const Composition feed = {0.70, 0.18, 0.12};
  const std::vector<Sequence> sequences = column_sequences(curved_chart(), feed, 3);
  EXPECT_NE(first_column(sequences, {1.0, 0.0, 0.0}, {0.0, 0.6, 0.4}, 1e-9), nullptr);
  // The polyline of the hand chart is coarse: 1e-3.
  const Column* indirect = first_column(sequences, {0.739866, 0.1333, 0.126834}, {0.0, 1.0, 0.0}, 1e-3);
  ASSERT_NE(indirect, nullptr);
  EXPECT_NEAR(1.0 - indirect->distillate_to_feed, 0.0538831, 2e-3);
  EXPECT_NEAR(best_recovery(sequences, feed, 1, 0.995), 0.29935, 5e-3);
  EXPECT_NEAR(best_recovery(sequences, feed, 2, 0.995), 0.455638, 5e-3);  // needs three columns
  EXPECT_NEAR(best_recovery(column_sequences(curved_chart(), feed, 2), feed, 2, 0.995), 0.22306118, 1e-6);
  EXPECT_NEAR(best_recovery(sequences, feed, 0, 0.995), 1.0, 1e-12);
  expect_consistent(sequences, feed);
}

TEST(Sequences, BinaryIsSplitBetweenItsFixedPoints) {
  const Composition feed = {0.8, 0.2};
  const std::vector<Sequence> sequences = column_sequences(binary_chart(0.5405844155844154, false), feed, 2);
  ASSERT_EQ(sequences.size(), 1U);
  ASSERT_EQ(sequences[0].streams.size(), 2U);
  EXPECT_NEAR(best_recovery(sequences, feed, 0, 0.99), 0.7875375375375374, 1e-12);
  expect_consistent(sequences, feed);
}

TEST(Sequences, NothingToSplitOnAFixedPoint) {
  EXPECT_TRUE(column_sequences(binary_chart(0.5, true), {0.5, 0.5}, 2).empty());
  EXPECT_TRUE(column_sequences(symmetric_chart(), {0.5, 0.5, 0.0}, 5).empty());
}

TEST(Sequences, RandomFeedsStayConsistent) {
  std::mt19937_64 random(5);
  std::exponential_distribution<double> exponential(1.0);
  for (const Chart& chart : {symmetric_chart(), curved_chart(), walled_chart({{0.35, 0.25}, {0.2, 0.1}})}) {
    for (int k = 0; k < 100; ++k) {
      Composition x = {exponential(random), exponential(random), exponential(random)};
      const double sum = x[0] + x[1] + x[2];
      for (double& value : x) {
        value /= sum;
      }
      const std::vector<Sequence> sequences = column_sequences(chart, x, 5);
      EXPECT_FALSE(sequences.empty());
      expect_consistent(sequences, x);
    }
  }
}

}  // namespace
}  // namespace stillshed
