#include "engine/boundaries.hpp"

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <cmath>

#include "engine/bubble_point.hpp"
#include "engine/geometry.hpp"
#include "engine/node_type.hpp"
#include "engine/residue_curve.hpp"

namespace stillshed {
namespace {

constexpr double kDisplacement = 1e-6;

struct Branch {
  Composition start;
  int direction = 0;  ///< +1 toward higher temperature
};

/// d(x - y)/dx in two coordinates (components 1 and 2 free, component 0 takes up the change).
Eigen::Matrix2d field_jacobian(const Mixture& mixture, double pressure_Pa, const FixedPoint& point) {
  const BubblePoint bubble = bubble_point(mixture, point.x, pressure_Pa, point.temperature_K);
  const BubbleGradient gradient = bubble_gradient(mixture, point.x, pressure_Pa, bubble);
  Eigen::Matrix2d m;
  for (int r = 0; r < 2; ++r) {
    for (int c = 0; c < 2; ++c) {
      m(r, c) = (r == c ? 1.0 : 0.0) - (gradient.dy_dx(r + 1, c + 1) - gradient.dy_dx(r + 1, 0));
    }
  }
  return m;
}

/// Steps from the saddle along its eigenvectors, those that stay inside the triangle and off its edges.
std::vector<Branch> branches_of(const Mixture& mixture, double pressure_Pa, const FixedPoint& point) {
  std::vector<Branch> branches;
  const Eigen::EigenSolver<Eigen::Matrix2d> solver(field_jacobian(mixture, pressure_Pa, point));
  for (int k = 0; k < 2; ++k) {
    const double eigenvalue = solver.eigenvalues()[k].real();
    const Eigen::Vector2d v = solver.eigenvectors().col(k).real();
    Composition direction{-v[0] - v[1], v[0], v[1]};
    const double length = std::sqrt(direction[0] * direction[0] + v[0] * v[0] + v[1] * v[1]);
    for (const double side : {1.0, -1.0}) {
      Composition start = point.x;
      // Near an edge the step must not be longer than the way to it.
      double step = kDisplacement;
      for (int i = 0; i < 3; ++i) {
        const double change = side * direction[i] / length;
        if (point.x[i] > 0.0 && change < 0.0) {
          step = std::min(step, 0.1 * point.x[i] / -change);
        }
      }
      bool interior = true;
      for (int i = 0; i < 3; ++i) {
        start[i] += side * step * direction[i] / length;
        interior = interior && start[i] > 1e-3 * step;
      }
      if (interior) {
        branches.push_back({start, eigenvalue > 0.0 ? +1 : -1});
      }
    }
  }
  return branches;
}

}  // namespace

BoundarySet find_boundaries(const Mixture& mixture, double pressure_Pa, const std::vector<FixedPoint>& fixed_points,
                            double error) {
  BoundarySet set;
  set.status = Status::complete;
  TraceOptions options;
  options.chord = 0.01 * error;  // the nearest point of a chord wanders along the curve by the root of this
  options.capture = std::min(2.0 * error, 2e-4);
  options.tolerance = std::min(1e-9, 1e-5 * error);
  for (std::size_t k = 0; k < fixed_points.size(); ++k) {
    const FixedPoint& saddle = fixed_points[k];
    if (saddle.node != NodeType::saddle || saddle.pure()) {
      continue;  // the branches of a pure saddle run along the edges
    }
    for (const Branch& branch : branches_of(mixture, pressure_Pa, saddle)) {
      Trace trace = trace_curve(mixture, pressure_Pa, fixed_points, branch.start, branch.direction, options);
      if (trace.status != Status::complete || *trace.end == static_cast<int>(k)) {
        set.status = Status::undecided;
        set.message += (set.message.empty() ? "" : "; ") + std::string("a boundary of ") + saddle.id +
                       " could not be followed to a node";
        continue;
      }
      Boundary boundary;
      boundary.error = error;
      boundary.curve = std::move(trace.curve);
      boundary.curve.points.insert(boundary.curve.points.begin(), saddle.x);
      boundary.curve.temperature_K.insert(boundary.curve.temperature_K.begin(), saddle.temperature_K);
      boundary.from = static_cast<int>(k);
      boundary.to = *trace.end;
      boundary.confines = Confines::overheads;
      if (branch.direction < 0) {
        std::reverse(boundary.curve.points.begin(), boundary.curve.points.end());
        std::reverse(boundary.curve.temperature_K.begin(), boundary.curve.temperature_K.end());
        std::swap(boundary.from, boundary.to);
        boundary.confines = Confines::bottoms;
      }
      boundary.id = "b" + std::to_string(set.boundaries.size() + 1);
      set.boundaries.push_back(std::move(boundary));
    }
  }
  return set;
}

}  // namespace stillshed
