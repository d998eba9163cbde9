/// NRTL activity coefficients for n liquid components.
///
///   ln g_i = M_i + sum_j x_j e_ij,   e_ij = (G_ij / D_j) (tau_ij - M_j),   M_j = C_j / D_j
///   D_j = sum_k x_k G_kj,   C_j = sum_k x_k tau_kj G_kj,   G_ij = exp(-alpha_ij tau_ij)
///   tau_ij = a_ij + b_ij/T + e_ij ln T + f_ij T,   alpha_ij = c_ij + d_ij T
///   d ln g_i/dx_k = e_ik + e_ki - sum_j x_j (g_kj e_ij + g_ij e_kj),   g_ij = G_ij / D_j
///
/// Symbols   T [K]; x [-]; a [-], b [K], e [-], f [1/K]; alpha: c [-], d [1/K], symmetric; row i = component i.
/// Source    H. Renon, J. M. Prausnitz, AIChE J. 14 (1968) 135-144 (from memory).
/// Valid     T > 0; the fitted range travels with each parameter record and is the caller's to check.
/// Accepts   x on the closed simplex, zeros included.
/// Errors    none at evaluation. Construction throws InputError that lists every bad entry.
/// Cost      O(n^2) exponentials when a temperature is new, then O(n^2); no heap.
#pragma once

#include "models/enclosed.hpp"
#include "models/gradient.hpp"
#include "models/means.hpp"
#include "models/pair_parameters.hpp"
#include "models/scalar.hpp"

namespace stillshed {

struct NrtlParameters {
  PairParameters tau;
  Matrix<double> alpha;        ///< c_ij [-]
  Matrix<double> alpha_per_K;  ///< d_ij [1/K]

