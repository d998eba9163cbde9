#include "engine/reach.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <random>

#include "engine/bubble_point.hpp"
#include "engine/flow_map.hpp"
#include "models/ideal.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using What = ProductTest::What;

Mixture with_molar_masses(const Mixture& mixture, const std::vector<double>& masses) {
  std::vector<MixtureComponent> components = mixture.components();
  for (std::size_t i = 0; i < components.size(); ++i) {
    components[i].molar_mass_g_mol = masses[i];
  }
  return {components, mixture.activity()};
}

ProductSpec purity(int component, double value, Basis basis = Basis::mole) {
  ProductSpec spec;
  spec.component = component;
  spec.tests = {{What::purity, component, true, value, basis}};
  return spec;
}

struct Study {
  Study(Mixture a_mixture, const Composition& x, const std::vector<ProductSpec>& products,
        const ReachOptions& options = {})
      : mixture(std::move(a_mixture)), feed(x) {
    found = survey(mixture, kAtmosphere_Pa);
    map = chart(mixture, found);
    result = reach(mixture, found, map, x, products, options);
  }
  Mixture mixture;
  Composition feed;
  Survey found;
  Chart map;
  Reach result;
};

void expect_cut(const Batch& batch, std::size_t k, const Composition& average, double share, double tolerance) {
  ASSERT_LT(k, batch.cuts.size());
  EXPECT_NEAR(batch.cuts[k].share, share, tolerance) << "cut " << k;
  EXPECT_LT(separation(batch.cuts[k].average, average), tolerance) << "cut " << k;
}

Mixture curved_mixture() {
  return margules_mixture({330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}},
                          {3700.0, 4800.0, 4900.0});
}

TEST(Reach, CurvedBoundaryCapsBottomsNotTheRectifier) {
  const Study study(curved_mixture(), {0.70, 0.18, 0.12}, {purity(0, 0.995), purity(1, 0.995), purity(2, 0.995)});
  ASSERT_EQ(study.result.status, Status::complete) << study.result.message;
  const Batch& rectifier = study.result.batch.at(0);
  ASSERT_EQ(rectifier.cuts.size(), 3U);
  expect_cut(rectifier, 0, {1.0, 0.0, 0.0}, 0.70, 1e-9);
  expect_cut(rectifier, 1, {0.0, 0.65877923, 0.34122077}, 0.27323265792699625, 1e-5);
  expect_cut(rectifier, 2, {0.0, 0.0, 1.0}, 0.02676734207300374, 1e-5);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::open);
  EXPECT_EQ(study.result.products[1].verdict, Verdict::tight);
  EXPECT_EQ(study.result.products[2].verdict, Verdict::tight);
  EXPECT_NEAR(study.result.products[0].recovery, 1.0, 1e-9);
  EXPECT_NEAR(study.result.products[1].recovery, 0.29935, 2e-4);
  EXPECT_NEAR(study.result.products[2].recovery, 0.455638, 2e-4);
  bool direct = false;
  bool indirect = false;
  for (const Sequence& sequence : study.result.sequences) {
    const Column& first = sequence.columns.front();
    direct = direct || separation(first.bottoms, {0.0, 0.6, 0.4}) < 1e-9;
    if (separation(first.bottoms, {0.0, 1.0, 0.0}) < 1e-9) {
      indirect = true;
      EXPECT_LT(separation(first.distillate, {0.739866, 0.1333, 0.126834}), 1e-4);
      EXPECT_NEAR(1.0 - first.distillate_to_feed, 0.0538831, 1e-5 * 5);
    }
  }
  EXPECT_TRUE(direct);
  EXPECT_TRUE(indirect);
}

TEST(Reach, SymmetricTernary) {
  const Study study(testing::symmetric_mixture(3, 1.2), {0.6, 0.25, 0.15}, {purity(0, 0.99)});
  const Batch& rectifier = study.result.batch.at(0);
  ASSERT_EQ(rectifier.cuts.size(), 3U);
  const double third = 1.0 / 3.0;
  expect_cut(rectifier, 0, {third, third, third}, 0.45, 1e-9);
  expect_cut(rectifier, 1, {0.5, 0.5, 0.0}, 0.20, 1e-9);
  expect_cut(rectifier, 2, {1.0, 0.0, 0.0}, 0.35, 1e-9);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::open);
  EXPECT_NEAR(study.result.products[0].recovery, 0.35 / 0.6, 1e-6);
}

