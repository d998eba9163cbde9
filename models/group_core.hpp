/// The surface-fraction (local composition) sums shared by UNIQUAC and UNIFAC.
///
/// Combinatorial part (p = 1, or 3/4 for modified UNIFAC (Dortmund)):
///   ln g_i^C = 1 - v_i + ln v_i - 5 q_i (1 - y_i + ln y_i)
///   v_i = r_i^p / sum_j x_j r_j^p,   y_i = (r_i / q_i) E / R,   E = sum_j x_j q_j,   R = sum_j x_j r_j
/// Residual part over sites k (main groups, or the components themselves for UNIQUAC):
///   ln g_i^R = A_i - sum_k [ a_ki ln( m_k A_i / s_ki ) + h_k s_ki ]
///   s_ki = sum_m a_mi psi_mk,   A_i = sum_k a_ki,   S_k = sum_i x_i s_ki
///   m_k = S_k / sum_i x_i A_i,  h_k = sum_i x_i a_ki / S_k      (both are means: models/means.hpp)
/// Gradient (mole-number form, symmetric; see models/gradient.hpp):
///   d ln g_i^C/dn_j = (1 - v_i)(1 - v_j) - 5 q_i (1 - y_i)(q_j / E)(1 - y_j)
///   d ln g_i^R/dn_j = A_i A_j / sum x A - sum_k [ (a_ki - h_k s_ki) s_kj / S_k + a_kj s_ki / S_k ]
///   d ln g_i/dT     = sum_k (a_ki - h_k s_ki) (s'_ki/s_ki - S'_k/S_k)
///
/// Subgroups of one main group share every psi, so a site is a main group with the areas of its subgroups added up.
/// Source    A. Fredenslund, R. L. Jones, J. M. Prausnitz, AIChE J. 21 (1975) 1086-1099 (from memory).
/// Valid     x on the closed simplex, zeros included.
/// Cost      no heap; about (sites)(sites + components) products, sites + areas logarithms.
#pragma once

#include <array>

#include "models/enclosed.hpp"
#include "models/gradient.hpp"
#include "models/means.hpp"
#include "models/scalar.hpp"

namespace stillshed {

inline constexpr int kMaxSites = kMaxTerms;

/// A table with a row per site.
template <class S, int Columns>
class SiteTable {
 public:
  /// Entries are to be written before they are read.
  SiteTable(int rows, int columns) : data_(rows * columns, for_overwrite), columns_(columns) {}
  S& operator()(int k, int i) { return data_.data()[k * columns_ + i]; }
  const S& operator()(int k, int i) const { return data_.data()[k * columns_ + i]; }
  S* row(int k) { return data_.data() + k * columns_; }
  const S* row(int k) const { return data_.data() + k * columns_; }

 private:
  FixedBuffer<S, kMaxSites * Columns> data_;
  int columns_;
};

/// psi_mk and, when asked for, its logarithmic T-derivative, for the sites in use.
template <class S>
struct SitePsi {
  SitePsi(int sites, bool with_slopes)
      : psi(sites, sites), ln_slope(with_slopes ? sites : 0, sites), has_slopes(with_slopes) {}
  SiteTable<S, kMaxSites> psi;       ///< (m, k)
  SiteTable<S, kMaxSites> ln_slope;  ///< (m, k): d ln psi_mk / dT
  bool has_slopes;
};

class GroupCore {
 public:
  GroupCore() = default;
  /// r, q per component; surfaces[k][i] = area a_ki of component i on site k.
  GroupCore(const Vec<double>& r, const Vec<double>& q, double exponent, int sites,
            const std::array<Vec<double>, kMaxSites>& surfaces);

  [[nodiscard]] int size() const { return r_.size(); }
  [[nodiscard]] int sites() const { return sites_; }
  [[nodiscard]] const Vec<double>& r() const { return r_; }
  [[nodiscard]] const Vec<double>& q() const { return q_; }
  [[nodiscard]] double exponent() const { return exponent_; }
  [[nodiscard]] const std::array<Vec<double>, kMaxSites>& surfaces() const { return a_; }

  template <class S>
  [[nodiscard]] Vec<S> combinatorial(const Vec<S>& x) const {
    expect_size(x, size());
    using std::log;
    const int n = size();
    const Sums<S> s = sums(x);
    Vec<S> result(n, for_overwrite);
    const S ln_R = log(s.R);
    const S ln_Rp = exponent_ == 1.0 ? ln_R : log(s.Rp);
    const S ln_E_over_R = log(s.E_over_R);
    for (int i = 0; i < n; ++i) {
      const S v = constant<S>(rp_[i]) / s.Rp;
      const S ln_v = constant<S>(ln_rp_[i]) - ln_Rp;
      const S y = constant<S>(r_over_q_[i]) * s.E_over_R;
      const S ln_y = constant<S>(ln_r_over_q_[i]) + ln_E_over_R;
      result[i] = 1.0 - v + ln_v - constant<S>(five_q_[i]) * (1.0 - y + ln_y);
    }
    return result;
  }

