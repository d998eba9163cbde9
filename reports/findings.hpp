/// Small facts that every writer derives from an Answer in the same way: amounts in kg, names of
/// points, the evidence of an azeotrope.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "reports/answer.hpp"

namespace stillshed {

/// Mean molar mass of a composition [g/mol].
[[nodiscard]] double molar_mass_g_mol(const Mixture& mixture, const Composition& x);

/// Mass fractions of a composition, in component order.
[[nodiscard]] std::vector<double> mass_fractions(const Mixture& mixture, const Composition& x);

/// Mass of `share` moles of `x` per mole of the volatile charge; empty when the amount was not given.
[[nodiscard]] std::optional<double> kilograms(const Answer& answer, const Composition& x, double share);

/// Fixed points in the order that indices refer to: the chart's, or the survey's.
[[nodiscard]] std::vector<FixedPoint> fixed_points(const Answer& answer);

/// "az1" of "az1(acetone,methanol)"; a pure component keeps its id.
[[nodiscard]] std::string short_id(const std::string& id);

/// "acetone + methanol" for the members of a face.
[[nodiscard]] std::string member_names(const Mixture& mixture, const Members& members, const char* separator = " + ");

/// "batch rectifier, cut 2" of "batch[0].cuts[1]"; counted from one. What is not understood comes back as it is.
[[nodiscard]] std::string reading_words(const Answer& answer, const std::string& reading);

/// Evidence mark of azeotrope k: "M" when a measurement lies within 0.5 K and 1 mol% at the same pressure,
/// otherwise the weakest mark of the parameters its members use.
[[nodiscard]] std::string azeotrope_evidence(const Answer& answer, std::size_t k);

/// Weakest of all marks in use.
[[nodiscard]] Evidence weakest_evidence(const Answer& answer, const Members& members);

/// A final stream of a sequence that holds one component best.
struct BestStream {
  std::size_t stream = 0;
  double recovery = 0.0;  ///< share of the component in the charge that leaves here
};
[[nodiscard]] std::optional<BestStream> best_stream(const Sequence& sequence, const Composition& feed, int component);

}  // namespace stillshed
