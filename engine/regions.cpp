#include "engine/regions.hpp"

#include <algorithm>
#include <cmath>
#include <set>

#include "engine/geometry.hpp"
#include "engine/residue_curve.hpp"

namespace stillshed {
namespace {

struct Arc {
  int from = 0;  ///< fixed point
  int to = 0;
  std::vector<Composition> points;
  std::string boundary;  ///< empty: a piece of an edge
};

/// Pieces of the three edges between neighbouring fixed points.
std::vector<Arc> edge_arcs(const std::vector<FixedPoint>& fixed_points) {
  std::vector<Arc> arcs;
  for (int absent = 0; absent < 3; ++absent) {
    const int a = (absent + 1) % 3;
    std::vector<int> on_edge;
    for (std::size_t k = 0; k < fixed_points.size(); ++k) {
      if (fixed_points[k].x[absent] == 0.0) {
        on_edge.push_back(static_cast<int>(k));
      }
    }
    std::sort(on_edge.begin(), on_edge.end(), [&](int p, int q) {
      return fixed_points[static_cast<std::size_t>(p)].x[a] < fixed_points[static_cast<std::size_t>(q)].x[a];
    });
    for (std::size_t k = 0; k + 1 < on_edge.size(); ++k) {
      const FixedPoint& p = fixed_points[static_cast<std::size_t>(on_edge[k])];
      const FixedPoint& q = fixed_points[static_cast<std::size_t>(on_edge[k + 1])];
      arcs.push_back({on_edge[k], on_edge[k + 1], {p.x, q.x}, ""});
    }
  }
  return arcs;
}

/// Where an arc that starts at its first point first leaves a circle around it.
double angle_at(const std::vector<Composition>& points, double radius) {
  const PlanePoint centre = to_plane(points.front());
  PlanePoint last = centre;
  for (const Composition& x : points) {
    const PlanePoint p = to_plane(x);
    const double away = std::hypot(p.x - centre.x, p.y - centre.y);
    if (away >= radius) {
      const double before = std::hypot(last.x - centre.x, last.y - centre.y);
      const double s = away > before ? (radius - before) / (away - before) : 1.0;
      return std::atan2(last.y + s * (p.y - last.y) - centre.y, last.x + s * (p.x - last.x) - centre.x);
    }
    last = p;
  }
  return std::atan2(last.y - centre.y, last.x - centre.x);
}

double reach_of(const std::vector<Composition>& points) {
  const PlanePoint centre = to_plane(points.front());
  double most = 0.0;
  for (const Composition& x : points) {
    const PlanePoint p = to_plane(x);
    most = std::max(most, std::hypot(p.x - centre.x, p.y - centre.y));
  }
  return most;
}

/// A half-edge: arc index and direction.
struct Half {
  std::size_t arc = 0;
  bool forward = true;
};

class Subdivision {
 public:
  Subdivision(std::vector<Arc> arcs, std::size_t points) : arcs_(std::move(arcs)), around_(points) {
    for (std::size_t k = 0; k < arcs_.size(); ++k) {
      around_[static_cast<std::size_t>(arcs_[k].from)].push_back({k, true});
      around_[static_cast<std::size_t>(arcs_[k].to)].push_back({k, false});
    }
    for (auto& halves : around_) {
      sort_around(halves);
    }
  }

  struct Face {
    std::vector<Composition> polygon;
    std::set<std::string> boundaries;
  };

  [[nodiscard]] std::vector<Face> faces() const {
    std::vector<std::array<bool, 2>> used(arcs_.size(), {false, false});
    std::vector<Face> faces;
    for (std::size_t k = 0; k < arcs_.size(); ++k) {
      for (const bool forward : {true, false}) {
        if (used[k][forward ? 1 : 0]) {
          continue;
        }
        Face face;
        Half half{k, forward};
        while (!used[half.arc][half.forward ? 1 : 0]) {
          used[half.arc][half.forward ? 1 : 0] = true;
          const std::vector<Composition> points = points_of(half);
          face.polygon.insert(face.polygon.end(), points.begin(), points.end() - 1);
          if (!arcs_[half.arc].boundary.empty()) {
            face.boundaries.insert(arcs_[half.arc].boundary);
          }
          half = next(half);
        }
        if (area_share(face.polygon) > 0.0) {  // the outside is walked clockwise
          faces.push_back(std::move(face));
        }
      }
    }
    return faces;
  }

