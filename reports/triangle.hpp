/// Geometry of the ternary map: mole fractions on an equilateral triangle.
#pragma once

#include <array>

#include "engine/survey.hpp"
#include "reports/svg.hpp"

namespace stillshed {

/// Equilateral triangle: mole fractions to picture coordinates and back.
class Triangle {
 public:
  /// `order` gives the component at the top, left and right corner.
  Triangle(Point left_corner, double side, std::array<int, 3> order);

  [[nodiscard]] Point at(const Composition& x) const;
  [[nodiscard]] Composition composition(Point point) const;  ///< inverse of `at`
  [[nodiscard]] Point corner(int k) const { return corners_[static_cast<std::size_t>(k)]; }
  [[nodiscard]] int component(int k) const { return order_[static_cast<std::size_t>(k)]; }
  [[nodiscard]] double side() const { return side_; }

 private:
  std::array<Point, 3> corners_;
  double side_;
  std::array<int, 3> order_;
};

/// Component indices by rising boiling temperature.
[[nodiscard]] std::array<int, 3> corners_by_boiling_point(const Survey& survey);

}  // namespace stillshed
