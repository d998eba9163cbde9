#include "engine/flow_map.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "engine/position.hpp"

namespace stillshed {

namespace {

constexpr double kOnRim = 1e-9;  ///< distance below which a composition lies on the rim of a region

std::size_t at(int i) {
  return static_cast<std::size_t>(i);
}

bool on_face(const FixedPoint& point, int i, int j) {
  return std::all_of(point.members.begin(), point.members.end(), [&](int k) { return k == i || k == j; });
}

std::vector<Composition> closed(const std::vector<Composition>& polygon) {
  std::vector<Composition> ring = polygon;
  if (!ring.empty()) {
    ring.push_back(ring.front());
  }
  return ring;
}

void append(std::vector<Composition>& path, const std::vector<Composition>& more) {
  for (const Composition& point : more) {
    if (path.empty() || separation(path.back(), point) > 0.0) {
      path.push_back(point);
    }
  }
}

}  // namespace

double cross(const Composition& a, const Composition& b) {
  return a[0] * b[1] - a[1] * b[0];
}

Composition minus(const Composition& a, const Composition& b) {
  Composition result(a.size());
  for (int i = 0; i < a.size(); ++i) {
    result[i] = a[i] - b[i];
  }
  return result;
}

double separation(const Composition& a, const Composition& b) {
  double largest = 0.0;
  for (int i = 0; i < a.size(); ++i) {
    largest = std::max(largest, std::abs(a[i] - b[i]));
  }
  return largest;
}

Members present(const Composition& x) {
  Members members;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      members.push_back(i);
    }
  }
  return members;
}

FlowMap::FlowMap(const Chart& chart, Direction direction) : chart_(&chart), direction_(direction) {
  add_edges();
  add_boundaries(direction);
}

const Composition& FlowMap::position(int node) const {
  return nodes()[at(node)].x;
}

int FlowMap::source(const Region& region) const {
  return direction_ == Direction::heating ? region.unstable_node : region.stable_node;
}

int FlowMap::sink(const Region& region) const {
  return direction_ == Direction::heating ? region.stable_node : region.unstable_node;
}

void FlowMap::add_edges() {
  const int components = nodes().empty() ? 0 : nodes().front().x.size();
  for (int i = 0; i < components; ++i) {
    for (int j = i + 1; j < components; ++j) {
      std::vector<int> on_edge;
      for (int k = 0; k < static_cast<int>(nodes().size()); ++k) {
        if (on_face(nodes()[at(k)], i, j)) {
          on_edge.push_back(k);
        }
      }
      std::sort(on_edge.begin(), on_edge.end(), [&](int a, int b) { return position(a)[j] < position(b)[j]; });
      for (std::size_t k = 0; k + 1 < on_edge.size(); ++k) {
        Arc arc;
        arc.tail = on_edge[k];
        arc.head = on_edge[k + 1];
        const bool rises = nodes()[at(arc.head)].temperature_K >= nodes()[at(arc.tail)].temperature_K;
        if (rises != (direction_ == Direction::heating)) {
          std::swap(arc.tail, arc.head);
        }
        arc.points = {position(arc.tail), position(arc.head)};
        arcs_.push_back(std::move(arc));
      }
    }
  }
}

void FlowMap::add_boundaries(Direction direction) {
  const Confines walls = direction == Direction::heating ? Confines::overheads : Confines::bottoms;
  for (int k = 0; k < static_cast<int>(chart_->boundaries.size()); ++k) {
    const Boundary& boundary = chart_->boundaries[at(k)];
    Arc arc;
    arc.tail = boundary.from;
    arc.head = boundary.to;
    arc.boundary = k;
    arc.wall = boundary.confines == walls;
    arc.points = boundary.curve.points;
    if (direction == Direction::cooling) {
      std::swap(arc.tail, arc.head);
      std::reverse(arc.points.begin(), arc.points.end());
    }
    arcs_.push_back(std::move(arc));
  }
}

std::optional<int> FlowMap::node_at(const Composition& x, double tolerance) const {
  for (int k = 0; k < static_cast<int>(nodes().size()); ++k) {
    if (separation(position(k), x) <= tolerance) {
      return k;
    }
  }
  return std::nullopt;
}

std::optional<int> FlowMap::edge_arc_at(const Composition& x) const {
  const Members members = present(x);
  if (members.size() != 2) {
    return std::nullopt;
  }
  for (int k = 0; k < static_cast<int>(arcs_.size()); ++k) {
    const Arc& arc = arcs_[at(k)];
    if (arc.boundary.has_value() || !on_face(nodes()[at(arc.tail)], members[0], members[1]) ||
        !on_face(nodes()[at(arc.head)], members[0], members[1])) {
      continue;
    }
    const int j = members[1];
    const double low = std::min(position(arc.tail)[j], position(arc.head)[j]);
    const double high = std::max(position(arc.tail)[j], position(arc.head)[j]);
    if (x[j] >= low && x[j] <= high) {
      return k;
    }
  }
  return std::nullopt;
}

/// The arc a curve follows into a saddle: from the interior for an azeotrope, along the other edge for a pure
/// component.
std::optional<int> FlowMap::arc_into(int node) const {
  for (int k = 0; k < static_cast<int>(arcs_.size()); ++k) {
    if (arcs_[at(k)].head == node) {
      return k;
    }
  }
  return std::nullopt;
}

