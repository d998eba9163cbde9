#include "engine/verdict.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "engine/batch.hpp"
#include "engine/flow_map.hpp"
#include "engine/sequences.hpp"
#include "models/ideal.hpp"
#include "tests/engine/hand_charts.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using What = ProductTest::What;

/// Batches and sequences of a hand-made chart, judged.
struct Bench {
  Bench(Chart hand_chart, const Composition& charge, const std::vector<std::string>& ids = {"A", "B", "C"})
      : chart(std::move(hand_chart)), feed(charge) {
    const Mixture plain = testing::simple_mixture(std::vector<double>(static_cast<std::size_t>(charge.size()), 350.0),
                                                  Ideal(charge.size()));
    std::vector<MixtureComponent> components = plain.components();
    for (std::size_t i = 0; i < components.size(); ++i) {
      components[i].id = ids[i];
    }
    mixture = Mixture(components, Ideal(charge.size()));
    const auto temperature = [](const Composition&) { return 345.0; };
    reach.batch = {run_batch(chart, feed, Batch::Mode::rectifier, temperature),
                   run_batch(chart, feed, Batch::Mode::stripper, temperature)};
    reach.sequences = column_sequences(chart, feed, 4);
    list = receivers(chart, reach, {0, 1});
  }
  ProductOutcome ask(int component, const std::vector<ProductTest>& tests) const {
    ProductSpec spec;
    spec.component = component;
    spec.tests = tests;
    return judge({mixture, chart, feed, list, options}, spec);
  }
  ProductOutcome ask_mole(int component, double purity) const {
    return ask(component, {{What::purity, component, true, purity, Basis::mole}});
  }

  Chart chart;
  Composition feed;
  Mixture mixture;
  Reach reach;
  std::vector<Receiver> list;
  ReachOptions options;
};

bool has(const ProductOutcome& outcome, Reason reason) {
  return std::find(outcome.reasons.begin(), outcome.reasons.end(), reason) != outcome.reasons.end();
}

TEST(Verdict, OpenWhenRecoveredWithRoom) {
  const Bench bench(testing::symmetric_chart(), {0.6, 0.25, 0.15});
  const ProductOutcome outcome = bench.ask_mole(0, 0.99);
  EXPECT_EQ(outcome.verdict, Verdict::open);
  EXPECT_EQ(outcome.reading, "batch[0].cuts[2]");
  EXPECT_NEAR(outcome.recovery, 0.35 / 0.6, 1e-12);
  EXPECT_TRUE(outcome.limited_by.empty());
  EXPECT_TRUE(outcome.reasons.empty());
  EXPECT_EQ(outcome.sentence,
            "A can leave within 99 mol% as the last cut of a batch rectifier, up to 58.3 % of the A of the charge.");
}

TEST(Verdict, TightBelowTheRequiredRecovery) {
  const Bench bench(testing::symmetric_chart(), {0.6, 0.25, 0.15});
  const ProductOutcome outcome =
      bench.ask(0, {{What::purity, 0, true, 0.99, Basis::mole}, {What::recovery, 0, true, 0.7, Basis::mole}});
  EXPECT_EQ(outcome.verdict, Verdict::tight);
  ASSERT_EQ(outcome.tests.size(), 2U);
  EXPECT_TRUE(outcome.tests[0].pass);
  EXPECT_FALSE(outcome.tests[1].pass);
  // Of the A not recovered, 0.15 moles leave with the ternary azeotrope and 0.10 with the binary one.
  EXPECT_EQ(outcome.limited_by, "az4(A,B,C)");
  EXPECT_TRUE(has(outcome, Reason::azeotrope_ceiling));
}

TEST(Verdict, CurvedBoundaryLimitsTheRecovery) {
  const Bench bench(testing::curved_chart(), {0.70, 0.18, 0.12}, {"zeta", "mu", "alpha"});
  EXPECT_EQ(bench.ask_mole(0, 0.995).verdict, Verdict::open);
  const ProductOutcome mu = bench.ask_mole(1, 0.995);
  EXPECT_EQ(mu.verdict, Verdict::tight);
  EXPECT_NEAR(mu.recovery, 0.29935, 5e-3);
  const ProductOutcome alpha = bench.ask_mole(2, 0.995);
  EXPECT_EQ(alpha.verdict, Verdict::tight);
  EXPECT_NEAR(alpha.recovery, 0.455638, 5e-3);
  EXPECT_EQ(alpha.limited_by, "az1(mu,alpha)");
  EXPECT_NE(alpha.sentence.find("; most of the rest leaves with the azeotrope with mu at 78.2 degC."),
            std::string::npos)
      << alpha.sentence;
}

