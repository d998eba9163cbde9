#include "engine/batch.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "engine/flow_map.hpp"
#include "tests/engine/hand_charts.hpp"

namespace stillshed {
namespace {

using testing::binary_chart;
using testing::curved_chart;
using testing::renumbered;
using testing::symmetric_chart;
using testing::upside_down;
using testing::walled_chart;
using testing::zeotropic_chart;

double no_temperature(const Composition&) {
  return 345.0;
}

Batch rectify(const Chart& chart, const Composition& x, std::optional<int> region = {}) {
  return run_batch(chart, x, Batch::Mode::rectifier, no_temperature, region);
}
Batch strip(const Chart& chart, const Composition& x, std::optional<int> region = {}) {
  return run_batch(chart, x, Batch::Mode::stripper, no_temperature, region);
}

void expect_cut(const Batch& batch, std::size_t k, const Composition& average, double share, double tolerance = 1e-12) {
  ASSERT_LT(k, batch.cuts.size());
  EXPECT_NEAR(batch.cuts[k].share, share, tolerance) << "cut " << k;
  EXPECT_LT(separation(batch.cuts[k].average, average), tolerance) << "cut " << k;
}

/// Whatever the chart: amounts close, the pot never leaves the simplex, every cut is the difference of two pots.
void expect_balances(const Batch& batch, const Composition& feed) {
  ASSERT_EQ(batch.status, Status::complete) << batch.message;
  EXPECT_DOUBLE_EQ(batch.heel_share, 0.0);
  double left = 1.0;
  Composition drawn(feed.size());
  Composition pot = feed;
  for (const Cut& cut : batch.cuts) {
    EXPECT_GE(cut.share, 0.0);
    EXPECT_LT(separation(cut.pot_start, pot), 1e-12);
    const double after = left - cut.share;
    for (int i = 0; i < feed.size(); ++i) {
      drawn[i] += cut.share * cut.average[i];
      EXPECT_GE(cut.pot_end[i], 0.0);
      EXPECT_GE(cut.average[i], 0.0);
      EXPECT_NEAR(left * cut.pot_start[i], cut.share * cut.average[i] + after * cut.pot_end[i], 1e-12);
    }
    left = after;
    pot = cut.pot_end;
  }
  EXPECT_NEAR(left, 0.0, 1e-12);
  EXPECT_LT(separation(drawn, feed), 1e-12);
}

TEST(Batch, SymmetricTernaryMatchesBarycentricShares) {
  const Batch batch = rectify(symmetric_chart(), {0.6, 0.25, 0.15});
  ASSERT_EQ(batch.cuts.size(), 3U);
  expect_cut(batch, 0, {1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0}, 0.45);
  expect_cut(batch, 1, {0.5, 0.5, 0.0}, 0.20);
  expect_cut(batch, 2, {1.0, 0.0, 0.0}, 0.35);
  EXPECT_EQ(batch.cuts[0].on, "interior");
  EXPECT_EQ(batch.cuts[1].on, "face");
  expect_balances(batch, {0.6, 0.25, 0.15});
}

TEST(Batch, StripperTakesStableNodesFirst) {
  // The pot leaves pure A straight, meets x_A = x_B, where region B pushes back: along it to the ternary azeotrope,
  // drawing the binary one.
  const Batch batch = strip(symmetric_chart(), {0.6, 0.25, 0.15});
  ASSERT_EQ(batch.cuts.size(), 3U);
  expect_cut(batch, 0, {1.0, 0.0, 0.0}, 0.35);
  expect_cut(batch, 1, {0.5, 0.5, 0.0}, 0.20);
  expect_cut(batch, 2, {1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0}, 0.45);
  EXPECT_EQ(batch.cuts[1].on, "b1");
  EXPECT_TRUE(batch.cuts[1].fixed_point.has_value());
}

TEST(Batch, RectifierPassesBoundariesThatPartStableNodes) {
  // The charge lies in the region of mu; the boundary starts at zeta, so the pot crosses it and alpha is drawn.
  const Composition feed = {0.70, 0.18, 0.12};
  const Batch batch = rectify(curved_chart(), feed);
  ASSERT_EQ(batch.cuts.size(), 3U);
  const double mu = 0.65877923;
  const double azeotrope = 0.18 / mu;
  expect_cut(batch, 0, {1.0, 0.0, 0.0}, 0.70);
  expect_cut(batch, 1, {0.0, mu, 1.0 - mu}, azeotrope);
  expect_cut(batch, 2, {0.0, 0.0, 1.0}, 0.30 - azeotrope);
  EXPECT_NEAR(batch.cuts[1].share, 0.27323265792699625, 1e-8);
  expect_balances(batch, feed);
}

TEST(Batch, StraightWallIsFollowedAndGivesTheSaddle) {
  // Barycentric in A, azeotrope, C.
  const Composition feed = {0.5, 0.2, 0.3};
  const Batch batch = rectify(walled_chart({}), feed);
  ASSERT_EQ(batch.cuts.size(), 3U);
  expect_cut(batch, 0, {1.0, 0.0, 0.0}, 0.3);
  expect_cut(batch, 1, {0.5, 0.5, 0.0}, 0.4);
  expect_cut(batch, 2, {0.0, 0.0, 1.0}, 0.3);
  EXPECT_EQ(batch.cuts[1].on, "b1");
  expect_balances(batch, feed);
}

TEST(Batch, WallIsCrossedWhereBothSidesPushAcross) {
  const Chart chart = walled_chart({{0.2, 0.5}, {0.4, 0.2}});
  const Composition feed = {0.65, 0.175, 0.175};  // half way from A to (0.3, 0.35)
  const Batch batch = rectify(chart, feed);
  ASSERT_EQ(batch.cuts.size(), 4U);
  expect_cut(batch, 0, {1.0, 0.0, 0.0}, 0.5);
  EXPECT_LT(separation(batch.cuts[0].pot_end, {0.3, 0.35, 0.35}), 1e-12);
  expect_cut(batch, 1, {0.0, 1.0, 0.0}, 0.1);  // 0.5 * 0.25 / 1.25
  EXPECT_LT(separation(batch.cuts[1].pot_end, {0.375, 0.1875, 0.4375}), 1e-12);
  expect_cut(batch, 2, {2.0 / 3.0, 1.0 / 3.0, 0.0}, 0.225);  // 0.4 * 0.5625
  EXPECT_EQ(batch.cuts[2].on, "b1");
  EXPECT_FALSE(batch.cuts[2].fixed_point.has_value());
  expect_cut(batch, 3, {0.0, 0.0, 1.0}, 0.175);
  expect_balances(batch, feed);
}

/// Points of a wall bent by a parabola: x_A - x_B = bend * x_C * (1 - x_C).
std::vector<std::pair<double, double>> parabola(double bend, int pieces) {
  std::vector<std::pair<double, double>> points;
  for (int k = 1; k < pieces; ++k) {
    const double c = static_cast<double>(k) / pieces;
    const double difference = bend * c * (1.0 - c);
    points.emplace_back((1.0 - c + difference) / 2.0, (1.0 - c - difference) / 2.0);
  }
  return points;
}

TEST(Batch, DistillateDriftsAlongACurvedWall) {
  // On the parabola d(x_A - x_B)/dx_C = bend (1 - 2 x_C). The distillate has x_C = 0 and lies on the tangent:
  //   D_A - D_B = bend c (1 - c) - c bend (1 - 2c) = bend c^2
  const double bend = 0.4;
  const Chart chart = walled_chart(parabola(bend, 2000));
  const Composition feed = {0.60, 0.20, 0.20};
  const Batch batch = rectify(chart, feed);
  ASSERT_EQ(batch.cuts.size(), 3U);
  const Cut& drift = batch.cuts[1];
  EXPECT_EQ(drift.on, "b1");
  EXPECT_FALSE(drift.fixed_point.has_value());
  const double c = drift.pot_start[2];
  EXPECT_NEAR(drift.pot_start[0] - drift.pot_start[1], bend * c * (1.0 - c), 1e-6);
  EXPECT_NEAR(drift.start[0] - drift.start[1], bend * c * c, 1e-3);
  EXPECT_NEAR(drift.end[0] - drift.end[1], bend, 1e-3);
  EXPECT_NEAR(drift.start[2], 0.0, 1e-15);
  // All of C stays: the amounts follow from C alone.
  EXPECT_NEAR(drift.share, 0.2 / c - 0.2, 1e-6);
  expect_balances(batch, feed);
}

TEST(Batch, PolylineConvergesToTheCurve) {
  const Composition feed = {0.60, 0.20, 0.20};
  const Batch coarse = rectify(walled_chart(parabola(0.4, 100)), feed);
  const Batch fine = rectify(walled_chart(parabola(0.4, 2000)), feed);
  ASSERT_EQ(coarse.cuts.size(), fine.cuts.size());
  for (std::size_t k = 0; k < fine.cuts.size(); ++k) {
    EXPECT_NEAR(coarse.cuts[k].share, fine.cuts[k].share, 2e-4);
    EXPECT_LT(separation(coarse.cuts[k].average, fine.cuts[k].average), 2e-4);
  }
}

TEST(Batch, StripperIsTheMirrorImage) {
  const Chart chart = walled_chart(parabola(0.4, 50));
  std::mt19937_64 random(11);
  std::uniform_real_distribution<double> uniform(0.02, 1.0);
  for (int k = 0; k < 50; ++k) {
    Composition x = {uniform(random), uniform(random), uniform(random)};
    const double sum = x[0] + x[1] + x[2];
    for (double& value : x) {
      value /= sum;
    }
    const Batch above = rectify(chart, x);
    const Batch below = strip(upside_down(chart), x);
    ASSERT_EQ(above.cuts.size(), below.cuts.size());
    for (std::size_t c = 0; c < above.cuts.size(); ++c) {
      expect_cut(below, c, above.cuts[c].average, above.cuts[c].share);
    }
  }
}

TEST(Batch, BalancesCloseAndRenumberingChangesNothing) {
  const std::vector<Chart> charts = {symmetric_chart(), zeotropic_chart(), curved_chart(),
                                     walled_chart(parabola(-0.3, 60)), walled_chart({{0.2, 0.5}, {0.4, 0.2}})};
  const std::vector<int> order = {2, 0, 1};
  std::mt19937_64 random(7);
  std::exponential_distribution<double> exponential(1.0);
  for (const Chart& chart : charts) {
    const Chart other = renumbered(chart, order);
    for (int k = 0; k < 100; ++k) {
      Composition x = {exponential(random), exponential(random), exponential(random)};
      const double sum = x[0] + x[1] + x[2];
      for (double& value : x) {
        value /= sum;
      }
      for (const Batch::Mode mode : {Batch::Mode::rectifier, Batch::Mode::stripper}) {
        const Batch batch = run_batch(chart, x, mode, no_temperature);
        expect_balances(batch, x);
        const Batch moved = run_batch(other, renumbered(x, order), mode, no_temperature);
        ASSERT_EQ(batch.cuts.size(), moved.cuts.size());
        for (std::size_t c = 0; c < batch.cuts.size(); ++c) {
          expect_cut(moved, c, renumbered(batch.cuts[c].average, order), batch.cuts[c].share, 1e-9);
        }
      }
    }
  }
}

TEST(Batch, BinaryWithAMaximumLosesProductToTheAzeotrope) {
  const double azeotrope = 0.5405844155844154;
  const Batch batch = rectify(binary_chart(azeotrope, false), {0.8, 0.2});
  ASSERT_EQ(batch.cuts.size(), 2U);
  EXPECT_NEAR(batch.cuts[0].share / 0.8, 0.7875375375375374, 1e-12);
  expect_cut(batch, 1, {1.0 - azeotrope, azeotrope}, 0.2 / azeotrope);
}

TEST(Batch, ChargeOnAFixedPointLeavesUnchanged) {
  const Batch batch = rectify(binary_chart(0.5, true), {0.5, 0.5});
  ASSERT_EQ(batch.cuts.size(), 1U);
  expect_cut(batch, 0, {0.5, 0.5}, 1.0);
}

TEST(Batch, ChargeOnAnEdgeStaysThere) {
  const Batch batch = rectify(symmetric_chart(), {0.8, 0.2, 0.0});
  ASSERT_EQ(batch.cuts.size(), 2U);
  expect_cut(batch, 0, {0.5, 0.5, 0.0}, 0.4);
  expect_cut(batch, 1, {1.0, 0.0, 0.0}, 0.6);
}

TEST(Batch, ChargeOnAWallSlidesFromTheFirstDrop) {
  const Batch batch = rectify(walled_chart({}), {0.3, 0.3, 0.4});
  ASSERT_EQ(batch.cuts.size(), 2U);
  expect_cut(batch, 0, {0.5, 0.5, 0.0}, 0.6);
  expect_cut(batch, 1, {0.0, 0.0, 1.0}, 0.4);
}

TEST(Batch, IncompleteChartIsRefused) {
  Chart chart = symmetric_chart();
  chart.status = Status::degenerate;
  chart.message = "two fixed points in one place";
  const Batch batch = rectify(chart, {0.6, 0.25, 0.15});
  EXPECT_EQ(batch.status, Status::degenerate);
  EXPECT_EQ(batch.message, chart.message);
  EXPECT_TRUE(batch.cuts.empty());
  EXPECT_EQ(rectify(chart, {0.25, 0.25, 0.25, 0.25}).status, Status::not_applicable);
}

}  // namespace
}  // namespace stillshed
