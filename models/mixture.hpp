/// A liquid mixture: pure-component vapour pressures, one activity model, ideal vapour.
///
///   K_i(T, x) = gamma_i(T, x) * Psat_i(T) / P          (ideal vapour, y_i = K_i x_i)
///   f_i(T, x) = ln gamma_i(T, x) + ln(Psat_i(T) / P)    zero for every member of an azeotrope
///
/// Symbols   T temperature [K]; P pressure [Pa]; x mole fractions [-] in component order.
/// Numbers   double, ceres::Jet, Interval, Jet<Interval>; see models/scalar.hpp.
/// Errors    none at evaluation; construction throws InputError / LogicError.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "models/activity.hpp"
#include "models/scalar.hpp"
#include "models/vapour_pressure.hpp"

namespace stillshed {

/// What the engine needs to know of one pure component.
struct MixtureComponent {
  std::string id;
  std::string cas;  ///< empty for a user's own component
  double molar_mass_g_mol = 0.0;
  PressureCurve pressure;  ///< the one vapour-pressure set used in this run
  std::optional<double> critical_temperature_K;
  std::optional<double> critical_pressure_Pa;
  std::optional<double> melting_point_K;
  bool vapour_dimerizes = false;
};

class Mixture {
 public:
  Mixture() = default;
  /// `correction` is an extra Redlich-Kister gE/RT added to the model: used to bound a missing pair.
  Mixture(std::vector<MixtureComponent> components, ActivityModel activity,
          std::optional<RedlichKister> correction = {});

  [[nodiscard]] int size() const { return static_cast<int>(components_.size()); }
  [[nodiscard]] const std::vector<MixtureComponent>& components() const { return components_; }
  [[nodiscard]] const MixtureComponent& component(int i) const { return components_[static_cast<std::size_t>(i)]; }
  [[nodiscard]] const ActivityModel& activity() const { return activity_; }
  /// True when a Redlich-Kister correction is added to the model.
  [[nodiscard]] bool corrected() const { return correction_.has_value(); }

  /// ln gamma of every component. x on the closed simplex, zeros included; sum(x) = 1 is assumed, not enforced.
  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const;

  /// ln(Psat_i / Pa).
  template <class S>
  [[nodiscard]] S ln_psat(int i, const S& temperature_K) const {
    return component(i).pressure.ln_psat(temperature_K);
  }

  /// ln K_i = f_i for all components.
  template <class S>
  [[nodiscard]] Vec<S> ln_k(const S& temperature_K, const Vec<S>& x, double ln_pressure_Pa) const;

  /// ln gamma of all components with its analytic gradient (the x as independent numbers, see models/gradient.hpp).
  /// S = double or Interval.
  template <class S>
  void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x, LnGammaGradient<S>& out) const;

  /// ln K of all components with its analytic gradient (the x as independent numbers, see models/gradient.hpp).
  /// S = double or Interval.
  template <class S>
  void ln_k_with_gradient(const S& temperature_K, const Vec<S>& x, double ln_pressure_Pa,
                          LnGammaGradient<S>& out) const;

  /// True when ln gamma changes with temperature at constant composition.
  [[nodiscard]] bool depends_on_temperature() const;

  /// The same mixture restricted to some of its components (order kept). An absent component changes
  /// nothing for the others, so a face is a smaller mixture.
  [[nodiscard]] Mixture face(const Members& members) const;

  /// Boiling temperature of pure component i at this pressure [K].
  [[nodiscard]] double boiling_point_K(int i, double pressure_Pa) const;

 private:
  std::vector<MixtureComponent> components_;
  ActivityModel activity_;
  std::optional<RedlichKister> correction_;
};

/// mole fractions -> mass fractions and back, with the mixture's molar masses.
[[nodiscard]] Composition to_mass_fractions(const Mixture& mixture, const Composition& mole_fractions);
[[nodiscard]] Composition to_mole_fractions(const Mixture& mixture, const Composition& mass_fractions);

}  // namespace stillshed
