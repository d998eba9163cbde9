#include "models/uniquac.hpp"

#include <cmath>
#include <string>
#include <vector>

namespace stillshed {
namespace {

GroupCore make_core(const UniquacParameters& p) {
  const int n = p.r.size();
  std::array<Vec<double>, kMaxSites> a{};
  for (int k = 0; k < n; ++k) {
    a[static_cast<std::size_t>(k)] = Vec<double>(n, 0.0);
    a[static_cast<std::size_t>(k)][k] = p.q_residual.empty() ? p.q[k] : p.q_residual[k];
  }
  return {p.r, p.q, 1.0, n, a};
}

}  // namespace

Uniquac::Uniquac(const UniquacParameters& parameters) : p_(parameters) {
  const int n = size();
  std::vector<Problem> problems = p_.ln_tau.problems("uniquac");
  if (p_.q.size() != n || (!p_.q_residual.empty() && p_.q_residual.size() != n) || p_.ln_tau.size() != n) {
    problems.push_back({"uniquac", "lists of unequal length", "r, q, q' and tau for every component", ""});
    throw InputError(problems);
  }
  for (int i = 0; i < n; ++i) {
    for (const double value : {p_.r[i], p_.q[i], p_.q_residual.empty() ? 1.0 : p_.q_residual[i]}) {
      if (!(value > 0.0) || !std::isfinite(value)) {
        problems.push_back({"uniquac/" + std::to_string(i), std::to_string(value), "positive r, q and q'", ""});
      }
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
  core_ = make_core(p_);
  depends_on_temperature_ = p_.ln_tau.depends_on_temperature();
  uses_ln_T_ = p_.ln_tau.uses_ln_T();
}

Uniquac Uniquac::face(const Members& members) const {
  UniquacParameters part;
  part.ln_tau = p_.ln_tau.face(members);
  for (const int i : members) {
    part.r.push_back(p_.r[i]);
    part.q.push_back(p_.q[i]);
    if (!p_.q_residual.empty()) {
      part.q_residual.push_back(p_.q_residual[i]);
    }
  }
  return Uniquac(part);
}

}  // namespace stillshed
