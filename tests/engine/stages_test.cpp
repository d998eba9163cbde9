#include "engine/stages.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "models/ideal.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

TEST(Stages, ConstantRelativeVolatilityIsTheFenskeEquation) {
  // H equal: the relative volatility exp(H (1/Tb_A - 1/Tb_B)) does not depend on temperature; here 1.5.
  const Mixture mixture = testing::simple_mixture({350.0, 362.8741194825}, Ideal(2));
  const StageProfile profile = stage_profile(mixture, testing::kAtmosphere_Pa, {0.5, 0.5}, 25);
  ASSERT_EQ(profile.status, Status::complete);
  ASSERT_EQ(profile.x.size(), 26U);
  EXPECT_NEAR(profile.x[1][0], 0.6, 1e-9);
  EXPECT_NEAR(profile.x[10][0], 0.9829540725450702, 1e-9);
  EXPECT_NEAR(profile.x[25][0], 0.9999603994402241, 1e-9);
  for (int n = 0; n <= 25; ++n) {
    const double odds = std::pow(1.5, n);
    EXPECT_NEAR(profile.x[static_cast<std::size_t>(n)][0], odds / (1.0 + odds), 1e-9);
  }
}

TEST(Stages, ATangentPinchHoldsTheHeadBack) {
  // ln alpha = A (1 - 2 x_A) + H (1/Tb_A - 1/Tb_B): 1e-6 at pure A.
  const Mixture mixture = testing::margules_mixture({350.0, 366.0131053868}, {{0.0, 0.5}, {0.5, 0.0}});
  const StageProfile profile = stage_profile(mixture, testing::kAtmosphere_Pa, {0.5, 0.5}, 25);
  EXPECT_NEAR(profile.x.back()[0], 0.96021286, 1e-8);
}

TEST(Stages, NothingChangesOnAnAzeotropeOrWithoutStages) {
  const Mixture mixture = testing::margules_mixture({350.0, 350.0}, {{0.0, 1.2}, {1.2, 0.0}});
  const StageProfile still = stage_profile(mixture, testing::kAtmosphere_Pa, {0.5, 0.5}, 5);
  EXPECT_NEAR(still.x.back()[0], 0.5, 1e-12);
  EXPECT_EQ(stage_profile(mixture, testing::kAtmosphere_Pa, {0.4, 0.6}, 0).x.size(), 1U);
}

}  // namespace
}  // namespace stillshed
