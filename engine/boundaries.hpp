/// Distillation boundaries of a ternary: the residue-curve separatrices of its saddles.
///
/// A saddle inside the triangle has four branches, a saddle on an edge one (into the triangle; its other branches are
/// the edge itself). Branches along a positive eigenvalue are followed toward higher temperature, to a stable node
/// (confines overheads); along a negative one toward lower temperature, to an unstable node (confines bottoms).
///
/// Start     1e-6 mole fraction from the saddle along the eigenvector; the neglected curvature is of second order.
/// Errors    a branch that does not end at a node is left out and named in `message`.
#pragma once

#include <string>
#include <vector>

#include "engine/chart.hpp"

namespace stillshed {

struct BoundarySet {
  Status status = Status::not_run;  ///< complete | undecided (some branch could not be followed)
  std::string message;
  std::vector<Boundary> boundaries;
};

[[nodiscard]] BoundarySet find_boundaries(const Mixture& mixture, double pressure_Pa,
                                          const std::vector<FixedPoint>& fixed_points, double error);

}  // namespace stillshed
