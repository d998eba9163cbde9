/// Sums and means over mole fractions, written once per scalar so that one template gives tight intervals.
///
///   weighted_mean(w, v) = sum_i w_i v_i / sum_i w_i     w_i >= 0, not all zero
///   ratio_of_sums(x, u, s) = sum_i x_i u_i / sum_i x_i s_i     x_i >= 0, s_i > 0: the mean of u_i/s_i with weights x_i
///   s_i simplex_sum(x, v)   = sum_i x_i v_i                 for mole fractions x, sum(x) = 1
///
/// Interval  `weighted_mean` is the range over all weights and values of the box: the largest value is reached with
///           every weight at an end point, upper for the values above the mean, lower below (a linear-fractional
///           function on a box). `simplex_sum` is the range over the part of the box with sum(x) = 1. This is the only
///           place where an enclosure uses that the mole fractions add up: Interval results hold for the points of the
///           box that lie on the simplex, which is where mole fractions are.
/// Jet       d mean = sum (w_j/W) dv_j + sum (dw_j/W) (v_j - mean): again a mean, again tight.
#pragma once

#include <ceres/jet.h>

#include <algorithm>
#include <array>
#include <limits>

#include "models/interval.hpp"
#include "models/jet_interval.hpp"

namespace stillshed {

/// Most terms of one sum: components or main groups.
inline constexpr int kMaxTerms = 24;

// --- double -------------------------------------------------------------------------------------------------------

inline double weighted_mean(const double* w, const double* v, int n) {
  double numerator = 0.0;
  double denominator = 0.0;
  for (int i = 0; i < n; ++i) {
    numerator += w[i] * v[i];
    denominator += w[i];
  }
  return numerator / denominator;
}

inline double simplex_sum(const double* x, const double* v, int n) {
  double sum = 0.0;
  for (int i = 0; i < n; ++i) {
    sum += x[i] * v[i];
  }
  return sum;
}

inline double ratio_of_sums(const double* x, const double* u, const double* s, int n) {
  return simplex_sum(x, u, n) / simplex_sum(x, s, n);
}

// --- Interval -----------------------------------------------------------------------------------------------------

namespace means {

using Order = std::array<int, kMaxTerms>;
using Values = std::array<double, kMaxTerms>;

/// Indices of the values, largest first.
inline void sort_falling(const Values& value, int n, Order& order) {
  for (int i = 0; i < n; ++i) {
    int k = i;
    const double v = value[static_cast<std::size_t>(i)];
    while (k > 0 && value[static_cast<std::size_t>(order[static_cast<std::size_t>(k - 1)])] < v) {
      order[static_cast<std::size_t>(k)] = order[static_cast<std::size_t>(k - 1)];
      --k;
    }
    order[static_cast<std::size_t>(k)] = i;
  }
}

/// Largest mean of these values over the box of weights (sorted threshold rule); NaN when the weights carry nothing.
inline double largest_mean(const Interval* w, const Values& value, int n) {
  Order order;
  sort_falling(value, n, order);
  double numerator = 0.0;
  double denominator = 0.0;
  for (int i = 0; i < n; ++i) {
    numerator += w[i].lower() * value[static_cast<std::size_t>(i)];
    denominator += w[i].lower();
  }
  // From every weight at its lower end, raise them in order of falling value for as long as that raises the mean.
  for (int k = 0; k < n; ++k) {
    const int i = order[static_cast<std::size_t>(k)];
    const double v = value[static_cast<std::size_t>(i)];
    if (denominator > 0.0 && v * denominator <= numerator) {
      break;
    }
    const double room = w[i].upper() - w[i].lower();
    numerator += room * v;
    denominator += room;
  }
  // Products and sums below this lose their relative accuracy to underflow.
  constexpr double kSmallestTotal = 1e-280;
  return denominator > kSmallestTotal ? numerator / denominator : std::numeric_limits<double>::quiet_NaN();
}

/// Least upper bound of sum x_i value_i over the points of the box with sum(x) = 1. By linear programming duality that
/// is the smallest, over the values v_k, of v_k + sum_i (value_i - v_k) x_i with each x_i at its worse end; every
/// single k gives a bound, so nothing rests on which is chosen.
inline double largest_sum(const Interval* x, const Values& value, int n) {
  double least = std::numeric_limits<double>::infinity();
  for (int k = 0; k < n; ++k) {
    const double level = value[static_cast<std::size_t>(k)];
    double bound = level;
    for (int i = 0; i < n; ++i) {
      const double above = value[static_cast<std::size_t>(i)] - level;
      bound += std::max(above * x[i].lower(), above * x[i].upper());
    }
    least = std::min(least, bound);
  }
  return least;
}

/// Covers the rounding of largest_mean: fewer than 4 n + 4 roundings, each of a number at most max|v| times the weight.
inline double mean_slack(double largest, int n) {
  return largest * (8.0 * n + 8.0) * std::numeric_limits<double>::epsilon() + 1e-300;
}
/// Covers the rounding of largest_sum for |x| <= 2: 3 n roundings of numbers at most (4 n + 1) max|v|.
inline double sum_slack(double largest, int n) {
  return largest * (6.0 * n * (n + 1.0)) * std::numeric_limits<double>::epsilon() + 1e-300;
}

}  // namespace means

inline Interval weighted_mean(const Interval* w, const Interval* v, int n) {
  double lowest = std::numeric_limits<double>::infinity();
  double highest = -std::numeric_limits<double>::infinity();
  means::Values up;
  means::Values down;
  for (int i = 0; i < n; ++i) {
    if (!(w[i].lower() >= 0.0) || !w[i].is_bounded() || !v[i].is_bounded()) {
      return Interval::whole();
    }
    up[static_cast<std::size_t>(i)] = v[i].upper();
    down[static_cast<std::size_t>(i)] = -v[i].lower();
    lowest = std::min(lowest, v[i].lower());
    highest = std::max(highest, v[i].upper());
  }
  const double room = means::mean_slack(std::max(-lowest, highest), n);
  const double upper = means::largest_mean(w, up, n) + room;
  const double lower = -means::largest_mean(w, down, n) - room;
  // Whatever the weights, a mean lies between the smallest and the largest value; a NaN falls back to that.
  return {lower > lowest ? lower : lowest, upper < highest ? upper : highest};
}

inline Interval simplex_sum(const Interval* x, const Interval* v, int n) {
  double low_sum = 0.0;
  double high_sum = 0.0;
  double largest = 0.0;
  bool usable = true;
  means::Values up;
  means::Values down;
  for (int i = 0; i < n; ++i) {
    low_sum += x[i].lower();
    high_sum += x[i].upper();
    usable = usable && x[i].magnitude() <= 2.0;
    up[static_cast<std::size_t>(i)] = v[i].upper();
    down[static_cast<std::size_t>(i)] = -v[i].lower();
    largest = std::max(largest, v[i].magnitude());
  }
  constexpr double kRounding = 1e-14;  // of mole fractions that were meant to add up to 1
  if (!usable || !(low_sum <= 1.0 + kRounding && high_sum >= 1.0 - kRounding) || !(largest < 1e300)) {
    Interval plain(0.0);  // the box misses the simplex, or something is unbounded: make no use of sum(x) = 1
    for (int i = 0; i < n; ++i) {
      plain += x[i] * v[i];
    }
    return plain;
  }
  const double room = means::sum_slack(largest, n);
  return {-means::largest_sum(x, down, n) - room, means::largest_sum(x, up, n) + room};
}

inline Interval ratio_of_sums(const Interval* x, const Interval* u, const Interval* s, int n) {
  std::array<Interval, kMaxTerms> weight;
  std::array<Interval, kMaxTerms> value;
  for (int i = 0; i < n; ++i) {
    weight[static_cast<std::size_t>(i)] = x[i] * s[i];
    value[static_cast<std::size_t>(i)] = u[i] / s[i];
  }
  return weighted_mean(weight.data(), value.data(), n);
}

/// The part of an enclosure that mole fractions can take. Off the simplex altogether: unchanged.
inline Interval fraction_part(const Interval& x) {
  return x.upper() >= 0.0 && x.lower() <= 1.0 ? both(x, Interval(0.0, 1.0)) : x;
}
inline double fraction_part(double x) {
  return x;
}
template <class S, int N>
ceres::Jet<S, N> fraction_part(const ceres::Jet<S, N>& x) {
  ceres::Jet<S, N> part = x;
  part.a = fraction_part(x.a);
  return part;
}

// --- Jets over either ---------------------------------------------------------------------------------------------

template <class S, int N>
ceres::Jet<S, N> weighted_mean(const ceres::Jet<S, N>* w, const ceres::Jet<S, N>* v, int n) {
  std::array<S, kMaxTerms> weight;
  std::array<S, kMaxTerms> value;
  S total(0.0);
  for (int i = 0; i < n; ++i) {
    weight[static_cast<std::size_t>(i)] = w[i].a;
    value[static_cast<std::size_t>(i)] = v[i].a;
    total += w[i].a;
  }
  ceres::Jet<S, N> mean;
  mean.a = weighted_mean(weight.data(), value.data(), n);
  std::array<S, kMaxTerms> slope;
  for (int k = 0; k < N; ++k) {
    S change(0.0);
    for (int i = 0; i < n; ++i) {
      slope[static_cast<std::size_t>(i)] = v[i].v[k];
      change += w[i].v[k] * (v[i].a - mean.a);
    }
    mean.v[k] = weighted_mean(weight.data(), slope.data(), n) + change / total;
  }
  return mean;
}

template <class S, int N>
ceres::Jet<S, N> simplex_sum(const ceres::Jet<S, N>* x, const ceres::Jet<S, N>* v, int n) {
  ceres::Jet<S, N> sum;
  std::array<S, kMaxTerms> fraction;
  std::array<S, kMaxTerms> value;
  for (int i = 0; i < n; ++i) {
    fraction[static_cast<std::size_t>(i)] = x[i].a;
    value[static_cast<std::size_t>(i)] = v[i].a;
  }
  sum.a = simplex_sum(fraction.data(), value.data(), n);
  std::array<S, kMaxTerms> slope;
  for (int k = 0; k < N; ++k) {
    S change(0.0);
    for (int i = 0; i < n; ++i) {
      slope[static_cast<std::size_t>(i)] = v[i].v[k];
      change += x[i].v[k] * v[i].a;
    }
    sum.v[k] = simplex_sum(fraction.data(), slope.data(), n) + change;
  }
  return sum;
}

template <class S, int N>
ceres::Jet<S, N> ratio_of_sums(const ceres::Jet<S, N>* x, const ceres::Jet<S, N>* u, const ceres::Jet<S, N>* s, int n) {
  std::array<ceres::Jet<S, N>, kMaxTerms> weight;
  std::array<ceres::Jet<S, N>, kMaxTerms> value;
  for (int i = 0; i < n; ++i) {
    weight[static_cast<std::size_t>(i)] = x[i] * s[i];
    value[static_cast<std::size_t>(i)] = u[i] / s[i];
  }
  return weighted_mean(weight.data(), value.data(), n);
}

}  // namespace stillshed
