#include "reports/triangle.hpp"

#include <algorithm>
#include <cmath>

#include "params/errors.hpp"

namespace stillshed {
namespace {

const double kHeightOverSide = std::sqrt(3.0) / 2.0;

}  // namespace

Triangle::Triangle(Point left_corner, double side, std::array<int, 3> order)
    : corners_{left_corner + Point{0.5 * side, -kHeightOverSide * side}, left_corner, left_corner + Point{side, 0.0}},
      side_(side),
      order_(order) {}

Point Triangle::at(const Composition& x) const {
  expects(x.size() == 3, "Triangle: three components needed");
  return x[order_[0]] * corners_[0] + x[order_[1]] * corners_[1] + x[order_[2]] * corners_[2];
}

Composition Triangle::composition(Point point) const {
  Composition x(3);
  const double top = (corners_[1].y - point.y) / (kHeightOverSide * side_);
  const double right = (point.x - corners_[1].x) / side_ - 0.5 * top;
  x[order_[0]] = top;
  x[order_[1]] = 1.0 - top - right;
  x[order_[2]] = right;
  return x;
}

std::array<int, 3> corners_by_boiling_point(const Survey& survey) {
  expects(survey.pure.size() == 3, "ternary map: three components needed");
  std::array<int, 3> order{0, 1, 2};
  std::stable_sort(order.begin(), order.end(), [&survey](int a, int b) {
    return survey.pure[static_cast<std::size_t>(a)].temperature_K <
           survey.pure[static_cast<std::size_t>(b)].temperature_K;
  });
  return order;
}

}  // namespace stillshed
