#include "engine/split_scan.hpp"

#include <gtest/gtest.h>

#include "engine/stability.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using testing::symmetric_mixture;

TEST(SplitScan, TwoSuffixMargulesSplitsAboveTwo) {
  EXPECT_TRUE(scan_for_splits(symmetric_mixture(2, 1.99), kAtmosphere_Pa).empty());
  const std::vector<SplitWitness> found = scan_for_splits(symmetric_mixture(2, 2.01), kAtmosphere_Pa);
  ASSERT_EQ(found.size(), 1U);
  EXPECT_NEAR(found[0].x[0], 0.5, 1e-12);
  // curvature of the symmetric model at x: 1 - 2 A x1 x2
  EXPECT_NEAR(found[0].curvature, 1.0 - 2.0 * 2.01 * 0.25, 1e-9);
}

/// A wide boiling gap: two liquids and no azeotrope of one liquid, so nothing in a survey tells of the split.
TEST(SplitScan, FindsASplitThatNoRootShows) {
  const Mixture mixture = margules_mixture({330.0, 470.0}, {{0.0, 2.6}, {2.6, 0.0}});
  const Survey found = survey(mixture, kAtmosphere_Pa);
  EXPECT_TRUE(found.azeotropes.empty());
  EXPECT_FALSE(found.splits());
  const std::vector<SplitWitness> witnesses = scan_for_splits(mixture, kAtmosphere_Pa);
  ASSERT_EQ(witnesses.size(), 1U);
  EXPECT_EQ(test_stability(mixture, witnesses[0].temperature_K, witnesses[0].x).outcome, Stability::unstable);
}

/// Every edge miscible, the middle of the triangle not: three like pairs beside one unlike (spinodal of A12 = 1.8,
/// A13 = -1.8, A23 = 1.8 lies inside).
TEST(SplitScan, LooksInsideTernaryFaces) {
  const Mixture mixture =
      margules_mixture({350.0, 352.0, 354.0}, {{0.0, 1.9, -1.9}, {1.9, 0.0, 1.9}, {-1.9, 1.9, 0.0}});
  const std::vector<SplitWitness> witnesses = scan_for_splits(mixture, kAtmosphere_Pa);
  ASSERT_EQ(witnesses.size(), 1U);
  EXPECT_EQ(witnesses[0].members.size(), 3);
}

TEST(SplitScan, OneWitnessPerFaceInOrder) {
  const std::vector<SplitWitness> witnesses = scan_for_splits(symmetric_mixture(4, 2.5), kAtmosphere_Pa);
  ASSERT_GE(witnesses.size(), 6U);
  EXPECT_EQ(witnesses[0].members, (Members{0, 1}));
  EXPECT_EQ(witnesses[5].members, (Members{2, 3}));
  for (const SplitWitness& witness : witnesses) {
    EXPECT_LT(witness.curvature, 0.0);
    EXPECT_EQ(witness.x.size(), 4);
  }
}

}  // namespace
}  // namespace stillshed
