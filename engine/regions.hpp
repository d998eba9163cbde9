/// Distillation regions of a ternary as polygons: the triangle cut up by its boundaries.
///
/// Every arc (a boundary, or a piece of a triangle edge between two fixed points) is walked in both directions; at
/// each fixed point the next arc is the neighbour in the cyclic order, taken on a circle around the point that is small
/// enough to meet each arc once and large enough to tell tangent arcs apart. The unstable and stable node of a
/// region are found by following a residue curve from a point well inside it.
#pragma once

#include <string>
#include <vector>

#include "engine/chart.hpp"

namespace stillshed {

struct RegionSet {
  Status status = Status::not_run;
  std::string message;
  std::vector<Region> regions;
};

/// Ternary.
[[nodiscard]] RegionSet find_regions(const Mixture& mixture, double pressure_Pa,
                                     const std::vector<FixedPoint>& fixed_points,
                                     const std::vector<Boundary>& boundaries);
/// Binary: intervals between neighbouring fixed points; area is the length of the interval.
[[nodiscard]] RegionSet find_intervals(const std::vector<FixedPoint>& fixed_points);

}  // namespace stillshed
