/// From a case to the mixture the engine works on: one vapour-pressure set per component, one activity model.
///
/// The set of a component is chosen once per run: it covers the whole temperature bracket if any does, then the best
/// graded, then the newest (order of the records on file). Bracket, before anything is computed: from 30 K below the
/// lowest to 10 K above the highest boiling point at the pressure of the run; azeotropes may lie outside, the
/// curve is continued there and the evidence becomes X.
#pragma once

#include <vector>

#include "params/catalog.hpp"
#include "reports/answer.hpp"
#include "reports/model_choice.hpp"

namespace stillshed {

struct BuiltMixture {
  Mixture mixture;
  ModelChoice choice;
  std::vector<const ComponentRecord*> records;  ///< null for the user's own
};

[[nodiscard]] BuiltMixture build_mixture(const Case& input, const Catalog& catalog);

/// Marks of the vapour-pressure sets once the temperatures of the run are known: U for the user's own, P when the set
/// is estimated, X when some temperature or the pressure (above 3 bar) lies outside, else F.
[[nodiscard]] std::vector<Evidence> pressure_evidence(const Mixture& mixture, double pressure_Pa, double lowest_K,
                                                      double highest_K);

}  // namespace stillshed
