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
/// there (ln P linear in 1/T): no pole, rising everywhere. A result that used it is marked as stretched.
///
/// Symbols   T [K], P [Pa]. Sources: params/sources.json, key in the set.
/// Numbers   double, Interval, and Jets of both (chain rule: the only place where a model looks at a value of T).
/// Proof     the curve is certified to rise over its range once, at construction, by interval evaluation of dlnP/dT;
///           an Interval argument is then enclosed by its end points.
/// Errors    construction throws InputError when the set does not rise over its range.
#pragma once

#include <ceres/jet.h>

#include "models/interval.hpp"
#include "models/jet_interval.hpp"
#include "params/records.hpp"

namespace stillshed {

class PressureCurve {
 public:
  PressureCurve() = default;
  explicit PressureCurve(PressureSet set);

  [[nodiscard]] const PressureSet& set() const { return set_; }
  /// True when the published range (if any) holds this temperature.
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

  /// Temperature at which P is the vapour pressure [K].
  [[nodiscard]] double boiling_point_K(double pressure_Pa) const;
  /// Encloses every T with ln P(T) in this interval.
  [[nodiscard]] Interval temperature_at(const Interval& ln_pressure) const;

 private:
  template <class S>
  [[nodiscard]] S formula(const S& T) const;
  template <class S>
  [[nodiscard]] S formula_slope(const S& T) const;
  void certify() const;

  PressureSet set_;
  double low_K_ = 0.0;  ///< range of the formula
  double high_K_ = 0.0;
  double low_ln_p_ = 0.0, low_H_K_ = 0.0;    ///< continuation below: ln P = low_ln_p + low_H (1/low - 1/T)
  double high_ln_p_ = 0.0, high_H_K_ = 0.0;  ///< continuation above
};

}  // namespace stillshed
