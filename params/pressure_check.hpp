/// Plausibility of one published vapour-pressure set, checked when the data are loaded.
///
/// Evaluates the formulas of records.hpp in plain double precision, apart from models/, so that a slip in either shows.
#pragma once

#include <optional>
#include <string>

#include "params/records.hpp"

namespace stillshed {

/// ln(P / Pa) at T [K]; NaN where the formula has no value.
[[nodiscard]] double plain_ln_pressure(const PressureSet& set, double temperature_K);

/// Boiling point at `pressure_Pa` inside the range of the set [K]; empty when the range does not hold it.
[[nodiscard]] std::optional<double> boiling_point_in_range_K(const PressureSet& set, double pressure_Pa);

/// First temperature [K] at which the set does not rise (or has no value) over its range; empty when it rises
/// throughout.
[[nodiscard]] std::optional<double> falls_at_K(const PressureSet& set);

}  // namespace stillshed
