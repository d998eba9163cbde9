#include "models/wilson.hpp"

namespace stillshed {

Wilson::Wilson(const PairParameters& ln_lambda) : p_(ln_lambda) {
  const auto problems = p_.problems("wilson");
  if (!problems.empty()) {
    throw InputError(problems);
  }
  depends_on_temperature_ = p_.depends_on_temperature();
  uses_ln_T_ = p_.uses_ln_T();
}

}  // namespace stillshed