  template <class S>
  [[nodiscard]] Vec<S> residual(const SitePsi<S>& psi, const Vec<S>& x) const {
    expect_size(x, size());
    const Sites<S> t(*this, psi, x);
    Vec<S> result(size(), for_overwrite);
    residual(t, result);
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const SitePsi<S>& psi, const Vec<S>& x, LnGammaGradient<S>& out) const {
    expect_size(x, size());
    const Sites<S> t(*this, psi, x);
    const int n = size();
    out.value = combinatorial(x);
    Vec<S> rest(n, for_overwrite);
    residual(t, rest);
    for (int i = 0; i < n; ++i) {
      out.value[i] += rest[i];
    }
    out.d_dx = Matrix<S>(n, for_overwrite);
    combinatorial_gradient(x, out.d_dx);
    residual_gradient(t, x, out.d_dx);
    out.d_dT = Vec<S>(n, S(0.0));
    if (psi.has_slopes) {
      temperature_slope(psi, t, x, out.d_dT);
    }
  }

 private:
  template <class S>
  struct Sums {
    S R, Rp, E, E_over_R;
  };

  /// What temperature and composition give per site.
  template <class S>
  struct Sites {
    Sites(const GroupCore& core, const SitePsi<S>& psi, const Vec<S>& x);
    SiteTable<S, kMaxComponents> s;        ///< s_ki
    SiteTable<S, kMaxComponents> ln_term;  ///< ln(m_k A_i / s_ki), where a_ki != 0
    SiteTable<S, kMaxComponents> excess;   ///< a_ki - h_k s_ki
    SiteTable<S, 1> h;
  };

  template <class S>
  [[nodiscard]] Sums<S> sums(const Vec<S>& x) const {
    const int n = size();
    Vec<S> r(n, for_overwrite);
    Vec<S> q(n, for_overwrite);
    Sums<S> s;
    for (int i = 0; i < n; ++i) {
      r[i] = S(r_[i]);
      q[i] = S(q_[i]);
    }
    s.R = simplex_sum(x.begin(), r.begin(), n);
    s.E = simplex_sum(x.begin(), q.begin(), n);
    s.E_over_R = ratio_of_sums(x.begin(), q.begin(), r.begin(), n);
    s.Rp = s.R;
    if (exponent_ != 1.0) {
      for (int i = 0; i < n; ++i) {
        r[i] = constant<S>(rp_[i]);
      }
      s.Rp = simplex_sum(x.begin(), r.begin(), n);
    }
    return s;
  }

