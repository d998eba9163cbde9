/// Where every number of a run comes from, one line each: what, record, range, source.
#pragma once

#include <string>
#include <vector>

#include "params/catalog.hpp"
#include "reports/answer.hpp"

namespace stillshed {

/// "from 273.16 to 647.10 K", "valid everywhere".
[[nodiscard]] std::string range_text(const PressureSet& set);

[[nodiscard]] std::vector<std::string> provenance_lines(const Answer& answer,
                                                        const std::vector<const ComponentRecord*>& records,
                                                        const Catalog& catalog);

}  // namespace stillshed
