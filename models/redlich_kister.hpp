/// Redlich-Kister expansion over pairs, n components.
///
///   gE/RT = sum over pairs (i, j) of x_i x_j p(d),  p(d) = sum_m c_m d^m,  d = x_i - x_j
///   with u = x_i x_j (p + d p'):
///   ln g_k = sum over pairs { -u + [k = i] (x_j p + x_i x_j p') + [k = j] (x_i p - x_i x_j p') }
///
/// Symbols   c_m [-], independent of T.
/// Source    O. Redlich, A. T. Kister, Ind. Eng. Chem. 40 (1948) 345-348 (from memory).
/// Valid     everywhere. Errors: construction throws InputError for bad indices, repeated pairs, NaN.
#pragma once

#include <vector>

#include "models/gradient.hpp"
#include "models/scalar.hpp"

namespace stillshed {

/// Most coefficients of one pair.
inline constexpr int kMaxRedlichKister = 8;

struct RedlichKisterPair {
  int i = 0;
  int j = 1;
  std::vector<double> c;
};

class RedlichKister {
 public:
  RedlichKister() = default;
  RedlichKister(int size, std::vector<RedlichKisterPair> pairs);
  [[nodiscard]] int size() const { return size_; }
  [[nodiscard]] bool depends_on_temperature() const { return false; }
  [[nodiscard]] RedlichKister face(const Members& members) const;
  [[nodiscard]] const std::vector<RedlichKisterPair>& pairs() const { return pairs_; }

  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& /*temperature_K*/, const Vec<S>& x) const {
    expect_size(x, size());
    Vec<S> result(size_, S(0.0));
    for (const RedlichKisterPair& pair : pairs_) {
      const S& a = x[pair.i];
      const S& b = x[pair.j];
      const S d = a - b;
      S p(0.0);
      S p1(0.0);
      S p2(0.0);
      polynomial(pair, d, p, p1, p2);
      const S ab = a * b;
      const S u = ab * (p + d * p1);
      for (int k = 0; k < size_; ++k) {
        result[k] -= u;
      }
      result[pair.i] += b * p + ab * p1;
      result[pair.j] += a * p - ab * p1;
    }
    return result;
  }

  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const {
    expect_size(x, size());
    out.value = ln_gamma(temperature_K, x);
    out.d_dx = Matrix<S>(size_, S(0.0));
    out.d_dT = Vec<S>(size_, S(0.0));
    for (const RedlichKisterPair& pair : pairs_) {
      const S& a = x[pair.i];
      const S& b = x[pair.j];
      const S d = a - b;
      S p(0.0);
      S p1(0.0);
      S p2(0.0);
      polynomial(pair, d, p, p1, p2);
      const S ab = a * b;
      const S w = p + d * p1;
      const S w1 = ab * (2.0 * p1 + d * p2);
      const S du_da = b * w + w1;
      const S du_db = a * w - w1;
      for (int k = 0; k < size_; ++k) {
        out.d_dx(k, pair.i) -= du_da;
        out.d_dx(k, pair.j) -= du_db;
      }
      const S cross = w - ab * p2;
      out.d_dx(pair.i, pair.i) += 2.0 * b * p1 + ab * p2;
      out.d_dx(pair.i, pair.j) += cross;
      out.d_dx(pair.j, pair.i) += cross;
      out.d_dx(pair.j, pair.j) += ab * p2 - 2.0 * a * p1;
    }
  }

 private:
  /// p and its first two derivatives at d (Horner).
  template <class S>
  static void polynomial(const RedlichKisterPair& pair, const S& d, S& p, S& p1, S& p2) {
    for (std::size_t m = pair.c.size(); m-- > 0;) {
      p2 = p2 * d + 2.0 * p1;
      p1 = p1 * d + p;
      p = p * d + pair.c[m];
    }
  }

  int size_ = 0;
  std::vector<RedlichKisterPair> pairs_;
};

}  // namespace stillshed
