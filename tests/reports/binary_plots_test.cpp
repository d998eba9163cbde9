#include "reports/binary_plots.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

BinaryPhases straight_phases() {
  BinaryPhases phases;
  for (int k = 0; k <= 10; ++k) {
    const double x = 0.1 * k;
    phases.rows.push_back({x, x + 0.4 * x * (1.0 - x), 337.7 - 8.5 * x});
  }
  return phases;
}

TEST(BinaryPlots, TicksAreRound) {
  const TickSteps wide = tick_steps(54.7, 66.1, 6);
  EXPECT_DOUBLE_EQ(wide.step, 2.0);
  EXPECT_DOUBLE_EQ(wide.first, 56.0);
  const TickSteps narrow = tick_steps(99.95, 100.05, 5);
  EXPECT_NEAR(narrow.step, 0.02, 1e-12);
  EXPECT_NEAR(narrow.first, 99.96, 1e-9);
  EXPECT_DOUBLE_EQ(tick_steps(0.0, 1000.0, 10).step, 100.0);
}

TEST(BinaryPlots, PhasesOfAnIdealBinaryFollowTheClosedForm) {
  // Equal slopes: the relative volatility does not depend on temperature, y = a x / (1 + (a - 1) x).
  Answer answer = sample::binary();
  answer.mixture =
      Mixture({sample::component("A", "", 60.0, 350.0), sample::component("B", "", 60.0, 360.0)}, Ideal(2));
  const auto phases = binary_phases(answer);
  ASSERT_TRUE(phases.has_value());
  ASSERT_EQ(phases->rows.size(), 101U);
  const double alpha = std::exp(4000.0 * (1.0 / 350.0 - 1.0 / 360.0));
  for (const BinaryPhases::Row& row : phases->rows) {
    EXPECT_NEAR(row.y, alpha * row.x / (1.0 + (alpha - 1.0) * row.x), 1e-11);
  }
  EXPECT_NEAR(phases->rows.front().temperature_K, 360.0, 1e-8);
  EXPECT_NEAR(phases->rows.back().temperature_K, 350.0, 1e-8);
  EXPECT_FALSE(binary_phases(sample::ternary()).has_value());
}

TEST(BinaryPlots, TemperaturePlotHoldsWhatAReaderNeeds) {
  const std::string svg = temperature_composition_svg(sample::binary(), straight_phases());
  EXPECT_TRUE(testing_support::is_valid(svg, "xml"));
  for (const char* words :
       {"T-x-y of acetone + methanol", "mole fractions · 1.013 bar · unifac-dortmund", "acetone, mol%",
        "temperature, °C", "az1  55.2 °C", "measured azeotrope", "vapour in equilibrium", "feed at its bubble point"}) {
    EXPECT_NE(svg.find(words), std::string::npos) << words;
  }
}

TEST(BinaryPlots, VapourLiquidPlotHasADiagonal) {
  const std::string svg = vapour_liquid_svg(sample::binary(), straight_phases());
  EXPECT_TRUE(testing_support::is_valid(svg, "xml"));
  EXPECT_NE(svg.find("acetone in the vapour, mol%"), std::string::npos);
  EXPECT_NE(svg.find("vapour like the liquid"), std::string::npos);
}

TEST(BinaryPlots, ZeotropicBinaryHasNoAzeotropeInItsLegend) {
  Answer answer = sample::binary();
  answer.survey->azeotropes.clear();
  answer.measured.clear();
  const std::string svg = temperature_composition_svg(answer, straight_phases());
  EXPECT_TRUE(testing_support::is_valid(svg, "xml"));
  EXPECT_EQ(svg.find("measured"), std::string::npos);
  EXPECT_NE(svg.find("No azeotrope computed."), std::string::npos);
}

}  // namespace
}  // namespace stillshed
