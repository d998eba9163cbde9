#include "engine/regions.hpp"

#include <gtest/gtest.h>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

TEST(Regions, SymmetricMixtureHasThreeEqualOnes) {
  // Derived here (symmetry): unstable node at the barycentre, three stable corners, a third of the triangle each.
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  const Chart result = chart(mixture, survey(mixture, kAtmosphere_Pa));
  ASSERT_EQ(result.status, Status::complete);
  ASSERT_EQ(result.regions.size(), 3U);
  for (const Region& region : result.regions) {
    EXPECT_NEAR(region.area, 1.0 / 3.0, 1e-9);
    EXPECT_EQ(result.fixed_points[static_cast<std::size_t>(region.unstable_node)].members.size(), 3);
    EXPECT_TRUE(result.fixed_points[static_cast<std::size_t>(region.stable_node)].pure());
    EXPECT_EQ(region.boundaries.size(), 2U);
  }
}

TEST(Regions, AreasAddUpToTheTriangle) {
  for (const double a : {-0.9, -0.4, 0.3, 0.8, 1.4}) {
    const Mixture mixture =
        testing::margules_mixture({345.0, 350.0, 356.0}, {{0.0, a, 1.1}, {a, 0.0, -0.6}, {1.1, -0.6, 0.0}});
    const Chart result = chart(mixture, survey(mixture, kAtmosphere_Pa));
    ASSERT_EQ(result.status, Status::complete) << a << ": " << result.message;
    double sum = 0.0;
    for (const Region& region : result.regions) {
      sum += region.area;
    }
    EXPECT_NEAR(sum, 1.0, 1e-9) << a;
  }
}

TEST(Regions, BinaryIntervals) {
  const Mixture mixture = testing::margules_mixture({350.0, 352.0}, {{0.0, -0.8}, {-0.8, 0.0}});
  const RegionSet set = find_intervals(survey(mixture, kAtmosphere_Pa).fixed_points());
  ASSERT_EQ(set.regions.size(), 2U);
  EXPECT_NEAR(set.regions[0].area + set.regions[1].area, 1.0, 1e-15);
}

}  // namespace
}  // namespace stillshed
