/// The surface-fraction (local composition) sums shared by UNIQUAC and UNIFAC.
///
/// Combinatorial part (p = 1, or 3/4 for modified UNIFAC (Dortmund)):
///   ln g_i^C = 1 - v_i + ln v_i - 5 q_i (1 - y_i + ln y_i)
///   v_i = r_i^p / sum_j x_j r_j^p,   y_i = (r_i / q_i) E / sum_j x_j r_j,   E = sum_j x_j q_j
/// Residual part over sites k (main groups, or the components themselves for UNIQUAC):
///   ln g_i^R = A_i - sum_k [ a_ki ln( S_k A_i / (E' s_ki) ) + H_k s_ki / S_k ]
///   s_ki = sum_m a_mi psi_mk,   S_k = sum_i x_i s_ki,   H_k = sum_i x_i a_ki,   A_i = sum_k a_ki,   E' = sum_i x_i A_i
/// Gradient (x as independent numbers; the sums are homogeneous of degree 0, so this is also the mole-number form):
///   d ln g_i^C/dx_j = (1 - v_i)(1 - v_j) - 5 q_i (1 - y_i)(q_j/E - r_j / sum x r)
///   d ln g_i^R/dx_j = A_i A_j/E' - sum_k [ a_ki s_kj + a_kj s_ki - H_k s_ki s_kj / S_k ] / S_k
///   d ln g_i/dT     = -sum_k [ a_ki (S'_k/S_k - s'_ki/s_ki) + H_k (s'_ki - s_ki S'_k/S_k) / S_k ]
///
/// Sites that share all psi (subgroups of one main group) are one site: the sums over them are the same.
/// Source    A. Fredenslund, R. L. Jones, J. M. Prausnitz, AIChE J. 21 (1975) 1086-1099 (from memory).
#pragma once

#include <array>

#include "models/enclosed.hpp"
#include "models/gradient.hpp"
#include "models/means.hpp"
#include "models/scalar.hpp"

namespace stillshed {

inline constexpr int kMaxSites = kMaxTerms;

/// psi_mk and its logarithmic T-derivative, for the sites in use.
template <class S>
struct SitePsi {
  std::array<std::array<S, kMaxSites>, kMaxSites> psi;       ///< [m][k]
  std::array<std::array<S, kMaxSites>, kMaxSites> ln_slope;  ///< d ln psi_mk / dT
};

class GroupCore {
 public:
  GroupCore() = default;
  /// r, q, r^p per component; a[k][i] site surfaces.
  GroupCore(Vec<double> r, Vec<double> q, double exponent, int sites, const std::array<Vec<double>, kMaxSites>& a);

  [[nodiscard]] int size() const { return r_.size(); }
  [[nodiscard]] int sites() const { return sites_; }
  [[nodiscard]] const Vec<double>& r() const { return r_; }
  [[nodiscard]] const Vec<double>& q() const { return q_; }
  [[nodiscard]] double exponent() const { return exponent_; }
  [[nodiscard]] const std::array<Vec<double>, kMaxSites>& surfaces() const { return a_; }

  template <class S>
  [[nodiscard]] Vec<S> combinatorial(const Vec<S>& x) const {
    using std::log;
    const int n = size();
    Sums<S> s = sums(x);
    Vec<S> result(n);
    const S ln_E = log(s.E);
    const S ln_R = log(s.R);
    const S ln_Rp = exponent_ == 1.0 ? ln_R : log(s.Rp);
    for (int i = 0; i < n; ++i) {
      const S v = constant<S>(rp_[i]) / s.Rp;
      const S ln_v = constant<S>(ln_rp_[i]) - ln_Rp;
      const S y = constant<S>(r_over_q_[i]) * s.E_over_R;
      const S ln_y = constant<S>(ln_r_over_q_[i]) + (ln_E - ln_R);
      result[i] = 1.0 - v + ln_v - 5.0 * (q_[i] * (1.0 - y + ln_y));
    }
    return result;
  }