 private:
  [[nodiscard]] std::vector<Composition> points_of(const Half& half) const {
    std::vector<Composition> points = arcs_[half.arc].points;
    if (!half.forward) {
      std::reverse(points.begin(), points.end());
    }
    return points;
  }

  void sort_around(std::vector<Half>& halves) const {
    double radius = 1.0;
    for (const Half& half : halves) {
      radius = std::min(radius, 0.4 * reach_of(points_of(half)));
    }
    std::sort(halves.begin(), halves.end(), [&](const Half& a, const Half& b) {
      return angle_at(points_of(a), radius) < angle_at(points_of(b), radius);
    });
  }

  /// Having walked `half`, turn as far clockwise as possible at its end: the face stays on the left.
  [[nodiscard]] Half next(const Half& half) const {
    const int at = half.forward ? arcs_[half.arc].to : arcs_[half.arc].from;
    const std::vector<Half>& halves = around_[static_cast<std::size_t>(at)];
    for (std::size_t k = 0; k < halves.size(); ++k) {
      if (halves[k].arc == half.arc && halves[k].forward != half.forward) {
        return halves[(k + halves.size() - 1) % halves.size()];
      }
    }
    throw LogicError("regions: an arc is missing around its end point");
  }

  std::vector<Arc> arcs_;
  std::vector<std::vector<Half>> around_;
};

}  // namespace

RegionSet find_regions(const Mixture& mixture, double pressure_Pa, const std::vector<FixedPoint>& fixed_points,
                       const std::vector<Boundary>& boundaries) {
  RegionSet set;
  set.status = Status::complete;
  std::vector<Arc> arcs = edge_arcs(fixed_points);
  for (const Boundary& boundary : boundaries) {
    arcs.push_back({boundary.from, boundary.to, boundary.curve.points, boundary.id});
  }
  for (auto& face : Subdivision(std::move(arcs), fixed_points.size()).faces()) {
    Region region;
    region.id = "r" + std::to_string(set.regions.size() + 1);
    region.area = area_share(face.polygon);
    region.boundaries.assign(face.boundaries.begin(), face.boundaries.end());
    const ResidueCurve inner = residue_curve(mixture, pressure_Pa, fixed_points, interior_point(face.polygon));
    region.polygon = std::move(face.polygon);
    if (inner.status != Status::complete) {
      set.status = Status::undecided;
      set.message = "the residue curve through the middle of region " + region.id + " did not reach its nodes";
      continue;
    }
    region.unstable_node = *inner.from;
    region.stable_node = *inner.to;
    set.regions.push_back(std::move(region));
  }
  return set;
}

RegionSet find_intervals(const std::vector<FixedPoint>& fixed_points) {
  RegionSet set;
  set.status = Status::complete;
  std::vector<int> order(fixed_points.size());
  for (std::size_t k = 0; k < order.size(); ++k) {
    order[k] = static_cast<int>(k);
  }
  const auto at = [&](int k) -> const FixedPoint& { return fixed_points[static_cast<std::size_t>(k)]; };
  std::sort(order.begin(), order.end(), [&](int a, int b) { return at(a).x[0] < at(b).x[0]; });
  for (std::size_t k = 0; k + 1 < order.size(); ++k) {
    Region region;
    region.id = "r" + std::to_string(k + 1);
    const bool rising = at(order[k]).temperature_K < at(order[k + 1]).temperature_K;
    region.unstable_node = rising ? order[k] : order[k + 1];
    region.stable_node = rising ? order[k + 1] : order[k];
    region.polygon = {at(order[k]).x, at(order[k + 1]).x};
    region.area = at(order[k + 1]).x[0] - at(order[k]).x[0];
    set.regions.push_back(region);
  }
  return set;
}

}  // namespace stillshed
