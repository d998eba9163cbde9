/// The map of a ternary mixture as one SVG picture: residue curves with arrows towards rising temperature,
/// boundaries, regions, azeotropes by node type, the feed and the way of the pot.
///
/// Basis    mole fractions, an equilateral triangle; straight mixing lines stay straight.
/// Corners  lowest boiling component on top, the next one left, the highest boiling one right (stated in the legend).
/// Ticks    slanted along the grid lines they belong to; each edge carries one component.
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed {

/// Needs three components and a survey; draws what else there is.
[[nodiscard]] std::string ternary_map_svg(const Answer& answer);

/// What the picture shows, in words.
[[nodiscard]] std::string ternary_map_words(const Answer& answer);

}  // namespace stillshed