  template <class S>
  [[nodiscard]] Vec<S> residual(const SitePsi<S>& psi, const Vec<S>& x) const {
    Site<S> site;
    site_sums(psi, x, site);
    Vec<S> result(size());
    for (int i = 0; i < size(); ++i) {
      result[i] = residual_of(site, i);
    }
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const SitePsi<S>& psi, const Vec<S>& x, bool temperature_slope,
                              LnGammaGradient<S>& out) const {
    const int n = size();
    Site<S> site;
    site_sums(psi, x, site);
    out.value = combinatorial(x);
    out.d_dx = Matrix<S>(n);
    out.d_dT = Vec<S>(n, S(0.0));
    combinatorial_gradient(x, out.d_dx);
    for (int i = 0; i < n; ++i) {
      out.value[i] += residual_of(site, i);
      for (int j = 0; j <= i; ++j) {
        S sum(0.0);
        for (int k = 0; k < sites_; ++k) {
          // (a_ki s_kj + a_kj s_ki - H_k s_ki s_kj / S_k) / S_k, grouped so that the mean h_k = H_k / S_k appears once.
          const S& si = site.s_over_S[static_cast<std::size_t>(k)][i];
          const S& sj = site.s_over_S[static_cast<std::size_t>(k)][j];
          const double ai = a_[static_cast<std::size_t>(k)][i];
          const double aj = a_[static_cast<std::size_t>(k)][j];
          sum += ai * sj + aj * si - site.H[static_cast<std::size_t>(k)] * (si * sj);
        }
        const S value = (A_[i] / site.E) * A_[j] - sum;  // no double product: its rounding would not be enclosed
        out.d_dx(i, j) += value;
        if (j != i) {
          out.d_dx(j, i) += value;
        }
      }
    }
    if (temperature_slope) {
      residual_slope(psi, x, site, out.d_dT);
    }
  }

 private:
  template <class S>
  struct Sums {
    S R, Rp, E, E_over_R;
  };
  template <class S>
  struct Site {
    std::array<Vec<S>, kMaxSites> s;         ///< s_ki
    std::array<Vec<S>, kMaxSites> s_over_S;  ///< s_ki / S_k
    std::array<Vec<S>, kMaxSites> ln_term;   ///< ln(S_k A_i / (E' s_ki)), only where a_ki != 0
    std::array<S, kMaxSites> H;              ///< H_k
    S E;
  };

  template <class S>
  [[nodiscard]] Sums<S> sums(const Vec<S>& x) const {
    const int n = size();
    Vec<S> weight(n);
    Vec<S> value(n);
    Sums<S> s{S(0.0), S(0.0), S(0.0), S(0.0)};
    for (int i = 0; i < n; ++i) {
      value[i] = S(r_[i]);
    }
    s.R = simplex_sum(x.begin(), value.begin(), n);
    for (int i = 0; i < n; ++i) {
      weight[i] = r_[i] * x[i];
      value[i] = S(q_[i]) / r_[i];
    }
    s.E_over_R = weighted_mean(weight.begin(), value.begin(), n);
    for (int i = 0; i < n; ++i) {
      value[i] = S(q_[i]);
    }
    s.E = simplex_sum(x.begin(), value.begin(), n);
    if (exponent_ == 1.0) {
      s.Rp = s.R;
    } else {
      for (int i = 0; i < n; ++i) {
        value[i] = constant<S>(rp_[i]);
      }
      s.Rp = simplex_sum(x.begin(), value.begin(), n);
    }
    return s;
  }

