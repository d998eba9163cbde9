/// Column sequences at total reflux, without recycle: sharp direct and indirect splits.
///
///   F = theta D + (1 - theta) B        D, F, B on one line
///   D and B on one residue curve, in the limit: in the closure of one region
///
/// The charge may lie in another region. For every region, in turn:
///   direct     D = its unstable node, B = the farthest point of the region's closure on the ray from D through F
///   indirect   B = its stable node,   D = the farthest point of the closure on the ray from B through F
/// A feed on an edge of the triangle is split between the fixed points on its two sides.
/// One product of such a split is a fixed point and final; the other is fed on while it is none, to `max_depth`
/// columns. A stream that was reached before, with at least the same amount and as many columns left, is not fed on
/// again.
///
/// Witness   the limiting residue curve from D to B on the rim of the region: pieces of edges and boundaries joined at
///           saddles. It starts at D and ends at B; its error is the stated error of the boundaries.
/// Order     depth first; regions in the order of the chart, direct before indirect.
/// Valid     binary and ternary charts.
#pragma once

#include <vector>

#include "engine/reach.hpp"

namespace stillshed {

[[nodiscard]] std::vector<Sequence> column_sequences(const Chart& chart, const Composition& feed, int max_depth);

}  // namespace stillshed
