/// Value and analytic gradient of ln gamma, the form the proof engine uses.
///
/// d_dx(i, j) = d ln gamma_i / d x_j with the x treated as independent numbers in the formula of the model. Only
/// directions with sum(dx) = 0 have a meaning; differences d_dx(i, j) - d_dx(i, k) are what callers may use.
#pragma once

#include "models/scalar.hpp"

namespace stillshed {

template <class S>
struct LnGammaGradient {
  Vec<S> value;
  Matrix<S> d_dx;
  Vec<S> d_dT;
};

}  // namespace stillshed
