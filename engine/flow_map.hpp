/// The residue-curve map as a planar graph: what batch cuts and column splits walk on.
///
///   node  fixed point of the map                      (index into Chart::fixed_points)
///   arc   one piece of a limiting residue curve between two nodes: the part of an edge of the triangle between
///         neighbouring fixed points, or a distillation boundary
///
/// A rectifier takes its product from the end of a curve where temperature falls, a stripper where it rises. `FlowMap`
/// turns every arc so that it runs away from the product end (`source`): the two modes are then one algorithm. A *wall*
/// parts pots with different sources: a boundary that leaves a saddle in that direction.
///
/// Plane   mole fractions (x_0, x_1); orientation and intersection do not depend on the choice of the two.
/// Valid   binary and ternary mixtures.
#pragma once

#include <optional>
#include <vector>

#include "engine/chart.hpp"
#include "engine/geometry.hpp"

namespace stillshed {

enum class Direction {
  heating,  ///< arcs run toward higher temperature: sources are unstable nodes (rectifier)
  cooling,  ///< reversed: sources are stable nodes (stripper)
};

struct Arc {
  int tail = 0;                     ///< node where it starts
  int head = 0;                     ///< node where it ends
  std::optional<int> boundary;      ///< index into Chart::boundaries; empty for a piece of an edge
  bool wall = false;                ///< pots on its two sides have different sources
  std::vector<Composition> points;  ///< from tail to head, both included
};

class FlowMap {
 public:
  FlowMap(const Chart& chart, Direction direction);

  [[nodiscard]] const std::vector<Arc>& arcs() const { return arcs_; }
  [[nodiscard]] const std::vector<FixedPoint>& nodes() const { return chart_->fixed_points; }
  [[nodiscard]] const Composition& position(int node) const;
  [[nodiscard]] const Chart& chart() const { return *chart_; }
  /// The node a region's pots send their product from.
  [[nodiscard]] int source(const Region& region) const;
  /// The node all curves of a region end in.
  [[nodiscard]] int sink(const Region& region) const;
  /// The node at this composition, if any.
  [[nodiscard]] std::optional<int> node_at(const Composition& x, double tolerance = 1e-10) const;
  /// The arc of the edge of the triangle that holds x; x has exactly two nonzero entries.
  [[nodiscard]] std::optional<int> edge_arc_at(const Composition& x) const;
  /// For a wall: the limiting curves from its saddle back to the source on its left (first) and right (second), seen
  /// along the wall. Empty when the map does not have them (incomplete chart).
  struct Sides {
    std::vector<Composition> left;  ///< from the saddle to the source
    std::vector<Composition> right;
    int left_source = 0;
    int right_source = 0;
  };
  [[nodiscard]] std::optional<Sides> sides(const Arc& wall) const;
  /// Limiting residue curve inside the closure of `region`, from its source to `x` on the rim of the region.
  [[nodiscard]] std::optional<std::vector<Composition>> curve_to(const Region& region, const Composition& x) const;

 private:
  void add_edges();
  void add_boundaries(Direction direction);
  [[nodiscard]] std::optional<int> arc_into(int node) const;
  [[nodiscard]] std::vector<int> rim(const Region& region) const;

  const Chart* chart_;
  Direction direction_;
  std::vector<Arc> arcs_;
};

/// Twice the signed area of (origin, a, b) in the plane of the first two mole fractions: positive when b lies to the
/// left of a. Arguments are differences of compositions.
[[nodiscard]] double cross(const Composition& a, const Composition& b);
[[nodiscard]] Composition minus(const Composition& a, const Composition& b);
/// Largest difference of two compositions.
[[nodiscard]] double separation(const Composition& a, const Composition& b);
[[nodiscard]] Members present(const Composition& x);  ///< indices with x_i > 0

/// Index of the region that holds x; on a rim the first that does.
[[nodiscard]] std::optional<int> region_at(const Chart& chart, const Composition& x);

/// Where the ray origin + t (through - origin) is farthest inside the closure of the polygon; empty when it meets it
/// at the origin only. The point lies on the rim and is interpolated on it: zero mole fractions stay zero.
struct RayEnd {
  double t = 0.0;
  Composition point;
};
[[nodiscard]] std::optional<RayEnd> farthest_on_ray(const std::vector<Composition>& polygon, const Composition& origin,
                                                    const Composition& through);

}  // namespace stillshed
