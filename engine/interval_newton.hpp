/// Interval Newton steps on the azeotrope equations of one face: the tests a box has to pass.
///
///   z in box  =>  f(z) = f(m) + J (z - m),  J in J(box), m the centre on the simplex      (mean-value form)
///   Y f(m) + (Y J)(z - m) = 0, Y = inverse of mid J                                       (preconditioned)
/// regular      |I - Y J| w < w for the widths w of the box: J(box) is regular, at most one root in the box
/// verified     |Y f(m)| + |I - Y J| rad < rad: exactly one root in the box (Krawczyk)
#pragma once

#include "engine/face_system.hpp"
#include "engine/locate_roots.hpp"

namespace stillshed {

struct SearchBox {
  Vec<Interval> x;
  Interval T;
};

enum class BoxState {
  excluded,   ///< no root
  vanishing,  ///< every f_i is zero to rounding on the whole box
  regular,    ///< at most one root
  unsettled,
};

class IntervalNewton {
 public:
  IntervalNewton(const FaceSystem& system, double mutation) : system_(system), mutation_(mutation) {}

  /// sum(x) = 1 on the box; false when the box misses the simplex.
  [[nodiscard]] bool cut_to_simplex(SearchBox& box) const;
  /// One round of tests; may shrink the box.
  [[nodiscard]] BoxState contract(SearchBox& box);
  [[nodiscard]] bool is_regular(const SearchBox& box);
  /// A small box around `root` that holds exactly one root.
  [[nodiscard]] bool verify(const LocatedRoot& root, SearchBox& enclosure);
  /// The largest box tried around a verified root that holds no other.
  [[nodiscard]] SearchBox largest_regular(const LocatedRoot& root, const SearchBox& enclosure);
  /// Centre on the simplex.
  [[nodiscard]] Composition centre(const SearchBox& box) const;
  [[nodiscard]] double size_of(const SearchBox& box) const;
  [[nodiscard]] double widest(const SearchBox& box) const;
  void bisect(SearchBox& box, SearchBox& other);

 private:
  using IntervalMatrix = Matrix<Interval>;
  [[nodiscard]] bool jacobian(const SearchBox& box, int dependent);
  [[nodiscard]] bool precondition();
  [[nodiscard]] bool contracts(const SearchBox& box, const Vec<double>* shift) const;
  [[nodiscard]] bool newton(SearchBox& box, const Composition& m);
  [[nodiscard]] Vec<Interval> residual_at(const Composition& m, double T, int dependent) const;
  [[nodiscard]] const Interval& unknown(const SearchBox& box, int c) const;

  const FaceSystem& system_;
  double mutation_;
  int dependent_ = 0;
  LnGammaGradient<Interval> gradient_;
  IntervalMatrix J_;  ///< d f_i / d z_c
  IntervalMatrix A_;  ///< Y J
  SmallMatrix Y_;
};

}  // namespace stillshed
