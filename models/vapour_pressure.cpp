#include "models/vapour_pressure.hpp"

#include <cmath>
#include <limits>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "models/wagner.hpp"
#include "params/errors.hpp"

namespace stillshed {
namespace {

constexpr double kAtmosphere_Pa = 101325.0;
constexpr double kInfinity = std::numeric_limits<double>::infinity();

std::size_t coefficient_count(PressureForm form) {
  switch (form) {
    case PressureForm::antoine_log10: return 3;
    case PressureForm::perry_101: return 5;
    case PressureForm::clausius_clapeyron: return 2;
    default: return wagner_terms(form).size() + 2;
  }
}

/// T^k for any real k, T > 0.
template <class S>
S real_power(const S& T, double k) {
  using std::exp;
  using std::log;
  return k >= 0.0 && k == std::floor(k) && k <= 8.0 ? half_power(T, k) : exp(k * log(T));
}

Enclosed ln_of(double value) {
  return {std::log(value), log(Interval(value))};
}

std::string name_of(const PressureSet& set) {
  return set.id.empty() ? "vapour pressure" : set.id;
}

}  // namespace

template <class S>
S PressureCurve::formula(const S& T) const {
  using std::log;
  const auto& c = set_.coefficients;
  switch (set_.form) {
    case PressureForm::antoine_log10: return (c[0] - c[1] / (T + c[2])) * constant<S>(ln_10_);
    case PressureForm::perry_101: return c[0] + c[1] / T + c[2] * log(T) + c[3] * real_power(T, c[4]);
    case PressureForm::clausius_clapeyron: return constant<S>(ln_reference_) + c[1] * (1.0 / S(c[0]) - 1.0 / T);
    default: break;
  }
  const double Tc = critical_K(set_);
  const S t = reduced(T, Tc);
  S sum(0.0);
  for (const WagnerTerm& term : wagner_terms(set_.form)) {
    sum += c[term.coefficient] * half_power(t, term.exponent);
  }
  return (Tc / T) * sum + constant<S>(ln_reference_);
}

template <class S>
S PressureCurve::formula_slope(const S& T) const {
  const auto& c = set_.coefficients;
  switch (set_.form) {
    case PressureForm::antoine_log10: return c[1] * constant<S>(ln_10_) / square(T + c[2]);
    case PressureForm::perry_101: return (c[2] - c[1] / T + (c[3] * S(c[4])) * real_power(T, c[4])) / T;
    case PressureForm::clausius_clapeyron: return c[1] / square(T);
    default: break;
  }
  // T^2/Tc dlnP/dT = -sum c [k t^(k-1) - (k-1) t^k]
  const double Tc = critical_K(set_);
  const S t = reduced(T, Tc);
  S sum(0.0);
  for (const WagnerTerm& term : wagner_terms(set_.form)) {
    sum += c[term.coefficient] * wagner_bracket(t, term.exponent);
  }
  return -(Tc * sum) / square(T);
}

Interval PressureCurve::formula_curvature(const Interval& T) const {
  const auto& c = set_.coefficients;
  switch (set_.form) {
    case PressureForm::antoine_log10: {
      const Interval reach = T + c[2];
      return (-2.0 * c[1]) * ln_10_.range / (square(reach) * reach);
    }
    case PressureForm::perry_101: {
      const Interval last = (Interval(c[3]) * c[4]) * ((Interval(c[4]) - 1.0) * real_power(T, c[4]));
      return (Interval(2.0) * c[1] / T - c[2] + last) / square(T);
    }
    case PressureForm::clausius_clapeyron: return (-2.0 * c[1]) / (square(T) * T);
    default: break;
  }
  // With z = T/Tc and lnP = f(t)/z + const: d2lnP/dz2 = f''/z + 2 f'/z^2 + 2 f/z^3.
  const double Tc = critical_K(set_);
  const Interval t = reduced(T, Tc);
  const Interval z = T / Tc;
  Interval sum(0.0);
  for (const WagnerTerm& term : wagner_terms(set_.form)) {
    const double k = term.exponent;
    Interval part = 2.0 * half_power(t, k) + (2.0 * k) * (half_power(t, k - 1.0) * z);
    if (k > 1.0) {
      const Interval bend = k >= 2.0 ? half_power(t, k - 2.0) : 1.0 / sqrt(t);
      part += (k * (k - 1.0)) * (bend * square(z));
    }
    sum += c[term.coefficient] * part;
  }
  return sum / (square(z) * z) / square(Interval(Tc));
}

PressureCurve::PressureCurve(PressureSet set) : set_(std::move(set)) {
  check_coefficients();
  ln_10_ = ln_of(10.0);
  ln_reference_ = ln_of(is_wagner(set_.form) ? critical_Pa(set_) : kAtmosphere_Pa);
  choose_range();
  certify_rising();
  certify_falling_slope();
  const double low_K = low_.end_K;
  const double high_K = high_.end_K;
  low_ = continuation(low_K);
  high_ = continuation(high_K);
}

void PressureCurve::check_coefficients() const {
  std::vector<Problem> problems;
  for (std::size_t k = 0; k < coefficient_count(set_.form); ++k) {
    if (!std::isfinite(set_.coefficients[k])) {
      problems.push_back({name_of(set_), "coefficient " + std::to_string(k) + " that is not a finite number",
                          "finite numbers", "check the record"});
    }
  }
  if (is_wagner(set_.form) && !(critical_K(set_) > 0.0 && critical_Pa(set_) > 0.0)) {
    problems.push_back({name_of(set_), "critical constants that are not positive", "Tc_K > 0 and Pc_Pa > 0", ""});
  }
  if (set_.form == PressureForm::clausius_clapeyron && !(set_.coefficients[0] > 0.0 && set_.coefficients[1] > 0.0)) {
    problems.push_back({name_of(set_), "constants that are not positive", "boiling_point_K > 0 and H_K > 0", ""});
  }
  if (set_.form == PressureForm::perry_101 && (!set_.t_min_K || !set_.t_max_K)) {
    problems.push_back({name_of(set_), "no temperature range", "t_min_K and t_max_K: the form holds in a range only",
                        "give the range of the source"});
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
}

/// Where the formula is used. A set without a stated range keeps to where its form makes sense: Antoine from the
/// temperature of 1 mPa (well above its pole) on, Wagner from 0.3 Tc to Tc.
void PressureCurve::choose_range() {
  const auto& c = set_.coefficients;
  double low = 1.0;
  double high = 1e4;
  if (set_.form == PressureForm::antoine_log10) {
    constexpr double kLogOfMillipascal = -3.0;
    low = std::max(low, c[1] / (c[0] - kLogOfMillipascal) - c[2]);
  } else if (is_wagner(set_.form)) {
    low = 0.3 * critical_K(set_);
    high = critical_K(set_);
  }
  low = set_.t_min_K.value_or(low);
  high = std::min(set_.t_max_K.value_or(high), is_wagner(set_.form) ? critical_K(set_) : kInfinity);
  if (!(low > 0.0) || !(low < high) || !std::isfinite(high)) {
    throw InputError(Problem{name_of(set_),
                             "temperature range " + std::to_string(low) + " to " + std::to_string(high) + " K",
                             "a positive lower end below a finite upper end", "check the record"});
  }
  low_.end_K = low;
  high_.end_K = high;
}

/// Bisects the range until every piece has a slope enclosure above zero.
void PressureCurve::certify_rising() const {
  constexpr double kNarrowest_K = 1e-3;
  std::vector<Interval> pieces{Interval(low_.end_K, high_.end_K)};
  while (!pieces.empty()) {
    const Interval piece = pieces.back();
    pieces.pop_back();
    if (formula_slope(piece).is_positive()) {
      continue;
    }
    if (piece.width() < kNarrowest_K) {
      throw InputError(Problem{name_of(set_),
                               "a vapour pressure that does not rise near " + std::to_string(piece.mid()) + " K",
                               "a curve that rises over its whole range", "check coefficients, units and range"});
    }
    pieces.emplace_back(piece.lower(), piece.mid());
    pieces.emplace_back(piece.mid(), piece.upper());
  }
}

/// Walks up the range in steps whose curvature enclosure is below zero; halves the step where it is not.
void PressureCurve::certify_falling_slope() {
  const double high = high_.end_K;
  double at = low_.end_K;
  double step = 0.25 * (high - at);
  while (at < high && step > 1e-3 * (high - low_.end_K)) {
    const double next = std::min(at + step, high);
    if (formula_curvature(Interval(at, next)).is_negative()) {
      at = next;
    } else {
      step *= 0.5;
    }
  }
  falling_to_K_ = at;
}

PressureCurve::Continuation PressureCurve::continuation(double end_K) const {
  const Interval exact(end_K);
  Continuation line;
  line.end_K = end_K;
  line.inverse_end = {1.0 / end_K, 1.0 / exact};
  line.ln_p = {formula(end_K), formula(exact)};
  line.H_K = {formula_slope(end_K) * end_K * end_K, formula_slope(exact) * square(exact)};
  return line;
}

bool PressureCurve::covers(double temperature_K) const {
  return (!set_.t_min_K || temperature_K >= *set_.t_min_K) && (!set_.t_max_K || temperature_K <= *set_.t_max_K);
}

/// Bounds of |computed - exact| for formula(T) and formula_slope(T) in double, T in the range: 2^-52 times, for every
/// term, its size and the number of roundings that went into it, counted generously (each is 2^-53).
PressureCurve::Bounds PressureCurve::rounding_at(double T) const {
  constexpr double kUnit = std::numeric_limits<double>::epsilon();
  const auto& c = set_.coefficients;
  const auto size = [](double value) { return std::abs(value); };
  switch (set_.form) {
    case PressureForm::antoine_log10: {
      const double reach = size(T + c[2]);
      return {8.0 * kUnit * 2.31 * (size(c[0]) + size(c[1]) / reach), 8.0 * kUnit * 2.31 * size(c[1]) / square(reach)};
    }
    case PressureForm::perry_101: {
      const double growth = 10.0 + 2.0 * size(c[4]) * (1.0 + size(std::log(T)));  // of the error in T^C5
      const double power = growth * size(c[3]) * real_power(T, c[4]);
      const double rest = size(c[1]) / T;
      return {kUnit * (8.0 * (size(c[0]) + rest + size(c[2] * std::log(T))) + power),
              kUnit * (8.0 * (size(c[2]) + rest) + (2.0 + size(c[4])) * power) / T};
    }
    case PressureForm::clausius_clapeyron:
      return {8.0 * kUnit * (12.0 + c[1] * (1.0 / c[0] + 1.0 / T)), 8.0 * kUnit * c[1] / square(T)};
    default: break;
  }
  // t carries an absolute error of 2^-53, which the slopes of t^k (at most k) and of the bracket pass on; the latter,
  // k (k - 1) t^(k - 2) (1 - t), grows like 0.75 t^-0.5 towards Tc, where the bracket changes by less than 1.5 2^-26.5.
  double value = 0.0;
  double slope = 0.0;
  const double Tc = critical_K(set_);
  const double t = std::max(reduced(T, Tc), 1e-16);
  for (const WagnerTerm& term : wagner_terms(set_.form)) {
    const double k = term.exponent;
    value += size(c[term.coefficient]) * (k + 10.0);
    slope += size(c[term.coefficient]) * (k * (k + 10.0) + 1.0 / std::sqrt(t));
  }
  return {kUnit * (Tc / T * value + 4.0 * size(ln_reference_.value)), kUnit * Tc / square(T) * slope};
}

double PressureCurve::ln_psat(double T) const {
  return T < low_.end_K ? low_.value(T) : T > high_.end_K ? high_.value(T) : formula(T);
}
double PressureCurve::d_ln_psat_dT(double T) const {
  return T < low_.end_K ? low_.slope(T) : T > high_.end_K ? high_.slope(T) : formula_slope(T);
}

/// Enclosures at one temperature: inside the range the double result and its rounding bound, several times cheaper than
/// the formula in intervals.
Interval PressureCurve::ln_psat_at(double T) const {
  if (T < low_.end_K || T > high_.end_K) {
    return (T < low_.end_K ? low_ : high_).value(Interval(T));
  }
  const double value = formula(T);
  const double room = rounding_at(T).value;
  return Interval::outward(value - room, value + room);
}
Interval PressureCurve::slope_at(double T) const {
  if (T < low_.end_K || T > high_.end_K) {
    return (T < low_.end_K ? low_ : high_).slope(Interval(T));
  }
  const double slope = formula_slope(T);
  const double room = rounding_at(T).slope;
  return Interval::outward(slope - room, slope + room);
}

Interval PressureCurve::ln_psat(const Interval& T) const {
  if (!T.is_positive() || !T.is_bounded()) {
    return Interval::whole();
  }
  return {ln_psat_at(T.lower()).lower(), ln_psat_at(T.upper()).upper()};
}

Interval PressureCurve::d_ln_psat_dT(const Interval& T) const {
  if (!T.is_positive() || !T.is_bounded()) {
    return Interval::whole();
  }
  // Falling from the low continuation through the range up to falling_to_K_: end points enclose.
  if (T.upper() <= falling_to_K_ || falling_to_K_ == high_.end_K) {
    return {slope_at(T.upper()).lower(), slope_at(T.lower()).upper()};
  }
  std::optional<Interval> result;
  const auto add = [&result](const Interval& piece) { result = result ? hull(*result, piece) : piece; };
  if (T.lower() < falling_to_K_) {
    add({slope_at(falling_to_K_).lower(), slope_at(T.lower()).upper()});
  }
  Interval inside = T;
  if (intersect(inside, Interval(falling_to_K_, high_.end_K))) {
    add(formula_slope(inside));
  }
  if (T.upper() > high_.end_K) {
    add(high_.slope(Interval(std::max(T.lower(), high_.end_K), T.upper())));
  }
  return *result;
}

double PressureCurve::boiling_point_K(double pressure_Pa) const {
  if (!(pressure_Pa > 0.0)) {
    return pressure_Pa == 0.0 ? 0.0 : std::numeric_limits<double>::quiet_NaN();
  }
  const double target = std::log(pressure_Pa);
  if (target >= high_.ln_p.value + high_.H_K.value * high_.inverse_end.value) {
    return kInfinity;
  }
  // Newton in 1/T, where ln P is nearly a line, kept between bounds that close in on the root.
  double below = 0.0;
  double above = kInfinity;
  double T = std::min(std::max(350.0, low_.end_K), high_.end_K);
  for (int step = 0; step < 200; ++step) {
    const double miss = ln_psat(T) - target;
    (miss > 0.0 ? above : below) = T;
    double next = 1.0 / (1.0 / T + miss / (d_ln_psat_dT(T) * T * T));
    if (!(next > below) || !(next < above)) {
      next = std::isfinite(above) ? 0.5 * (below + above) : 2.0 * T;
    }
    if (std::abs(next - T) <= 2e-16 * T) {
      return next;
    }
    T = next;
  }
  return T;
}

Interval PressureCurve::temperature_at(const Interval& ln_pressure) const {
  // Widen a double solution until the enclosure of ln P at the end lies beyond the target: proved by monotonicity.
  const auto bound = [this](double target, double side) {
    const double unknown = side < 0.0 ? 0.0 : kInfinity;
    const double T = boiling_point_K(std::exp(target));
    if (!std::isfinite(target) || !std::isfinite(T)) {
      return unknown;
    }
    double step = 1e-15;
    for (int k = 0; k < 60; ++k) {
      const double candidate = T * (1.0 + side * step);
      const Interval value = ln_psat(Interval(candidate));
      if (side < 0.0 ? value.upper() <= target : value.lower() >= target) {
        return candidate;
      }
      step *= 2.0;
    }
    return unknown;
  };
  return {bound(ln_pressure.lower(), -1.0), bound(ln_pressure.upper(), 1.0)};
}

}  // namespace stillshed
