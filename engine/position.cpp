#include "engine/position.hpp"

#include <algorithm>
#include <cmath>

#include "engine/bubble_point.hpp"
#include "engine/geometry.hpp"

namespace stillshed {
namespace {

constexpr double kOnBoundary = 1e-4;

/// The curves (ternary) or points (binary) that part the regions.
std::vector<std::vector<Composition>> walls(const Chart& chart) {
  std::vector<std::vector<Composition>> result;
  for (const Boundary& boundary : chart.boundaries) {
    result.push_back(boundary.curve.points);
  }
  return result;
}

bool is_binary(const Chart& chart) {
  return !chart.fixed_points.empty() && chart.fixed_points.front().x.size() == 2;
}

void keep_nearer(std::optional<Nearest>& slot, const Nearest& candidate) {
  if (!slot || candidate.distance < slot->distance) {
    slot = candidate;
  }
}

/// Positions s in (0, 1) along the line from x to `target` where a wall is crossed.
std::vector<double> wall_crossings(const Chart& chart, const Composition& x, const Composition& target) {
  std::vector<double> found;
  if (is_binary(chart)) {
    for (const FixedPoint& point : chart.fixed_points) {
      const double span = target[0] - x[0];
      const double s = span != 0.0 ? (point.x[0] - x[0]) / span : -1.0;
      if (!point.pure() && s > 0.0 && s < 1.0) {
        found.push_back(s);
      }
    }
  } else {
    for (const auto& wall : walls(chart)) {
      for (const Crossing& crossing : crossings(x, target, wall)) {
        found.push_back(crossing.s);
      }
    }
  }
  std::sort(found.begin(), found.end());
  return found;
}

}  // namespace

std::optional<int> region_of(const Chart& chart, const Composition& x) {
  for (std::size_t k = 0; k < chart.regions.size(); ++k) {
    const Region& region = chart.regions[k];
    if (is_binary(chart)) {
      if (x[0] >= region.polygon[0][0] && x[0] <= region.polygon[1][0]) {
        return static_cast<int>(k);
      }
    } else if (inside_polygon(region.polygon, x)) {
      return static_cast<int>(k);
    }
  }
  if (is_binary(chart) || chart.regions.empty()) {
    return std::nullopt;
  }
  // On an edge of the triangle rounding decides against every polygon: step inside and ask again.
  Composition inner(x.size());
  for (int i = 0; i < x.size(); ++i) {
    inner[i] = (1.0 - 1e-9) * x[i] + 1e-9 / x.size();
  }
  if (*std::min_element(x.begin(), x.end()) < 1e-10) {
    for (std::size_t k = 0; k < chart.regions.size(); ++k) {
      if (inside_polygon(chart.regions[k].polygon, inner)) {
        return static_cast<int>(k);
      }
    }
  }
  return std::nullopt;
}

std::optional<Flip> smallest_flip(const Mixture& mixture, const Chart& chart, const Composition& x) {
  std::optional<Flip> best;
  double molar_mass = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    molar_mass += x[i] * mixture.component(i).molar_mass_g_mol;
  }
  const auto offer = [&](int component, double moles) {
    const double kg = 100.0 * moles * mixture.component(component).molar_mass_g_mol / molar_mass;
    if (!best || std::abs(kg) < std::abs(best->kg_per_100kg)) {
      best = Flip{component, kg};
    }
  };
  for (int i = 0; i < x.size(); ++i) {
    Composition vertex(x.size(), 0.0);
    vertex[i] = 1.0;
    const std::vector<double> adding = wall_crossings(chart, x, vertex);
    if (!adding.empty()) {
      offer(i, adding.front() / (1.0 - adding.front()));
    }
    if (x[i] > 0.0 && x[i] < 1.0) {
      Composition without = x;
      without[i] = 0.0;
      for (double& value : without) {
        value /= 1.0 - x[i];
      }
      const std::vector<double> removing = wall_crossings(chart, x, without);
      if (!removing.empty()) {
        // At share s of the way a fraction s of component i is gone... measured on what is left: x_i' = (1 - s) x_i.
        const double left = (1.0 - removing.front()) * x[i];
        offer(i, (left - x[i]) / (1.0 - left));
      }
    }
  }
  return best;
}

Position locate(const Mixture& mixture, const Chart& chart, const Composition& x) {
  Position position;
  const BubblePoint bubble = bubble_point_scanned(mixture, x, chart.pressure_Pa);
  position.bubble_temperature_K = bubble.temperature_K;
  position.vapour = bubble.y;
  position.region = region_of(chart, x);
  double error = 0.0;
  if (is_binary(chart)) {
    for (const FixedPoint& point : chart.fixed_points) {
      if (point.pure()) {
        continue;
      }
      const Nearest nearest{distance(point.x, x), point.id, point.x};
      keep_nearer(position.nearest, nearest);
      keep_nearer(point.node == NodeType::unstable_node ? position.nearest_bottoms : position.nearest_overheads,
                  nearest);
    }
  }
  for (const Boundary& boundary : chart.boundaries) {
    const NearestOnCurve on = nearest_on_curve(boundary.curve.points, x);
    const Nearest nearest{on.distance, boundary.id, on.point};
    keep_nearer(position.nearest, nearest);
    keep_nearer(boundary.confines == Confines::overheads ? position.nearest_overheads : position.nearest_bottoms,
                nearest);
    error = std::max(error, boundary.error);
  }
  position.on_boundary = position.nearest && position.nearest->distance < kOnBoundary + error;
  if (position.on_boundary) {
    position.region.reset();
  }
  position.residue_curve = residue_curve(mixture, chart.pressure_Pa, chart.fixed_points, x);
  if (const auto flip = smallest_flip(mixture, chart, x)) {
    position.flip_component = flip->component;
    position.flip_kg_per_100kg = flip->kg_per_100kg;
  }
  return position;
}

}  // namespace stillshed
