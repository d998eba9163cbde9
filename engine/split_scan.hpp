/// Does a boiling liquid of this mixture split anywhere? A scan for places where it is unstable to small changes.
///
/// On every binary edge (kEdgePoints) and, up to kFacesUpTo components, on a grid of every ternary face, at the boiling
/// temperature of that composition: the softest curvature of the tangent-plane distance (engine/stability.hpp). Below
/// zero the liquid splits: certain up to rounding, with the composition as witness.
///
/// Claims    a witness is a fact. No witness is strong evidence, not proof: a gap narrower than the grid is missed.
///           Azeotropes of two liquids can exist where no azeotrope of one liquid does, so a survey without rejected
///           roots does not show that nothing splits.
/// Errors    none; points without a bubble point are passed over.
#pragma once

#include <vector>

#include "models/mixture.hpp"

namespace stillshed {

inline constexpr int kEdgePoints = 39;
inline constexpr int kFacesUpTo = 6;

struct SplitWitness {
  Members members;  ///< of the face
  Composition x;    ///< all components of the mixture; the softest point found on this face
  double temperature_K = 0.0;
  double curvature = 0.0;  ///< below zero, relative to an ideal liquid
};

/// At most one witness per face, by size of the face, then members.
[[nodiscard]] std::vector<SplitWitness> scan_for_splits(const Mixture& mixture, double pressure_Pa);

}  // namespace stillshed
