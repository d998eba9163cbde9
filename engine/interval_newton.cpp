#include "engine/interval_newton.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "models/means.hpp"

namespace stillshed {
namespace {

constexpr double kEpsilon = std::numeric_limits<double>::epsilon();
/// Room for the rounding of a few operations on numbers of one sign.
constexpr double kOutward = 1.0 + 16.0 * kEpsilon;

Interval around(double middle, double radius) {
  return Interval::outward(middle - radius, middle + radius);
}

double magnitude(double middle, double radius) {
  return (std::abs(middle) + radius) * kOutward;
}

Narrowing narrow(Interval& range, const Interval& by) {
  const double before = range.width();
  if (!intersect(range, by)) {
    return Narrowing::empty;
  }
  return range.width() < before ? Narrowing::narrowed : Narrowing::unchanged;
}

}  // namespace

bool IntervalNewton::cut_to_simplex(SearchBox& box) {
  constexpr int kRounds = 2;
  for (int round = 0; round < kRounds; ++round) {
    for (int i = 0; i < box.x.size(); ++i) {
      Interval rest(1.0);
      for (int j = 0; j < box.x.size(); ++j) {
        if (j != i) {
          rest -= box.x[j];
        }
      }
      if (!intersect(box.x[i], rest)) {
        return false;
      }
    }
  }
  return true;
}

void IntervalNewton::set_centre(SearchBox& box) {
  double low = 0.0;
  double high = 0.0;
  for (const Interval& side : box.x) {
    low += side.lower();
    high += side.upper();
  }
  const double share = high > low ? std::clamp((1.0 - low) / (high - low), 0.0, 1.0) : 0.5;
  Composition x(box.x.size());
  for (int i = 0; i < box.x.size(); ++i) {
    x[i] = box.x[i].lower() + share * box.x[i].width();
  }
  set_centre(box, x, box.T.mid());
}

void IntervalNewton::set_centre(SearchBox& box, const Composition& x, double T) {
  const int n = x.size();
  centre_.x = Vec<Interval>(n);
  centre_.pivot = static_cast<int>(std::max_element(x.begin(), x.end()) - x.begin());
  centre_.T = T;
  Interval rest(1.0);
  for (int i = 0; i < n; ++i) {
    if (i != centre_.pivot) {
      centre_.x[i] = Interval(x[i]);
      rest -= centre_.x[i];
    }
  }
  centre_.x[centre_.pivot] = rest;
  centre_.f = system_.value(centre_.x, Interval(T));
  // The way from the centre to any point of the box must lie in the box.
  for (int i = 0; i < n; ++i) {
    box.x[i] = hull(box.x[i], centre_.x[i]);
  }
  box.T = hull(box.T, Interval(T));
}

void IntervalNewton::set_gradient(const FaceEnclosure& enclosure) {
  for (std::size_t i = 0; i < n_; ++i) {
    const int row = static_cast<int>(i);
    for (std::size_t j = 0; j <= n_; ++j) {
      const Interval entry = j == n_ ? enclosure.ln_gamma.d_dT[row] + enclosure.p_dT[row]
                                     : enclosure.ln_gamma.d_dx(row, static_cast<int>(j));
      const double middle = entry.mid();
      middle_[i][j] = middle;
      radius_[i][j] = mutation_ * kOutward * std::max(entry.upper() - middle, middle - entry.lower());
    }
  }
}

Interval IntervalNewton::offset(const SearchBox& box, std::size_t column) const {
  return column == n_ ? box.T - centre_.T : box.x[static_cast<int>(column)] - centre_.x[static_cast<int>(column)];
}

Narrowing IntervalNewton::narrow_by_value(const FaceEnclosure& enclosure, SearchBox& box) const {
  Narrowing result = Narrowing::unchanged;
  const Interval middle(box.T.mid());
  for (int i = 0; i < system_.size(); ++i) {
    const Interval& ln_gamma = enclosure.ln_gamma.value[i];
    if (!(ln_gamma + enclosure.p[i]).contains_zero()) {
      return Narrowing::empty;
    }
    const Narrowing step = narrow(box.T, middle - (ln_gamma + system_.p(i, middle)) / enclosure.p_dT[i]);
    if (step == Narrowing::empty) {
      return step;
    }
    result = step == Narrowing::narrowed ? step : result;
  }
  return result;
}

Narrowing IntervalNewton::narrow_by_mean_value(SearchBox& box) const {
  Narrowing result = Narrowing::unchanged;
  std::array<Interval, kMostUnknowns> moved;
  std::array<double, kMostUnknowns> width;
  for (std::size_t j = 0; j < n_; ++j) {
    moved[j] = offset(box, j);
    width[j] = moved[j].width();
  }
  for (std::size_t i = 0; i < n_; ++i) {
    double m = 0.0;
    double least = std::numeric_limits<double>::infinity();
    for (std::size_t k = 0; k < n_; ++k) {
      double sum = 0.0;
      for (std::size_t j = 0; j < n_; ++j) {
        sum += std::abs(middle_[i][j] - middle_[i][k]) * width[j];
      }
      if (sum < least) {
        least = sum;
        m = middle_[i][k];
      }
    }
    Interval sum = centre_.f[static_cast<int>(i)];
    for (std::size_t j = 0; j < n_; ++j) {
      sum += (around(middle_[i][j], radius_[i][j]) - m) * moved[j];
    }
    const Interval slope = around(middle_[i][n_], radius_[i][n_]);
    if (!(sum + slope * offset(box, n_)).contains_zero()) {
      return Narrowing::empty;
    }
    const Narrowing step = narrow(box.T, centre_.T - sum / slope);
    if (step == Narrowing::empty) {
      return step;
    }
    result = step == Narrowing::narrowed ? step : result;
  }
  return result;
}

std::size_t IntervalNewton::unknown(std::size_t row) const {
  return row < static_cast<std::size_t>(centre_.pivot) ? row : row + 1;  // the last row gets column n
}

bool IntervalNewton::precondition() {
  const auto pivot = static_cast<std::size_t>(centre_.pivot);
  SquareArray a;
  for (std::size_t i = 0; i < n_; ++i) {
    for (std::size_t r = 0; r < n_; ++r) {
      const std::size_t j = unknown(r);
      a[i][r] = middle_[i][j] - (j == n_ ? 0.0 : middle_[i][pivot]);
    }
  }
  SquareArray y;
  if (!invert(a, y, n_)) {
    return false;
  }
  const double rounding = static_cast<double>(n_ + 4) * kEpsilon;
  for (std::size_t r = 0; r < n_; ++r) {
    newton_value_[r] = Interval(0.0);
    for (std::size_t i = 0; i < n_; ++i) {
      newton_value_[r] += y[r][i] * centre_.f[static_cast<int>(i)];
    }
    for (std::size_t j = 0; j <= n_; ++j) {
      double middle = 0.0;
      double radius = 0.0;
      double size = 0.0;  // of the terms of the middle, for its rounding
      for (std::size_t i = 0; i < n_; ++i) {
        const double m = j == n_ ? 0.0 : middle_[i][pivot];
        const double weight = std::abs(y[r][i]);
        middle += y[r][i] * (middle_[i][j] - m);
        radius += weight * radius_[i][j];
        size += weight * (std::abs(middle_[i][j]) + std::abs(m));
      }
      if (!std::isfinite(middle) || !std::isfinite(radius) || !std::isfinite(size)) {
        return false;
      }
      newton_middle_[r][j] = middle;
      newton_radius_[r][j] = (radius * (1.0 + rounding) + size * rounding) * kOutward;
    }
  }
  return true;
}

Narrowing IntervalNewton::narrow_by_newton(SearchBox& box) const {
  Narrowing result = Narrowing::unchanged;
  std::array<Interval, kMostUnknowns> moved;
  for (std::size_t j = 0; j <= n_; ++j) {
    moved[j] = offset(box, j);
  }
  for (std::size_t r = 0; r < n_; ++r) {
    const std::size_t k = unknown(r);
    Interval rest = newton_value_[r];
    for (std::size_t j = 0; j <= n_; ++j) {
      if (j != k) {
        rest += around(newton_middle_[r][j], newton_radius_[r][j]) * moved[j];
      }
    }
    const Interval diagonal = around(newton_middle_[r][k], newton_radius_[r][k]);
    if (!(rest + diagonal * moved[k]).contains_zero()) {
      return Narrowing::empty;
    }
    // A diagonal that holds zero gives the whole line here.
    const Interval at = k == n_ ? Interval(centre_.T) : centre_.x[static_cast<int>(k)];
    Interval& side = k == n_ ? box.T : box.x[static_cast<int>(k)];
    const Narrowing step = narrow(side, at - rest / diagonal);
    if (step == Narrowing::empty) {
      return step;
    }
    if (step == Narrowing::narrowed) {
      result = step;
      moved[k] = offset(box, k);
    }
  }
  return cut_to_simplex(box) ? result : Narrowing::empty;
}

bool IntervalNewton::regular() const {
  // Let M v = 0 with M within Y D and the fractions of v adding up to zero, and take the row k of the largest |v_k| /
  // d_k:
  //   |M_kk| d_k <= sum over the other unknowns of |M_kj| d_j + |M_kp| sum over the fractions of d_j
  // because |v_p| is at most the sum of the other |v_j|. A scaling d that contradicts this in every row is looked for
  // by a few Jacobi sweeps.
  const auto pivot = static_cast<std::size_t>(centre_.pivot);
  std::array<double, kMostUnknowns> d;
  for (std::size_t r = 0; r < n_; ++r) {
    d[r] = unknown(r) == n_ ? kKelvinPerFraction : 1.0;
  }
  constexpr int kSweeps = 4;
  constexpr double kRoom = 1.0 - 1e-12;  // for the rounding of the sums below
  for (int sweep = 0; sweep < kSweeps; ++sweep) {
    double of_pivot = 0.0;
    for (std::size_t r = 0; r < n_; ++r) {
      of_pivot += unknown(r) == n_ ? 0.0 : d[r];
    }
    bool dominant = true;
    std::array<double, kMostUnknowns> next;
    for (std::size_t r = 0; r < n_; ++r) {
      const std::size_t k = unknown(r);
      const double diagonal = std::abs(newton_middle_[r][k]) - newton_radius_[r][k] * kOutward;
      if (!(diagonal > 0.0)) {
        return false;
      }
      double others = magnitude(newton_middle_[r][pivot], newton_radius_[r][pivot]) * of_pivot;
      for (std::size_t s = 0; s < n_; ++s) {
        if (s != r) {
          others += magnitude(newton_middle_[r][unknown(s)], newton_radius_[r][unknown(s)]) * d[s];
        }
      }
      dominant = dominant && others < diagonal * d[r] * kRoom;
      next[r] = std::max(1.02 * others / diagonal, 1e-3 * d[r]);
    }
    if (dominant) {
      return true;
    }
    d = next;
  }
  return false;
}

bool IntervalNewton::maps_into_itself(const SearchBox& box) const {
  for (std::size_t r = 0; r < n_; ++r) {
    const std::size_t k = unknown(r);
    Interval image = k == n_ ? Interval(centre_.T) : centre_.x[static_cast<int>(k)];
    image -= newton_value_[r];
    for (std::size_t j = 0; j <= n_; ++j) {
      const Interval entry = around(newton_middle_[r][j], newton_radius_[r][j]);
      image -= (j == k ? entry - 1.0 : entry) * offset(box, j);
    }
    const Interval& side = k == n_ ? box.T : box.x[static_cast<int>(k)];
    if (!side.contains_inside(image)) {
      return false;
    }
  }
  return true;
}

double IntervalNewton::smear(const SearchBox& box, int column) const {
  if (column == centre_.pivot) {
    return 0.0;
  }
  const auto j = static_cast<std::size_t>(column);
  const auto pivot = static_cast<std::size_t>(centre_.pivot);
  double largest = 0.0;
  for (std::size_t i = 0; i < n_; ++i) {
    const double slope = j == n_ ? std::abs(middle_[i][j]) + radius_[i][j]
                                 : std::abs(middle_[i][j] - middle_[i][pivot]) + radius_[i][j] + radius_[i][pivot];
    largest = std::max(largest, slope);
  }
  return largest * (j == n_ ? box.T.width() : box.x[column].width());
}

}  // namespace stillshed
