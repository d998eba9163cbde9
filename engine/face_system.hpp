/// The azeotrope equations of one face, in double and in interval form.
///
///   f_i(x, T) = ln gamma_i(x, T) + ln Psat_i(T) - ln P = 0   for every member i
///
/// Unknowns z: the mole fractions of all members but one (the dependent one, x_d = 1 - sum of the others) and T, in the
/// order [members without d ascending, T]. The K-form is regular at x_i = 0: no cut near faces.
#pragma once

#include <Eigen/Dense>

#include "models/mixture.hpp"

namespace stillshed {

inline constexpr int kMaxUnknowns = kMaxComponents;
using SmallMatrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kMaxUnknowns, kMaxUnknowns>;
using SmallVector = Eigen::Matrix<double, Eigen::Dynamic, 1, 0, kMaxUnknowns, 1>;

class FaceSystem {
 public:
  FaceSystem(const Mixture& face, double pressure_Pa);
  [[nodiscard]] int size() const { return face_.size(); }
  [[nodiscard]] const Mixture& face() const { return face_; }
  [[nodiscard]] double ln_pressure() const { return ln_pressure_; }

  /// f and its Jacobian in the unknowns z, doubles.
  void evaluate(const Composition& x, double temperature_K, int dependent, SmallVector& f, SmallMatrix& jacobian) const;
  [[nodiscard]] Vec<double> residual(const Composition& x, double temperature_K) const {
    return face_.ln_k(temperature_K, x, ln_pressure_);
  }

 private:
  Mixture face_;
  double ln_pressure_;
};

/// Index of unknown c in the list of members (c < n - 1), skipping the dependent one.
[[nodiscard]] inline int member_of_unknown(int c, int dependent) {
  return c < dependent ? c : c + 1;
}

}  // namespace stillshed
