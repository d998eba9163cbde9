/// Wilson activity coefficients for n liquid components.
///
///   ln g_i = 1 - ln D_i - sum_k x_k L_ki / D_k,   D_i = sum_j x_j L_ij
///   ln L_ij = a_ij + b_ij/T + e_ij ln T + f_ij T,   L_ii = 1
/// With molar volumes V and energies lambda (published form): a_ij = ln(V_j/V_i), b_ij = -(lambda_ij - lambda_ii)/R.
///   d ln g_i/dx_k = -L_ik/D_i - L_ki/D_k + sum_m x_m L_mi L_mk / D_m^2
///
/// Symbols   T [K]; x [-]; row i = component i.
/// Source    G. M. Wilson, J. Am. Chem. Soc. 86 (1964) 127-130 (from memory).
/// Valid     completely miscible liquids only: the model cannot split.
/// Errors    construction: InputError listing every bad entry.
#pragma once

#include "models/gradient.hpp"
#include "models/means.hpp"
#include "models/pair_parameters.hpp"
#include "models/scalar.hpp"

namespace stillshed {

class Wilson {
 public:
  Wilson() = default;
  explicit Wilson(const PairParameters& ln_lambda);
  [[nodiscard]] int size() const { return p_.size(); }
  [[nodiscard]] bool depends_on_temperature() const { return depends_on_temperature_; }
  [[nodiscard]] Wilson face(const Members& members) const { return Wilson(p_.face(members)); }
  [[nodiscard]] const PairParameters& parameters() const { return p_; }

  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const {
    expect_size(x, size());
    using std::log;
    Matrix<S> L(size(), for_overwrite);
    Vec<S> D(size(), for_overwrite);
    factors(temperature_K, x, L, D);
    const int n = size();
    Vec<S> result(n, for_overwrite);
    Vec<S> column(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      for (int k = 0; k < n; ++k) {
        column[k] = L(k, i) / D[k];
      }
      result[i] = 1.0 - log(D[i]) - simplex_sum(x.begin(), column.begin(), n);
    }
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const {
    expect_size(x, size());
    using std::log;
    const int n = size();
    Matrix<S> L(n, for_overwrite);
    Vec<S> D(n, for_overwrite);
    factors(temperature_K, x, L, D);
    Matrix<S> l(n, for_overwrite);  // L_ki / D_k
    for (int k = 0; k < n; ++k) {
      for (int i = 0; i < n; ++i) {
        l(k, i) = L(k, i) / D[k];
      }
    }
    out.value = Vec<S>(n, for_overwrite);
    out.d_dx = Matrix<S>(n, for_overwrite);
    out.d_dT = Vec<S>(n, S(0.0));
    Vec<S> column(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      for (int k = 0; k < n; ++k) {
        column[k] = l(k, i);
      }
      out.value[i] = 1.0 - log(D[i]) - simplex_sum(x.begin(), column.begin(), n);
      for (int k = 0; k <= i; ++k) {
        for (int m = 0; m < n; ++m) {
          column[m] = l(m, i) * l(m, k);
        }
        out.d_dx(i, k) = simplex_sum(x.begin(), column.begin(), n) - l(i, k) - l(k, i);
        out.d_dx(k, i) = out.d_dx(i, k);
      }
    }
    if (depends_on_temperature()) {
      temperature_slopes(temperature_K, x, L, l, out.d_dT);
    }
  }

 private:
  template <class S>
  void factors(const S& T, const Vec<S>& x, Matrix<S>& L, Vec<S>& D) const {
    using std::exp;
    const int n = size();
    const PairTemperature<S> shared = p_.temperature(T, uses_ln_T_);
    Vec<S> row(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        L(i, j) = i == j ? S(1.0) : exp(p_.at(i, j, shared));
        row[j] = L(i, j);
      }
      D[i] = simplex_sum(x.begin(), row.begin(), n);
    }
  }

  template <class S>
  void temperature_slopes(const S& T, const Vec<S>& x, const Matrix<S>& L, const Matrix<S>& l, Vec<S>& out) const {
    const int n = size();
    const PairTemperature<S> shared = p_.temperature(T, uses_ln_T_);
    Vec<S> weight(n, for_overwrite);
    Vec<S> column(n, for_overwrite);
    Vec<S> dlnD(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        weight[j] = x[j] * L(i, j);
        column[j] = i == j ? S(0.0) : p_.slope(i, j, shared);
      }
      dlnD[i] = weighted_mean(weight.begin(), column.begin(), n);
    }
    for (int i = 0; i < n; ++i) {
      for (int k = 0; k < n; ++k) {
        const S slope = i == k ? S(0.0) : p_.slope(k, i, shared);
        column[k] = l(k, i) * (slope - dlnD[k]);
      }
      out[i] = -dlnD[i] - simplex_sum(x.begin(), column.begin(), n);
    }
  }

  PairParameters p_;
  bool depends_on_temperature_ = false;
  bool uses_ln_T_ = false;
};

}  // namespace stillshed
