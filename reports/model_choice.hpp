/// Which activity model a run uses, and what is known about every pair of components in it.
///
/// "auto": modified UNIFAC (Dortmund) when every pair of components is covered, else original UNIFAC when that covers
/// them all, else the table with fewer missing component pairs (Dortmund on a tie), those pairs named. Tables are
/// never mixed within one mixture. A named table with missing pairs is used the same way.
/// A missing pair is never taken as zero: its group interactions are filled with psi = 1 only so that
/// reports/missing_pairs.hpp can bound the pair by a correction on top.
#pragma once

#include <string>
#include <vector>

#include "params/records.hpp"
#include "reports/answer.hpp"

namespace stillshed {

/// Two components of which at least one pair of groups has no published parameters.
struct MissingPair {
  int i = 0;
  int j = 0;
  std::string groups;  ///< "31 (DOH) and 23 (CCl3)"; several joined by ", "
};

struct ModelChoice {
  std::string kind;  ///< "unifac-dortmund", "unifac", "ideal", "nrtl", ...
  std::string note;
  ActivityModel activity;
  std::vector<PairUse> pairs;        ///< every i < j
  std::vector<MissingPair> missing;  ///< empty: complete
  std::string refusal;               ///< not empty: no model at all, `activity` is a stand-in that must not be used
};

/// `records`: one per component of the case; null for the user's own.
[[nodiscard]] ModelChoice choose_model(const Case& input, const std::vector<const ComponentRecord*>& records,
                                       const Facts& facts);

}  // namespace stillshed
