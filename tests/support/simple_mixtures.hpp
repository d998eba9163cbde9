/// Mixtures with closed-form answers for tests: Clausius-Clapeyron vapour pressures and simple activity models.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "models/mixture.hpp"

namespace stillshed::testing {

inline constexpr double kAtmosphere_Pa = 101325.0;

/// ln(P/101325) = H (1/Tb - 1/T), ids "A", "B", ...; any activity model.
inline Mixture simple_mixture(const std::vector<double>& boiling_points_K, ActivityModel activity,
                              const std::vector<double>& H_K = {}) {
  std::vector<MixtureComponent> components;
  for (std::size_t i = 0; i < boiling_points_K.size(); ++i) {
    MixtureComponent component;
    component.id = std::string(1, static_cast<char>('A' + static_cast<int>(i)));
    component.molar_mass_g_mol = 60.0;
    PressureSet set;
    set.id = "user";
    set.form = PressureForm::clausius_clapeyron;
    set.coefficients = {boiling_points_K[i], H_K.empty() ? 4000.0 : H_K[i]};
    component.pressure = PressureCurve(set);
    components.push_back(component);
  }
  return {std::move(components), std::move(activity)};
}

inline Matrix<double> square_matrix(const std::vector<std::vector<double>>& rows) {
  Matrix<double> result(static_cast<int>(rows.size()));
  for (int i = 0; i < result.size(); ++i) {
    for (int j = 0; j < result.size(); ++j) {
      result(i, j) = rows[static_cast<std::size_t>(i)][static_cast<std::size_t>(j)];
    }
  }
  return result;
}

inline Mixture margules_mixture(const std::vector<double>& boiling_points_K, const std::vector<std::vector<double>>& A,
                                const std::vector<double>& H_K = {}) {
  return simple_mixture(boiling_points_K, Margules(square_matrix(A)), H_K);
}

/// gE/RT = A sum_{i<j} x_i x_j, every boiling point 350 K, H = 4000 K.
inline Mixture symmetric_mixture(int size, double A) {
  std::vector<std::vector<double>> rows(static_cast<std::size_t>(size),
                                        std::vector<double>(static_cast<std::size_t>(size), A));
  for (std::size_t i = 0; i < rows.size(); ++i) {
    rows[i][i] = 0.0;
  }
  return margules_mixture(std::vector<double>(static_cast<std::size_t>(size), 350.0), rows);
}

}  // namespace stillshed::testing
