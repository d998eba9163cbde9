#include "engine/geometry.hpp"

#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

double cross(const PlanePoint& o, const PlanePoint& a, const PlanePoint& b) {
  return (a.x - o.x) * (b.y - o.y) - (a.y - o.y) * (b.x - o.x);
}

double distance_to_segment(const PlanePoint& p, const PlanePoint& a, const PlanePoint& b) {
  const double dx = b.x - a.x;
  const double dy = b.y - a.y;
  const double length = dx * dx + dy * dy;
  const double s = length > 0.0 ? std::clamp(((p.x - a.x) * dx + (p.y - a.y) * dy) / length, 0.0, 1.0) : 0.0;
  return std::hypot(p.x - a.x - s * dx, p.y - a.y - s * dy);
}

Composition from_plane(const PlanePoint& p) {
  const double x2 = p.y / (0.5 * std::sqrt(3.0));
  const double x1 = p.x - 0.5 * x2;
  return {1.0 - x1 - x2, x1, x2};
}

bool inside_plane(const std::vector<PlanePoint>& polygon, const PlanePoint& p) {
  bool inside = false;
  for (std::size_t i = 0, j = polygon.size() - 1; i < polygon.size(); j = i++) {
    const PlanePoint& a = polygon[i];
    const PlanePoint& b = polygon[j];
    if ((a.y > p.y) != (b.y > p.y) && p.x < (b.x - a.x) * (p.y - a.y) / (b.y - a.y) + a.x) {
      inside = !inside;
    }
  }
  return inside;
}

std::vector<PlanePoint> to_plane(const std::vector<Composition>& polygon) {
  std::vector<PlanePoint> result;
  result.reserve(polygon.size());
  for (const Composition& x : polygon) {
    result.push_back(to_plane(x));
  }
  return result;
}

}  // namespace

PlanePoint to_plane(const Composition& x) {
  return {x[1] + 0.5 * x[2], 0.5 * std::sqrt(3.0) * x[2]};
}

double area_share(const std::vector<Composition>& polygon) {
  double twice = 0.0;
  for (std::size_t i = 0, j = polygon.size() - 1; i < polygon.size(); j = i++) {
    const PlanePoint a = to_plane(polygon[j]);
    const PlanePoint b = to_plane(polygon[i]);
    twice += a.x * b.y - b.x * a.y;
  }
  return 0.5 * twice / (0.25 * std::sqrt(3.0));
}

bool inside_polygon(const std::vector<Composition>& polygon, const Composition& point) {
  return inside_plane(to_plane(polygon), to_plane(point));
}

Composition interior_point(const std::vector<Composition>& polygon) {
  const std::vector<PlanePoint> plane = to_plane(polygon);
  PlanePoint low = plane.front();
  PlanePoint high = plane.front();
  for (const PlanePoint& p : plane) {
    low = {std::min(low.x, p.x), std::min(low.y, p.y)};
    high = {std::max(high.x, p.x), std::max(high.y, p.y)};
  }
  PlanePoint best = plane.front();
  double most = -1.0;
  // Finer grids until a point inside is found: thin regions need them.
  for (int cells = 16; cells <= 512 && most < 0.0; cells *= 2) {
    for (int i = 0; i < cells; ++i) {
      for (int j = 0; j < cells; ++j) {
        const PlanePoint p{low.x + (high.x - low.x) * (i + 0.5) / cells, low.y + (high.y - low.y) * (j + 0.5) / cells};
        if (!inside_plane(plane, p)) {
          continue;
        }
        double clearance = 1.0;
        for (std::size_t a = 0, b = plane.size() - 1; a < plane.size(); b = a++) {
          clearance = std::min(clearance, distance_to_segment(p, plane[a], plane[b]));
        }
        if (clearance > most) {
          most = clearance;
          best = p;
        }
      }
    }
  }
  return from_plane(best);
}

double distance(const Composition& a, const Composition& b) {
  double sum = 0.0;
  for (int i = 0; i < a.size(); ++i) {
    sum += (a[i] - b[i]) * (a[i] - b[i]);
  }
  return std::sqrt(sum);
}

Composition between(const Composition& a, const Composition& b, double s) {
  Composition result(a.size());
  for (int i = 0; i < a.size(); ++i) {
    result[i] = (1.0 - s) * a[i] + s * b[i];
  }
  return result;
}

NearestOnCurve nearest_on_curve(const std::vector<Composition>& curve, const Composition& point) {
  NearestOnCurve best{distance(curve.front(), point), curve.front(), 0, 0.0};
  for (std::size_t k = 0; k + 1 < curve.size(); ++k) {
    double along = 0.0;
    double length = 0.0;
    for (int i = 0; i < point.size(); ++i) {
      const double d = curve[k + 1][i] - curve[k][i];
      along += d * (point[i] - curve[k][i]);
      length += d * d;
    }
    const double s = length > 0.0 ? std::clamp(along / length, 0.0, 1.0) : 0.0;
    const Composition at = between(curve[k], curve[k + 1], s);
    const double away = distance(at, point);
    if (away < best.distance) {
      best = {away, at, k, s};
    }
  }
  return best;
}

std::vector<Crossing> crossings(const Composition& a, const Composition& b, const std::vector<Composition>& curve) {
  std::vector<Crossing> found;
  const PlanePoint pa = to_plane(a);
  const PlanePoint pb = to_plane(b);
  for (std::size_t k = 0; k + 1 < curve.size(); ++k) {
    const PlanePoint c = to_plane(curve[k]);
    const PlanePoint d = to_plane(curve[k + 1]);
    const double side_c = cross(pa, pb, c);
    const double side_d = cross(pa, pb, d);
    if ((side_c > 0.0) == (side_d > 0.0)) {
      continue;
    }
    const double side_a = cross(c, d, pa);
    const double side_b = cross(c, d, pb);
    if ((side_a > 0.0) == (side_b > 0.0)) {
      continue;
    }
    found.push_back({side_a / (side_a - side_b), k, side_c / (side_c - side_d)});
  }
  std::sort(found.begin(), found.end(), [](const Crossing& u, const Crossing& v) { return u.s < v.s; });
  return found;
}

}  // namespace stillshed
