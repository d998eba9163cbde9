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
    expect_size(x, size());
    const Terms<S> t(*this, temperature_K, x);
    Vec<S> result(size(), for_overwrite);
    values(t, x, result);
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const {
    expect_size(x, size());
    const Terms<S> t(*this, temperature_K, x);
    const int n = size();
    out.value = Vec<S>(n, for_overwrite);
    out.d_dx = Matrix<S>(n, for_overwrite);
    out.d_dT = Vec<S>(n);
    values(t, x, out.value);
    Vec<S> row(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      for (int k = 0; k <= i; ++k) {
        for (int j = 0; j < n; ++j) {
          row[j] = t.g(k, j) * t.e(i, j) + t.g(i, j) * t.e(k, j);
        }
        out.d_dx(i, k) = t.e(i, k) + t.e(k, i) - simplex_sum(x.begin(), row.begin(), n);
        out.d_dx(k, i) = out.d_dx(i, k);
      }
    }
    if (depends_on_temperature_) {
      temperature_slopes(t, x, out.d_dT);
    }
  }

 private:
  /// What temperature and composition give; `_to` tables hold column j of the published matrix as their row j.
  template <class S>
  struct Terms {
    Terms(const Nrtl& model, const S& temperature_K, const Vec<S>& x)
        : T(temperature_K),
          tau_to(model.size(), for_overwrite),
          G_to(model.size(), for_overwrite),
          g(model.size(), for_overwrite),
          e(model.size(), for_overwrite),
          M(model.size(), for_overwrite) {
      model.pairs(*this);
      model.means(x, *this);
    }
    S T;
    Matrix<S> tau_to;  ///< (j, k): tau_kj
    Matrix<S> G_to;    ///< (j, k): G_kj
    Matrix<S> g;       ///< (i, j): G_ij / D_j
    Matrix<S> e;       ///< (i, j)
    Vec<S> M;
  };

  template <class S>
  void pairs(Terms<S>& t) const {
    using std::exp;
    const int n = size();
    if (!depends_on_temperature_) {
      for (int i = 0; i < n; ++i) {
        for (int j = 0; j < n; ++j) {
          t.tau_to(j, i) = S(p_.tau.a(i, j));
          t.G_to(j, i) = constant<S>(constant_G_(i, j));
        }
      }
      return;
    }
    const PairTemperature<S> shared = p_.tau.temperature(t.T, uses_ln_T_);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        if (i == j) {
          t.tau_to(j, i) = S(0.0);
          t.G_to(j, i) = S(1.0);
          continue;
        }
        const S tau = p_.tau.at(i, j, shared);
        t.tau_to(j, i) = tau;
        t.G_to(j, i) = exp(-(alpha(i, j, t.T) * tau));
      }
    }
  }

  template <class S>
  [[nodiscard]] S alpha(int i, int j, const S& T) const {
    S result(p_.alpha(i, j));
    if (p_.alpha_per_K(i, j) != 0.0) {
      result += p_.alpha_per_K(i, j) * T;
    }
    return result;
  }

  template <class S>
  void means(const Vec<S>& x, Terms<S>& t) const {
    const int n = size();
    Vec<S> weight(n, for_overwrite);
    for (int j = 0; j < n; ++j) {
      for (int k = 0; k < n; ++k) {
        weight[k] = x[k] * t.G_to(j, k);
      }
      t.M[j] = weighted_mean(weight.begin(), t.tau_to.row(j), n);
      const S inverse_D = 1.0 / simplex_sum(x.begin(), t.G_to.row(j), n);
      for (int i = 0; i < n; ++i) {
        t.g(i, j) = t.G_to(j, i) * inverse_D;
        t.e(i, j) = t.g(i, j) * (t.tau_to(j, i) - t.M[j]);
      }
    }
  }

  template <class S>
  void values(const Terms<S>& t, const Vec<S>& x, Vec<S>& result) const {
    const int n = x.size();
    for (int i = 0; i < n; ++i) {
      result[i] = t.M[i] + simplex_sum(x.begin(), t.e.row(i), n);
    }
  }

  /// d ln g_i/dT at constant x, by the chain rule over tau and G.
  template <class S>
  void temperature_slopes(const Terms<S>& t, const Vec<S>& x, Vec<S>& out) const {
    const int n = size();
    const PairTemperature<S> shared = p_.tau.temperature(t.T, uses_ln_T_);
    Matrix<S> dtau_to(n);
    Matrix<S> dlnG_to(n);
    Vec<S> dM(n, for_overwrite);
    Vec<S> dlnD(n, for_overwrite);
    Vec<S> weight(n, for_overwrite);
    Vec<S> column(n, for_overwrite);
    for (int j = 0; j < n; ++j) {
      for (int k = 0; k < n; ++k) {
        if (k != j) {
          dtau_to(j, k) = p_.tau.slope(k, j, shared);
          dlnG_to(j, k) = -(alpha(k, j, t.T) * dtau_to(j, k)) - p_.alpha_per_K(k, j) * t.tau_to(j, k);
        }
        weight[k] = x[k] * t.G_to(j, k);
        column[k] = dlnG_to(j, k) * (t.tau_to(j, k) - t.M[j]) + dtau_to(j, k);
      }
      dM[j] = weighted_mean(weight.begin(), column.begin(), n);
      dlnD[j] = weighted_mean(weight.begin(), dlnG_to.row(j), n);
    }
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        column[j] = t.e(i, j) * (dlnG_to(j, i) - dlnD[j]) + t.g(i, j) * (dtau_to(j, i) - dM[j]);
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