TEST(Reach, AzeotropeNextToAVertexAndJustOutside) {
  ReachOptions stages;
  stages.stages = 25;
  const std::vector<std::vector<double>> A = {{0.0, 0.5}, {0.5, 0.0}};
  const Study inside(margules_mixture({350.0, 366.013038404}, A), {0.5, 0.5}, {purity(0, 0.999)}, stages);
  ASSERT_EQ(inside.found.azeotropes.size(), 1U);
  EXPECT_NEAR(inside.result.products[0].purity_limit_mole, 0.999999, 1e-9);
  const Mixture outside = margules_mixture({350.0, 366.0131053868}, A);
  EXPECT_EQ(Study(outside, {0.5, 0.5}, {purity(0, 0.999)}).result.products[0].verdict, Verdict::open);
  const Study few(outside, {0.5, 0.5}, {purity(0, 0.999)}, stages);
  const ProductOutcome& outcome = few.result.products[0];
  EXPECT_EQ(outcome.verdict, Verdict::tight);
  EXPECT_EQ(outcome.reasons, std::vector<Reason>{Reason::pinch});
  EXPECT_NEAR(*outcome.purity_at_stages, 0.96021286, 1e-8);
  EXPECT_EQ(few.result.stage_profile.size(), 26U);
}

TEST(Reach, MassSpecAgainstMolarAzeotrope) {
  const Mixture mixture = with_molar_masses(
      margules_mixture({351.4, 373.15}, {{0.0, 0.9}, {0.9, 0.0}}, {4700.0, 5000.0}), {46.069, 18.015});
  const Study study(mixture, {0.5, 0.5},
                    {purity(0, 0.975, Basis::mass), purity(0, 0.99, Basis::mass), purity(1, 0.999, Basis::mass)});
  EXPECT_EQ(study.result.products[0].verdict, Verdict::open);
  EXPECT_TRUE(study.result.products[0].limited_by.empty());
  EXPECT_NEAR(study.result.products[0].recovery, 1.0, 1e-6);
  EXPECT_EQ(study.result.products[1].verdict, Verdict::capped);
  EXPECT_EQ(study.result.products[1].limited_by, study.found.azeotropes[0].point.id);
  EXPECT_NEAR(study.result.products[1].purity_limit_mole, 0.9608056197087118, 1e-6);
  EXPECT_NEAR(study.result.products[1].purity_limit_mass, 0.9842985203391914, 1e-6);
  EXPECT_EQ(study.result.products[2].verdict, Verdict::open);
  EXPECT_NEAR(study.result.products[2].recovery, 0.9592067536999098, 1e-6);
}

TEST(Reach, TraceWithAMinimumAzeotropeCostsAForecutOnly) {
  const Study study(margules_mixture({350.0, 370.0, 350.0}, {{0.0, 0.0, 1.2}, {0.0, 0.0, 0.0}, {1.2, 0.0, 0.0}}),
                    {0.7, 0.299, 0.001}, {purity(0, 0.999)});
  const Batch& rectifier = study.result.batch.at(0);
  ASSERT_EQ(rectifier.cuts.size(), 3U);
  expect_cut(rectifier, 0, {0.5, 0.0, 0.5}, 0.002, 1e-7);
  expect_cut(rectifier, 1, {1.0, 0.0, 0.0}, 0.699, 1e-7);
  expect_cut(rectifier, 2, {0.0, 1.0, 0.0}, 0.299, 1e-7);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::open);
  EXPECT_NEAR(study.result.products[0].recovery, 0.9985714285714286, 1e-6);
}

