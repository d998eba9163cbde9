#include "reports/answer.hpp"

namespace stillshed {

const char* to_string(Evidence evidence) {
  switch (evidence) {
    case Evidence::fitted: return "F";
    case Evidence::stretched: return "X";
    case Evidence::predicted: return "P";
    case Evidence::user: return "U";
    case Evidence::none: return "0";
  }
  return "0";
}

}  // namespace stillshed
