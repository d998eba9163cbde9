#include "engine/chart.hpp"

#include <algorithm>

#include "engine/boundaries.hpp"
#include "engine/geometry.hpp"
#include "engine/regions.hpp"

namespace stillshed {
namespace {

/// Residue curves spread over the triangle: each starts at the grid point farthest from everything drawn so far.
void draw_curves(const Mixture& mixture, int wanted, Chart& chart) {
  constexpr int kGrid = 12;
  std::vector<Composition> seeds;
  for (int i = 1; i < kGrid; ++i) {
    for (int j = 1; i + j < kGrid; ++j) {
      seeds.push_back(
          {1.0 - static_cast<double>(i + j) / kGrid, static_cast<double>(i) / kGrid, static_cast<double>(j) / kGrid});
    }
  }
  std::vector<double> clearance(seeds.size());
  const auto drawn = [&](const std::vector<Composition>& curve) {
    for (std::size_t k = 0; k < seeds.size(); ++k) {
      clearance[k] = std::min(clearance[k], nearest_on_curve(curve, seeds[k]).distance);
    }
  };
  for (std::size_t k = 0; k < seeds.size(); ++k) {
    // Distance to an edge where x_i = 0 is x_i sqrt(3/2).
    clearance[k] = 1.2247448713915890 * *std::min_element(seeds[k].begin(), seeds[k].end());
  }
  for (const Boundary& boundary : chart.boundaries) {
    drawn(boundary.curve.points);
  }
  for (int count = 0; count < wanted; ++count) {
    const auto best =
        static_cast<std::size_t>(std::max_element(clearance.begin(), clearance.end()) - clearance.begin());
    if (clearance[best] < 0.02) {
      break;
    }
    chart.curves.push_back(residue_curve(mixture, chart.pressure_Pa, chart.fixed_points, seeds[best]));
    drawn(chart.curves.back().curve.points);
    clearance[best] = 0.0;
  }
}

}  // namespace

const char* to_string(Confines confines) {
  return confines == Confines::overheads ? "overheads" : "bottoms";
}

Chart chart(const Mixture& mixture, const Survey& survey, const ChartOptions& options) {
  Chart result;
  result.pressure_Pa = survey.pressure_Pa;
  result.fixed_points = survey.fixed_points();
  const int n = mixture.size();
  if (n != 2 && n != 3) {
    result.status = Status::not_applicable;
    result.message = "maps are drawn for two and three components";
    return result;
  }
  if (survey.splits()) {
    result.status = Status::undecided;
    result.message = "a liquid splits here: the map is not drawn until heteroazeotropes are searched";
    return result;
  }
  if (survey.status != Status::complete) {
    result.status = survey.status == Status::degenerate ? Status::degenerate : Status::undecided;
    result.message = survey.status == Status::degenerate
                         ? "an azeotrope is degenerate: its boundaries have no direction"
                         : "the azeotropes are not all known";
    return result;
  }
  for (const FixedPoint& point : result.fixed_points) {
    if (point.node == NodeType::degenerate) {
      result.status = Status::degenerate;
      result.message = point.id + " is degenerate: its boundaries have no direction";
      return result;
    }
  }
  RegionSet regions;
  if (n == 2) {
    regions = find_intervals(result.fixed_points);
  } else {
    BoundarySet boundaries = find_boundaries(mixture, result.pressure_Pa, result.fixed_points, options.boundary_error);
    result.boundaries = std::move(boundaries.boundaries);
    if (boundaries.status != Status::complete) {
      result.status = boundaries.status;
      result.message = boundaries.message;
      return result;
    }
    regions = find_regions(mixture, result.pressure_Pa, result.fixed_points, result.boundaries);
    draw_curves(mixture, options.curves, result);
  }
  result.regions = std::move(regions.regions);
  result.status = regions.status;
  result.message = regions.message;
  return result;
}

}  // namespace stillshed
