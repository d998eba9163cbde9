/// Terms of the Wagner vapour-pressure equations, ln(P/Pc) = (Tc/T) sum_k c_k t^k, t = 1 - T/Tc.
///
///   wagner_25     k = 1, 1.5, 2.5, 5
///   wagner_36     k = 1, 1.5, 3, 6
///   wagner_water  k = 1, 1.5, 3, 3.5, 4, 7.5
///
/// Numbers   double and Interval. Used by models/vapour_pressure.cpp.
#pragma once

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <span>

#include "models/interval.hpp"
#include "params/records.hpp"

namespace stillshed {

/// One power of t and where its coefficient stands.
struct WagnerTerm {
  double exponent;
  std::size_t coefficient;  ///< index in PressureSet::coefficients
};
inline constexpr std::array<WagnerTerm, 4> kWagner25{{{1.0, 0}, {1.5, 1}, {2.5, 2}, {5.0, 3}}};
inline constexpr std::array<WagnerTerm, 4> kWagner36{{{1.0, 0}, {1.5, 1}, {3.0, 2}, {6.0, 3}}};
inline constexpr std::array<WagnerTerm, 6> kWagnerWater{{{1.0, 0}, {1.5, 1}, {3.0, 2}, {3.5, 3}, {4.0, 4}, {7.5, 5}}};

/// Terms of a form; none when it is not a Wagner equation.
inline std::span<const WagnerTerm> wagner_terms(PressureForm form) {
  switch (form) {
    case PressureForm::wagner_25: return kWagner25;
    case PressureForm::wagner_36: return kWagner36;
    case PressureForm::wagner_water: return kWagnerWater;
    default: return {};
  }
}
inline bool is_wagner(PressureForm form) {
  return !wagner_terms(form).empty();
}
/// Tc [K] and Pc [Pa] belong to the fit; they follow the coefficients.
inline double critical_K(const PressureSet& set) {
  return set.coefficients[wagner_terms(set.form).size()];
}
inline double critical_Pa(const PressureSet& set) {
  return set.coefficients[wagner_terms(set.form).size() + 1];
}

/// z^k for a whole or half-odd k >= 0: products and one square root, much cheaper than pow.
template <class S>
S half_power(const S& z, double k) {
  using std::sqrt;
  const int whole = static_cast<int>(k);
  S result = k > whole ? sqrt(z) : S(1.0);
  for (int i = 0; i < whole; ++i) {
    result = result * z;
  }
  return result;
}

/// t = 1 - T/Tc; never negative, because the range of the formula ends at Tc.
inline double reduced(double T, double Tc) {
  return 1.0 - T / Tc;
}
inline Interval reduced(const Interval& T, double Tc) {
  return (1.0 - T / Tc).not_negative();
}

/// k t^(k-1) - (k-1) t^k for t in [0, 1]: rises with t, so the end points of an interval enclose it.
inline double wagner_bracket(double t, double k) {
  return half_power(t, k - 1.0) * (1.0 + (k - 1.0) * (1.0 - t));
}
inline Interval wagner_bracket(const Interval& t, double k) {
  const auto at = [k](double end) {
    return half_power(Interval(end), k - 1.0) * (1.0 + (k - 1.0) * (1.0 - Interval(end)));
  };
  return {at(t.lower()).lower(), at(std::min(t.upper(), 1.0)).upper()};
}

}  // namespace stillshed
