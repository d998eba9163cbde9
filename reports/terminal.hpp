/// The summary that fits one screen: cautions first, verdicts, azeotropes beside their measurements, the map,
/// what is proved, notes, and a last line that defers to those who decide.
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed {

struct TerminalOptions {
  bool colour = false;
  int width = 80;  ///< no line is longer; at least 40
};

[[nodiscard]] std::string terminal_text(const Answer& answer, const TerminalOptions& options = {});

}  // namespace stillshed
