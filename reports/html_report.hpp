/// The page: one self-contained HTML file, no scripts, no network, printable in grey on A4 or Letter.
///
/// Verdicts come first, the cautions of the substances above them; nothing that is a caution can be left out.
/// The markup is well-formed XML. Everything that came from outside is escaped.
#pragma once

#include <string>

#include "reports/answer.hpp"

namespace stillshed {

struct PageOptions {
  std::string date;  ///< as it shall be printed; empty: no date
};

[[nodiscard]] std::string html_text(const Answer& answer, const PageOptions& options = {});

}  // namespace stillshed
