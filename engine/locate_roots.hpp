/// Numerical search for azeotropes of one face: Newton from many starts. No claim of completeness.
///
/// Starts    the barycentre, edge midpoints (n <= 6), points near every vertex (n <= 6), the roots of the sub-faces
/// with
///           one member less nudged inward, and seeded points spread over the face (n <= 5: 8 n, else 4).
/// Method    Newton in (x, T) with exact derivatives; a step stays 95 % of the way inside the simplex. A root counts
///           when every |f_i| is at rounding level and every x_i is positive.
#pragma once

#include <cstdint>
#include <vector>

#include "engine/face_system.hpp"

namespace stillshed {

struct LocatedRoot {
  Composition x;
  double temperature_K = 0.0;
  double regularity = 0.0;  ///< smallest over largest singular value of the Jacobian: small = nearly double
};

/// `nearby` are compositions of the face to start from as well (sub-face roots nudged inward).
[[nodiscard]] std::vector<LocatedRoot> locate_roots(const FaceSystem& system, const std::vector<Composition>& nearby,
                                                    std::uint64_t seed);

/// Newton from one start; empty when it does not converge inside the open face.
[[nodiscard]] bool polish_root(const FaceSystem& system, Composition& x, double& temperature_K, double& regularity);

/// A temperature to start from: sum x_i f_i = 0 in T at fixed x.
[[nodiscard]] double start_temperature(const FaceSystem& system, const Composition& x);

}  // namespace stillshed
