/// Condensing of a vapour at given pressure: the liquid in equilibrium with it.
///
///   ln x_i + ln K_i(T, x) - ln y_i = 0 for every y_i > 0,   sum x_i = 1
///
/// Method    Newton in (ln x, T) with analytic derivatives; where that fails, continuation from the ideal liquid
///           (ln gamma scaled by s = 0 .. 1). Components with y_i = 0 have x_i = 0.
/// Symbols   T temperature [K]; x liquid, y vapour mole fractions [-].
/// Claims    `complete`: a solution of the single-liquid equations. Where the liquid splits there can be several, and
/// the
///           one returned is the one connected to the starting point; its stability is not tested here.
/// Errors    none: a bad ending is a status.
#pragma once

#include <optional>

#include "engine/status.hpp"
#include "models/mixture.hpp"

namespace stillshed {

struct DewPoint {
  Status status = Status::not_run;  ///< complete | undecided
  std::optional<Reason> reason;     ///< not_converged
  double temperature_K = 0.0;
  Composition x;  ///< liquid, sums to 1
};

/// A guess speeds things up and selects the solution near it; `guess_K` <= 0 or an empty `guess_x`: none.
[[nodiscard]] DewPoint dew_point(const Mixture& mixture, const Composition& y, double pressure_Pa, double guess_K = 0.0,
                                 const Composition& guess_x = {});

}  // namespace stillshed
