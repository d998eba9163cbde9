/// Temperature-dependent pair parameters shared by NRTL, Wilson and UNIQUAC.
///
///   t_ij(T) = a_ij + b_ij / T + e_ij ln T + f_ij T        T in K
///
/// Row i = component i; the diagonal is zero. Which symbol t stands for (tau, ln Lambda, ln tau) is said by the model.
#pragma once

#include <string>
#include <vector>

#include "models/interval.hpp"
#include "models/jet_interval.hpp"
#include "models/scalar.hpp"

namespace stillshed {

template <class S>
struct PairTemperature {
  S T;
  S inverse_T;
  S ln_T;  ///< zero when no entry uses it
};

struct PairParameters {
  Matrix<double> a;        ///< [-]
  Matrix<double> b_K;      ///< [K]
  Matrix<double> e;        ///< [-]
  Matrix<double> f_per_K;  ///< [1/K]

  PairParameters() = default;
  explicit PairParameters(int size) : a(size, 0.0), b_K(size, 0.0), e(size, 0.0), f_per_K(size, 0.0) {}
  [[nodiscard]] int size() const { return a.size(); }
  [[nodiscard]] bool depends_on_temperature() const;
  [[nodiscard]] bool uses_ln_T() const;
  [[nodiscard]] PairParameters face(const Members& members) const;
  /// Bad entries: NaN, unequal sizes, a diagonal that is not zero.
  [[nodiscard]] std::vector<Problem> problems(const std::string& model) const;

  /// The functions of temperature that every entry shares; a model remembers uses_ln_T() to spare a logarithm.
  template <class S>
  [[nodiscard]] static PairTemperature<S> temperature(const S& temperature_K, bool with_ln_T) {
    using std::log;
    PairTemperature<S> t{temperature_K, 1.0 / temperature_K, S(0.0)};
    if (with_ln_T) {
      t.ln_T = log(temperature_K);
    }
    return t;
  }
  /// t_ij at this temperature.
  template <class S>
  [[nodiscard]] S at(int i, int j, const PairTemperature<S>& T) const {
    S t = b_K(i, j) * T.inverse_T + a(i, j);
    if (e(i, j) != 0.0) {
      t += e(i, j) * T.ln_T;
    }
    if (f_per_K(i, j) != 0.0) {
      t += f_per_K(i, j) * T.T;
    }
    return t;
  }
  /// dt_ij/dT.
  template <class S>
  [[nodiscard]] S slope(int i, int j, const PairTemperature<S>& T) const {
    S t = (-b_K(i, j)) * square(T.inverse_T) + f_per_K(i, j);
    if (e(i, j) != 0.0) {
      t += e(i, j) * T.inverse_T;
    }
    return t;
  }
};

}  // namespace stillshed
