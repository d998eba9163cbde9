#include "models/wilson.hpp"

namespace stillshed {

Wilson::Wilson(const PairParameters& ln_lambda) : p_(ln_lambda) {
  const auto problems = p_.problems("wilson");
  if (!problems.empty()) {
    throw InputError(problems);
  }
}

}  // namespace stillshed