  template <class S>
  void combinatorial_gradient(const Vec<S>& x, Matrix<S>& d) const {
    const int n = size();
    const Sums<S> s = sums(x);
    Vec<S> one_minus_v(n, for_overwrite);
    Vec<S> one_minus_y(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      one_minus_v[i] = 1.0 - constant<S>(rp_[i]) / s.Rp;
      one_minus_y[i] = 1.0 - constant<S>(r_over_q_[i]) * s.E_over_R;
    }
    const S inverse_E = 1.0 / s.E;
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j <= i; ++j) {
        const S surface = constant<S>(five_q_[i]) * (q_[j] * inverse_E);
        d(i, j) = one_minus_v[i] * one_minus_v[j] - surface * (one_minus_y[i] * one_minus_y[j]);
        d(j, i) = d(i, j);
      }
    }
  }

  template <class S>
  void residual(const Sites<S>& t, Vec<S>& result) const {
    for (int i = 0; i < size(); ++i) {
      S sum = constant<S>(A_[i]);
      for (int k = 0; k < sites_; ++k) {
        const double a = a_[static_cast<std::size_t>(k)][i];
        sum -= t.h(k, 0) * t.s(k, i);
        if (a != 0.0) {
          sum -= a * t.ln_term(k, i);
        }
      }
      result[i] = sum;
    }
  }

  template <class S>
  void residual_gradient(const Sites<S>& t, const Vec<S>& x, Matrix<S>& d) const {
    const int n = size();
    Vec<S> column(n, for_overwrite);
    for (int i = 0; i < n; ++i) {
      column[i] = constant<S>(A_[i]);
    }
    const S inverse_A = 1.0 / simplex_sum(x.begin(), column.begin(), n);
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j <= i; ++j) {
        d(i, j) += constant<S>(A_[i]) * (constant<S>(A_[j]) * inverse_A);
      }
    }
    Vec<S> share(n, for_overwrite);
    for (int k = 0; k < sites_; ++k) {
      const S inverse_S = 1.0 / simplex_sum(x.begin(), t.s.row(k), n);
      for (int i = 0; i < n; ++i) {
        share[i] = t.s(k, i) * inverse_S;
      }
      for (int i = 0; i < n; ++i) {
        for (int j = 0; j <= i; ++j) {
          d(i, j) -= t.excess(k, i) * share[j] + a_[static_cast<std::size_t>(k)][j] * share[i];
        }
      }
    }
    for (int i = 0; i < n; ++i) {
      for (int j = 0; j < i; ++j) {
        d(j, i) = d(i, j);
      }
    }
  }

  template <class S>
  void temperature_slope(const SitePsi<S>& psi, const Sites<S>& t, const Vec<S>& x, Vec<S>& out) const {
    const int n = size();
    Vec<S> weight(n, for_overwrite);
    Vec<S> ln_slope(n, for_overwrite);  // s'_ki / s_ki: a mean of the slopes of psi
    std::array<S, kMaxSites> part;
    std::array<S, kMaxSites> slope;
    for (int k = 0; k < sites_; ++k) {
      for (int i = 0; i < n; ++i) {
        int terms = 0;
        for (const Area& area : areas(i)) {
          part[static_cast<std::size_t>(terms)] = area.a * psi.psi(area.site, k);
          slope[static_cast<std::size_t>(terms)] = psi.ln_slope(area.site, k);
          ++terms;
        }
        ln_slope[i] = weighted_mean(part.data(), slope.data(), terms);
        weight[i] = x[i] * t.s(k, i);
      }
      const S mean = weighted_mean(weight.begin(), ln_slope.begin(), n);  // S'_k / S_k
      for (int i = 0; i < n; ++i) {
        out[i] += t.excess(k, i) * (ln_slope[i] - mean);
      }
    }
  }

  /// The sites a component has.
  struct Area {
    int site = 0;
    double a = 0.0;
  };
  [[nodiscard]] std::span<const Area> areas(int i) const {
    const auto first = static_cast<std::size_t>(first_area_[static_cast<std::size_t>(i)]);
    const auto last = static_cast<std::size_t>(first_area_[static_cast<std::size_t>(i) + 1]);
    return {areas_.data() + first, last - first};
  }

  Vec<double> r_;
  Vec<double> q_;
  double exponent_ = 1.0;
  int sites_ = 0;
  std::array<Vec<double>, kMaxSites> a_{};
  std::array<Area, static_cast<std::size_t>(kMaxSites) * kMaxComponents> areas_{};  ///< component by component
  std::array<int, kMaxComponents + 1> first_area_{};
  Vec<Enclosed> A_;
  Vec<Enclosed> rp_;
  Vec<Enclosed> ln_rp_;
  Vec<Enclosed> r_over_q_;
  Vec<Enclosed> ln_r_over_q_;
  Vec<Enclosed> five_q_;
};

template <class S>
GroupCore::Sites<S>::Sites(const GroupCore& core, const SitePsi<S>& psi, const Vec<S>& x)
    : s(core.sites_, core.size()),
      ln_term(core.sites_, core.size()),
      excess(core.sites_, core.size()),
      h(core.sites_, 1) {
  using std::log;
  const int n = core.size();
  Vec<S> total(n, for_overwrite);
  Vec<S> column(n, for_overwrite);
  for (int i = 0; i < n; ++i) {
    total[i] = constant<S>(core.A_[i]);
    for (int k = 0; k < core.sites_; ++k) {
      s(k, i) = S(0.0);
    }
    for (const Area& area : core.areas(i)) {
      for (int k = 0; k < core.sites_; ++k) {
        s(k, i) += area.a * psi.psi(area.site, k);
      }
    }
  }
  for (int k = 0; k < core.sites_; ++k) {
    const Vec<double>& a = core.a_[static_cast<std::size_t>(k)];
    const S ln_mean = log(ratio_of_sums(x.begin(), s.row(k), total.begin(), n));
    for (int i = 0; i < n; ++i) {
      if (a[i] != 0.0) {
        ln_term(k, i) = ln_mean - log(s(k, i) / total[i]);
      }
      column[i] = S(a[i]);
    }
    h(k, 0) = ratio_of_sums(x.begin(), column.begin(), s.row(k), n);
    for (int i = 0; i < n; ++i) {
      excess(k, i) = column[i] - h(k, 0) * s(k, i);
    }
  }
}

}  // namespace stillshed
