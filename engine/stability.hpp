/// Is a liquid stable, or does it split? Global tangent-plane test of one liquid at its temperature.
///
///   tpd(w) = sum_i w_i (ln w_i + ln g_i(w) - ln x_i - ln g_i(x))      in RT, w on the simplex of the components of x
///
/// The liquid x is stable when tpd >= 0 for every w. At an interior stationary point all
///   s_i(w) = ln w_i + ln g_i(w) - d_i,  d_i = ln x_i + ln g_i(x),
/// are equal, and their common value is tpd (Gibbs-Duhem). Components absent from x are excluded: x is tested in its
/// face.
///
/// Method    search: successive substitution and Newton (in 2 sqrt(w)) from pure phases, midpoints, the ideal
///           reply, the softest direction at x, given and seeded points. Proof (engine/stability_proof.hpp): interval
///           branch and prune up to `proof_up_to` components, after the first starts found nothing. Models
///           that never split need neither.
/// Claims    unstable, proved      interval evaluation of tpd at `incipient` lies below zero: certain for this model.
///           stable, proved        no liquid has tpd < 0: certain for this model and the stored parameters, T and x.
///           stable, not proved    every start converged, none to tpd < kTpdNoise, x well inside the region of local
///                                 stability: strong evidence, not certainty.
///           not_concluded         anything else: a tpd within kTpdNoise of zero away from x (x on a binodal), a
///           softest
///                                 curvature below kSoftCurvature (near a critical point or spinodal), budget spent,
///                                 a start that did not converge.
/// Source    M. L. Michelsen, Fluid Phase Equilibria 9 (1982) 1-19 (from memory); L. E. Baker, A. C. Pierce,
///           K. D. Luks, SPE J. 22 (1982) 731-742 (from memory).
/// Cost      measured on one core, search alone / with proof: NRTL and Margules ternaries 20-180 us / 0.1-2 ms, UNIFAC
///           ternaries 70-300 us / 1-6 ms, NRTL quaternaries 80-160 us / 1-6 ms; more near a critical point.
#pragma once

#include <cstdint>
#include <vector>

#include "engine/survey.hpp"

namespace stillshed {

/// A tangent-plane distance closer to zero than this has no reliable sign [RT].
inline constexpr double kTpdNoise = 1e-9;
/// Softest curvature of tpd at x, relative to an ideal liquid (1 there, 0 on the spinodal), below which
/// nothing is concluded without proof.
inline constexpr double kSoftCurvature = 1e-4;

struct StabilityOptions {
  int proof_up_to = 4;              ///< components of x; more than four are never proved
  std::int64_t max_boxes = 50'000;  ///< budget of the proof
  std::uint64_t seed = 1;
  std::vector<Composition> starts;  ///< further starting points, all components of the mixture
};

/// `x` on the closed simplex (rescaled to sum 1), all components of the mixture.
[[nodiscard]] StabilityResult test_stability(const Mixture& mixture, double temperature_K, const Composition& x,
                                             const StabilityOptions& options = {});

/// True for models whose liquids never split at any composition: ideal, and Wilson, whose free energy of mixing is
/// sum_i x_i ln(x_i/L_i) with L_i = sum_j Lambda_ij x_j linear and positive: every term is convex in (x_i, L_i).
[[nodiscard]] bool never_splits(const Mixture& mixture);

/// tpd(w) in doubles; w and x of the mixture's size, w zero where x is zero.
[[nodiscard]] double tangent_plane_distance(const Mixture& mixture, double temperature_K, const Composition& x,
                                            const Composition& w);

/// Smallest eigenvalue of the curvature of tpd at x along its face, relative to the ideal liquid: of
/// delta_ij + sqrt(x_i x_j) d ln g_i/d x_j on directions with sum(sqrt(x) u) = 0. Negative: unstable to small changes.
struct Softness {
  double curvature = 1.0;
  Composition direction;  ///< of softest change, sums to 0
};
[[nodiscard]] Softness softest_direction(const Mixture& mixture, double temperature_K, const Composition& x);

}  // namespace stillshed
