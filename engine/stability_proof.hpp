/// Interval branch and prune for the tangent-plane test: proof that no liquid lies below the tangent plane at x.
///
/// The simplex is covered by boxes. A box is dismissed when one of these holds for all its points on the simplex:
///   1  the s_i (engine/stability.hpp) cannot be equal, or cannot be equal and negative: no stationary point with
///      tpd < 0. The smallest tpd lies in the open simplex, because at a face ln w_i -> -infinity pulls it inward;
///   2  tpd >= 0 from a mean-value form of the excess part (Gibbs-Duhem) and Gibbs' inequality for the ideal part:
///      tpd(c) + sum_i (w_i - c_i) (ln c_i - d_i + ln g_i(box)), c the midpoint;
///   3  the curvature of tpd is negative in one direction throughout: no minimum inside;
///   4  the box lies in a box around x where the curvature is positive definite: tpd is convex there, x is stationary
///      with tpd = 0, so tpd >= 0;
///   5  tpd >= 0 from the supporting plane at c and a lower bound of the curvature R over the box:
///      sum_i w_i s_i(c) + (w - c).R.(w - c)/2.
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
