/// Sums and means over mole fractions, written once per scalar so that one template gives tight intervals.
///
///   weighted_mean(w, v) = sum_i w_i v_i / sum_i w_i     w_i >= 0, not all zero
///   simplex_sum(x, v)   = sum_i x_i v_i                 for mole fractions x, sum(x) = 1
///
/// For Interval, `weighted_mean` is the exact range over all weights and values of the box: the largest value is
/// reached with every weight at an end point, upper for the values above the mean, lower below (a linear-fractional
/// function on a box). `simplex_sum` is the exact range over the part of the box with sum(x) = 1: this is the only
/// place where an enclosure uses that the mole fractions add up, so Interval results hold for points on the simplex
/// only.
#pragma once

#include <ceres/jet.h>

#include <array>

#include "models/interval.hpp"
#include "models/jet_interval.hpp"

namespace stillshed {

/// Most terms of one sum: components or main groups.
inline constexpr int kMaxTerms = 24;

inline double weighted_mean(const double* w, const double* v, int n) {
  double numerator = 0.0;
  double denominator = 0.0;
  for (int i = 0; i < n; ++i) {
    numerator += w[i] * v[i];
    denominator += w[i];
  }
  return numerator / denominator;
}

namespace means {

/// Upper bound of the mean for end-point values v (as sign * value): sorted threshold rule.
inline double upper_mean(const Interval* w, const Interval* v, int n, bool lower_side) {
  std::array<int, kMaxTerms> order{};
  std::array<double, kMaxTerms> value{};
  for (int i = 0; i < n; ++i) {
    value[static_cast<std::size_t>(i)] = lower_side ? -v[i].lower() : v[i].upper();
    int k = i;
    while (k > 0 && value[static_cast<std::size_t>(order[static_cast<std::size_t>(k - 1)])] <
                        value[static_cast<std::size_t>(i)]) {
      order[static_cast<std::size_t>(k)] = order[static_cast<std::size_t>(k - 1)];
      --k;
    }
    order[static_cast<std::size_t>(k)] = i;
  }
  // Start with every weight at its lower end; raise them in order of falling value while that raises the mean.
  double numerator = 0.0;
  double denominator = 0.0;
  for (int i = 0; i < n; ++i) {
    numerator += w[i].lower() * value[static_cast<std::size_t>(i)];
    denominator += w[i].lower();
  }
  for (int k = 0; k < n; ++k) {
    const int i = order[static_cast<std::size_t>(k)];
    const double v_i = value[static_cast<std::size_t>(i)];
    if (denominator > 0.0 && v_i * denominator <= numerator) {
      break;
    }
    numerator += (w[i].upper() - w[i].lower()) * v_i;
    denominator += w[i].upper() - w[i].lower();
  }
  return numerator / denominator;
}

/// Rounding of the sums above: at most about 2n operations on numbers no larger than n * max|w v|.
inline double slack(const Interval* v, int n) {
  double largest = 0.0;
  for (int i = 0; i < n; ++i) {
    largest = std::max(largest, v[i].magnitude());
  }
  return largest * (8.0 * n + 8.0) * std::numeric_limits<double>::epsilon() + std::numeric_limits<double>::denorm_min();
}

}  // namespace means

inline Interval weighted_mean(const Interval* w, const Interval* v, int n) {
  double lowest = std::numeric_limits<double>::infinity();
  double highest = -std::numeric_limits<double>::infinity();
  for (int i = 0; i < n; ++i) {
    if (!(w[i].lower() >= 0.0) || !w[i].is_bounded() || !v[i].is_bounded()) {
      return Interval::whole();
    }
    lowest = std::min(lowest, v[i].lower());
    highest = std::max(highest, v[i].upper());
  }
  const double room = means::slack(v, n);
  double upper = means::upper_mean(w, v, n, false) + room;
  double lower = -means::upper_mean(w, v, n, true) - room;
  // Whatever the weights, the mean lies between the smallest and the largest value (NaN from 0/0 falls back to that).
  upper = upper < highest ? upper : highest;
  lower = lower > lowest ? lower : lowest;
  return {lower, upper};
}

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

inline double simplex_sum(const double* x, const double* v, int n) {
  double sum = 0.0;
  for (int i = 0; i < n; ++i) {
    sum += x[i] * v[i];
  }
  return sum;
}

inline Interval simplex_sum(const Interval* x, const Interval* v, int n) {
  // Greedy: give every x its lower end, then spend the rest of the unit on the largest values first.
  double result[2] = {0.0, 0.0};
  Interval plain(0.0);
  double low_sum = 0.0;
  double high_sum = 0.0;
  for (int i = 0; i < n; ++i) {
    if (!x[i].is_bounded() || !v[i].is_bounded() || !(x[i].lower() >= 0.0)) {
      return Interval::whole();
    }
    plain += x[i] * v[i];
    low_sum += x[i].lower();
    high_sum += x[i].upper();
  }
  if (!(low_sum <= 1.0 && high_sum >= 1.0)) {  // the box (or rounding) misses the simplex: make no use of it
    return plain;
  }
  std::array<bool, kMaxTerms> used;
  for (int side = 0; side < 2; ++side) {
    used.fill(false);
    double rest = 1.0 - low_sum;
    double sum = 0.0;
    for (int i = 0; i < n; ++i) {
      sum += x[i].lower() * (side == 0 ? -v[i].lower() : v[i].upper());
    }
    for (int step = 0; step < n && rest > 0.0; ++step) {
      int best = -1;
      double best_value = 0.0;
      for (int i = 0; i < n; ++i) {
        const double value = side == 0 ? -v[i].lower() : v[i].upper();
        if (!used[static_cast<std::size_t>(i)] && (best < 0 || value > best_value)) {
          best = i;
          best_value = value;
        }
      }
      used[static_cast<std::size_t>(best)] = true;
      const double take = std::min(rest, x[best].upper() - x[best].lower());
      sum += take * best_value;
      rest -= take;
    }
    result[side] = sum;
  }
  const double room = means::slack(v, n);
  const double lower = -result[0] - room;
  const double upper = result[1] + room;
  return {lower > plain.lower() ? lower : plain.lower(), upper < plain.upper() ? upper : plain.upper()};
}

template <class S, int N>
ceres::Jet<S, N> simplex_sum(const ceres::Jet<S, N>* x, const ceres::Jet<S, N>* v, int n) {
  ceres::Jet<S, N> sum(S(0.0));
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

}  // namespace stillshed
