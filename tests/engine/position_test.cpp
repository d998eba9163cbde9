#include "engine/position.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

Mixture curved() {
  return testing::margules_mixture({330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}},
                                   {3700.0, 4800.0, 4900.0});
}

TEST(Position, OnEitherSideOfACurvedBoundary) {
  // Feeds 0.001 from the boundary on both sides (numerical solution with SciPy's LSODA at 1e-10).
  const Mixture mixture = curved();
  const Chart map = chart(mixture, survey(mixture, kAtmosphere_Pa));
  const Position one = locate(mixture, map, {0.70017, 0.161231, 0.138599});
  const Position other = locate(mixture, map, {0.699821, 0.160024, 0.140155});
  ASSERT_TRUE(one.nearest && other.nearest);
  EXPECT_NEAR(one.nearest->distance, 0.001, 1e-4);
  EXPECT_NEAR(other.nearest->distance, 0.001, 1e-4);
  EXPECT_EQ(map.fixed_points[static_cast<std::size_t>(*one.residue_curve.to)].id, "B");
  EXPECT_EQ(map.fixed_points[static_cast<std::size_t>(*other.residue_curve.to)].id, "C");
  ASSERT_TRUE(one.region && other.region);
  EXPECT_NE(*one.region, *other.region);
}

TEST(Position, FlipMovesTheFeedAcross) {
  const Mixture mixture = curved();
  const Chart map = chart(mixture, survey(mixture, kAtmosphere_Pa));
  const Composition feed{0.7, 0.18, 0.12};
  const auto flip = smallest_flip(mixture, map, feed);
  ASSERT_TRUE(flip);
  // Equal molar masses: kg per 100 kg are moles per 100 moles. A little more than the flip changes the region, less
  // does not.
  for (const double share : {0.98, 1.02}) {
    Composition x = feed;
    x[flip->component] += share * flip->kg_per_100kg / 100.0;
    double sum = 0.0;
    for (const double value : x) {
      sum += value;
    }
    for (double& value : x) {
      value /= sum;
    }
    EXPECT_EQ(region_of(map, x) == region_of(map, feed), share < 1.0);
  }
}

TEST(Position, SymmetricMixtureDistance) {
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  const Chart map = chart(mixture, survey(mixture, kAtmosphere_Pa));
  const Position position = locate(mixture, map, {0.6, 0.25, 0.15});
  ASSERT_TRUE(position.nearest);
  EXPECT_NEAR(position.nearest->distance, 0.35 / std::sqrt(2.0), 1e-9);  // to the line x_A = x_B
  EXPECT_NEAR(position.nearest->distance, 0.2474873734152916, 1e-9);
}

TEST(Position, FeedOnABoundaryHasNoRegion) {
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  const Chart map = chart(mixture, survey(mixture, kAtmosphere_Pa));
  const Position position = locate(mixture, map, {0.4, 0.4, 0.2});
  EXPECT_TRUE(position.on_boundary);
  EXPECT_FALSE(position.region);
}

}  // namespace
}  // namespace stillshed
