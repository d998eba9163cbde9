/// Proof that the azeotropes of one face are all known: interval branch and prune over (x, T).
///
/// Rules for a box, in this order (engine/interval_newton.hpp has the formulas):
///   simplex      sum x_i = 1 narrows every fraction
///   known root   inside the neighbourhood of a verified root, which holds no second one: done
///   value        every f_i over the box narrows T
///   mean value   every f_i around the centre narrows T
///   Newton       the preconditioned system narrows every unknown
///   regular      at most one root: Newton in doubles from the centre looks for it, and verifies it
/// and the rest is halved where the f differ most. Only the empty intersection of two valid enclosures dismisses a box:
/// an unbounded or undefined enclosure never does.
///
/// A root is verified by a small box that a Krawczyk step maps strictly into itself (existence), within a box where the
/// preconditioned gradient is regular (uniqueness). Located roots are verified first.
///
/// A box narrower than `cluster_width` that nothing decides goes to a cluster, and clusters that touch are merged:
/// tangent azeotropes, twins, roots exactly on a sub-face. After every kLeavesPerWidth such boxes the width is raised
/// fourfold, so that a whole curve of roots costs little.
///
/// Claims    complete: for the stored double-precision parameters, this model and T inside the reported bracket, every
///           solution of the single-liquid equations (engine/face_system.hpp) with x on the closed face lies in a
///           listed box and each box holds exactly one. degenerate: the same, but a cluster may hold any number, also
///           none. undecided, stopped: the boxes in `undecided` are not dealt with. Nothing is said about T outside the
///           bracket.
/// Source    R. S. Maier, J. F. Brennecke, M. A. Stadtherr, AIChE J. 44 (1998) 1745 (interval Newton for azeotropes;
/// from
///           memory).
#pragma once

#include <cstdint>
#include <stop_token>
#include <vector>

#include "engine/locate_roots.hpp"
#include "engine/survey.hpp"

namespace stillshed {

inline constexpr int kLeavesPerWidth = 64;

struct ProofOptions {
  std::int64_t max_boxes = 2'000'000;
  double cluster_width = 3e-8;  ///< mole fraction
  double mutation = 1.0;        ///< for tests of the tests: scales the radii of the gradient; 1 is sound, less is not
  std::stop_token stop;
};

struct CertifiedRoot {
  Composition x;
  double temperature_K = 0.0;
  Box box;
  bool cluster = false;
};

struct ProofResult {
  Status status = Status::not_run;
  double t_lower_K = 0.0;
  double t_upper_K = 0.0;
  std::int64_t boxes = 0;
  std::vector<CertifiedRoot> roots;  ///< by temperature, then composition
  std::vector<Box> undecided;
};

/// `located` are roots found before; others are found on the way.
[[nodiscard]] ProofResult prove_face(const FaceSystem& system, const std::vector<LocatedRoot>& located,
                                     const ProofOptions& options = {});

}  // namespace stillshed
