/// Value and analytic gradient of ln gamma (or ln K), the form the proof engine uses.
///
/// d_dx(i, j) = d ln gamma_i / d x_j up to an addend that is the same for every j of a row: models use the form that is
/// tightest for intervals (the formula with independent x, or the symmetric mole-number form). Mole fractions add up,
/// so only directions with sum(dx) = 0 mean anything, and for those the addend drops out: with x_r eliminated,
///   d ln gamma_i / d x_j |_reduced = d_dx(i, j) - d_dx(i, r).
/// d_dT is taken at constant x.
///
/// For S = Interval the entries enclose the derivatives at every point of the box that lies on the simplex; that set is
/// convex, so the mean-value theorem holds along every segment in it.
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
