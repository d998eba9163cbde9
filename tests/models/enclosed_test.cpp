#include "models/enclosed.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(Enclosed, GivesEachNumberTypeItsPart) {
  const Enclosed third{1.0 / 3.0, Interval(1.0) / 3.0};
  EXPECT_EQ(constant<double>(third), 1.0 / 3.0);
  EXPECT_GT(constant<Interval>(third).width(), 0.0);
  EXPECT_TRUE(constant<Interval>(third).contains(1.0 / 3.0));
  const auto jet = constant<ceres::Jet<Interval, 2>>(third);
  EXPECT_EQ(jet.a.upper(), third.range.upper());
  EXPECT_EQ(jet.v[1].upper(), 0.0);
}

}  // namespace
}  // namespace stillshed
