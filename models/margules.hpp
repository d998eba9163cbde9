/// Two-suffix Margules model, n components.
///
///   gE/RT = 1/2 x.A.x,   ln g_k = sum_j A_kj x_j - 1/2 x.A.x
///
/// Symbols   A [-] symmetric, zero diagonal, independent of T; row i = component i.
/// Source    M. Margules, Sitzungsber. Akad. Wiss. Wien 104 (1895) 1243 (from memory).
/// Valid     everywhere; splits into two liquids where some A_ij > 2.
/// Errors    construction: InputError for shape, symmetry, diagonal, NaN.
#pragma once

#include "models/gradient.hpp"
#include "models/means.hpp"
#include "models/scalar.hpp"

namespace stillshed {

class Margules {
 public:
  Margules() = default;
  explicit Margules(const Matrix<double>& A);
  [[nodiscard]] int size() const { return A_.size(); }
  [[nodiscard]] bool depends_on_temperature() const { return false; }
  [[nodiscard]] Margules face(const Members& members) const { return Margules(A_.face(members)); }
  [[nodiscard]] const Matrix<double>& A() const { return A_; }

  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& /*temperature_K*/, const Vec<S>& x) const {
    expect_size(x, size());
    const int n = size();
    Vec<S> row(n);
    S half(0.0);
    for (int k = 0; k < n; ++k) {
      row[k] = S(0.0);
      for (int j = 0; j < n; ++j) {
        row[k] += A_(k, j) * x[j];
      }
      half += x[k] * row[k];
    }
    for (int k = 0; k < n; ++k) {
      row[k] -= 0.5 * half;
    }
    return row;
  }

  template <class S>
  void ln_gamma_with_gradient(const S& /*temperature_K*/, const Vec<S>& x, LnGammaGradient<S>& out) const {
    expect_size(x, size());
    const int n = size();
    Vec<S> row(n);
    S half(0.0);
    for (int k = 0; k < n; ++k) {
      row[k] = S(0.0);
      for (int j = 0; j < n; ++j) {
        row[k] += A_(k, j) * x[j];
      }
      half += x[k] * row[k];
    }
    out.value = Vec<S>(n);
    out.d_dx = Matrix<S>(n);
    out.d_dT = Vec<S>(n, S(0.0));
    for (int k = 0; k < n; ++k) {
      out.value[k] = row[k] - 0.5 * half;
      for (int j = 0; j < n; ++j) {
        out.d_dx(k, j) = A_(k, j) - row[j];
      }
    }
  }

 private:
  Matrix<double> A_;
};

}  // namespace stillshed