TEST(Reach, ChargeOnTheAzeotrope) {
  const Study study(margules_mixture({350.0, 350.0}, {{0.0, 1.2}, {1.2, 0.0}}), {0.5, 0.5},
                    {purity(0, 0.60), purity(1, 0.50)});
  EXPECT_EQ(study.result.products[0].verdict, Verdict::shut);
  EXPECT_EQ(study.result.products[1].verdict, Verdict::tight);
  EXPECT_NEAR(study.result.products[1].recovery, 1.0, 1e-12);
  EXPECT_TRUE(study.result.sequences.empty());
}

TEST(Reach, MaximumAzeotropeKeepsTheHeavyComponent) {
  const Study study(margules_mixture({350.0, 352.0}, {{0.0, -0.8}, {-0.8, 0.0}}), {0.8, 0.2},
                    {purity(0, 0.99), purity(1, 0.99)});
  EXPECT_EQ(study.result.products[0].verdict, Verdict::open);
  EXPECT_NEAR(study.result.products[0].recovery, 0.7875375375375374, 1e-6);
  EXPECT_EQ(study.result.products[1].verdict, Verdict::capped);
  EXPECT_NEAR(study.result.products[1].purity_limit_mole, 0.5405844155844154, 1e-6);
  EXPECT_NEAR(study.result.products[1].recovery, 1.0, 1e-6);
}

TEST(Reach, GivenStagesLowerOpenToTight) {
  const Mixture mixture = testing::simple_mixture({350.0, 362.8741194825}, Ideal(2));
  ReachOptions options;
  EXPECT_EQ(Study(mixture, {0.5, 0.5}, {purity(0, 0.99)}).result.products[0].verdict, Verdict::open);
  options.stages = 10;
  const Study study(mixture, {0.5, 0.5}, {purity(0, 0.99), purity(1, 0.99)}, options);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::tight);
  EXPECT_NEAR(*study.result.products[0].purity_at_stages, 0.9829540725450702, 1e-9);
  EXPECT_EQ(study.result.products[1].verdict,
            Verdict::open);  // what stays behind is not bounded by (c)
}

TEST(Reach, LiquidThatSplitsIsNoCall) {
  const Study study(margules_mixture({350.0, 350.0}, {{0.0, 3.0}, {3.0, 0.0}}), {0.5, 0.5}, {purity(0, 0.99)});
  EXPECT_EQ(study.result.products[0].verdict, Verdict::no_call);
  EXPECT_EQ(study.result.products[0].reasons, std::vector<Reason>{Reason::phase_split_needed});
}

TEST(Reach, FourComponentsAreNotJudged) {
  const Study study(testing::simple_mixture({340.0, 350.0, 360.0, 370.0}, Ideal(4)), {0.25, 0.25, 0.25, 0.25},
                    {purity(0, 0.99)});
  EXPECT_EQ(study.result.status, Status::not_applicable);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::no_call);
  EXPECT_FALSE(study.result.products[0].sentence.empty());
}

TEST(Reach, ChargeOnABoundaryIsJudgedFromBothSides) {
  // x_A = x_B parts the stable nodes A and B; the stripper draws the one or the
  // other.
  const Study study(testing::symmetric_mixture(3, 1.2), {0.4, 0.4, 0.2}, {purity(0, 0.99), purity(1, 0.99)});
  EXPECT_TRUE(study.result.feed.on_boundary);
  EXPECT_EQ(study.result.products[0].verdict, study.result.products[1].verdict);
  EXPECT_NEAR(study.result.products[0].recovery, study.result.products[1].recovery, 1e-6);
}

/// What the pot holds after `removed` moles of the batch left, by balance over the cuts.
Composition pot_after(const Batch& batch, const Composition& feed, double removed) {
  Composition moles = feed;
  double left = removed;
  const auto take = [&](const Composition& x, double share) {
    const double taken = std::min(left, share);
    for (int i = 0; i < moles.size(); ++i) {
      moles[i] -= taken * x[i];
    }
    left -= taken;
  };
  for (const Cut& cut : batch.cuts) {
    if (cut.drift.empty()) {
      take(cut.average, cut.share);
    }
    for (const Cut::Piece& piece : cut.drift) {
      take(piece.x, piece.share);
    }
  }
  for (double& value : moles) {
    value /= 1.0 - removed;
  }
  return moles;
}

