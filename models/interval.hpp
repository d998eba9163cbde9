/// Outward-rounded intervals: every operation encloses the exact result for all points of its operands.
///
/// Rounding   A computed end point m becomes m -+ (|m| * 2.3e-16 + 1e-300). The rounding of the operation and that of
/// the
///            step itself are at most 2^-53 |m| = 1.11e-16 |m| each (plus a denormal where m underflows), so the step
///            covers both. The guard is a normal number: a bound of 5e-324 would drag every later product into slow
///            denormal arithmetic. No rounding-mode switches; the build uses -ffp-contract=off. exp, log and pow are
///            widened by kElementaryUlp units: the C library promises "a few ulp", and the tests measure it.
/// No verdict An Interval is never empty and never holds a NaN: lower <= upper, lower < inf, upper > -inf always.
///            Operands that say nothing (NaN, bounds in the wrong order), and operations undefined at some point of
///            their operands (log of a negative number, division by an interval that holds zero, overflow), give the
///            whole line, which excludes nothing. Only `intersect` can find that nothing is left, and it says so apart.
/// Order      no <, >, ==: a model that branches on an Interval does not compile. Questions have names.
///
/// Source     R. E. Moore, R. B. Kearfott, M. J. Cloud, Introduction to Interval Analysis, SIAM 2009 (from memory).
/// Errors     none.
/// Tests      tests/models/interval_test.cpp (millions of operations against MPFI, 200 bits).
#pragma once

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillshed {

/// Widening of exp, log and pow, units in the last place (below 1 as measured by the tests).
inline constexpr double kElementaryUlp = 4.0;

class Interval {
 public:
  constexpr Interval() = default;
  // Implicit on purpose: ceres::Jet<Interval, N> is built from a double through it. A double is a point.
  constexpr Interval(double value) : Interval(value, value) {}  // NOLINT(google-explicit-constructor)
  constexpr Interval(double lower, double upper) : lower_(lower), upper_(upper) {
    if (!(lower <= upper) || !(lower < kInfinity) || !(upper > -kInfinity)) {
      lower_ = -kInfinity;
      upper_ = kInfinity;
    }
  }
  [[nodiscard]] static constexpr Interval whole() { return Interval(-kInfinity, kInfinity, Ordered{}); }

  [[nodiscard]] constexpr double lower() const { return lower_; }
  [[nodiscard]] constexpr double upper() const { return upper_; }
  /// Length; infinite when unbounded.
  [[nodiscard]] double width() const { return upper_ - lower_; }
  /// A finite double inside the interval.
  [[nodiscard]] double mid() const {
    if (is_bounded()) {
      const double middle = lower_ + 0.5 * (upper_ - lower_);
      return std::isfinite(middle) ? std::clamp(middle, lower_, upper_) : 0.5 * lower_ + 0.5 * upper_;
    }
    return std::clamp(0.0, std::max(lower_, -std::numeric_limits<double>::max()),
                      std::min(upper_, std::numeric_limits<double>::max()));
  }
  /// Largest |value|.
  [[nodiscard]] double magnitude() const { return std::max(-lower_, upper_); }
  [[nodiscard]] bool contains(double value) const { return lower_ <= value && value <= upper_; }
  [[nodiscard]] bool contains(const Interval& other) const { return lower_ <= other.lower_ && other.upper_ <= upper_; }
  [[nodiscard]] bool contains_zero() const { return contains(0.0); }
  /// True when `other` lies between the end points without touching them.
  [[nodiscard]] bool contains_inside(const Interval& other) const {
    return lower_ < other.lower_ && other.upper_ < upper_;
  }
  [[nodiscard]] bool is_bounded() const { return -kInfinity < lower_ && upper_ < kInfinity; }
  [[nodiscard]] bool is_positive() const { return lower_ > 0.0; }
  [[nodiscard]] bool is_negative() const { return upper_ < 0.0; }

  Interval& operator+=(const Interval& other);
  Interval& operator-=(const Interval& other);
  Interval& operator*=(const Interval& other);
  Interval& operator/=(const Interval& other);

  /// Outward rounding of computed end points; NaN, overflow or wrong order give the whole line.
  [[nodiscard]] static Interval outward(double lower, double upper) { return widened(lower, upper, kStep); }
  /// The same for results of exp, log and pow.
  [[nodiscard]] static Interval outward_elementary(double lower, double upper) {
    return widened(lower, upper, kElementaryUlp * std::numeric_limits<double>::epsilon());
  }
  /// The part that is not negative, for results known to be so.
  [[nodiscard]] Interval not_negative() const {
    return upper_ >= 0.0 ? Interval(std::max(lower_, 0.0), upper_, Ordered{}) : *this;
  }
  friend Interval operator-(const Interval& a) { return Interval(-a.upper_, -a.lower_, Ordered{}); }

 private:
  struct Ordered {};
  constexpr Interval(double lower, double upper, Ordered /*checked*/) : lower_(lower), upper_(upper) {}
  [[nodiscard]] static Interval widened(double lower, double upper, double step) {
    const double low = lower - (std::abs(lower) * step + kGuard);
    const double high = upper + (std::abs(upper) * step + kGuard);
    if (!(low <= high)) {  // also when an end point overflowed: inf - inf is NaN
      return whole();
    }
    return Interval(low, high, Ordered{});
  }

  static constexpr double kInfinity = std::numeric_limits<double>::infinity();
  static constexpr double kStep = 2.3e-16;
  static constexpr double kGuard = 1e-300;

  double lower_ = 0.0;
  double upper_ = 0.0;
};

// --- arithmetic ---------------------------------------------------------------------------------------------------

inline Interval operator+(const Interval& a) {
  return a;
}
inline Interval operator+(const Interval& a, const Interval& b) {
  return Interval::outward(a.lower() + b.lower(), a.upper() + b.upper());
}
inline Interval operator-(const Interval& a, const Interval& b) {
  return Interval::outward(a.lower() - b.upper(), a.upper() - b.lower());
}
namespace interval_detail {
/// Any signs: the extreme of four products. Out of line: fractions and positive numbers do not come here.
[[nodiscard]] inline Interval multiply_any(const Interval& a, const Interval& b) {
  const double p = a.lower() * b.lower();
  const double q = a.lower() * b.upper();
  const double r = a.upper() * b.lower();
  const double s = a.upper() * b.upper();
  if (std::isnan(p + q + r + s)) {  // 0 * inf somewhere, or inf - inf in this sum: min and max would drop a NaN
    if (std::isnan(p) || std::isnan(q) || std::isnan(r) || std::isnan(s)) {
      return Interval::whole();
    }
  }
  return Interval::outward(std::min(std::min(p, q), std::min(r, s)), std::max(std::max(p, q), std::max(r, s)));
}
}  // namespace interval_detail

inline Interval operator*(const Interval& a, const Interval& b) {
  if (a.lower() >= 0.0 && b.lower() >= 0.0) {  // exact zeros stay
    return Interval::outward(a.lower() * b.lower(), a.upper() * b.upper()).not_negative();
  }
  return interval_detail::multiply_any(a, b);
}
inline Interval operator/(const Interval& a, const Interval& b) {
  if (b.lower() > 0.0) {
    if (a.lower() >= 0.0) {
      return Interval::outward(a.lower() / b.upper(), a.upper() / b.lower()).not_negative();
    }
    return a.upper() <= 0.0 ? Interval::outward(a.lower() / b.lower(), a.upper() / b.upper())
                            : Interval::outward(a.lower() / b.lower(), a.upper() / b.lower());
  }
  return b.upper() < 0.0 ? (-a) / (-b) : Interval::whole();
}

inline Interval operator+(const Interval& a, double b) {
  return Interval::outward(a.lower() + b, a.upper() + b);
}
inline Interval operator+(double a, const Interval& b) {
  return b + a;
}
inline Interval operator-(const Interval& a, double b) {
  return Interval::outward(a.lower() - b, a.upper() - b);
}
inline Interval operator-(double a, const Interval& b) {
  return Interval::outward(a - b.upper(), a - b.lower());
}
inline Interval operator*(const Interval& a, double b) {
  if (b >= 0.0) {
    const Interval product = Interval::outward(a.lower() * b, a.upper() * b);
    return a.lower() >= 0.0 ? product.not_negative() : product;
  }
  return Interval::outward(a.upper() * b, a.lower() * b);
}
inline Interval operator*(double a, const Interval& b) {
  return b * a;
}
inline Interval operator/(const Interval& a, double b) {
  return a / Interval(b);
}
inline Interval operator/(double a, const Interval& b) {
  return Interval(a) / b;
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

// --- elementary functions -----------------------------------------------------------------------------------------

inline Interval exp(const Interval& a) {
  return Interval::outward_elementary(std::exp(a.lower()), std::exp(a.upper())).not_negative();
}
/// ln a; log of an interval that starts at zero is unbounded below.
inline Interval log(const Interval& a) {
  if (!(a.lower() >= 0.0) || !(a.upper() > 0.0)) {
    return Interval::whole();
  }
  return Interval::outward_elementary(std::log(a.lower()), std::log(a.upper()));
}
inline Interval sqrt(const Interval& a) {
  if (!(a.lower() >= 0.0)) {
    return Interval::whole();
  }
  return Interval::outward(std::sqrt(a.lower()), std::sqrt(a.upper())).not_negative();
}
inline Interval square(const Interval& a) {
  if (a.lower() >= 0.0) {
    return a * a;
  }
  if (a.upper() <= 0.0) {
    return (-a) * (-a);
  }
  const double m = a.magnitude();
  return Interval::outward(0.0, m * m).not_negative();
}
/// a^exponent for a >= 0 and exponent > 0.
inline Interval pow(const Interval& a, double exponent) {
  if (!(a.lower() >= 0.0) || !(exponent > 0.0)) {
    return Interval::whole();
  }
  return Interval::outward_elementary(std::pow(a.lower(), exponent), std::pow(a.upper(), exponent)).not_negative();
}

inline double square(double a) {
  return a * a;
}

/// x ln x, continued by 0 at 0.
inline double xlogx(double x) {
  return x > 0.0 ? x * std::log(x) : 0.0;
}
/// Exact range: falls to -1/e at x = 1/e, rises after it.
inline Interval xlogx(const Interval& x) {
  if (!(x.lower() >= 0.0)) {
    return Interval::whole();
  }
  const auto at = [](double v) { return v > 0.0 ? Interval(v) * log(Interval(v)) : Interval(); };
  const Interval left = at(x.lower());
  const Interval right = at(x.upper());
  constexpr double kMinimiser = 0.36787944117144233;  // 1/e to half an ulp
  const bool turns = x.lower() <= kMinimiser * (1.0 + 1e-15) && x.upper() >= kMinimiser * (1.0 - 1e-15);
  const double low = turns ? -kMinimiser * (1.0 + 1e-15) : std::min(left.lower(), right.lower());
  return {low, std::max(left.upper(), right.upper())};
}

// --- sets ---------------------------------------------------------------------------------------------------------

/// Smallest interval that holds both.
inline Interval hull(const Interval& a, const Interval& b) {
  return {std::min(a.lower(), b.lower()), std::max(a.upper(), b.upper())};
}
/// Puts the common part of `a` and `b` into `a`; false, and `a` unchanged, when they share no point.
[[nodiscard]] inline bool intersect(Interval& a, const Interval& b) {
  const double lower = std::max(a.lower(), b.lower());
  const double upper = std::min(a.upper(), b.upper());
  if (lower > upper) {
    return false;
  }
  a = Interval(lower, upper);
  return true;
}
/// Replaces an enclosure by its common part with another enclosure of the same quantity. Two enclosures of one number
/// always overlap; should they not, one of them rests on an assumption that fails here, and nothing may be concluded.
inline Interval both(const Interval& a, const Interval& b) {
  return {std::max(a.lower(), b.lower()), std::min(a.upper(), b.upper())};
}

}  // namespace stillshed
