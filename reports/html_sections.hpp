/// Sections of the page, each as markup. Order and wording of the whole: html_report.cpp.
#pragma once

#include <optional>
#include <string>

#include "reports/answer.hpp"
#include "reports/binary_plots.hpp"

namespace stillshed {

/// html_azeotropes.cpp: table of azeotropes beside measurements, pure components, map or plots, regions.
[[nodiscard]] std::string azeotrope_section(const Answer& answer, const std::optional<BinaryPhases>& phases);

/// html_reach.cpp: batch cuts and column sequences.
[[nodiscard]] std::string reach_section(const Answer& answer);
/// html_reach.cpp: every test with its limit and margin, and what stands in the way.
[[nodiscard]] std::string hold_section(const Answer& answer);

/// html_trust.cpp: what is proved and what is not, marks, what was not checked.
[[nodiscard]] std::string trust_section(const Answer& answer);
/// html_trust.cpp: parameters, sources, what makes the run repeatable.
[[nodiscard]] std::string source_section(const Answer& answer, const std::string& date);

/// Indices of the sequences worth printing: for each product the one that recovers it best, at most `most`.
[[nodiscard]] std::vector<std::size_t> sequences_to_print(const Answer& answer, std::size_t most);

}  // namespace stillshed
