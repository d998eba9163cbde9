/// One descent on the tangent-plane distance (engine/stability.hpp) to a stationary point.
///
///   tm(W) = 1 + sum_i W_i (s_i - 1),  s_i = ln W_i + ln g_i(W/sum W) - d_i,  d_i = ln x_i + ln g_i(x)
///
/// W are unnormalised amounts. Stationary points have all s_i = 0; there tpd = -ln sum W, w = W/sum W.
///
/// Method    three successive substitutions, then Newton in 2 sqrt(W), whose curvature is near the unit matrix, shifted
/// where tm is
///           not convex; a step is taken only when tm does not rise.
/// Source    M. L. Michelsen, Fluid Phase Equilibria 9 (1982) 1-19 (from memory).
/// Errors    none: `converged` says how it ended.
#pragma once

#include "models/mixture.hpp"

namespace stillshed {

struct Descent {
  bool converged = false;
  double tpd = 0.0;  ///< at w
  Composition w;     ///< sums to 1
};

class TangentPlaneDescent {
 public:
  /// Every component of `face` is present in the liquid tested; `d` of that liquid. Keeps references to both.
  TangentPlaneDescent(const Mixture& face, double temperature_K, const Vec<double>& d)
      : face_(face), temperature_K_(temperature_K), d_(d) {}

  /// From any composition, zeros allowed.
  [[nodiscard]] Descent run(const Composition& start) const;

  /// sum_i w_i (ln w_i + ln g_i(w) - d_i).
  [[nodiscard]] double distance(const Composition& w) const;

 private:
  struct Model;
  [[nodiscard]] Composition substitute(const Composition& from) const;
  [[nodiscard]] Model evaluate(const Composition& W) const;
  bool step(Composition& W, Model& here, double& shift) const;

  const Mixture& face_;
  double temperature_K_ = 0.0;
  const Vec<double>& d_;
};

/// Amounts scaled to sum 1.
[[nodiscard]] Composition normalised(const Composition& amounts);
/// exp without overflow: the exponent is held within +-60.
[[nodiscard]] double bounded_exp(double exponent);

}  // namespace stillshed
