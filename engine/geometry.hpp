/// Plane geometry of composition triangles, and distances between compositions.
///
/// Compositions of three components are drawn in the plane as p = (x_1 + x_2 / 2, sqrt(3)/2 x_2), component 0 at the
/// origin: an equilateral triangle of side 1. Distances between compositions are Euclidean over all mole fractions.
#pragma once

#include <optional>
#include <vector>

#include "models/scalar.hpp"

namespace stillshed {

struct PlanePoint {
  double x = 0.0;
  double y = 0.0;
};
[[nodiscard]] PlanePoint to_plane(const Composition& x);

/// Signed area, positive when counter-clockwise, as a share of the whole triangle.
[[nodiscard]] double area_share(const std::vector<Composition>& polygon);
[[nodiscard]] bool inside_polygon(const std::vector<Composition>& polygon, const Composition& point);
/// A point well inside a polygon (far from its sides, among the centres of an ear-clipping grid).
[[nodiscard]] Composition interior_point(const std::vector<Composition>& polygon);

[[nodiscard]] double distance(const Composition& a, const Composition& b);
/// (1 - s) a + s b.
[[nodiscard]] Composition between(const Composition& a, const Composition& b, double s);

struct NearestOnCurve {
  double distance = 0.0;
  Composition point;
  std::size_t segment = 0;  ///< between points segment and segment + 1
  double s = 0.0;           ///< position on that segment
};
/// Nearest point of a polyline with at least one point.
[[nodiscard]] NearestOnCurve nearest_on_curve(const std::vector<Composition>& curve, const Composition& point);

struct Crossing {
  double s = 0.0;           ///< on the straight line from a to b
  std::size_t segment = 0;  ///< of the polyline
  double along = 0.0;       ///< position on that segment
};
/// Where the straight line a-b crosses a polyline in the triangle, by rising s.
[[nodiscard]] std::vector<Crossing> crossings(const Composition& a, const Composition& b,
                                              const std::vector<Composition>& curve);

}  // namespace stillshed