  NrtlParameters() = default;
  explicit NrtlParameters(int size) : tau(size), alpha(size, 0.0), alpha_per_K(size, 0.0) {}
};

class Nrtl {
 public:
  Nrtl() = default;
  explicit Nrtl(const NrtlParameters& parameters);
  [[nodiscard]] int size() const { return p_.tau.size(); }
  [[nodiscard]] bool depends_on_temperature() const { return depends_on_temperature_; }
  [[nodiscard]] Nrtl face(const Members& members) const;
  [[nodiscard]] const NrtlParameters& parameters() const { return p_; }

  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const {
    Terms<S> t;
    pairs(temperature_K, t);
    means(x, t);
    const int n = size();
    Vec<S> result(n);
    Vec<S> row(n);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        row[j] = t.e(i, j);
      }
      result[i] = t.M[i] + simplex_sum(x.begin(), row.begin(), n);
    }
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const {
    Terms<S> t;
    pairs(temperature_K, t);
    means(x, t);
    const int n = size();
    out.value = Vec<S>(n);
    out.d_dx = Matrix<S>(n);
    out.d_dT = Vec<S>(n, S(0.0));
    Vec<S> row(n);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        row[j] = t.e(i, j);
      }
      out.value[i] = t.M[i] + simplex_sum(x.begin(), row.begin(), n);
      for (int k = 0; k <= i; ++k) {
        for (int j = 0; j < n; ++j) {
          row[j] = t.g(k, j) * t.e(i, j) + t.g(i, j) * t.e(k, j);
        }
        out.d_dx(i, k) = t.e(i, k) + t.e(k, i) - simplex_sum(x.begin(), row.begin(), n);
        out.d_dx(k, i) = out.d_dx(i, k);
      }
    }
    if (depends_on_temperature_) {
      temperature_slopes(temperature_K, x, t, out.d_dT);
    }
  }

 private:
  template <class S>
  struct Terms {
    Matrix<S> tau;
    Matrix<S> G;
    Matrix<S> g;
    Matrix<S> e;
    Vec<S> M;
  };

  template <class S>
  void pairs(const S& T, Terms<S>& t) const {
    using std::exp;
    using std::log;
    const int n = size();
    const S inverse_T = depends_on_temperature_ ? 1.0 / T : S(0.0);
    const S ln_T = uses_ln_T_ ? log(T) : S(0.0);
    t.tau = Matrix<S>(n);
    t.G = Matrix<S>(n);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        if (i == j) {
          t.tau(i, j) = S(0.0);
          t.G(i, j) = S(1.0);
          continue;
        }
        if (!depends_on_temperature_) {
          t.tau(i, j) = S(p_.tau.a(i, j));
          t.G(i, j) = constant<S>(constant_G_(i, j));
          continue;
        }
        t.tau(i, j) = p_.tau.at(i, j, T, inverse_T, ln_T);
        if (p_.alpha_per_K(i, j) != 0.0) {
          t.G(i, j) = exp(-(p_.alpha_per_K(i, j) * T + p_.alpha(i, j)) * t.tau(i, j));
        } else {
          t.G(i, j) = exp(-p_.alpha(i, j) * t.tau(i, j));
        }
      }
    }
  }

  template <class S>
  void means(const Vec<S>& x, Terms<S>& t) const {
    const int n = size();
    t.M = Vec<S>(n);
    t.g = Matrix<S>(n);
    t.e = Matrix<S>(n);
    Vec<S> weight(n);
    Vec<S> column(n);
    for (int j = 0; j < n; ++j) {
      for (int k = 0; k < n; ++k) {
        weight[k] = x[k] * t.G(k, j);
        column[k] = t.tau(k, j);
      }
      t.M[j] = weighted_mean(weight.begin(), column.begin(), n);
      for (int k = 0; k < n; ++k) {
        column[k] = t.G(k, j);
      }
      const S D = simplex_sum(x.begin(), column.begin(), n);
      for (int i = 0; i < n; ++i) {
        t.g(i, j) = t.G(i, j) / D;
        t.e(i, j) = t.g(i, j) * (t.tau(i, j) - t.M[j]);
      }
    }
  }

  /// d ln g_i/dT at constant x, by the chain rule over tau and G.
  template <class S>
  void temperature_slopes(const S& T, const Vec<S>& x, const Terms<S>& t, Vec<S>& out) const {
    const int n = size();
    const S inverse_T = 1.0 / T;
    Matrix<S> dtau(n);
    Matrix<S> dlnG(n);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        dtau(i, j) = i == j ? S(0.0) : p_.tau.slope(i, j, inverse_T);
        S alpha(p_.alpha(i, j));
        if (p_.alpha_per_K(i, j) != 0.0) {
          alpha += p_.alpha_per_K(i, j) * T;
        }
        dlnG(i, j) = i == j ? S(0.0) : -(alpha * dtau(i, j)) - p_.alpha_per_K(i, j) * t.tau(i, j);
      }
    }
    Vec<S> weight(n);
    Vec<S> column(n);
    Vec<S> dM(n);
    Vec<S> dlnD(n);
    for (int j = 0; j < n; ++j) {
      for (int k = 0; k < n; ++k) {
        weight[k] = x[k] * t.G(k, j);
        column[k] = dlnG(k, j) * (t.tau(k, j) - t.M[j]) + dtau(k, j);
      }
      dM[j] = weighted_mean(weight.begin(), column.begin(), n);
      for (int k = 0; k < n; ++k) {
        column[k] = dlnG(k, j);
      }
      dlnD[j] = weighted_mean(weight.begin(), column.begin(), n);
    }
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        column[j] = t.e(i, j) * (dlnG(i, j) - dlnD[j]) + t.g(i, j) * (dtau(i, j) - dM[j]);
      }
      out[i] = dM[i] + simplex_sum(x.begin(), column.begin(), n);
    }
  }

  NrtlParameters p_;
  Matrix<Enclosed> constant_G_;  ///< exp(-alpha tau), used when nothing depends on T
  bool depends_on_temperature_ = false;
  bool uses_ln_T_ = false;
};

}  // namespace stillshed