TEST(Reach, SlidingPotAgreesWithSmallStepsOfTheResidueCurveRule) {
  // A and B light with a maximum azeotrope between them, C heavy: the boundary azeotrope -> C is curved. Taking small
  // amounts from whatever node the pot's residue curve starts in, the pot chatters across the boundary; both nodes and
  // the saddle lie on one edge, so the average product is the drifting distillate.
  const Mixture mixture =
      margules_mixture({340.0, 343.0, 368.0}, {{0.0, -1.2, 0.6}, {-1.2, 0.0, -0.5}, {0.6, -0.5, 0.0}});
  const Composition feed = {0.45, 0.20, 0.35};
  const Study study(mixture, feed, {});
  ASSERT_EQ(study.map.status, Status::complete) << study.map.message;
  const Batch& batch = study.result.batch.at(0);
  const auto drift = std::find_if(batch.cuts.begin(), batch.cuts.end(), [](const Cut& c) { return !c.drift.empty(); });
  ASSERT_NE(drift, batch.cuts.end());
  EXPECT_GT(separation(drift->start, drift->end), 0.02);
  constexpr double kStep = 5e-4;
  Composition pot = feed;
  double amount = 1.0;
  double worst = 0.0;
  while (amount > 0.5) {
    const ResidueCurve curve = residue_curve(mixture, kAtmosphere_Pa, study.map.fixed_points, pot);
    ASSERT_TRUE(curve.from.has_value());
    const Composition& product = study.map.fixed_points[static_cast<std::size_t>(*curve.from)].x;
    for (int i = 0; i < pot.size(); ++i) {
      pot[i] = (amount * pot[i] - kStep * product[i]) / (amount - kStep);
    }
    amount -= kStep;
    worst = std::max(worst, separation(pot, pot_after(batch, feed, 1.0 - amount)));
  }
  EXPECT_LT(worst, 2e-3);  // one step moves the pot by up to 1e-3
}

TEST(Reach, WallThatArrivesAlongAnEdgeIsFollowedToItsEnd) {
  // The boundary into the A-B maximum azeotrope coincides with the edge A-B to rounding before it ends: the pot must
  // not slip past the azeotrope to B, and the regions must cover the triangle.
  const Mixture mixture = margules_mixture({341.86222453677908, 364.75895397141767, 346.25209615978093},
                                           {{0.0, -0.929824487336123, -0.43293147432737877},
                                            {-0.929824487336123, 0.0, 0.92164915708079853},
                                            {-0.43293147432737877, 0.92164915708079853, 0.0}});
  const Study study(mixture, {0.36099922196010054, 0.10297864871045898, 0.5360221293294406}, {purity(1, 0.99)});
  const Batch& batch = study.result.batch.at(0);
  ASSERT_FALSE(batch.cuts.empty());
  const FixedPoint& last = study.map.fixed_points[static_cast<std::size_t>(*batch.cuts.back().fixed_point)];
  EXPECT_EQ(last.members, (Members{0, 1}));
  // B leaves with the first cut, the B-C azeotrope, and with the last one.
  EXPECT_NEAR(batch.cuts.front().share * batch.cuts.front().average[1] + batch.cuts.back().share * last.x[1],
              study.feed[1], 1e-5);
  EXPECT_EQ(study.result.products[0].verdict, Verdict::capped);
  EXPECT_NEAR(study.result.products[0].purity_limit_mole, 0.89495, 1e-5);
}

TEST(Reach, RegionsCoverTheTriangleWhenACurveLeavesAlongAnEdge) {
  const Mixture mixture = margules_mixture({351.94554305663729, 340.92099224677634, 354.63699739772665},
                                           {{0.0, -0.45716005722603847, 1.3022362928780065},
                                            {-0.45716005722603847, 0.0, 0.45781151486447058},
                                            {1.3022362928780065, 0.45781151486447058, 0.0}});
  const Study study(mixture, {0.2, 0.1, 0.7}, {});
  ASSERT_EQ(study.map.regions.size(), 4U);
  double area = 0.0;
  for (const Region& region : study.map.regions) {
    area += region.area;
  }
  EXPECT_NEAR(area, 1.0, 1e-9);
}

