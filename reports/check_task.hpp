/// `stillshed check`: published and closed-form values, recomputed on this machine.
#pragma once

#include <string>

#include "params/catalog.hpp"

namespace stillshed {

struct CheckLine {
  std::string id;
  std::string what;      ///< "gamma of acetone in unifac at 307.00 K"
  std::string computed;  ///< six digits, or a count
  std::string published;
  std::string source;  ///< citation
  bool agrees = false;
};

struct CheckAnswer {
  std::vector<CheckLine> lines;
  [[nodiscard]] int mismatches() const;
};

/// Every check value on file. A value that cannot be computed is a mismatch that says why.
[[nodiscard]] CheckAnswer run_checks(const Catalog& catalog);

/// The same for machines: reports/schema/check.schema.json.
[[nodiscard]] std::string check_json(const CheckAnswer& answer);

/// As a person reads it: computed, published, source; mismatches marked.
[[nodiscard]] std::string check_text(const CheckAnswer& answer, int width = 80);

}  // namespace stillshed
