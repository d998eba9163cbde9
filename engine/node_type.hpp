/// Type of a fixed point of the residue-curve field dx/dxi = x - y(x).
///
/// Eigenvalues of d(x - y)/dx on the simplex: those inside the face of the present components, then 1 - K_k for each
/// absent component k. At a homogeneous azeotrope (K_i = 1, so dT/dx vanishes along the face by Gibbs-Duhem)
///     d(x_i - y_i)/dx_j = -x_i d ln gamma_i / d x_j,
/// which is similar to a symmetric matrix: the eigenvalues are real, and below 1 exactly when the liquid is locally
/// stable.
///
/// Signs     xi grows toward higher boiling temperature. All eigenvalues positive: curves leave, unstable node (lowest
///           temperature around). All negative: stable node. Mixed: saddle. An eigenvalue below kZeroEigenvalue in
///           size, or a complex pair beyond rounding: degenerate, never typed by noise.
/// Boiling   the same test of the inside eigenvalues alone: all positive minimum, all negative maximum, mixed saddle,
///           else inflection.
#pragma once

#include <vector>

#include "engine/survey.hpp"

namespace stillshed {

/// An eigenvalue smaller than this in size has no reliable sign.
inline constexpr double kZeroEigenvalue = 1e-6;
/// The same for a pure component: its composition is exact, so 1 - K_k is known to rounding.
inline constexpr double kZeroEigenvaluePure = 1e-9;

struct NodeAnalysis {
  NodeType node = NodeType::degenerate;   ///< in the whole mixture
  Boiling boiling = Boiling::inflection;  ///< in the point's own face (meaningless for a pure component)
  std::vector<double>
      eigenvalues;            ///< inside the face (ascending), then one for each absent component (ascending index)
  int inside = 0;             ///< how many of them belong to the face
  int negative_inside = 0;    ///< for the index rule
  bool complex_pair = false;  ///< the inside ones are real parts only: the point is degenerate
};

/// `x` (all components, zeros for absent ones) is a pure component or a homogeneous azeotrope boiling at
/// `temperature_K`.
[[nodiscard]] NodeAnalysis analyse_node(const Mixture& mixture, double pressure_Pa, const Members& members,
                                        const Composition& x, double temperature_K);

/// Type from real eigenvalues; `degenerate` when one of them is smaller than `zero` in size or there is none.
[[nodiscard]] NodeType node_from_eigenvalues(const std::vector<double>& eigenvalues, double zero = kZeroEigenvalue);

}  // namespace stillshed
