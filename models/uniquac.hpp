/// UNIQUAC activity coefficients for n liquid components.
///
///   combinatorial and residual parts as in models/group_core.hpp with the components themselves as sites:
///   a_ki = q'_i for k = i, else 0;  psi_mk = tau_mk
///   ln tau_ij = a_ij + b_ij/T + e_ij ln T + f_ij T,  tau_ii = 1     (published form: tau_ij = exp(-u_ij/T), so b = -u)
///
/// Symbols   r, q structural parameters [-]; q' surface of the residual part (q unless given); row i = component i.
/// Source    D. S. Abrams, J. M. Prausnitz, AIChE J. 21 (1975) 116-128; q': T. F. Anderson, J. M. Prausnitz,
///           Ind. Eng. Chem. Process Des. Dev. 17 (1978) 552 (both from memory).
/// Errors    construction: InputError listing every bad entry (r, q positive; tau entries finite).
#pragma once

#include "models/group_core.hpp"
#include "models/pair_parameters.hpp"

namespace stillshed {

struct UniquacParameters {
  Vec<double> r;
  Vec<double> q;
  Vec<double> q_residual;  ///< empty: q
  PairParameters ln_tau;
};

class Uniquac {
 public:
  Uniquac() = default;
  explicit Uniquac(const UniquacParameters& parameters);
  [[nodiscard]] int size() const { return p_.r.size(); }
  [[nodiscard]] bool depends_on_temperature() const { return depends_on_temperature_; }
  [[nodiscard]] Uniquac face(const Members& members) const;
  [[nodiscard]] const UniquacParameters& parameters() const { return p_; }

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
    core_.ln_gamma_with_gradient(site_psi(temperature_K, depends_on_temperature()), x, out);
  }

 private:
  template <class S>
  [[nodiscard]] SitePsi<S> site_psi(const S& T, bool with_slopes) const {
    using std::exp;
    SitePsi<S> result(size(), with_slopes);
    const PairTemperature<S> t = p_.ln_tau.temperature(T, uses_ln_T_);
    for (int i = 0; i < size(); ++i) {
      for (int j = 0; j < size(); ++j) {
        result.psi(i, j) = i == j ? S(1.0) : exp(p_.ln_tau.at(i, j, t));
        if (with_slopes) {
          result.ln_slope(i, j) = i == j ? S(0.0) : p_.ln_tau.slope(i, j, t);
        }
      }
    }
    return result;
  }

  UniquacParameters p_;
  GroupCore core_;
  bool depends_on_temperature_ = false;
  bool uses_ln_T_ = false;
};

}  // namespace stillshed
