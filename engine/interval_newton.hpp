/// Tests of one box of the completeness proof: mean-value form and preconditioned Newton step.
///
/// With c a point of the box on the simplex, t the middle of T and D an enclosure of the gradient over the box, every
/// root of the box satisfies, for any row of real weights Y and any real number m,
///     0 = Y f(c, t) + sum_j (Y D_j - m)(x_j - c_j) + Y D_T (T - t)          because sum_j (x_j - c_j) = 0
/// so the choice of m costs nothing: it is the middle of Y D_p for the pivot p, the largest fraction.
///     mean value   Y = unit rows, m by the least sum of |middle - m| times width
///     Newton       Y = inverse of the middle of D: every row narrows its own unknown (Hansen-Sengupta)
/// Two different roots a, b give M (a - b) = 0 for a matrix M within Y D: none when Y D is strictly dominant.
///
/// Columns 0 .. n-1 are the mole fractions, column n is T. An unbounded enclosure narrows nothing.
/// Source    E. R. Hansen, S. Sengupta, BIT 21 (1981) 203-211; R. Krawczyk, Computing 4 (1969) 187-201 (from memory).
#pragma once

#include <array>

#include "engine/face_system.hpp"
#include "engine/small_linear.hpp"

namespace stillshed {

/// Point c on the simplex and t, with f there.
struct BoxCentre {
  Vec<Interval> x;  ///< points, but for the pivot: one minus the others, rounded outward
  int pivot = 0;    ///< the largest fraction
  double T = 0.0;
  Vec<Interval> f;
};

enum class Narrowing { empty, narrowed, unchanged };

class IntervalNewton {
 public:
  /// `mutation` is for tests of the tests: it scales the radii of D. 1 is sound, less is not.
  IntervalNewton(const FaceSystem& system, double mutation)
      : system_(system), mutation_(mutation), n_(static_cast<std::size_t>(system.size())) {}

  /// Narrows every fraction to what the others leave of the unit; false when the box misses the simplex.
  [[nodiscard]] static bool cut_to_simplex(SearchBox& box);

  /// Evaluates f at a centre of the box (which must have been cut to the simplex) or at a given point. The box grows to
  /// hold the centre where rounding put that outside.
  void set_centre(SearchBox& box);
  void set_centre(SearchBox& box, const Composition& x, double T);
  /// Takes D from an enclosure over the box, centre included.
  void set_gradient(const FaceEnclosure& enclosure);

  /// From ln gamma over the box: p_i(T) = -ln gamma_i. `enclosure` belongs to the box.
  [[nodiscard]] Narrowing narrow_by_value(const FaceEnclosure& enclosure, SearchBox& box) const;
  /// Mean-value form of every f_i, solved for T.
  [[nodiscard]] Narrowing narrow_by_mean_value(SearchBox& box) const;
  /// Computes Y and Y D; false when the middle of D is singular or unbounded.
  [[nodiscard]] bool precondition();
  /// Newton step of every unknown, after `precondition`.
  [[nodiscard]] Narrowing narrow_by_newton(SearchBox& box) const;
  /// True when Y D is strictly dominant for some scaling: at most one root where D holds. After `precondition`.
  [[nodiscard]] bool regular() const;
  /// True when the Krawczyk step x - Y f(x) maps the box strictly into itself: at least one root. After `precondition`;
  /// the pivot's side must hold one minus every sum of the others.
  [[nodiscard]] bool maps_into_itself(const SearchBox& box) const;

  [[nodiscard]] const BoxCentre& centre() const { return centre_; }
  /// How far the f differ over the box along one column, seen from the pivot (smear). The column to halve has the
  /// largest.
  [[nodiscard]] double smear(const SearchBox& box, int column) const;

 private:
  [[nodiscard]] Interval offset(const SearchBox& box, std::size_t column) const;
  [[nodiscard]] std::size_t unknown(std::size_t row) const;  ///< column of the unknown that a row is solved for

  const FaceSystem& system_;
  double mutation_;
  std::size_t n_;
  BoxCentre centre_;
  // Middle and radius of D, and of Y D after the subtraction of m.
  SquareArray middle_, radius_;
  SquareArray newton_middle_, newton_radius_;
  std::array<Interval, kMostUnknowns> newton_value_;  ///< Y f(c, t)
};

}  // namespace stillshed
