/// Charts drawn by hand: every number of a batch or split on them can be checked with a pencil.
#pragma once

#include "engine/chart.hpp"

namespace stillshed::testing {

/// Three components, every binary and the ternary azeotrope a minimum: straight boundaries, equal regions.
Chart symmetric_chart();

/// A, B, C without azeotropes, A lightest.
Chart zeotropic_chart();

/// A and B are unstable nodes, their maximum azeotrope a saddle, C the stable node; the boundary azeotrope -> C runs
/// through the given points (x_A, x_B) on its way.
Chart walled_chart(const std::vector<std::pair<double, double>>& on_the_way);

/// Mixture "zeta, mu, alpha": zeta is the unstable node, mu and alpha stable nodes, their azeotrope a saddle; the
/// boundary zeta -> azeotrope is curved. Points of the boundary: integrated separately (LSODA, 1e-10).
Chart curved_chart();

/// Two components; x_B of the azeotrope, a minimum or a maximum.
Chart binary_chart(double azeotrope_B, bool minimum);

/// The same chart upside down: what boils first boils last. A rectifier on it is a stripper on the original.
Chart upside_down(const Chart& chart);

/// Components renumbered: new component order[i] is old component i.
Chart renumbered(const Chart& chart, const std::vector<int>& order);
Composition renumbered(const Composition& x, const std::vector<int>& order);

}  // namespace stillshed::testing
