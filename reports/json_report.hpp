/// The result as JSON: reports/schema/result.schema.json describes every block.
///
/// Only the blocks that the task computed are written; key order never changes; compositions are
/// {component id: mole fraction}; references are ids or paths such as "batch[0].cuts[1]"; what is not known
/// is null, and "why_null" of the same object says why. Two runs of one case differ only in "timing".
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed {

/// LogicError when the answer holds NaN or infinity.
[[nodiscard]] std::string json_text(const Answer& answer);

}  // namespace stillshed
