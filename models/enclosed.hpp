/// A constant computed once from published numbers: its double value and an interval that holds the exact one.
#pragma once

#include <ceres/jet.h>

#include "models/interval.hpp"

namespace stillshed {

struct Enclosed {
  double value = 0.0;
  Interval range;
};

template <class S>
struct ConstantOf;
template <>
struct ConstantOf<double> {
  static double get(const Enclosed& c) { return c.value; }
};
template <>
struct ConstantOf<Interval> {
  static Interval get(const Enclosed& c) { return c.range; }
};
template <class S, int N>
struct ConstantOf<ceres::Jet<S, N>> {
  static ceres::Jet<S, N> get(const Enclosed& c) { return ceres::Jet<S, N>(ConstantOf<S>::get(c)); }
};

/// The constant in the number type of the calculation.
template <class S>
[[nodiscard]] S constant(const Enclosed& c) {
  return ConstantOf<S>::get(c);
}

}  // namespace stillshed