  template <class S>
  void combinatorial_gradient(const Vec<S>& x, Matrix<S>& d) const {
    const int n = size();
    const Sums<S> s = sums(x);
    Vec<S> one_minus_v(n);
    Vec<S> difference(n);
    Vec<S> y_term(n);
    for (int i = 0; i < n; ++i) {
      one_minus_v[i] = 1.0 - constant<S>(rp_[i]) / s.Rp;
      // q_j/E - r_j/R = (q_j / E) (1 - y_j)
      const S one_minus_y = 1.0 - constant<S>(r_over_q_[i]) * s.E_over_R;
      y_term[i] = 5.0 * (q_[i] * one_minus_y);
      difference[i] = (q_[i] / s.E) * one_minus_y;
    }
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < n; ++j) {
        d(i, j) = one_minus_v[i] * one_minus_v[j] - y_term[i] * difference[j];
      }
    }
  }

  template <class S>
  void site_sums(const SitePsi<S>& psi, const Vec<S>& x, Site<S>& site) const {
    using std::log;
    const int n = size();
    Vec<S> weight(n);
    Vec<S> column(n);
    for (int i = 0; i < n; ++i) {
      column[i] = S(A_[i]);
    }
    site.E = simplex_sum(x.begin(), column.begin(), n);
    for (int k = 0; k < sites_; ++k) {
      const auto at = static_cast<std::size_t>(k);
      site.s[at] = Vec<S>(n, S(0.0));
      site.s_over_S[at] = Vec<S>(n);
      site.ln_term[at] = Vec<S>(n, S(0.0));
      for (int i = 0; i < n; ++i) {
        S sum(0.0);
        for (int m = 0; m < sites_; ++m) {
          const double a = a_[static_cast<std::size_t>(m)][i];
          if (a != 0.0) {
            sum += a * psi.psi[static_cast<std::size_t>(m)][at];
          }
        }
        site.s[at][i] = sum;
      }
      const S S_k = simplex_sum(x.begin(), site.s[at].begin(), n);
      // ln(S_k/E') as the logarithm of one mean: sum x A (s/A) / sum x A.
      for (int i = 0; i < n; ++i) {
        weight[i] = A_[i] * x[i];
        column[i] = site.s[at][i] / A_[i];
      }
      const S ln_mean = log(weighted_mean(weight.begin(), column.begin(), n));
      for (int i = 0; i < n; ++i) {
        site.s_over_S[at][i] = site.s[at][i] / S_k;
        if (a_[at][i] != 0.0) {
          site.ln_term[at][i] = ln_mean - log(column[i]);
        }
        column[i] = S(a_[at][i]);
      }
      site.H[at] = simplex_sum(x.begin(), column.begin(), n);
      // H_k / S_k, the mean of a_ki / s_ki with weights x_i s_ki, is used as H_k (s_ki / S_k) below.
    }
  }

  template <class S>
  [[nodiscard]] S residual_of(const Site<S>& site, int i) const {
    S sum(A_[i]);
    for (int k = 0; k < sites_; ++k) {
      const auto at = static_cast<std::size_t>(k);
      if (a_[at][i] != 0.0) {
        sum -= a_[at][i] * site.ln_term[at][i];
      }
      sum -= site.H[at] * site.s_over_S[at][i];
    }
    return sum;
  }

  template <class S>
  void residual_slope(const SitePsi<S>& psi, const Vec<S>& x, const Site<S>& site, Vec<S>& out) const {
    const int n = size();
    Vec<S> weight(n);
    Vec<S> ln_slope(n);  // s'_ki / s_ki
    std::array<S, kMaxSites> site_weight;
    std::array<S, kMaxSites> site_slope;
    for (int k = 0; k < sites_; ++k) {
      const auto at = static_cast<std::size_t>(k);
      for (int i = 0; i < n; ++i) {
        int terms = 0;
        for (int m = 0; m < sites_; ++m) {
          const auto from = static_cast<std::size_t>(m);
          if (a_[from][i] != 0.0) {
            site_weight[static_cast<std::size_t>(terms)] = a_[from][i] * psi.psi[from][at];
            site_slope[static_cast<std::size_t>(terms)] = psi.ln_slope[from][at];
            ++terms;
          }
        }
        ln_slope[i] = weighted_mean(site_weight.data(), site_slope.data(), terms);
        weight[i] = x[i] * site.s[at][i];
      }
      const S mean = weighted_mean(weight.begin(), ln_slope.begin(), n);  // S'_k / S_k
      for (int i = 0; i < n; ++i) {
        const S excess = ln_slope[i] - mean;
        out[i] += (a_[at][i] - site.H[at] * site.s_over_S[at][i]) * excess;
      }
    }
  }

  Vec<double> r_;
  Vec<double> q_;
  Vec<double> A_;
  double exponent_ = 1.0;
  int sites_ = 0;
  std::array<Vec<double>, kMaxSites> a_{};
  Vec<Enclosed> rp_;
  Vec<Enclosed> ln_rp_;
  Vec<Enclosed> ln_r_over_q_;
  Vec<Enclosed> r_over_q_;
};

}  // namespace stillshed
