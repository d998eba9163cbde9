#include "engine/residue_curve.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "engine/bubble_point.hpp"
#include "engine/geometry.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

/// Ideal liquid with equal H: relative volatilities 4 : 2 : 1 at every temperature.
Mixture constant_volatility() {
  const double heaviest = 370.0;
  const auto boiling = [&](double alpha) { return 1.0 / (1.0 / heaviest + std::log(alpha) / 4000.0); };
  return testing::simple_mixture({boiling(4.0), boiling(2.0), heaviest}, Ideal(3));
}

TEST(ResidueCurve, KeepsTheInvariantOfConstantVolatility) {
  // Textbook result, derived here: (x1/x3)^(1/(a1-a3)) / (x2/x3)^(1/(a2-a3)) is constant along a residue curve.
  const Mixture mixture = constant_volatility();
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const ResidueCurve result = residue_curve(mixture, kAtmosphere_Pa, points, {0.3, 0.3, 0.4});
  ASSERT_EQ(result.status, Status::complete);
  const auto invariant = [](const Composition& x) { return std::log(x[0] / x[2]) / 3.0 - std::log(x[1] / x[2]); };
  const double expected = invariant({0.3, 0.3, 0.4});
  int checked = 0;
  for (const Composition& x : result.curve.points) {
    if (x[0] > 0.01 && x[1] > 0.01 && x[2] > 0.01) {
      EXPECT_NEAR(invariant(x), expected, 5e-5);  // the chord tolerance 1e-5 over the smallest mole fraction
      ++checked;
    }
  }
  EXPECT_GT(checked, 30);
  EXPECT_EQ(points[static_cast<std::size_t>(*result.from)].id, "A");
  EXPECT_EQ(points[static_cast<std::size_t>(*result.to)].id, "C");
}

TEST(ResidueCurve, EveryTemperatureIsTheBubblePointOfItsComposition) {
  const Mixture mixture = testing::margules_mixture(
      {330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}}, {3700.0, 4800.0, 4900.0});
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const ResidueCurve result = residue_curve(mixture, kAtmosphere_Pa, points, {0.2, 0.5, 0.3});
  ASSERT_EQ(result.status, Status::complete);
  ASSERT_EQ(result.curve.points.size(), result.curve.temperature_K.size());
  for (std::size_t k = 0; k < result.curve.points.size(); ++k) {
    const BubblePoint boiling = bubble_point(mixture, result.curve.points[k], kAtmosphere_Pa);
    EXPECT_NEAR(result.curve.temperature_K[k], boiling.temperature_K, 1e-8) << "point " << k;
  }
}

TEST(ResidueCurve, TemperatureNeverFalls) {
  const Mixture mixture = testing::margules_mixture(
      {330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}}, {3700.0, 4800.0, 4900.0});
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  for (const Composition& start :
       {Composition{0.7, 0.18, 0.12}, Composition{0.1, 0.2, 0.7}, Composition{0.2, 0.7, 0.1}}) {
    const ResidueCurve result = residue_curve(mixture, kAtmosphere_Pa, points, start);
    ASSERT_EQ(result.status, Status::complete);
    for (std::size_t k = 1; k < result.curve.temperature_K.size(); ++k) {
      EXPECT_GE(result.curve.temperature_K[k], result.curve.temperature_K[k - 1] - 1e-9);
    }
    EXPECT_LT(distance(result.curve.points[static_cast<std::size_t>(result.through)], start), 1e-15);
  }
}

TEST(ResidueCurve, StaysOnItsEdgeAndEndsThere) {
  const Mixture mixture = testing::symmetric_mixture(3, 1.2);
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const ResidueCurve result = residue_curve(mixture, kAtmosphere_Pa, points, {0.8, 0.2, 0.0});
  ASSERT_EQ(result.status, Status::complete);
  for (const Composition& x : result.curve.points) {
    EXPECT_EQ(x[2], 0.0);
  }
  // On the edge its azeotrope attracts backward, though it is a saddle of the triangle.
  EXPECT_EQ(points[static_cast<std::size_t>(*result.from)].members, (Members{0, 1}));
  EXPECT_EQ(points[static_cast<std::size_t>(*result.to)].id, "A");
}

TEST(ResidueCurve, FourComponents) {
  const Mixture mixture = testing::simple_mixture({330.0, 345.0, 360.0, 375.0}, Ideal(4));
  const auto points = survey(mixture, kAtmosphere_Pa).fixed_points();
  const ResidueCurve result = residue_curve(mixture, kAtmosphere_Pa, points, {0.25, 0.25, 0.25, 0.25});
  ASSERT_EQ(result.status, Status::complete);
  EXPECT_EQ(points[static_cast<std::size_t>(*result.to)].id, "D");
}

}  // namespace
}  // namespace stillshed
