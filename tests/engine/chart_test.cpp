#include "engine/chart.hpp"

#include <gtest/gtest.h>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

TEST(Chart, DrawsTheCurvesItWasAskedFor) {
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  ChartOptions options;
  options.curves = 5;
  const Chart result = chart(mixture, survey(mixture, kAtmosphere_Pa), options);
  EXPECT_EQ(result.curves.size(), 5U);
  for (const ResidueCurve& curve : result.curves) {
    EXPECT_EQ(curve.status, Status::complete);
  }
}

TEST(Chart, SplitLiquidIsNotMapped) {
  const Mixture mixture = testing::symmetric_mixture(3, 3.0);
  const Chart result = chart(mixture, survey(mixture, kAtmosphere_Pa));
  EXPECT_EQ(result.status, Status::undecided);
  EXPECT_TRUE(result.regions.empty());
  EXPECT_FALSE(result.message.empty());
}

TEST(Chart, DegeneratePointsAreNotGuessed) {
  const Mixture twins = testing::margules_mixture({350.0, 350.0}, {{0.0, 0.0}, {0.0, 0.0}});
  EXPECT_EQ(chart(twins, survey(twins, kAtmosphere_Pa)).status, Status::degenerate);
}

TEST(Chart, FourComponentsAreNotApplicable) {
  const Mixture mixture = testing::symmetric_mixture(4, 1.2);
  EXPECT_EQ(chart(mixture, survey(mixture, kAtmosphere_Pa)).status, Status::not_applicable);
}

}  // namespace
}  // namespace stillshed
