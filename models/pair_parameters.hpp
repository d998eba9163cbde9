/// Temperature-dependent pair parameters shared by NRTL, Wilson and UNIQUAC.
///
///   t_ij(T) = a_ij + b_ij / T + e_ij ln T + f_ij T        T in K
///
/// Row i = component i; the diagonal is zero. Which symbol t stands for (tau, ln Lambda, ln tau) is said by the model.
#pragma once

#include <string>
#include <vector>

#include "models/scalar.hpp"

namespace stillshed {

struct PairParameters {
  Matrix<double> a;        ///< [-]
  Matrix<double> b_K;      ///< [K]
  Matrix<double> e;        ///< [-]
  Matrix<double> f_per_K;  ///< [1/K]

  PairParameters() = default;
  explicit PairParameters(int size) : a(size, 0.0), b_K(size, 0.0), e(size, 0.0), f_per_K(size, 0.0) {}
  [[nodiscard]] int size() const { return a.size(); }
  [[nodiscard]] bool depends_on_temperature() const;
  [[nodiscard]] PairParameters face(const Members& members) const;
  /// Bad entries: NaN, unequal sizes, a diagonal that is not zero.
  [[nodiscard]] std::vector<Problem> problems(const std::string& model) const;

  /// t_ij at this temperature; `ln_T` and `inverse_T` are passed in because every entry shares them.
  template <class S>
  [[nodiscard]] S at(int i, int j, const S& temperature_K, const S& inverse_T, const S& ln_T) const {
    S t = b_K(i, j) * inverse_T + a(i, j);
    if (e(i, j) != 0.0) {
      t += e(i, j) * ln_T;
    }
    if (f_per_K(i, j) != 0.0) {
      t += f_per_K(i, j) * temperature_K;
    }
    return t;
  }
  /// dt_ij/dT.
  template <class S>
  [[nodiscard]] S slope(int i, int j, const S& inverse_T) const {
    S t = (-b_K(i, j)) * (inverse_T * inverse_T) + f_per_K(i, j);
    if (e(i, j) != 0.0) {
      t += e(i, j) * inverse_T;
    }
    return t;
  }
};

}  // namespace stillshed
