/// Interval branch and prune for the tangent-plane test: proof that no liquid lies below the tangent plane at x.
///
/// The simplex is covered by boxes. A box is dismissed when one of these holds for all its points on the simplex:
///   1  the s_i (engine/stability.hpp) cannot be equal, or cannot be equal and negative: no stationary point with
///      tpd < 0. The smallest tpd lies in the open simplex, because at a face ln w_i -> -infinity pulls it inward;
///   2  tpd >= 0 from a mean-value form: tpd(c) + sum_i (s_i(box) - s_p(box)) (w_i - c_i) (Gibbs-Duhem);
///   3  the curvature of tpd is negative in one direction throughout: no minimum inside;
///   4  the curvature is positive definite on the hull of the box and x: tpd is convex there, x is stationary
///      with tpd = 0, so tpd >= 0;
///   5  the curvature is positive definite on the box and the supporting plane at its midpoint stays above zero.
/// Otherwise it is halved. An unbounded or NaN enclosure dismisses nothing.
///
/// Claims    `proved`: tpd >= 0 for every composition of the components of x, for the stored parameters, this model and
///           this T, x being the stored composition with its largest fraction replaced by one minus the others.
/// Limits    x near a critical point or on a binodal: rules 4 or 2 cannot close and the budget runs out.
#pragma once

#include <cstdint>

#include "models/mixture.hpp"

namespace stillshed {

inline constexpr int kMostProvedComponents = 4;

struct StabilityProof {
  bool proved = false;
  std::int64_t boxes = 0;
};

/// Every component of `face` is present in `x`; at most kMostProvedComponents of them.
[[nodiscard]] StabilityProof prove_stable(const Mixture& face, double temperature_K, const Composition& x,
                                          std::int64_t max_boxes);

/// True when interval arithmetic shows tpd(w) < 0: x is certainly unstable.
[[nodiscard]] bool proves_unstable(const Mixture& face, double temperature_K, const Composition& x,
                                   const Composition& w);

}  // namespace stillshed