TEST(Reach, ChargeCloseToABoundaryIsJudgedFromBothSides) {
  // 4e-5 on the side of A: the stripper of the other side starts with B.
  const Study study(testing::symmetric_mixture(3, 1.2), {0.40003, 0.39997, 0.2}, {purity(0, 0.99), purity(1, 0.99)});
  ASSERT_TRUE(study.result.feed.on_boundary);
  ASSERT_EQ(study.result.batch.size(), 4U);
  EXPECT_LT(separation(study.result.batch[3].cuts[0].pot_start, {0.39997, 0.40003, 0.2}), 1e-9);
  EXPECT_LT(separation(study.result.batch[1].cuts[0].average, {1.0, 0.0, 0.0}), 1e-12);
  EXPECT_LT(separation(study.result.batch[3].cuts[0].average, {0.0, 1.0, 0.0}), 1e-12);
}

/// Random Margules ternaries whose liquid does not split.
std::vector<Study> random_studies(int count) {
  std::mt19937_64 random(20260);
  std::uniform_real_distribution<double> pair(-1.4, 1.4);
  std::uniform_real_distribution<double> boiling(340.0, 368.0);
  std::exponential_distribution<double> exponential(1.0);
  std::vector<Study> studies;
  while (static_cast<int>(studies.size()) < count) {
    const double ab = pair(random);
    const double ac = pair(random);
    const double bc = pair(random);
    const Mixture mixture = margules_mixture({boiling(random), boiling(random), boiling(random)},
                                             {{0.0, ab, ac}, {ab, 0.0, bc}, {ac, bc, 0.0}});
    Composition x = {exponential(random), exponential(random), exponential(random)};
    const double sum = x[0] + x[1] + x[2];
    for (double& value : x) {
      value /= sum;
    }
    Study study(mixture, x, {purity(0, 0.99), purity(1, 0.99), purity(2, 0.99)});
    if (study.map.status == Status::complete) {
      studies.push_back(std::move(study));
    }
  }
  return studies;
}

int random_count() {
  return std::getenv("STILLSHED_FULL") != nullptr ? 200 : 25;
}

void expect_batch_balances(const Batch& batch, const Composition& charge) {
  // From the other side of a boundary the charge is moved a little.
  const Composition& feed = batch.cuts.at(0).pot_start;
  EXPECT_LT(separation(feed, charge), batch.message.empty() ? 1e-15 : 1e-3);
  Composition total(feed.size());
  double left = 1.0;
  for (const Cut& cut : batch.cuts) {
    for (int i = 0; i < feed.size(); ++i) {
      total[i] += cut.share * cut.average[i];
      EXPECT_GE(cut.pot_end[i], 0.0);
      EXPECT_NEAR(left * cut.pot_start[i], cut.share * cut.average[i] + (left - cut.share) * cut.pot_end[i], 1e-11);
    }
    left -= cut.share;
  }
  EXPECT_NEAR(left, 0.0, 1e-11);
  EXPECT_LT(separation(total, feed), 1e-11);
}

/// The product of a straight cut is where the residue curve through the pot
/// comes from (or goes to).
void expect_product_of_the_pot(const Study& study, const Batch& batch) {
  for (const Cut& cut : batch.cuts) {
    const Composition pot = between(cut.pot_start, cut.pot_end, 0.5);
    if (cut.on != "interior" || !cut.fixed_point.has_value() || cut.share < 1e-3 || present(pot).size() < 3 ||
        separation(cut.pot_start, cut.pot_end) < 1e-3) {
      continue;
    }
    const Position position = locate(study.mixture, study.map, pot);
    if (position.on_boundary) {
      continue;
    }
    const auto& end = batch.mode == Batch::Mode::rectifier ? position.residue_curve.from : position.residue_curve.to;
    ASSERT_TRUE(end.has_value());
    EXPECT_EQ(*end, *cut.fixed_point);
  }
}

