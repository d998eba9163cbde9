/// The two pictures of a binary mixture: T-x-y and x-y, with measured azeotropes overlaid.
///
/// The first component of the mixture runs along the horizontal axis; mole fractions.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "reports/answer.hpp"

namespace stillshed {

/// Bubble points from pure second component (x = 0) to pure first component (x = 1).
struct BinaryPhases {
  struct Row {
    double x = 0.0;  ///< liquid mole fraction of the first component
    double y = 0.0;  ///< vapour in equilibrium with it
    double temperature_K = 0.0;
  };
  std::vector<Row> rows;
};

/// Bubble points at 101 compositions; empty unless two components were surveyed and every point converged.
[[nodiscard]] std::optional<BinaryPhases> binary_phases(const Answer& answer);

[[nodiscard]] std::string temperature_composition_svg(const Answer& answer, const BinaryPhases& phases);
[[nodiscard]] std::string vapour_liquid_svg(const Answer& answer, const BinaryPhases& phases);

/// Round steps that divide [low, high] into about `wanted` pieces: first tick, step.
struct TickSteps {
  double first = 0.0;
  double step = 1.0;
};
[[nodiscard]] TickSteps tick_steps(double low, double high, int wanted);

}  // namespace stillshed
