/// `stillshed name`: what a name or CAS number means here, and what is on file for it.
#pragma once

#include <string>
#include <vector>

#include "params/catalog.hpp"
#include "params/errors.hpp"

namespace stillshed {

struct NameAnswer {
  std::string text;               ///< for people, of every name that was found
  std::string json;               ///< the same for machines: reports/schema/name.schema.json
  std::vector<Problem> problems;  ///< one for every name that was not
};

[[nodiscard]] NameAnswer name_text(const std::vector<std::string>& names, const Catalog& catalog);

}  // namespace stillshed
