/// Where a composition sits in a chart: region, distances to boundaries, the change that moves it to another region.
/// Declared in engine/chart.hpp (`locate`); this header holds the pieces that are tested on their own.
///
/// A binary has no boundary curves: its azeotropes part the regions, and distances are to them.
#pragma once

#include "engine/chart.hpp"

namespace stillshed {

/// Index of the region that holds x; empty when none does (on a boundary to rounding).
[[nodiscard]] std::optional<int> region_of(const Chart& chart, const Composition& x);

/// Smallest kg of one component added to (positive) or taken out of (negative) 100 kg of x that changes the region.
struct Flip {
  int component = 0;
  double kg_per_100kg = 0.0;
};
[[nodiscard]] std::optional<Flip> smallest_flip(const Mixture& mixture, const Chart& chart, const Composition& x);

}  // namespace stillshed
