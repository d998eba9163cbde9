/// What a missing pair can change: products are judged at the corners and the centre of the box of its possible
/// activity coefficients at infinite dilution.
///
///   ln g_i(infinite dilution in j), ln g_j(infinite dilution in i)  in [-1, +3] x [-1, +3]
///
/// A two-constant Redlich-Kister correction on top of the filled model brings the binary (i, j) to such a point at the
/// mean boiling temperature of the components: c0 - c1 = g_i - filled_i, c0 + c1 = g_j - filled_j.
/// Several missing pairs: every combination, up to kMostCombinations, more are not tried.
/// A point whose liquid splits has no verdict in this version, so most missing pairs end in NO CALL.
/// A verdict that is the same at every point is kept, with evidence mark 0; any other is NO CALL.
#pragma once

#include <functional>
#include <optional>
#include <vector>

#include "reports/model_choice.hpp"

namespace stillshed {

inline constexpr double kLowestLnGamma = -1.0;
inline constexpr double kHighestLnGamma = 3.0;
inline constexpr std::size_t kMostCombinations = 25;  ///< two missing pairs

/// The mixture at every combination of corners and centre; empty when there would be too many.
[[nodiscard]] std::vector<Mixture> bounding_mixtures(const Mixture& filled, const std::vector<MissingPair>& missing,
                                                     double pressure_Pa);

/// True when these members include both ends of a missing pair.
[[nodiscard]] bool holds_missing_pair(const Members& members, const std::vector<MissingPair>& missing);

/// Takes out of the survey of a filled mixture what its missing pairs decide: faces that hold one are not run, nodes
/// whose type hangs on one are degenerate, the index rule of the mixture is open, a complete survey undecided.
void forget_missing_pairs(Survey& survey, const std::vector<MissingPair>& missing);

/// The same verdicts in every reach that a mixture can have: per product the common verdict, or nothing.
/// `judge` gives the verdicts of one mixture, in the order of the products.
[[nodiscard]] std::vector<std::optional<Verdict>> common_verdicts(
    const std::vector<Mixture>& mixtures, std::size_t products,
    const std::function<std::vector<Verdict>(const Mixture&)>& judge);

}  // namespace stillshed