TEST(Verdict, CappedNamesTheAzeotrope) {
  const double azeotrope = 0.5405844155844154;
  const Bench bench(testing::binary_chart(azeotrope, false), {0.8, 0.2});
  EXPECT_EQ(bench.ask_mole(0, 0.99).verdict, Verdict::open);
  const ProductOutcome outcome = bench.ask_mole(1, 0.99);
  EXPECT_EQ(outcome.verdict, Verdict::capped);
  EXPECT_NEAR(outcome.purity_limit_mole, azeotrope, 1e-15);
  EXPECT_NEAR(outcome.recovery, 1.0, 1e-12);
  EXPECT_EQ(outcome.limited_by, "az1(A,B)");
  EXPECT_TRUE(has(outcome, Reason::azeotrope_ceiling));
  EXPECT_EQ(outcome.sentence, "B stops at 54.05 mol%: the azeotrope with A at 83.9 degC.");
}

TEST(Verdict, ShutOnAnAzeotropeAndTightOnASpecWithoutRoom) {
  const Bench bench(testing::binary_chart(0.5, true), {0.5, 0.5});
  const ProductOutcome shut = bench.ask_mole(0, 0.60);
  EXPECT_EQ(shut.verdict, Verdict::shut);
  EXPECT_EQ(shut.limited_by, "az1(A,B)");
  EXPECT_EQ(shut.sentence,
            "A gains nothing at total reflux: the charge already stands at the azeotrope with B at 67.9 degC.");
  const ProductOutcome tight = bench.ask_mole(1, 0.50);
  EXPECT_EQ(tight.verdict, Verdict::tight);
  EXPECT_NEAR(tight.recovery, 1.0, 1e-12);
}

TEST(Verdict, ImpurityFailsAlone) {
  // The distillate azeotrope holds A at .7: pure enough, but too much B.
  const Bench bench(testing::binary_chart(0.3, true), {0.6, 0.4});
  const ProductOutcome outcome =
      bench.ask(0, {{What::purity, 0, true, 0.65, Basis::mole}, {What::impurity, 1, false, 0.05, Basis::mole}});
  EXPECT_EQ(outcome.verdict, Verdict::capped);
  EXPECT_TRUE(outcome.tests[0].pass);
  EXPECT_FALSE(outcome.tests[1].pass);
  EXPECT_EQ(outcome.sentence,
            "A does not meet B of at most 5 mol%: it keeps 30 mol%: the azeotrope with B at 67.9 degC.");
}

TEST(Verdict, StagesTurnOpenIntoTightAndNeverTheOtherWay) {
  Bench bench(testing::binary_chart(0.9, false), {0.6, 0.4});
  ASSERT_EQ(bench.ask_mole(0, 0.99).verdict, Verdict::open);
  bench.options.stages = 10;
  for (Receiver& receiver : bench.list) {
    if (receiver.x[0] > 0.999) {
      receiver.head = Composition{0.98, 0.02};
    }
  }
  const ProductOutcome tight = bench.ask_mole(0, 0.99);
  EXPECT_EQ(tight.verdict, Verdict::tight);
  EXPECT_TRUE(has(tight, Reason::pinch));
  EXPECT_DOUBLE_EQ(*tight.purity_at_stages, 0.98);
  EXPECT_EQ(tight.sentence, "A meets 99 mol%, but not with 10 stages: they bring the head to 98 mol% at most.");
  EXPECT_EQ(bench.ask_mole(0, 0.97).verdict, Verdict::open);
  // A head better than the receiver does not rescue a product that is capped.
  for (Receiver& receiver : bench.list) {
    receiver.head = Composition{0.0, 1.0};
  }
  EXPECT_EQ(bench.ask_mole(1, 0.99).verdict, Verdict::capped);
}

