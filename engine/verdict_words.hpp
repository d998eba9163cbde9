/// One plain sentence per verdict, built from the numbers of the outcome: what stops the product, and where.
///
/// Purities and recoveries are rounded down (impurities up) and never reach a hundred per cent. A sentence uses the
/// basis of the first purity test that the product has (mass without one).
#pragma once

#include <string>

#include "engine/verdict.hpp"

namespace stillshed {

struct Names {
  const Mixture& mixture;
  const Chart& chart;
  const ReachOptions& options;
};

/// `short_of_recovery`: the receiver meets the tests but holds less than required.
[[nodiscard]] std::string sentence(const Names& names, const ProductOutcome& outcome, const Receiver& receiver,
                                   bool short_of_recovery);

/// "95.63", rounded down to two decimals; "more than 99.99" above that.
[[nodiscard]] std::string percent_down(double fraction);

/// "the azeotrope with methanol at 55.3 degC", "the distillation boundary from acetone to the azeotrope of ...".
/// `component` >= 0: the product, left out of the list of an azeotrope's members.
[[nodiscard]] std::string limit_words(const Names& names, const std::string& id, int component);

}  // namespace stillshed
