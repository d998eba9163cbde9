/// `stillshed vouch`: source, range and evidence of every parameter in use.
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed {

/// Of an answer of Task::vouch; lines of at most `width` columns.
[[nodiscard]] std::string vouch_text(const Answer& answer, int width = 80);

}  // namespace stillshed
