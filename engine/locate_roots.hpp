/// Numerical search for azeotropes of one face: Newton from many deterministic starts. No claim of completeness.
///
/// Starts    the barycentre; 80 % of every member; the given ones (roots of sub-faces nudged inward); then `spread`
/// points of
///           a low-discrepancy sequence, shifted by the seed. The temperature of a start solves sum x_i f_i = 0 there.
/// Method    Newton in (x, T) with exact derivatives, sum x_i = 1 as a bordering row; a step leaves at least a tenth of
/// every
///           fraction. A root counts when every |f_i| is at rounding level and every x_i is positive; a run that ends
///           on a sub-face is dropped, for that face is searched by itself.
#pragma once

#include <cstdint>
#include <optional>
#include <vector>

#include "engine/face_system.hpp"

namespace stillshed {

struct LocatedRoot {
  Composition x;
  double temperature_K = 0.0;
};

struct LocateOptions {
  std::vector<Composition> nearby;  ///< further starts, compositions of the face
  int spread = 16;                  ///< number of spread-out starts
  std::uint64_t seed = 1;
};

/// Every different root found, by temperature, then composition.
[[nodiscard]] std::vector<LocatedRoot> locate_roots(const FaceSystem& system, const LocateOptions& options = {});

/// Newton from one start; empty when it does not converge inside the open face.
[[nodiscard]] std::optional<LocatedRoot> newton_from(const FaceSystem& system, LocatedRoot start);

/// A temperature to start from: sum x_i f_i = 0 in T at fixed x, to a few kelvin.
[[nodiscard]] double start_temperature(const FaceSystem& system, const Composition& x);

/// True when two roots agree to what Newton reaches (relative to the fractions, so that traces count; a double root is
/// reached to 1e-8 only).
[[nodiscard]] bool same_root(const LocatedRoot& a, const LocatedRoot& b);

/// Point `index` of a low-discrepancy sequence on the open simplex.
[[nodiscard]] Composition simplex_sequence(int size, std::uint64_t index, std::uint64_t seed);

}  // namespace stillshed
