#include "engine/cuts.hpp"

#include <gtest/gtest.h>

#include "engine/flow_map.hpp"
#include "tests/engine/hand_charts.hpp"

namespace stillshed {
namespace {

Cut straight(int node, const Composition& product, double share, const Composition& pot_start,
             const Composition& pot_end) {
  Cut cut;
  cut.start = cut.end = cut.average = product;
  cut.fixed_point = node;
  cut.share = share;
  cut.pot_start = pot_start;
  cut.pot_end = pot_end;
  cut.on = "interior";
  return cut;
}

Cut drifting(const Composition& product, double share, const Composition& pot_start, const Composition& pot_end) {
  Cut cut = straight(0, product, share, pot_start, pot_end);
  cut.fixed_point.reset();
  cut.drift = {{product, share}};
  cut.on = "b1";
  return cut;
}

/// Straight wall from the azeotrope (1/2, 1/2, 0) to C.
std::vector<Boundary> wall() {
  std::vector<Boundary> boundaries = testing::walled_chart({}).boundaries;
  boundaries[0].error = 1e-4;
  return boundaries;
}

TEST(Cuts, SameProductInARowIsOneCut) {
  const Composition A = {1.0, 0.0, 0.0};
  const std::vector<Cut> joined = join_cuts({straight(0, A, 0.2, {0.6, 0.2, 0.2}, {0.5, 0.25, 0.25}),
                                             straight(0, A, 0.1, {0.5, 0.25, 0.25}, {3.0 / 7.0, 2.0 / 7.0, 2.0 / 7.0})},
                                            wall());
  ASSERT_EQ(joined.size(), 1U);
  EXPECT_NEAR(joined[0].share, 0.3, 1e-15);
  EXPECT_EQ(joined[0].fixed_point, 0);
  EXPECT_TRUE(joined[0].drift.empty());
  EXPECT_LT(separation(joined[0].pot_start, {0.6, 0.2, 0.2}), 1e-15);
  EXPECT_LT(separation(joined[0].pot_end, {3.0 / 7.0, 2.0 / 7.0, 2.0 / 7.0}), 1e-15);
}

TEST(Cuts, GrazingPieceJoinsItsBoundary) {
  const Composition A = {1.0, 0.0, 0.0};
  const auto three = [&](double off) {
    const Composition first = {0.4, 0.4, 0.2};
    const Composition second = {0.3 + off, 0.3 - off, 0.4};
    const Composition third = {0.2 + off, 0.2 - off, 0.6};
    return std::vector<Cut>{drifting({0.6, 0.4, 0.0}, 0.1, first, second), straight(0, A, 0.02, second, third),
                            drifting({0.7, 0.3, 0.0}, 0.08, third, {0.1, 0.1, 0.8})};
  };
  const std::vector<Cut> joined = join_cuts(three(5e-5), wall());
  ASSERT_EQ(joined.size(), 1U);
  EXPECT_EQ(joined[0].on, "b1");
  EXPECT_FALSE(joined[0].fixed_point.has_value());
  EXPECT_NEAR(joined[0].share, 0.2, 1e-15);
  EXPECT_LT(separation(joined[0].average, {0.68, 0.32, 0.0}), 1e-15);  // (.1*.6 + .02*1 + .08*.7) / .2
  ASSERT_EQ(joined[0].drift.size(), 3U);
  EXPECT_NEAR(joined[0].drift[1].share, 0.02, 1e-15);
  EXPECT_EQ(join_cuts(three(5e-3), wall()).size(), 3U);  // a real departure stays a cut of its own
}

TEST(Cuts, DifferentProductsStayApart) {
  const std::vector<Cut> cuts = {straight(0, {1.0, 0.0, 0.0}, 0.2, {0.6, 0.2, 0.2}, {0.5, 0.25, 0.25}),
                                 straight(1, {0.0, 1.0, 0.0}, 0.1, {0.5, 0.25, 0.25}, {0.5, 0.2, 0.3})};
  EXPECT_EQ(join_cuts(cuts, wall()).size(), 2U);
}

}  // namespace
}  // namespace stillshed
