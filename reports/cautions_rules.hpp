/// Which cautions an answer calls for (texts: params/cautions.json).
///
/// A caution is brought up by the substances in the stream, by what the user declared, by the conditions of the run and
/// by the result. Rules on a legal region say themselves where they apply, and are shown with their substances.
/// Cautions above the verdict come first, C1 last of its kind; none can be switched off.
#pragma once

#include <vector>

#include "params/records.hpp"
#include "reports/answer.hpp"

namespace stillshed {

/// `records`: one per component of the mixture; null for the user's own. `extrapolated`: data used outside its range.
[[nodiscard]] std::vector<Caution> cautions_for(const Answer& answer,
                                                const std::vector<const ComponentRecord*>& records, const Facts& facts,
                                                bool extrapolated);

/// Words that a case may declare, with what they mean: "azides", "hydrogen-peroxide", ...
[[nodiscard]] const std::vector<std::string>& declarable_words();

}  // namespace stillshed
