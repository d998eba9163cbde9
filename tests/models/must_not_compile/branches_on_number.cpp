// A model that branches on its number type. With double it compiles (the control); with Interval it must not.
#include <ceres/jet.h>

#include "models/interval.hpp"
#include "models/jet_interval.hpp"

namespace stillshed {

template <class S>
S larger_fraction(const S& x) {
  if (x > 0.5) {
    return x;
  }
  return 1.0 - x;
}

template STILLSHED_NUMBER larger_fraction<STILLSHED_NUMBER>(const STILLSHED_NUMBER&);

}  // namespace stillshed
