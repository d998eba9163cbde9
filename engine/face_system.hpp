/// The azeotrope equations of one face, as the search and the proof use them.
///
///   f_i(T, x) = ln gamma_i(T, x) + p_i(T) = 0 for every member i,   p_i(T) = ln(Psat_i(T) / P),   sum x_i = 1
///
/// regular at x_i = 0: no cut near faces. A root on a sub-face solves these equations only when K_k = 1 exactly for
/// every member missing from it.
///
/// Symbols   T temperature [K]; x mole fractions of the members [-]; P pressure [Pa].
/// Numbers   double for the search, Interval for the proof. Interval results hold for the points of the box on the
///           simplex (models/means.hpp).
#pragma once

#include "engine/box_search.hpp"
#include "models/gradient.hpp"
#include "models/mixture.hpp"

namespace stillshed {

/// Enclosures over a box. Columns of d_dx as in models/gradient.hpp: only directions with sum(dx) = 0 have a meaning.
struct FaceEnclosure {
  LnGammaGradient<Interval> ln_gamma;
  Vec<Interval> p;     ///< p_i
  Vec<Interval> p_dT;  ///< dp_i/dT [1/K]
};

class FaceSystem {
 public:
  /// `face` holds the members only.
  FaceSystem(Mixture face, double pressure_Pa);

  [[nodiscard]] int size() const { return face_.size(); }
  [[nodiscard]] const Mixture& face() const { return face_; }
  [[nodiscard]] bool depends_on_temperature() const { return depends_on_temperature_; }
  /// Boiling temperature of each member [K].
  [[nodiscard]] const Vec<double>& boiling_points_K() const { return boiling_points_; }

  /// f and its gradient in doubles.
  void evaluate(const Composition& x, double temperature_K, LnGammaGradient<double>& out) const;
  /// f over a box, natural extension.
  [[nodiscard]] Vec<Interval> value(const Vec<Interval>& x, const Interval& temperature_K) const;
  /// Everything over a box.
  void enclose(const SearchBox& box, FaceEnclosure& out) const;
  [[nodiscard]] Interval p(int i, const Interval& temperature_K) const;

 private:
  Mixture face_;
  double ln_pressure_ = 0.0;
  Interval ln_pressure_enclosure_;
  bool depends_on_temperature_ = false;
  Vec<double> boiling_points_;
};

/// Temperatures that can belong to a root of the face.
///
/// sum x_i f_i = gE/RT + sum x_i p_i = 0, so there is no root where max_i p_i < -max gE/RT or min_i p_i > -min gE/RT,
/// and none where some f_i has no zero on the face. The window from half the lowest to one and a half times the highest
/// boiling point is cut into slices, each is tested by interval evaluation over the whole face, and the hull of the
/// boiling points and of the slices that may hold a root is returned. Outside the window nothing is claimed.
[[nodiscard]] Interval temperature_bracket(const FaceSystem& system);

}  // namespace stillshed
