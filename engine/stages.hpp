/// What a given number of theoretical stages can do at total reflux, while the pot still holds what it started with.
///
///   x_1 = pot,   x_{j+1} = y(x_j)          y: vapour in equilibrium with boiling liquid x
///
/// The pot is stage 1; the vapour of stage N leaves the top and is condensed. A bound on purity only: it says nothing
/// about amounts, and the pot becomes poorer in the product as the cut goes on.
#pragma once

#include <vector>

#include "engine/bubble_point.hpp"

namespace stillshed {

struct StageProfile {
  Status status = Status::not_run;  ///< complete | undecided (a bubble point failed)
  std::vector<Composition> x;       ///< the pot, then the vapour of stage 1, 2, ... N
};
[[nodiscard]] StageProfile stage_profile(const Mixture& mixture, double pressure_Pa, const Composition& pot,
                                         int stages);

}  // namespace stillshed