std::optional<FlowMap::Sides> FlowMap::sides(const Arc& wall) const {
  const Composition leaving = minus(wall.points[1], wall.points[0]);
  Sides result;
  bool has_left = false;
  bool has_right = false;
  for (const Arc& first : arcs_) {
    if (first.head != wall.tail) {
      continue;
    }
    const Composition back = minus(first.points[first.points.size() - 2], first.points.back());
    const bool left = cross(leaving, back) > 0.0;
    std::vector<Composition> path(first.points.rbegin(), first.points.rend());
    int source = first.tail;
    // A chain of saddles is no longer than the list of nodes.
    for (std::size_t step = 0; step < nodes().size(); ++step) {
      const std::optional<int> next = arc_into(source);
      if (!next.has_value()) {
        break;
      }
      const Arc& arc = arcs_[at(*next)];
      append(path, {arc.points.rbegin(), arc.points.rend()});
      source = arc.tail;
    }
    (left ? result.left : result.right) = std::move(path);
    (left ? result.left_source : result.right_source) = source;
    (left ? has_left : has_right) = true;
  }
  return has_left && has_right ? std::optional<Sides>(result) : std::nullopt;
}

/// Arcs that lie on the rim of a region.
std::vector<int> FlowMap::rim(const Region& region) const {
  const std::vector<Composition> ring = closed(region.polygon);
  std::vector<int> result;
  for (int k = 0; k < static_cast<int>(arcs_.size()); ++k) {
    const Arc& arc = arcs_[at(k)];
    bool belongs = false;
    if (arc.boundary.has_value()) {
      const std::string& id = chart_->boundaries[at(*arc.boundary)].id;
      belongs = std::find(region.boundaries.begin(), region.boundaries.end(), id) != region.boundaries.end();
    } else {
      belongs = nearest_on_curve(ring, between(arc.points.front(), arc.points.back(), 0.5)).distance < kOnRim;
    }
    if (belongs) {
      result.push_back(k);
    }
  }
  return result;
}

std::optional<std::vector<Composition>> FlowMap::curve_to(const Region& region, const Composition& x) const {
  const std::vector<int> arcs = rim(region);
  int last = -1;
  NearestOnCurve foot;
  foot.distance = 1e-7;
  for (const int k : arcs) {
    const NearestOnCurve candidate = nearest_on_curve(arcs_[at(k)].points, x);
    if (candidate.distance < foot.distance) {
      foot = candidate;
      last = k;
    }
  }
  if (last < 0) {
    return std::nullopt;
  }
  // Back from x to the source, arc by arc on the rim.
  std::vector<int> chain = {last};
  const int source_node = source(region);
  while (arcs_[at(chain.back())].tail != source_node) {
    const int node = arcs_[at(chain.back())].tail;
    const auto before = std::find_if(arcs.begin(), arcs.end(), [&](int k) { return arcs_[at(k)].head == node; });
    if (before == arcs.end() || chain.size() > arcs.size()) {
      return std::nullopt;
    }
    chain.push_back(*before);
  }
  std::vector<Composition> path;
  for (std::size_t k = chain.size() - 1; k > 0; --k) {
    append(path, arcs_[at(chain[k])].points);
  }
  const std::vector<Composition>& points = arcs_[at(last)].points;
  append(path, {points.begin(), points.begin() + static_cast<std::ptrdiff_t>(foot.segment) + 1});
  append(path, {x});
  return path;
}

std::optional<int> region_at(const Chart& chart, const Composition& x) {
  if (const std::optional<int> region = region_of(chart, x); region.has_value()) {
    return region;
  }
  for (int k = 0; k < static_cast<int>(chart.regions.size()); ++k) {
    if (nearest_on_curve(closed(chart.regions[at(k)].polygon), x).distance < kOnRim) {
      return k;
    }
  }
  return std::nullopt;
}

std::optional<RayEnd> farthest_on_ray(const std::vector<Composition>& polygon, const Composition& origin,
                                      const Composition& through) {
  const Composition ray = minus(through, origin);
  const double length2 = ray[0] * ray[0] + ray[1] * ray[1];
  const double slack = 1e-12 * std::sqrt(length2);  // a vertex this close to the ray lies on it
  std::optional<RayEnd> best;
  const auto offer = [&](const Composition& point) {
    const Composition away = minus(point, origin);
    const double t = (away[0] * ray[0] + away[1] * ray[1]) / length2;
    if (t > 0.0 && separation(point, origin) > 1e-12 && (!best.has_value() || t > best->t)) {
      best = RayEnd{t, point};
    }
  };
  for (std::size_t k = 0; k < polygon.size(); ++k) {
    const Composition& a = polygon[k];
    const Composition& b = polygon[(k + 1) % polygon.size()];
    const double side_a = cross(ray, minus(a, origin));
    const double side_b = cross(ray, minus(b, origin));
    if (std::abs(side_a) <= slack) {
      offer(a);
    }
    if (std::abs(side_a) > slack && std::abs(side_b) > slack && (side_a > 0.0) != (side_b > 0.0)) {
      offer(between(a, b, side_a / (side_a - side_b)));
    }
  }
  return best;
}

}  // namespace stillshed
