/// Searches for azeotropes that share nothing with the engine: the second opinion of the property tests.
#pragma once

#include <functional>
#include <vector>

#include "tests/support/random_mixtures.hpp"

namespace stillshed::testing {

/// Roots of the open face by Newton with difference quotients from `starts` random points: an independent, incomplete
/// search with its own equations (y_i/x_i equal for all members, bubble temperature eliminated).
[[nodiscard]] std::vector<KnownRoot> search_independently(const Mixture& mixture, const Members& members,
                                                          double pressure_Pa, int starts, Random& random);

/// All roots of g on (0, 1): sign changes on a grid that is geometric towards both ends, then bisection.
[[nodiscard]] std::vector<double> roots_on_unit_interval(const std::function<double(double)>& g);

/// Largest |ln K_i| of the members at a root.
[[nodiscard]] double residual(const Mixture& mixture, const KnownRoot& root, double pressure_Pa);

/// True when no known point lies within `distance` of x in any mole fraction.
[[nodiscard]] bool apart(const std::vector<Composition>& points, const Composition& x, double distance);

}  // namespace stillshed::testing
