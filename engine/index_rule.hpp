/// The index rule of a face: a necessary check that no fixed point was missed.
///
///   sum over the fixed points of the face, each with k components, of 2^k (-1)^(negative eigenvalues inside the face)
///     = 1 + (-1)^(n - 1),   n = members of the face
///
/// Needs hyperbolic points and every vertex boiling; undefined where a liquid splits or a point is degenerate.
/// Necessary, never sufficient: pairs cancel.
/// Source    Yu. V. Zharov, L. A. Serafimov, Physicochemical Foundations of Distillation and Rectification, Khimiya
/// 1975;
///           M. F. Doherty, J. D. Perkins, Chem. Eng. Sci. 34 (1979) 1401-1414 (both from memory).
#pragma once

#include <optional>
#include <vector>

#include "engine/survey.hpp"

namespace stillshed {

/// One fixed point as seen from inside a face.
struct IndexTerm {
  int components = 1;               ///< of the point
  std::vector<double> eigenvalues;  ///< those of directions inside the face
};

[[nodiscard]] int index_expected(int members);
/// Empty when some eigenvalue has no reliable sign.
[[nodiscard]] std::optional<int> index_sum(const std::vector<IndexTerm>& terms);

/// The eigenvalues of `point` in directions inside the face `members` (which must hold the point's own members).
[[nodiscard]] std::vector<double> eigenvalues_inside(const FixedPoint& point, const Members& members);

}  // namespace stillshed
