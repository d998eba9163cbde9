/// Joins cuts that an operator could not tell apart.
///
/// A pot that grazes a boundary leaves and meets it again many times within the error of the boundary's polyline. Such
/// pieces belong to one cut:
///   - neighbours with the same fixed composition;
///   - a straight piece between two cuts on the same boundary, when the pot stays closer to that boundary than its
///     stated error.
/// Amounts and averages are kept exactly: only the division into cuts changes.
#pragma once

#include <vector>

#include "engine/reach.hpp"

namespace stillshed {

[[nodiscard]] std::vector<Cut> join_cuts(const std::vector<Cut>& cuts, const std::vector<Boundary>& boundaries);

}  // namespace stillshed
