/// UNIFAC group-contribution activity coefficients: the original model and modified UNIFAC (Dortmund).
///
///   combinatorial and residual parts as in models/group_core.hpp, sites = main groups in use
///   psi_mk = exp(-(a_mk/T + b_mk + c_mk T))   (b = c = 0 for the original model), T in K
///   exponent p = 1 (original), 3/4 (Dortmund)
///
/// Source    A. Fredenslund, R. L. Jones, J. M. Prausnitz, AIChE J. 21 (1975) 1086-1099; U. Weidlich, J. Gmehling,
///           Ind. Eng. Chem. Res. 26 (1987) 1372-1381 (both from memory); tables: params/README.md.
/// Valid     the original table is recommended for 275 to 425 K (from memory).
/// Errors    a pair of main groups without parameters is an InputError that names both groups and the components;
///           it is never taken as zero unless the caller asks for fillers (see UnifacOptions).
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "models/group_core.hpp"
#include "params/records.hpp"

namespace stillshed {

/// Two main groups without published parameters, and the components that need them.
struct MissingGroupPair {
  int main_i = 0;
  int main_j = 0;
  int component_i = 0;
  int component_j = 0;
};

struct UnifacOptions {
  /// Take missing group pairs as psi = 1. Only for bounding a missing pair with an extra correction
  /// (models/mixture.hpp).
  bool fill_missing = false;
};

/// a/T + b + c T.
template <class S>
[[nodiscard]] S group_exponent(const GroupInteraction& p, const S& T, const S& inverse_T) {
  S exponent = p.a_K * inverse_T + p.b;
  if (p.c_per_K != 0.0) {
    exponent += p.c_per_K * T;
  }
  return exponent;
}
/// The same over an interval of T. Where a and c have one sign the two terms run against each other and their separate
/// ranges add up to far too much: the range is that of the end points and, where the slope c - a/T^2 may vanish, of the
/// extreme value b +- 2 sqrt(a c).
[[nodiscard]] inline Interval group_exponent(const GroupInteraction& p, const Interval& T, const Interval& inverse_T) {
  const Interval natural = group_exponent<Interval>(p, T, inverse_T);
  if (!(p.a_K > 0.0 && p.c_per_K > 0.0) && !(p.a_K < 0.0 && p.c_per_K < 0.0)) {
    return natural;
  }
  const Interval low(T.lower());
  const Interval high(T.upper());
  Interval range = hull(group_exponent<Interval>(p, low, 1.0 / low), group_exponent<Interval>(p, high, 1.0 / high));
  if ((p.c_per_K - p.a_K * square(inverse_T)).contains_zero()) {
    const Interval turn = 2.0 * sqrt(Interval(p.a_K) * p.c_per_K);
    range = hull(range, p.a_K > 0.0 ? p.b + turn : p.b - turn);
  }
  return both(natural, range);
}

class Unifac {
 public:
  Unifac() = default;
  /// `names` are used in messages. A component without groups is an InputError too.
  Unifac(const GroupTable& table, const std::vector<GroupAssignment>& components, const std::vector<std::string>& names,
         UnifacOptions options = {});
  [[nodiscard]] int size() const { return core_.size(); }
  [[nodiscard]] bool depends_on_temperature() const { return true; }
  [[nodiscard]] Unifac face(const Members& members) const;
  [[nodiscard]] GroupModel model() const { return model_; }

  template <class S>
  [[nodiscard]] Vec<S> combinatorial(const Vec<S>& x) const {
    return core_.combinatorial(x);
  }
  template <class S>
  [[nodiscard]] Vec<S> residual(const S& temperature_K, const Vec<S>& x) const {
    return core_.residual(site_psi(temperature_K, false), x);
  }
  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const {
    Vec<S> result = core_.combinatorial(x);
    const Vec<S> rest = residual(temperature_K, x);
    for (int i = 0; i < size(); ++i) {
      result[i] += rest[i];
    }
    return result;
  }
  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const {
    core_.ln_gamma_with_gradient(site_psi(temperature_K, true), x, out);
  }

 private:
  template <class S>
  [[nodiscard]] SitePsi<S> site_psi(const S& T, bool with_slopes) const {
    using std::exp;
    SitePsi<S> result(core_.sites(), with_slopes);
    const S inverse_T = 1.0 / T;
    for (int m = 0; m < core_.sites(); ++m) {
      for (int k = 0; k < core_.sites(); ++k) {
        if (m == k) {
          result.psi(m, k) = S(1.0);
          if (with_slopes) {
            result.ln_slope(m, k) = S(0.0);
          }
          continue;
        }
        const GroupInteraction& p = interaction_[static_cast<std::size_t>(m)][static_cast<std::size_t>(k)];
        result.psi(m, k) = exp(-group_exponent(p, T, inverse_T));
        if (with_slopes) {
          result.ln_slope(m, k) = p.a_K * square(inverse_T) - p.c_per_K;
        }
      }
    }
    return result;
  }

  GroupModel model_ = GroupModel::unifac;
  GroupCore core_;
  std::vector<int> main_groups_;  ///< of the sites
  std::array<std::array<GroupInteraction, kMaxSites>, kMaxSites> interaction_{};
};

/// Every pair of main groups that two of these components need and the table does not have.
[[nodiscard]] std::vector<MissingGroupPair> missing_group_pairs(const GroupTable& table,
                                                                const std::vector<GroupAssignment>& components);

}  // namespace stillshed
