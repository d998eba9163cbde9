#include "models/jet_interval.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

using Jet = ceres::Jet<Interval, 2>;
using Plain = ceres::Jet<double, 2>;

/// Every mixed operator, once over intervals and once over doubles.
template <class J>
J everything(const J& x, const J& y) {
  using std::exp;
  using std::log;
  return square(2.0 * x - y * 3.0 + 1.5) / 4.0 + (1.0 - x) / (2.0 + y) - 0.5 / (y + 3.0) + (x - 0.25) * exp(-x) +
         log(1.0 + y);
}

TEST(JetInterval, MixesWithDoubles) {
  const Plain expected = everything(Plain(0.3, 0), Plain(0.7, 1));
  const Jet ours = everything(Jet(Interval(0.3), 0), Jet(Interval(0.7), 1));
  const auto close = [](const Interval& a, double b) { return a.lower() - 1e-14 <= b && b <= a.upper() + 1e-14; };
  EXPECT_TRUE(close(ours.a, expected.a));
  for (int k = 0; k < 2; ++k) {
    EXPECT_TRUE(close(ours.v[k], expected.v[k]));
    EXPECT_LT(ours.v[k].width(), 1e-13);
  }
}

TEST(JetInterval, EnclosesOverABox) {
  const Jet ours = everything(Jet(Interval(0.2, 0.4), 0), Jet(Interval(0.6, 0.9), 1));
  for (double x = 0.2; x <= 0.4; x += 0.02) {
    for (double y = 0.6; y <= 0.9; y += 0.03) {
      const Plain sample = everything(Plain(x, 0), Plain(y, 1));
      EXPECT_TRUE(ours.a.contains(sample.a));
      EXPECT_TRUE(ours.v[0].contains(sample.v[0]));
      EXPECT_TRUE(ours.v[1].contains(sample.v[1]));
    }
  }
}

}  // namespace
}  // namespace stillshed
