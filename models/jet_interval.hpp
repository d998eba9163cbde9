/// The operators between double and ceres::Jet<Interval, N> that neither type provides, found by argument-dependent
/// lookup in namespace stillshed (Interval's own).
#pragma once

#include <ceres/jet.h>

#include "models/interval.hpp"

namespace stillshed {

template <int N>
using IntervalJet = ceres::Jet<Interval, N>;

template <int N>
IntervalJet<N> operator+(const IntervalJet<N>& a, double b) {
  IntervalJet<N> r = a;
  r.a = a.a + b;
  return r;
}
template <int N>
IntervalJet<N> operator+(double a, const IntervalJet<N>& b) {
  return b + a;
}
template <int N>
IntervalJet<N> operator-(const IntervalJet<N>& a, double b) {
  return a + (-b);
}
template <int N>
IntervalJet<N> operator-(double a, const IntervalJet<N>& b) {
  return (-b) + a;
}
template <int N>
IntervalJet<N> operator*(const IntervalJet<N>& a, double b) {
  IntervalJet<N> r;
  r.a = a.a * b;
  for (int k = 0; k < N; ++k) {
    r.v[k] = a.v[k] * b;
  }
  return r;
}
template <int N>
IntervalJet<N> operator*(double a, const IntervalJet<N>& b) {
  return b * a;
}
template <int N>
IntervalJet<N> operator/(const IntervalJet<N>& a, double b) {
  return a * IntervalJet<N>(Interval(1.0) / b);
}
template <int N>
IntervalJet<N> operator/(double a, const IntervalJet<N>& b) {
  return IntervalJet<N>(Interval(a)) / b;
}

/// z^2, tighter than z * z for an interval; any Jet.
template <class S, int N>
ceres::Jet<S, N> square(const ceres::Jet<S, N>& z) {
  ceres::Jet<S, N> r;
  r.a = square(z.a);
  const S twice = z.a * 2.0;
  for (int k = 0; k < N; ++k) {
    r.v[k] = twice * z.v[k];
  }
  return r;
}

}  // namespace stillshed
