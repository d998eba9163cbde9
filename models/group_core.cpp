#include "models/group_core.hpp"

#include <cmath>

namespace stillshed {

GroupCore::GroupCore(Vec<double> r, Vec<double> q, double exponent, int sites,
                     const std::array<Vec<double>, kMaxSites>& a)
    : r_(r), q_(q), exponent_(exponent), sites_(sites), a_(a) {
  const int n = r_.size();
  expects(q_.size() == n && sites >= 1 && sites <= kMaxSites, "GroupCore: sizes");
  expects(exponent == 1.0 || exponent == 0.75, "GroupCore: exponent");
  A_ = Vec<double>(n, 0.0);
  rp_ = Vec<Enclosed>(n);
  ln_rp_ = Vec<Enclosed>(n);
  ln_r_over_q_ = Vec<Enclosed>(n);
  r_over_q_ = Vec<Enclosed>(n);
  for (int i = 0; i < n; ++i) {
    for (int k = 0; k < sites; ++k) {
      A_[i] += a_[static_cast<std::size_t>(k)][i];
    }
    const Interval exact_r(r_[i]);
    const Interval ratio = exact_r / q_[i];
    rp_[i] = {std::pow(r_[i], exponent), exponent == 1.0 ? exact_r : pow(exact_r, exponent)};
    ln_rp_[i] = {exponent * std::log(r_[i]), exponent * log(exact_r)};
    r_over_q_[i] = {r_[i] / q_[i], ratio};
    ln_r_over_q_[i] = {std::log(r_[i] / q_[i]), log(ratio)};
  }
}

}  // namespace stillshed
