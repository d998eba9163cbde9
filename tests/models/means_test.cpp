#include "models/means.hpp"

#include <gtest/gtest.h>

#include <random>

namespace stillshed {
namespace {

struct Draw {
  std::mt19937_64 random{4242};
  double operator()(double low, double high) { return std::uniform_real_distribution<double>(low, high)(random); }
};

TEST(Means, WeightedMeanOfABoxIsItsRange) {
  Draw draw;
  constexpr int n = 4;
  for (int trial = 0; trial < 4000; ++trial) {
    std::array<Interval, n> w;
    std::array<Interval, n> v;
    for (int i = 0; i < n; ++i) {
      const auto at = static_cast<std::size_t>(i);
      const double low = trial % 3 == 0 && i == 1 ? 0.0 : draw(0.0, 1.0);
      w[at] = Interval(low, low + draw(0.0, 1.0));
      const double value = draw(-3.0, 3.0);
      v[at] = Interval(value, value + draw(0.0, 0.5));
    }
    const Interval mean = weighted_mean(w.data(), v.data(), n);
    // Every corner of the box of weights, with all values at one end: these are where the range ends lie.
    double lowest = 1e300;
    double highest = -1e300;
    for (int corner = 0; corner < 1 << n; ++corner) {
      std::array<double, n> weight;
      std::array<double, n> low;
      std::array<double, n> high;
      for (int i = 0; i < n; ++i) {
        const auto at = static_cast<std::size_t>(i);
        weight[at] = (corner >> i & 1) != 0 ? w[at].upper() : w[at].lower();
        low[at] = v[at].lower();
        high[at] = v[at].upper();
      }
      lowest = std::min(lowest, weighted_mean(weight.data(), low.data(), n));
      highest = std::max(highest, weighted_mean(weight.data(), high.data(), n));
    }
    ASSERT_LE(mean.lower(), lowest);
    ASSERT_GE(mean.upper(), highest);
    ASSERT_NEAR(mean.lower(), lowest, 1e-13);
    ASSERT_NEAR(mean.upper(), highest, 1e-13);
  }
}

TEST(Means, WeightsThatCarryNothingFallBackToTheValues) {
  const std::array<Interval, 2> w{Interval(0.0), Interval(0.0)};
  const std::array<Interval, 2> v{Interval(-1.0, 0.5), Interval(2.0)};
  const Interval mean = weighted_mean(w.data(), v.data(), 2);
  EXPECT_EQ(mean.lower(), -1.0);
  EXPECT_EQ(mean.upper(), 2.0);
  const std::array<Interval, 2> negative{Interval(-0.1, 1.0), Interval(1.0)};
  EXPECT_FALSE(weighted_mean(negative.data(), v.data(), 2).is_bounded());
  const std::array<Interval, 2> unknown{Interval::whole(), Interval(2.0)};
  EXPECT_FALSE(weighted_mean(negative.data(), unknown.data(), 2).is_bounded());
}

TEST(Means, SimplexSumIsTheRangeOverTheSimplexPartOfTheBox) {
  Draw draw;
  constexpr int n = 3;
  for (int trial = 0; trial < 3000; ++trial) {
    std::array<double, n> centre{draw(0.0, 1.0), draw(0.0, 1.0), draw(0.0, 1.0)};
    const double total = centre[0] + centre[1] + centre[2];
    std::array<Interval, n> x;
    std::array<Interval, n> v;
    for (std::size_t i = 0; i < n; ++i) {
      centre[i] /= total;
      x[i] = Interval(std::max(0.0, centre[i] - draw(0.0, 0.3)), std::min(1.0, centre[i] + draw(0.0, 0.3)));
      v[i] = draw(-2.0, 2.0);
    }
    const Interval sum = simplex_sum(x.data(), v.data(), n);
    // The end points lie where two coordinates sit at ends of their range and the third makes up the unit.
    double lowest = 1e300;
    double highest = -1e300;
    for (std::size_t free = 0; free < n; ++free) {
      for (int corner = 0; corner < 4; ++corner) {
        const std::size_t a = (free + 1) % n;
        const std::size_t b = (free + 2) % n;
        const double xa = (corner & 1) != 0 ? x[a].upper() : x[a].lower();
        const double xb = (corner & 2) != 0 ? x[b].upper() : x[b].lower();
        const double rest = 1.0 - xa - xb;
        if (x[free].contains(rest)) {
          const double value = xa * v[a].lower() + xb * v[b].lower() + rest * v[free].lower();
          lowest = std::min(lowest, value);
          highest = std::max(highest, value);
        }
      }
    }
    ASSERT_LE(sum.lower(), lowest + 1e-15);
    ASSERT_GE(sum.upper(), highest - 1e-15);
    ASSERT_NEAR(sum.lower(), lowest, 1e-12);
    ASSERT_NEAR(sum.upper(), highest, 1e-12);
  }
}

TEST(Means, SimplexSumOffTheSimplexIsThePlainSum) {
  const std::array<Interval, 2> x{Interval(0.1, 0.2), Interval(0.3, 0.4)};  // no point adds up to 1
  const std::array<Interval, 2> v{Interval(1.0), Interval(2.0)};
  const Interval sum = simplex_sum(x.data(), v.data(), 2);
  EXPECT_TRUE(sum.contains(Interval(0.7, 1.0)));
  EXPECT_NEAR(sum.lower(), 0.7, 1e-15);
}

TEST(Means, JetsFollowTheQuotientRule) {
  using Jet = ceres::Jet<double, 2>;
  const std::array<Jet, 3> w{Jet(0.2, 0), Jet(0.5, 1), Jet(0.3)};
  std::array<Jet, 3> v{Jet(1.0), Jet(-2.0), Jet(4.0, 1)};
  const Jet mean = weighted_mean(w.data(), v.data(), 3);
  const Jet plain = (w[0] * v[0] + w[1] * v[1] + w[2] * v[2]) / (w[0] + w[1] + w[2]);
  EXPECT_NEAR(mean.a, plain.a, 1e-15);
  EXPECT_NEAR(mean.v[0], plain.v[0], 1e-15);
  EXPECT_NEAR(mean.v[1], plain.v[1], 1e-15);
  const Jet ratio = ratio_of_sums(w.data(), v.data(), w.data(), 3);
  const Jet expected = (w[0] * v[0] + w[1] * v[1] + w[2] * v[2]) / (w[0] * w[0] + w[1] * w[1] + w[2] * w[2]);
  EXPECT_NEAR(ratio.a, expected.a, 1e-15);
  EXPECT_NEAR(ratio.v[0], expected.v[0], 1e-14);
  EXPECT_NEAR(ratio.v[1], expected.v[1], 1e-14);
}

TEST(Means, FractionPartKeepsWhatItCannotJudge) {
  EXPECT_EQ(fraction_part(Interval(-1e-17, 0.3)).lower(), 0.0);
  EXPECT_EQ(fraction_part(Interval(0.9, 1.5)).upper(), 1.0);
  EXPECT_EQ(fraction_part(Interval(1.5, 2.0)).lower(), 1.5);
}

}  // namespace
}  // namespace stillshed
