/// Answers put together by hand, so that the writers are tested on known content, awkward names included.
/// The numbers are plausible but invented; nothing here is a reference value.
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed::sample {

/// ln(P / 101325 Pa) = 4000 K (1 / boiling_point_K - 1 / T): equal slopes, so relative volatilities do not depend on T.
MixtureComponent component(const std::string& id, const std::string& cas, double molar_mass_g_mol,
                           double boiling_point_K = 350.0);

Survey ternary_survey();

/// Acetone, methanol and water, with every block filled.
Answer ternary();

/// Two components, one azeotrope, a survey and a chart but no reach.
Answer binary();

}  // namespace stillshed::sample
