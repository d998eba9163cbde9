/// Vapour pressure of a pure liquid: one published set, continued beyond its range by one stated rule.
///
///   antoine_log10       log10 P = A - B / (T + C)
///   wagner_25           ln(P/Pc) = (Tc/T) (a t + b t^1.5 + c t^2.5 + d t^5),  t = 1 - T/Tc
///   wagner_36           ln(P/Pc) = (Tc/T) (a t + b t^1.5 + c t^3 + d t^6)
///   wagner_water        ln(P/Pc) = (Tc/T) (a1 t + a2 t^1.5 + a3 t^3 + a4 t^3.5 + a5 t^4 + a6 t^7.5)
///   perry_101           ln P = C1 + C2/T + C3 ln T + C4 T^C5
///   clausius_clapeyron  ln(P/101325 Pa) = H (1/Tb - 1/T)
///
/// Outside [t_min_K, t_max_K] the curve goes on as the Clausius-Clapeyron line through the end point with the slope
/// there (ln P linear in 1/T): no Antoine pole, rising everywhere, value and slope continuous. `covers` tells a caller
/// that a result used it.
///
/// Symbols   T [K], P [Pa]. Sources: params/sources.json, key in the set.
/// Numbers   double, Interval, and Jets of both (by the chain rule). The choice between formula and continuation is the
///           only place where a model looks at a value of T.
/// Proof     once, at construction, dlnP/dT > 0 is shown over the range by interval evaluation and bisection, and
///           d2lnP/dT2 < 0 up to the highest temperature where that can be shown (Wagner curves turn near Tc). So
///           ln P of an interval is enclosed by its end points, and so is the slope where it is known to fall.
/// Errors    construction throws InputError for bad coefficients, a bad range, or a curve that does not rise over it.
#pragma once

#include <ceres/jet.h>

#include "models/enclosed.hpp"
#include "models/interval.hpp"
#include "models/jet_interval.hpp"
#include "params/records.hpp"

namespace stillshed {

class PressureCurve {
 public:
  PressureCurve() = default;
  explicit PressureCurve(PressureSet set);

  [[nodiscard]] const PressureSet& set() const { return set_; }
  /// True when the published range holds this temperature (a missing end: no limit on that side).
  [[nodiscard]] bool covers(double temperature_K) const;

  /// ln(P / Pa).
  [[nodiscard]] double ln_psat(double temperature_K) const;
  [[nodiscard]] Interval ln_psat(const Interval& temperature_K) const;
  template <class S, int N>
  [[nodiscard]] ceres::Jet<S, N> ln_psat(const ceres::Jet<S, N>& temperature_K) const {
    ceres::Jet<S, N> result(ln_psat(temperature_K.a));
    const S slope = d_ln_psat_dT(temperature_K.a);
    for (int k = 0; k < N; ++k) {
      result.v[k] = slope * temperature_K.v[k];
    }
    return result;
  }
  /// d ln P / dT [1/K].
  [[nodiscard]] double d_ln_psat_dT(double temperature_K) const;
  [[nodiscard]] Interval d_ln_psat_dT(const Interval& temperature_K) const;

  /// Temperature at which P is the vapour pressure [K]; infinite above the pressure that the continuation tends to.
  [[nodiscard]] double boiling_point_K(double pressure_Pa) const;
  /// Encloses every T with ln P(T) in this interval.
  [[nodiscard]] Interval temperature_at(const Interval& ln_pressure) const;

 private:
  /// The part of the curve beyond one end of the range: ln P = ln_p + H (1/end - 1/T).
  struct Continuation {
    double end_K = 0.0;
    Enclosed inverse_end;
    Enclosed ln_p;
    Enclosed H_K;
    template <class S>
    [[nodiscard]] S value(const S& T) const {
      return constant<S>(ln_p) + constant<S>(H_K) * (constant<S>(inverse_end) - 1.0 / T);
    }
    template <class S>
    [[nodiscard]] S slope(const S& T) const {
      return constant<S>(H_K) / square(T);
    }
  };

  template <class S>
  [[nodiscard]] S formula(const S& T) const;
  template <class S>
  [[nodiscard]] S formula_slope(const S& T) const;
  [[nodiscard]] Interval formula_curvature(const Interval& T) const;
  struct Bounds {
    double value;
    double slope;
  };
  [[nodiscard]] Bounds rounding_at(double T) const;
  [[nodiscard]] Interval ln_psat_at(double T) const;
  [[nodiscard]] Interval slope_at(double T) const;
  void check_coefficients() const;
  void choose_range();
  void certify_rising() const;
  void certify_falling_slope();
  [[nodiscard]] Continuation continuation(double end_K) const;

  PressureSet set_;
  Enclosed ln_10_;
  Enclosed ln_reference_;      ///< ln Pc, or ln of one atmosphere
  double falling_to_K_ = 0.0;  ///< dlnP/dT is shown to fall up to here
  Continuation low_;
  Continuation high_;
};

}  // namespace stillshed
