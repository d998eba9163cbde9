/// Outward-rounded intervals: every operation encloses the exact result for all points of its operands.
///
/// Bounds are rounded outward arithmetically: m -> m -+ (|m| * 2.3e-16 + 5e-324). Half a unit in the last place of a
/// double is at most 2^-53 |m| = 1.11e-16 |m|, plus half the smallest denormal, so the step covers the rounding of the
/// operation and of the step itself. No rounding-mode switches; the build uses -ffp-contract=off.
/// exp, log and pow are widened by kElementaryUlp units: the C library promises "a few ulp", and tests measure it.
///
/// There are no empty intervals and no ordering operators. An operation whose result is undefined for some point of its
/// operands (log of a negative number, division by an interval that holds zero, NaN anywhere) returns the whole line:
/// it then excludes nothing. Sets are combined with `intersect`, which says whether anything is left.
///
/// Source    R. E. Moore, R. B. Kearfott, M. J. Cloud, Introduction to Interval Analysis, SIAM 2009 (from memory).
/// Errors    none: unusable operands give the whole line.
#pragma once

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillshed {

/// Widening of elementary functions, units in the last place (the accuracy seen in tests is below 1).
inline constexpr double kElementaryUlp = 4.0;

class Interval {
 public:
  Interval() = default;  ///< not set: arrays of intervals cost nothing to create
  /// Implicit on purpose: a stored double stands for itself, and Jet<Interval, N>(double) must compile.
  constexpr Interval(double value) : lower_(value), upper_(value) {}
  constexpr Interval(double lower, double upper) : lower_(lower), upper_(upper) {}

  [[nodiscard]] constexpr double lower() const { return lower_; }
  [[nodiscard]] constexpr double upper() const { return upper_; }
  [[nodiscard]] double width() const { return upper_ - lower_; }
  /// A double inside the interval (finite when the interval is bounded).
  [[nodiscard]] double mid() const { return lower_ + 0.5 * (upper_ - lower_); }
  [[nodiscard]] double magnitude() const { return std::max(std::abs(lower_), std::abs(upper_)); }
  [[nodiscard]] bool contains(double value) const { return lower_ <= value && value <= upper_; }
  [[nodiscard]] bool contains(const Interval& other) const { return lower_ <= other.lower_ && other.upper_ <= upper_; }
  [[nodiscard]] bool contains_zero() const { return contains(0.0); }
  [[nodiscard]] bool is_bounded() const { return std::isfinite(lower_) && std::isfinite(upper_); }
  [[nodiscard]] bool is_positive() const { return lower_ > 0.0; }
  [[nodiscard]] bool is_negative() const { return upper_ < 0.0; }

  [[nodiscard]] static constexpr Interval whole() {
    return {-std::numeric_limits<double>::infinity(), std::numeric_limits<double>::infinity()};
  }

  Interval& operator+=(const Interval& other);
  Interval& operator-=(const Interval& other);
  Interval& operator*=(const Interval& other);
  Interval& operator/=(const Interval& other);

 private:
  double lower_;
  double upper_;
};

namespace rounding {
inline constexpr double kStep = 2.3e-16;
inline constexpr double kDenormal = std::numeric_limits<double>::denorm_min();
inline double down(double m) {
  return m - (std::abs(m) * kStep + kDenormal);
}
inline double up(double m) {
  return m + (std::abs(m) * kStep + kDenormal);
}
/// From rounded end points to an enclosure; NaN or inverted bounds give the whole line.
inline Interval outward(double lower, double upper) {
  if (!(lower <= upper)) {
    return Interval::whole();
  }
  // An overflowed end point (inf - inf) must not become NaN: it stays unbounded.
  const double lo = std::isinf(lower) ? -std::numeric_limits<double>::infinity() : down(lower);
  const double hi = std::isinf(upper) ? std::numeric_limits<double>::infinity() : up(upper);
  return {lo, hi};
}
inline Interval outward_elementary(double lower, double upper) {
  if (!(lower <= upper)) {
    return Interval::whole();
  }
  constexpr double step = kElementaryUlp * std::numeric_limits<double>::epsilon();
  const double lo =
      std::isinf(lower) ? -std::numeric_limits<double>::infinity() : lower - (std::abs(lower) * step + kDenormal);
  const double hi =
      std::isinf(upper) ? std::numeric_limits<double>::infinity() : upper + (std::abs(upper) * step + kDenormal);
  return {lo, hi};
}
}  // namespace rounding

inline Interval operator-(const Interval& a) {
  return {-a.upper(), -a.lower()};
}
inline Interval operator+(const Interval& a) {
  return a;
}
inline Interval operator+(const Interval& a, const Interval& b) {
  return rounding::outward(a.lower() + b.lower(), a.upper() + b.upper());
}
inline Interval operator-(const Interval& a, const Interval& b) {
  return rounding::outward(a.lower() - b.upper(), a.upper() - b.lower());
}
inline Interval operator*(const Interval& a, const Interval& b) {
  if (a.lower() >= 0.0 && b.lower() >= 0.0) {  // the common case in mole-fraction work
    return rounding::outward(a.lower() * b.lower(), a.upper() * b.upper());
  }
  const double p = a.lower() * b.lower();
  const double q = a.lower() * b.upper();
  const double r = a.upper() * b.lower();
  const double s = a.upper() * b.upper();
  // min/max drop NaN silently, so look at the sum first (0 * inf).
  if (std::isnan(p + q + r + s)) {
    const bool undefined = std::isnan(p) || std::isnan(q) || std::isnan(r) || std::isnan(s);
    if (undefined) {
      return Interval::whole();
    }
  }
  return rounding::outward(std::min(std::min(p, q), std::min(r, s)), std::max(std::max(p, q), std::max(r, s)));
}
inline Interval operator/(const Interval& a, const Interval& b) {
  if (!(b.lower() > 0.0 || b.upper() < 0.0)) {
    return Interval::whole();
  }
  return a * rounding::outward(1.0 / b.upper(), 1.0 / b.lower());
}

inline Interval operator+(const Interval& a, double b) {
  return rounding::outward(a.lower() + b, a.upper() + b);
}
inline Interval operator+(double a, const Interval& b) {
  return b + a;
}
inline Interval operator-(const Interval& a, double b) {
  return rounding::outward(a.lower() - b, a.upper() - b);
}
inline Interval operator-(double a, const Interval& b) {
  return rounding::outward(a - b.upper(), a - b.lower());
}
inline Interval operator*(const Interval& a, double b) {
  return b >= 0.0 ? rounding::outward(a.lower() * b, a.upper() * b) : rounding::outward(a.upper() * b, a.lower() * b);
}
inline Interval operator*(double a, const Interval& b) {
  return b * a;
}
inline Interval operator/(const Interval& a, double b) {
  return a / Interval(b);
}
inline Interval operator/(double a, const Interval& b) {
  if (!(b.lower() > 0.0 || b.upper() < 0.0)) {
    return Interval::whole();
  }
  return a >= 0.0 ? rounding::outward(a / b.upper(), a / b.lower()) : rounding::outward(a / b.lower(), a / b.upper());
}

inline Interval& Interval::operator+=(const Interval& other) {
  return *this = *this + other;
}
inline Interval& Interval::operator-=(const Interval& other) {
  return *this = *this - other;
}
inline Interval& Interval::operator*=(const Interval& other) {
  return *this = *this * other;
}
inline Interval& Interval::operator/=(const Interval& other) {
  return *this = *this / other;
}

inline Interval exp(const Interval& a) {
  const Interval r = rounding::outward_elementary(std::exp(a.lower()), std::exp(a.upper()));
  return {std::max(r.lower(), 0.0), r.upper()};
}
inline Interval log(const Interval& a) {
  if (!(a.lower() > 0.0)) {
    // log(0) is the limit -inf; a negative part or NaN is outside the domain.
    if (a.lower() == 0.0 && a.upper() > 0.0) {
      return {-std::numeric_limits<double>::infinity(),
              rounding::outward_elementary(std::log(a.upper()), std::log(a.upper())).upper()};
    }
    return Interval::whole();
  }
  const Interval r = rounding::outward_elementary(std::log(a.lower()), std::log(a.upper()));
  // Near 1 the error of log is absolute, not relative: |log(1+e)| may be far below one ulp of its argument.
  return {r.lower() - rounding::kDenormal, r.upper() + rounding::kDenormal};
}
inline Interval sqrt(const Interval& a) {
  if (!(a.lower() >= 0.0)) {
    return Interval::whole();
  }
  const Interval r = rounding::outward(std::sqrt(a.lower()), std::sqrt(a.upper()));
  return {std::max(r.lower(), 0.0), r.upper()};
}
inline Interval square(const Interval& a) {
  if (a.lower() >= 0.0 || a.upper() <= 0.0) {
    const Interval r = a * a;
    return {std::max(r.lower(), 0.0), r.upper()};
  }
  if (!a.is_bounded()) {
    return {0.0, std::numeric_limits<double>::infinity()};
  }
  return {0.0, rounding::up(square(Interval(a.magnitude())).upper())};
}
/// a^exponent for a >= 0 and exponent > 0.
inline Interval pow(const Interval& a, double exponent) {
  if (!(a.lower() >= 0.0) || !(exponent > 0.0)) {
    return Interval::whole();
  }
  const Interval r = rounding::outward_elementary(std::pow(a.lower(), exponent), std::pow(a.upper(), exponent));
  return {std::max(r.lower(), 0.0), r.upper()};
}

/// Smallest interval that holds both.
inline Interval hull(const Interval& a, const Interval& b) {
  if (std::isnan(a.lower() + b.lower()) || std::isnan(a.upper() + b.upper())) {
    return Interval::whole();
  }
  return {std::min(a.lower(), b.lower()), std::max(a.upper(), b.upper())};
}
/// Common part of `a` and `b` into `a`; false (and `a` unchanged) when there is none.
[[nodiscard]] inline bool intersect(Interval& a, const Interval& b) {
  const double lower = b.lower() > a.lower() ? b.lower() : a.lower();
  const double upper = b.upper() < a.upper() ? b.upper() : a.upper();
  if (lower > upper) {
    return false;
  }
  a = Interval(lower, upper);
  return true;
}

inline double square(double a) {
  return a * a;
}

/// x ln x, continued by 0 at 0.
inline double xlogx(double x) {
  return x > 0.0 ? x * std::log(x) : 0.0;
}
inline Interval xlogx(const Interval& x) {
  if (!(x.lower() >= 0.0)) {
    return Interval::whole();
  }
  const auto at = [](double v) { return v > 0.0 ? Interval(v) * log(Interval(v)) : Interval(0.0); };
  constexpr double kMinimiser = 0.36787944117144233;  // 1/e, rounded
  Interval result = hull(at(x.lower()), at(x.upper()));
  if (x.lower() <= kMinimiser * (1.0 + 1e-15) && x.upper() >= kMinimiser * (1.0 - 1e-15)) {
    result = {rounding::down(-kMinimiser * (1.0 + 1e-15)), result.upper()};
  }
  return result;
}

}  // namespace stillshed
