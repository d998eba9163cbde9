#include "models/nrtl.hpp"

#include <cmath>
#include <string>
#include <vector>

namespace stillshed {

Nrtl::Nrtl(const NrtlParameters& parameters) : p_(parameters) {
  const int n = size();
  std::vector<Problem> problems = p_.tau.problems("nrtl");
  if (p_.alpha.size() != n || p_.alpha_per_K.size() != n) {
    problems.push_back({"nrtl/alpha", std::to_string(p_.alpha.size()) + " rows", std::to_string(n) + " rows", ""});
    throw InputError(problems);
  }
  for (int i = 0; i < n; ++i) {
    for (int j = 0; j < n; ++j) {
      const double alpha = p_.alpha(i, j);
      const std::string where = "nrtl/alpha/" + std::to_string(i) + "/" + std::to_string(j);
      if (!std::isfinite(alpha) || !std::isfinite(p_.alpha_per_K(i, j)) || alpha < -1.0 || alpha > 1.0) {
        problems.push_back(
            {where, std::to_string(alpha), "a number from -1 to 1", "check the sign or column in the source table"});
      } else if (j < i && (alpha != p_.alpha(j, i) || p_.alpha_per_K(i, j) != p_.alpha_per_K(j, i))) {
        problems.push_back({where, std::to_string(alpha), "its mirror entry, " + std::to_string(p_.alpha(j, i)),
                            "alpha is symmetric"});
      }
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
  depends_on_temperature_ = p_.tau.depends_on_temperature();
  uses_ln_T_ = p_.tau.uses_ln_T();
  constant_G_ = Matrix<Enclosed>(n);
  for (int i = 0; i < n; ++i) {
    for (int j = 0; j < n; ++j) {
      depends_on_temperature_ = depends_on_temperature_ || p_.alpha_per_K(i, j) != 0.0;
      constant_G_(i, j) = {std::exp(-p_.alpha(i, j) * p_.tau.a(i, j)),
                           exp(-(Interval(p_.alpha(i, j)) * p_.tau.a(i, j)))};
    }
  }
}

Nrtl Nrtl::face(const Members& members) const {
  NrtlParameters part;
  part.tau = p_.tau.face(members);
  part.alpha = p_.alpha.face(members);
  part.alpha_per_K = p_.alpha_per_K.face(members);
  return Nrtl(part);
}

}  // namespace stillshed
