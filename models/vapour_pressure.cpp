#include "models/vapour_pressure.hpp"

#include <cmath>
#include <limits>
#include <utility>

#include "params/errors.hpp"

namespace stillshed {
namespace {

constexpr double kAtmosphere_Pa = 101325.0;

template <class S>
S constant_ln(double value) {
  using std::log;
  return log(S(value));
}

/// t^k for the half-integer powers of the Wagner forms.
template <class S>
S power(const S& t, double k) {
  using std::pow;
  return pow(t, k);
}

struct Term {
  double coefficient;
  double exponent;
};

/// Terms of the Wagner polynomial of a set, by form.
std::array<Term, 6> wagner_terms(const PressureSet& set, int& count) {
  const auto& c = set.coefficients;
  switch (set.form) {
    case PressureForm::wagner_25:
      count = 4;
      return {{{c[0], 1.0}, {c[1], 1.5}, {c[2], 2.5}, {c[3], 5.0}, {0, 1}, {0, 1}}};
    case PressureForm::wagner_36:
      count = 4;
      return {{{c[0], 1.0}, {c[1], 1.5}, {c[2], 3.0}, {c[3], 6.0}, {0, 1}, {0, 1}}};
    default: count = 6; return {{{c[0], 1.0}, {c[1], 1.5}, {c[2], 3.0}, {c[3], 3.5}, {c[4], 4.0}, {c[5], 7.5}}};
  }
}

std::pair<double, double> wagner_critical(const PressureSet& set) {
  const std::size_t at = set.form == PressureForm::wagner_water ? 6 : 4;
  return {set.coefficients[at], set.coefficients[at + 1]};
}

}  // namespace

template <class S>
S PressureCurve::formula(const S& T) const {
  using std::log;
  const auto& c = set_.coefficients;
  switch (set_.form) {
    case PressureForm::antoine_log10: return (c[0] - c[1] / (T + c[2])) * constant_ln<S>(10.0);
    case PressureForm::perry_101: {
      const S last = c[3] * power(T, c[4]);
      return c[0] + c[1] / T + c[2] * log(T) + last;
    }
    case PressureForm::clausius_clapeyron: return constant_ln<S>(kAtmosphere_Pa) + c[1] * (1.0 / S(c[0]) - 1.0 / T);
    case PressureForm::wagner_25:
    case PressureForm::wagner_36:
    case PressureForm::wagner_water: break;
  }
  const auto [Tc, Pc] = wagner_critical(set_);
  const S t = 1.0 - T / Tc;
  int count = 0;
  const auto terms = wagner_terms(set_, count);
  S sum(0.0);
  for (int k = 0; k < count; ++k) {
    const Term& term = terms[static_cast<std::size_t>(k)];
    sum += term.coefficient * power(t, term.exponent);
  }
  return (Tc / T) * sum + constant_ln<S>(Pc);
}

template <class S>
S PressureCurve::formula_slope(const S& T) const {
  using std::log;
  const auto& c = set_.coefficients;
  switch (set_.form) {
    case PressureForm::antoine_log10: {
      const S reach = T + c[2];
      return c[1] * constant_ln<S>(10.0) / (reach * reach);
    }
    case PressureForm::perry_101: {
      const S power_term = (c[3] * S(c[4])) * power(T, c[4]);
      return (c[2] - c[1] / T + power_term) / T;
    }
    case PressureForm::clausius_clapeyron: return c[1] / (T * T);
    case PressureForm::wagner_25:
    case PressureForm::wagner_36:
    case PressureForm::wagner_water: break;
  }
  // d/dT [(Tc/T) w(t)] = -[(Tc/T) w + w'] / T, written with (Tc/T) w + w' = sum c t^(k-1) (t Tc/T + k).
  const auto [Tc, Pc] = wagner_critical(set_);
  static_cast<void>(Pc);
  const S t = 1.0 - T / Tc;
  int count = 0;
  const auto terms = wagner_terms(set_, count);
  const S reduced = Tc / T - 1.0;  // t Tc / T
  S sum(0.0);
  for (int k = 0; k < count; ++k) {
    const Term& term = terms[static_cast<std::size_t>(k)];
    const S factor = reduced + term.exponent;
    sum +=
        term.exponent == 1.0 ? term.coefficient * factor : term.coefficient * (power(t, term.exponent - 1.0) * factor);
  }
  return -sum / T;
}

PressureCurve::PressureCurve(PressureSet set) : set_(std::move(set)) {
  constexpr double infinity = std::numeric_limits<double>::infinity();
  low_K_ = set_.t_min_K.value_or(0.0);
  high_K_ = set_.t_max_K.value_or(infinity);
  if (set_.form == PressureForm::wagner_25 || set_.form == PressureForm::wagner_36 ||
      set_.form == PressureForm::wagner_water) {
    // t = 0 is the critical point; the slope of t^1.5 is still finite there, t itself must not go negative.
    high_K_ = std::min(high_K_, wagner_critical(set_).first);
  }
  if (low_K_ > 0.0 || std::isfinite(high_K_)) {
    certify();
  } else if (set_.form != PressureForm::clausius_clapeyron || !(set_.coefficients[1] > 0.0) ||
             !(set_.coefficients[0] > 0.0)) {
    throw InputError(Problem{set_.id.empty() ? "vapour pressure" : set_.id, "no temperature range",
                             "a range for every form but clausius-clapeyron with positive boiling_point_K and H_K",
                             "give t_min_K and t_max_K"});
  }
  if (low_K_ > 0.0) {
    low_ln_p_ = formula(low_K_);
    low_H_K_ = formula_slope(low_K_) * low_K_ * low_K_;
  }
  if (std::isfinite(high_K_)) {
    high_ln_p_ = formula(high_K_);
    high_H_K_ = formula_slope(high_K_) * high_K_ * high_K_;
  }
}

void PressureCurve::certify() const {
  const double low = low_K_ > 0.0 ? low_K_ : 1.0;
  const double high = std::isfinite(high_K_) ? high_K_ : 10.0 * low;
  if (!(low < high)) {
    throw InputError(Problem{set_.id, "temperature range " + std::to_string(low) + " to " + std::to_string(high) + " K",
                             "a lower end below the upper end", "check the record"});
  }
  // Bisect until every piece has a slope enclosure above zero; a piece narrower than 1 mK is a failure.
  std::array<std::pair<double, double>, 128> stack;
  std::size_t depth = 0;
  stack[depth++] = {low, high};
  while (depth > 0) {
    const auto [a, b] = stack[--depth];
    if (formula_slope(Interval(a, b)).is_positive()) {
      continue;
    }
    const double middle = 0.5 * (a + b);
    if (b - a < 1e-3 || depth + 2 > stack.size()) {
      throw InputError(Problem{set_.id, "vapour pressure that does not rise near " + std::to_string(middle) + " K",
                               "a curve that rises over its whole range", "check coefficients, units and range"});
    }
    stack[depth++] = {a, middle};
    stack[depth++] = {middle, b};
  }
}

bool PressureCurve::covers(double temperature_K) const {
  return (!set_.t_min_K || temperature_K >= *set_.t_min_K) && (!set_.t_max_K || temperature_K <= *set_.t_max_K);
}

double PressureCurve::ln_psat(double T) const {
  if (T < low_K_) {
    return low_ln_p_ + low_H_K_ * (1.0 / low_K_ - 1.0 / T);
  }
  if (T > high_K_) {
    return high_ln_p_ + high_H_K_ * (1.0 / high_K_ - 1.0 / T);
  }
  return formula(T);
}

double PressureCurve::d_ln_psat_dT(double T) const {
  if (T < low_K_) {
    return low_H_K_ / (T * T);
  }
  if (T > high_K_) {
    return high_H_K_ / (T * T);
  }
  return formula_slope(T);
}

Interval PressureCurve::ln_psat(const Interval& T) const {
  if (!(T.lower() > 0.0) || !std::isfinite(T.upper())) {
    return Interval::whole();
  }
  const auto at = [this](double t) {
    if (t < low_K_) {
      return low_ln_p_ + low_H_K_ * (1.0 / Interval(low_K_) - 1.0 / Interval(t));
    }
    if (t > high_K_) {
      return high_ln_p_ + high_H_K_ * (1.0 / Interval(high_K_) - 1.0 / Interval(t));
    }
    return formula(Interval(t));
  };
  // Rising everywhere (certified), so the end points enclose. The continuation starts at a rounded value of the
  // formula: widen by that rounding so that both sides of the joint are covered.
  const Interval low = at(T.lower());
  const Interval high = at(T.upper());
  const double joint =
      64.0 * std::numeric_limits<double>::epsilon() * (1.0 + std::max(low.magnitude(), high.magnitude()));
  return {low.lower() - joint, high.upper() + joint};
}

Interval PressureCurve::d_ln_psat_dT(const Interval& T) const {
  if (!(T.lower() > 0.0) || !std::isfinite(T.upper())) {
    return Interval::whole();
  }
  bool any = false;
  Interval result;
  const auto add = [&](const Interval& piece) {
    result = any ? hull(result, piece) : piece;
    any = true;
  };
  if (T.lower() < low_K_) {
    const Interval part(T.lower(), std::min(T.upper(), low_K_));
    add(low_H_K_ / (part * part));
  }
  if (T.upper() > high_K_) {
    const Interval part(std::max(T.lower(), high_K_), T.upper());
    add(high_H_K_ / (part * part));
  }
  Interval inside = T;
  if (intersect(inside, Interval(low_K_, high_K_))) {
    add(formula_slope(inside));
  }
  return result;
}

double PressureCurve::boiling_point_K(double pressure_Pa) const {
  const double target = std::log(pressure_Pa);
  // Newton in 1/T, where ln P is nearly a line; rising everywhere, so it cannot leave for good.
  double T = low_K_ > 0.0 && std::isfinite(high_K_) ? 0.5 * (low_K_ + high_K_) : 350.0;
  double below = 0.0;
  double above = std::numeric_limits<double>::infinity();
  for (int step = 0; step < 100; ++step) {
    const double miss = ln_psat(T) - target;
    (miss > 0.0 ? above : below) = T;
    const double slope_in_inverse = -d_ln_psat_dT(T) * T * T;
    double next = 1.0 / (1.0 / T - miss / slope_in_inverse);
    if (!(next > below) || !(next < above)) {
      next = std::isfinite(above) ? 0.5 * (below + above) : 2.0 * T;
    }
    if (std::abs(next - T) <= 4e-16 * T) {
      return next;
    }
    T = next;
  }
  return T;
}

Interval PressureCurve::temperature_at(const Interval& ln_pressure) const {
  // Widen a double solution until the enclosure of ln P at the end lies beyond the target: proved by monotonicity.
  const auto bound = [this](double target, double side) {
    if (!std::isfinite(target)) {
      return side < 0.0 ? 0.0 : std::numeric_limits<double>::infinity();
    }
    double step = 1e-14;
    const double T = boiling_point_K(std::exp(target));
    for (int k = 0; k < 40; ++k) {
      const double candidate = T * (1.0 + side * step);
      const Interval value = ln_psat(Interval(candidate));
      if (side < 0.0 ? value.upper() <= target : value.lower() >= target) {
        return candidate;
      }
      step *= 4.0;
    }
    return side < 0.0 ? 0.0 : std::numeric_limits<double>::infinity();
  };
  return {bound(ln_pressure.lower(), -1.0), bound(ln_pressure.upper(), 1.0)};
}

}  // namespace stillshed
