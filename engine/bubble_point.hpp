/// Boiling of a liquid, condensing of a vapour, at given pressure.
///
///   bubble point   F(T) = ln sum_i x_i K_i(T, x) = 0        y_i = x_i K_i
///   K_i = gamma_i Psat_i / P                                 (models/mixture.hpp)
///
/// Method    Newton in 1/T on F, kept inside a bracket whose signs were evaluated. The slope of ln Psat is exact, that
/// of
///           ln gamma a difference quotient of the last two steps; F is nearly linear in 1/T.
/// Symbols   T temperature [K]; x liquid, y vapour mole fractions [-], zeros allowed.
/// Claims    `complete`: |F| below 1e-12 at the returned T, and F rises there. Other roots are not looked for by
///           `bubble_point`; `bubble_point_scanned` samples a wide range of T for them.
/// Errors    none: a bad ending is a status. LogicError for a composition of the wrong size.
/// Cost      no heap; 1 to 3 evaluations of ln gamma from a good guess.
#pragma once

#include <optional>

#include "engine/status.hpp"
#include "models/mixture.hpp"

namespace stillshed {

struct BubblePoint {
  Status status = Status::not_run;  ///< complete | undecided (see reason)
  std::optional<Reason> reason;     ///< multiple_bubble_points | not_converged
  double temperature_K = 0.0;
  Composition y;       ///< vapour, sums to 1
  Vec<double> k;       ///< K of every component, absent ones at infinite dilution
  double slope = 0.0;  ///< dF/d ln T, positive when complete
  int evaluations = 0;
};

/// `guess_K` <= 0: start from the boiling points of the components.
[[nodiscard]] BubblePoint bubble_point(const Mixture& mixture, const Composition& x, double pressure_Pa,
                                       double guess_K = 0.0);

/// The same, after looking for further roots at `samples` temperatures between 0.6 times the lowest and 1.6 times the
/// highest boiling point of the components present. More than one root: status undecided, reason
/// multiple_bubble_points, temperature of the lowest root.
[[nodiscard]] BubblePoint bubble_point_scanned(const Mixture& mixture, const Composition& x, double pressure_Pa,
                                               int samples = 160);

/// First derivatives of the bubble point by implicit differentiation of F(T, x) = 0.
/// Columns treat the x as independent numbers: only combinations with sum(dx) = 0 have a meaning.
struct BubbleGradient {
  Vec<double> dT_dx;     ///< [K]
  Matrix<double> dy_dx;  ///< row i = component i of the vapour
};
/// `point` must be a complete bubble point of `x` at `pressure_Pa`.
[[nodiscard]] BubbleGradient bubble_gradient(const Mixture& mixture, const Composition& x, double pressure_Pa,
                                             const BubblePoint& point);

}  // namespace stillshed
