/// The map of a ternary mixture as one SVG picture: residue curves with arrows towards rising temperature,
/// boundaries, regions, azeotropes by node type, the feed and the way of the pot.
///
/// Basis    mole fractions, an equilateral triangle; straight mixing lines stay straight.
/// Corners  lowest boiling component on top, the next one left, the highest boiling one right (stated in the legend).
/// Ticks    slanted along the grid lines they belong to; each edge carries one component.
#pragma once

#include <array>
#include <string>

#include "reports/answer.hpp"
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

/// Needs three components and a survey; draws what else there is.
[[nodiscard]] std::string ternary_map_svg(const Answer& answer);

/// What the picture shows, in words.
[[nodiscard]] std::string ternary_map_words(const Answer& answer);

}  // namespace stillshed
