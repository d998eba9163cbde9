#include "models/group_core.hpp"

#include <cmath>

namespace stillshed {

GroupCore::GroupCore(const Vec<double>& r, const Vec<double>& q, double exponent, int sites,
                     const std::array<Vec<double>, kMaxSites>& surfaces)
    : r_(r), q_(q), exponent_(exponent), sites_(sites), a_(surfaces) {
  const int n = r_.size();
  expects(q_.size() == n && sites >= 1 && sites <= kMaxSites, "GroupCore: sizes");
  expects(exponent == 1.0 || exponent == 0.75, "GroupCore: exponent");
  int count = 0;
  for (int i = 0; i < n; ++i) {
    Enclosed total{0.0, Interval(0.0)};
    first_area_[static_cast<std::size_t>(i)] = count;
    for (int k = 0; k < sites; ++k) {
      const double a = a_[static_cast<std::size_t>(k)][i];
      if (a != 0.0) {
        areas_[static_cast<std::size_t>(count++)] = {k, a};
        total = {total.value + a, total.range + a};
      }
    }
    expects(total.value > 0.0, "GroupCore: a component without surface");
    A_.push_back(total);
    const Interval exact_r(r_[i]);
    const Interval ratio = exact_r / q_[i];
    rp_.push_back({std::pow(r_[i], exponent), exponent == 1.0 ? exact_r : pow(exact_r, exponent)});
    ln_rp_.push_back({exponent * std::log(r_[i]), exponent * log(exact_r)});
    r_over_q_.push_back({r_[i] / q_[i], ratio});
    ln_r_over_q_.push_back({std::log(r_[i] / q_[i]), log(ratio)});
    five_q_.push_back({5.0 * q_[i], Interval(q_[i]) * 5.0});
  }
  first_area_[static_cast<std::size_t>(n)] = count;
}

}  // namespace stillshed