TEST(Verdict, DriftingCutMayBeTakenInPart) {
  // From the pot (0.35, 0.25, 0.40) on, the wall is straight to C: the distillate is (7/12, 5/12, 0). Before, along the
  // piece from the azeotrope, it is the azeotrope itself: the drift starts at 50 and ends at 41.67 mol% B.
  const Chart chart = testing::walled_chart({{0.35, 0.25}});
  const Composition feed = between({1.0, 0.0, 0.0}, {0.425, 0.375, 0.20}, 0.5);
  Bench bench(chart, feed);
  bench.reach.sequences.clear();  // the rectifier alone
  bench.list = receivers(bench.chart, bench.reach, {0});
  bench.options.room = 0.0;
  EXPECT_EQ(std::count_if(bench.list.begin(), bench.list.end(), [](const Receiver& r) { return r.part; }), 2);
  const Cut& drift = bench.reach.batch[0].cuts.at(1);
  ASSERT_EQ(drift.drift.size(), 2U);
  EXPECT_NEAR(drift.drift[0].x[1], 0.5, 1e-12);
  EXPECT_NEAR(drift.drift[1].x[1], 5.0 / 12.0, 1e-12);
  EXPECT_NEAR(drift.drift[0].share, 0.25, 1e-12);  // 0.5 moles of pot, x_C from 0.2 to 0.4
  EXPECT_NEAR(drift.drift[0].share + drift.drift[1].share, drift.share, 1e-12);
  // A spec between the two is met by the start of the cut alone.
  const ProductOutcome part = bench.ask_mole(1, 0.48);
  EXPECT_EQ(part.verdict, Verdict::open);
  EXPECT_NEAR(part.recovery, 0.25 * 0.5 / feed[1], 1e-12);
  EXPECT_EQ(part.reading, "batch[0].cuts[1] first 625/1000");
  // The whole cut holds 46.875 mol%.
  EXPECT_EQ(bench.ask_mole(1, 0.46875 - 1e-6).reading, "batch[0].cuts[1]");
  EXPECT_EQ(bench.ask_mole(1, 0.51).verdict, Verdict::capped);
}

TEST(Verdict, VerdictFollowsFromItsOwnTests) {
  const Bench bench(testing::symmetric_chart(), {0.5, 0.3, 0.2});
  for (int component = 0; component < 3; ++component) {
    for (const double purity : {0.2, 0.35, 0.5, 0.7, 0.99, 1.0}) {
      const ProductOutcome outcome = bench.ask_mole(component, purity);
      const TestOutcome& item = outcome.tests.at(0);
      EXPECT_LE(outcome.recovery, 1.0);
      EXPECT_EQ(item.pass, outcome.verdict == Verdict::open || outcome.verdict == Verdict::tight);
      if (outcome.verdict == Verdict::open) {
        EXPECT_GE(item.margin, 0.2 * (1.0 - purity) - 1e-9);
        EXPECT_GE(outcome.recovery, 0.5);
      }
      if (outcome.verdict == Verdict::tight) {
        EXPECT_TRUE(outcome.recovery < 0.5 || item.margin < 0.2 * (1.0 - purity) + 1e-9);
      }
      if (outcome.verdict == Verdict::capped) {
        EXPECT_GT(outcome.purity_limit_mole, bench.feed[component] + 1e-6);
      }
      EXPECT_EQ(outcome.sentence.find("100 %"), std::string::npos);
      EXPECT_EQ(outcome.sentence.find("pure"), std::string::npos);
    }
  }
}

TEST(Verdict, NoCallSaysWhatIsMissing) {
  const Bench bench(testing::binary_chart(0.5, true), {0.4, 0.6});
  ProductSpec spec;
  spec.component = 1;
  const ProductOutcome outcome = no_call(bench.mixture, spec, {Reason::phase_split_needed, "the liquid splits"});
  EXPECT_EQ(outcome.verdict, Verdict::no_call);
  EXPECT_TRUE(has(outcome, Reason::phase_split_needed));
  EXPECT_EQ(outcome.sentence, "No call for B: the liquid splits.");
}

TEST(Verdict, WorseComparesVerdictThenRecovery) {
  ProductOutcome open;
  open.verdict = Verdict::open;
  open.recovery = 0.9;
  ProductOutcome tight = open;
  tight.verdict = Verdict::tight;
  EXPECT_TRUE(worse(tight, open));
  EXPECT_FALSE(worse(open, tight));
  ProductOutcome less = open;
  less.recovery = 0.8;
  EXPECT_TRUE(worse(less, open));
  EXPECT_FALSE(worse(open, less));
}

TEST(Verdict, PocketIsTheDistanceFromTheChord) {
  const Chart chart = testing::walled_chart({{0.35, 0.25}});
  // Chord: x_A = x_B. The point (0.35, 0.25) is 0.05 off in A and in B.
  EXPECT_NEAR(pocket_width(chart.boundaries[0]), std::sqrt(2.0) * 0.05, 1e-12);
  EXPECT_NEAR(pocket_width(testing::walled_chart({}).boundaries[0]), 0.0, 1e-15);
}

TEST(Verdict, NamesOfVerdicts) {
  EXPECT_STREQ(to_string(Verdict::open), "open");
  EXPECT_STREQ(to_string(Verdict::no_call), "no-call");
}

}  // namespace
}  // namespace stillshed
