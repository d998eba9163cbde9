#include "engine/regions.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>
#include <set>

#include "engine/geometry.hpp"
#include "engine/residue_curve.hpp"

namespace stillshed {
namespace {

constexpr double kPi = 3.141592653589793;
const Composition kMiddle = {1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0};

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

  /// Counter-clockwise order around a node. Curves do not cross, so their first exits from any circle around the node
  /// stand in that order; the circle that parts them best is taken. Curves that arrive along an edge of the triangle
  /// may coincide with it to rounding: the two edge pieces come first and last, seen from the inside.
  void sort_around(std::vector<Half>& halves) const {
    double start = -kPi;  // direction the angles are counted from
    double shortest = 1.0;
    for (const Half& half : halves) {
      shortest = std::min(shortest, reach_of(points_of(half)));
      if (is_first_edge(half)) {
        start = edge_direction(half);
      }
    }
    const bool on_perimeter =
        std::any_of(halves.begin(), halves.end(), [&](const Half& half) { return is_edge(half); });
    std::vector<double> keys;
    double best_gap = -1.0;
    for (const double part : {0.9, 0.7, 0.5, 0.3, 0.15, 0.05}) {
      const std::vector<double> candidate = keys_at(halves, start, part * shortest);
      std::vector<double> sorted = candidate;
      std::sort(sorted.begin(), sorted.end());
      double gap = on_perimeter || sorted.empty() ? 2.0 * kPi : sorted.front() + 2.0 * kPi - sorted.back();
      for (std::size_t k = 0; k + 1 < sorted.size(); ++k) {
        gap = std::min(gap, sorted[k + 1] - sorted[k]);
      }
      if (gap > best_gap) {
        best_gap = gap;
        keys = candidate;
      }
    }
    std::vector<std::size_t> order(halves.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return keys[a] < keys[b]; });
    part_by_longer_reach(halves, keys, order);
    std::vector<Half> result;
    for (const std::size_t k : order) {
      result.push_back(halves[k]);
    }
    halves = std::move(result);
  }

  /// Curves that a short neighbour keeps on a small circle may coincide there (they arrive along one direction): such
  /// pairs are compared on the largest circle that both reach.
  void part_by_longer_reach(const std::vector<Half>& halves, const std::vector<double>& keys,
                            std::vector<std::size_t>& order) const {
    constexpr double kSameDirection = 1e-3;
    const auto swapped = [&](std::size_t a, std::size_t b) {
      if (is_edge(halves[a]) || is_edge(halves[b]) || std::abs(keys[a] - keys[b]) > kSameDirection) {
        return false;
      }
      const std::vector<Composition> points_a = points_of(halves[a]);
      const std::vector<Composition> points_b = points_of(halves[b]);
      const double radius = 0.9 * std::min(reach_of(points_a), reach_of(points_b));
      return turn(angle_at(points_a, radius), angle_at(points_b, radius)) < 0.0;
    };
    for (std::size_t pass = 0; pass < order.size(); ++pass) {  // a handful of curves: exchange neighbours
      for (std::size_t k = 0; k + 1 < order.size(); ++k) {
        if (swapped(order[k], order[k + 1])) {
          std::swap(order[k], order[k + 1]);
        }
      }
    }
  }

  /// Angles from `start`; edge pieces far below or above every curve.
  [[nodiscard]] std::vector<double> keys_at(const std::vector<Half>& halves, double start, double radius) const {
    std::vector<double> keys;
    for (const Half& half : halves) {
      const std::vector<Composition> points = points_of(half);
      if (is_edge(half)) {
        keys.push_back(is_first_edge(half) ? -4.0 * kPi : 4.0 * kPi);
      } else {
        const double angle = turn(start, angle_at(points, radius));
        keys.push_back(angle < -kPi / 2.0 ? angle + 2.0 * kPi : angle);
      }
    }
    return keys;
  }

  [[nodiscard]] bool is_edge(const Half& half) const { return arcs_[half.arc].boundary.empty(); }

  [[nodiscard]] double edge_direction(const Half& half) const {
    const std::vector<Composition> points = points_of(half);
    return direction(points.front(), points.back());
  }

  /// The edge piece from which a counter-clockwise turn leads into the triangle.
  [[nodiscard]] bool is_first_edge(const Half& half) const {
    return is_edge(half) && turn(edge_direction(half), direction(points_of(half).front(), kMiddle)) > 0.0;
  }

  static double direction(const Composition& from, const Composition& to) {
    const PlanePoint a = to_plane(from);
    const PlanePoint b = to_plane(to);
    return std::atan2(b.y - a.y, b.x - a.x);
  }

  /// From direction a to direction b, in (-pi, pi].
  static double turn(double a, double b) {
    const double difference = std::remainder(b - a, 2.0 * kPi);
    return difference <= -kPi ? kPi : difference;
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
  const std::size_t expected = arcs.size() + 1 - fixed_points.size();  // Euler, the outside not counted
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
  double covered = 0.0;
  for (const Region& region : set.regions) {
    covered += region.area;
  }
  if (set.status == Status::complete && (set.regions.size() != expected || std::abs(covered - 1.0) > 1e-9)) {
    set.status = Status::undecided;
    set.message = "the regions found do not cover the triangle";
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
