#include "params/pressure_check.hpp"

#include <cmath>

namespace stillshed {
namespace {

/// (Tc/T) times the weighted powers of 1 - T/Tc that the three Wagner forms share.
double wagner(const PressureSet& set, double T, std::initializer_list<double> powers) {
  const std::size_t terms = powers.size();
  const double Tc = set.coefficients[terms];
  const double Pc = set.coefficients[terms + 1];
  const double t = std::max(1.0 - T / Tc, 0.0);
  double sum = 0.0;
  std::size_t k = 0;
  for (const double power : powers) {
    sum += set.coefficients[k] * std::pow(t, power);
    ++k;
  }
  return std::log(Pc) + Tc / T * sum;
}

}  // namespace

double plain_ln_pressure(const PressureSet& set, double T) {
  const auto& c = set.coefficients;
  constexpr double kAtmosphere_Pa = 101325.0;
  switch (set.form) {
    case PressureForm::antoine_log10: return std::log(10.0) * (c[0] - c[1] / (T + c[2]));
    case PressureForm::wagner_25: return wagner(set, T, {1.0, 1.5, 2.5, 5.0});
    case PressureForm::wagner_36: return wagner(set, T, {1.0, 1.5, 3.0, 6.0});
    case PressureForm::wagner_water: return wagner(set, T, {1.0, 1.5, 3.0, 3.5, 4.0, 7.5});
    case PressureForm::perry_101: return c[0] + c[1] / T + c[2] * std::log(T) + c[3] * std::pow(T, c[4]);
    case PressureForm::clausius_clapeyron: return std::log(kAtmosphere_Pa) + c[1] * (1.0 / c[0] - 1.0 / T);
  }
  return std::nan("");
}

std::optional<double> boiling_point_in_range_K(const PressureSet& set, double pressure_Pa) {
  if (!set.t_min_K || !set.t_max_K) {
    return std::nullopt;
  }
  const double wanted = std::log(pressure_Pa);
  double low = *set.t_min_K;
  double high = *set.t_max_K;
  if (!(plain_ln_pressure(set, low) <= wanted && wanted <= plain_ln_pressure(set, high))) {
    return std::nullopt;
  }
  constexpr int kHalvings = 60;  // far below 1e-9 K from any range in use
  for (int k = 0; k < kHalvings; ++k) {
    const double middle = 0.5 * (low + high);
    (plain_ln_pressure(set, middle) < wanted ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

std::optional<double> falls_at_K(const PressureSet& set) {
  if (!set.t_min_K || !set.t_max_K) {
    return std::nullopt;
  }
  constexpr int kSteps = 400;
  double before = plain_ln_pressure(set, *set.t_min_K);
  if (!std::isfinite(before)) {
    return *set.t_min_K;
  }
  for (int k = 1; k <= kSteps; ++k) {
    const double T = *set.t_min_K + (*set.t_max_K - *set.t_min_K) * k / kSteps;
    const double now = plain_ln_pressure(set, T);
    if (!(now > before)) {
      return T;
    }
    before = now;
  }
  return std::nullopt;
}

}  // namespace stillshed