TEST(ReachProperty, BatchesCloseAndFollowTheResidueCurves) {
  for (const Study& study : random_studies(random_count())) {
    EXPECT_EQ(study.result.status, Status::complete) << study.result.message;
    for (const Batch& batch : study.result.batch) {
      ASSERT_EQ(batch.status, Status::complete) << batch.message;
      expect_batch_balances(batch, study.feed);
      expect_product_of_the_pot(study, batch);
    }
  }
}

/// Angle between the witness and the residue-curve field x - y at its own
/// points, away from fixed points.
double worst_turn(const Study& study, const Column& column) {
  double worst = 0.0;
  for (std::size_t k = 0; k + 1 < column.witness.size(); ++k) {
    const Composition step = minus(column.witness[k + 1], column.witness[k]);
    const Composition middle = between(column.witness[k], column.witness[k + 1], 0.5);
    const BubblePoint boiling = bubble_point(study.mixture, middle, kAtmosphere_Pa);
    const Composition field = minus(middle, boiling.y);
    const double lengths = std::hypot(step[0], step[1]) * std::hypot(field[0], field[1]);
    if (std::hypot(field[0], field[1]) > 0.01) {
      worst = std::max(worst, std::abs(cross(step, field)) / lengths);
      EXPECT_GT(step[0] * field[0] + step[1] * field[1],
                0.0);  // toward higher temperature
    }
  }
  return worst;
}

TEST(ReachProperty, ColumnsCloseAndTheirWitnessesFollowTheField) {
  for (const Study& study : random_studies(random_count())) {
    for (const Sequence& sequence : study.result.sequences) {
      Composition total(3);
      for (const Sequence::Stream& stream : sequence.streams) {
        for (int i = 0; i < 3; ++i) {
          total[i] += stream.share * stream.x[i];
        }
      }
      EXPECT_LT(separation(total, study.feed), 1e-10);
      for (const Column& column : sequence.columns) {
        EXPECT_LT(separation(between(column.bottoms, column.distillate, column.distillate_to_feed), column.feed),
                  1e-10);
        EXPECT_EQ(column.witness.front(), column.distillate);
        EXPECT_EQ(column.witness.back(), column.bottoms);
        EXPECT_LT(worst_turn(study, column), 0.05);
      }
    }
  }
}

TEST(ReachProperty, RenumberingTheComponentsRenumbersTheAnswer) {
  const std::vector<int> order = {2, 0, 1};  // component i of the one is component order[i] of the other
  for (const Study& study : random_studies(random_count() / 3)) {
    std::vector<MixtureComponent> components(3);
    Matrix<double> A(3);
    const auto& old = std::get<Margules>(study.mixture.activity());
    for (int i = 0; i < 3; ++i) {
      components[static_cast<std::size_t>(order[static_cast<std::size_t>(i)])] = study.mixture.component(i);
      for (int j = 0; j < 3; ++j) {
        A(order[static_cast<std::size_t>(i)], order[static_cast<std::size_t>(j)]) = old.A()(i, j);
      }
    }
    Composition x(3);
    std::vector<ProductSpec> specs;
    for (int i = 0; i < 3; ++i) {
      x[order[static_cast<std::size_t>(i)]] = study.feed[i];
      specs.push_back(purity(order[static_cast<std::size_t>(i)], 0.99));
    }
    const Study other(Mixture(components, Margules(A)), x, specs);
    for (std::size_t k = 0; k < 3; ++k) {
      EXPECT_EQ(other.result.products[k].verdict, study.result.products[k].verdict);
      EXPECT_NEAR(other.result.products[k].recovery, study.result.products[k].recovery, 2e-3);
      EXPECT_NEAR(other.result.products[k].purity_limit_mole, study.result.products[k].purity_limit_mole, 1e-3);
    }
  }
}

}  // namespace
}  // namespace stillshed
