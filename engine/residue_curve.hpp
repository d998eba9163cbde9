/// Residue curves dx/dxi = x - y(x) of a mixture with any number of components.
///
/// Method    Dormand-Prince 5(4) with error control (Boost.odeint), recorded at every accepted step; between two
/// recorded
///           points the curve is refined by cubic Hermite interpolation until chords deviate less than `chord`.
/// Ends      a fixed point of the curve's own face ends the curve when it attracts within that face (all its
///           eigenvalues there have the sign of the direction) and lies within `capture`; the fixed point is then
///           the last point of the curve.
/// Zeros     a mole fraction that is zero stays exactly zero.
/// Source    J. R. Dormand, P. J. Prince, J. Comput. Appl. Math. 6 (1980) 19-26 (from memory).
#pragma once

#include <vector>

#include "engine/chart.hpp"

namespace stillshed {

struct TraceOptions {
  double tolerance = 1e-9;  ///< local error of a step, mole fraction
  double chord = 1e-5;      ///< largest distance between the curve and its polyline
  double capture = 2e-4;    ///< distance at which an attracting fixed point ends the curve
  int max_steps = 20000;
};

struct Trace {
  Status status = Status::not_run;  ///< complete: ended at a fixed point
  Curve curve;                      ///< from the start on, in the direction of the trace
  std::optional<int> end;           ///< index of the fixed point
};

/// Direction +1: toward higher boiling temperature (xi grows); -1: toward lower.
[[nodiscard]] Trace trace_curve(const Mixture& mixture, double pressure_Pa, const std::vector<FixedPoint>& fixed_points,
                                const Composition& start, int direction, const TraceOptions& options = {});

}  // namespace stillshed
