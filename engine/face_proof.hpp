/// Proof that the azeotropes of one face are all known: interval branch and prune.
///
/// What `complete` means: for the stored double-precision parameters, this model and T inside the reported bracket,
/// every solution of the single-liquid equations (engine/face_system.hpp) with x on the closed face lies in a listed
/// box and each box holds exactly one. Nothing more.
///
/// Method    temperature bracket: slices of [0.5 Tmin, 1.6 Tmax] (boiling points of the face) in which no composition
/// can
///           solve the equations are cut away by one interval evaluation each, using every f_i and
///           gE/RT + sum x_i ln(Psat_i/P) = sum x_i f_i = 0.
///           Located roots are verified first (Krawczyk operator strictly inside a small box) and surrounded by the
///           largest box in which the preconditioned Jacobian is regular, which holds no second root.
///           Then bisection of the face: simplex cuts, T from each equation by the mean-value form in T, f_i without
///           zero, preconditioned interval Newton (Hansen-Sengupta) contraction, regularity.
/// Soundness an enclosure that is unbounded or undefined excludes nothing; the mean-value centre lies on the simplex
///           inside the box, or the step is left out.
/// Sources   R. Krawczyk, Computing 4 (1969) 187-201; E. Hansen, S. Sengupta, BIT 21 (1981) 201-211; R. S. Maier,
///           J. F. Brennecke, M. A. Stadtherr, AIChE J. 44 (1998) 1745 (interval Newton for azeotropes) (from memory).
#pragma once

#include <cstdint>
#include <stop_token>
#include <vector>

#include "engine/locate_roots.hpp"
#include "engine/survey.hpp"

namespace stillshed {

struct ProofOptions {
  std::int64_t max_boxes = 2'000'000;
  double cluster_width =
      3e-8;               ///< a box narrower than this in every mole fraction that no test can settle is a cluster
  double mutation = 1.0;  ///< for tests of the tests: scales interval radii of the Jacobian; 1 = sound
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
  std::vector<CertifiedRoot> roots;
  std::vector<Box> undecided;
};

[[nodiscard]] ProofResult prove_face(const FaceSystem& system, const std::vector<LocatedRoot>& located,
                                     const ProofOptions& options);

}  // namespace stillshed
