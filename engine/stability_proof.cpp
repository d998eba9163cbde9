#include "engine/stability_proof.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <vector>

#include "models/interval.hpp"
#include "models/means.hpp"

namespace stillshed {
namespace {

constexpr double kInfinity = std::numeric_limits<double>::infinity();
using Point = Vec<Interval>;

/// Curvature of tpd in the coordinates of all components but one (the pivot, which balances them):
///   R_ab = delta_ab/w_a + 1/w_p + (G_ab - G_ap - G_pb + G_pp),  G_ij = d ln g_i/d w_j,
/// with 1/w at its lower end.
struct Curvature {
  int size = 0;
  std::array<int, kMostProvedComponents> index{};  ///< component of row a
  std::array<std::array<Interval, kMostProvedComponents>, kMostProvedComponents> entry{};
};

enum class Reciprocal { enclosure, lower_end };

/// 1/w for w >= 0. The lower end alone gives a curvature below the true one in the sense of positive definiteness.
Interval reciprocal(const Interval& w, Reciprocal kind) {
  const double lower = (1.0 / Interval(w.upper())).lower();
  if (kind == Reciprocal::lower_end) {
    return Interval(lower);
  }
  return {lower, w.lower() > 0.0 ? (1.0 / Interval(w.lower())).upper() : kInfinity};
}

int largest(const Point& w) {
  int best = 0;
  for (int i = 1; i < w.size(); ++i) {
    if (w[i].upper() > w[best].upper()) {
      best = i;
    }
  }
  return best;
}

Curvature least_curvature(const Point& w, const Matrix<Interval>& G) {
  Curvature result;
  const int pivot = largest(w);
  for (int i = 0; i < w.size(); ++i) {
    if (i != pivot) {
      result.index[static_cast<std::size_t>(result.size++)] = i;
    }
  }
  const Interval of_pivot = reciprocal(w[pivot], Reciprocal::lower_end);
  for (std::size_t a = 0; a < static_cast<std::size_t>(result.size); ++a) {
    for (std::size_t b = 0; b <= a; ++b) {
      const int i = result.index[a];
      const int j = result.index[b];
      Interval value = (G(i, j) - G(i, pivot)) - (G(pivot, j) - G(pivot, pivot)) + of_pivot;
      if (a == b) {
        value += reciprocal(w[i], Reciprocal::lower_end);
      }
      result.entry[a][b] = value;
      result.entry[b][a] = value;
    }
  }
  return result;
}

/// Interval Cholesky: success means that every symmetric matrix within the entries is positive definite.
bool positive_definite(Curvature m) {
  for (std::size_t k = 0; k < static_cast<std::size_t>(m.size); ++k) {
    if (!m.entry[k][k].is_positive() || !m.entry[k][k].is_bounded()) {
      return false;
    }
    for (std::size_t a = k + 1; a < static_cast<std::size_t>(m.size); ++a) {
      const Interval share = m.entry[a][k] / m.entry[k][k];
      for (std::size_t b = k + 1; b < a; ++b) {
        m.entry[a][b] -= share * m.entry[b][k];
        m.entry[b][a] = m.entry[a][b];
      }
      m.entry[a][a] -= square(m.entry[a][k]) / m.entry[k][k];
    }
  }
  return true;
}

/// True when tpd curves downward all over the box along the exchange of some two components.
bool curves_down(const Point& w, const Matrix<Interval>& G) {
  for (int i = 0; i < w.size(); ++i) {
    for (int j = 0; j < i; ++j) {
      const Interval ideal = reciprocal(w[i], Reciprocal::enclosure) + reciprocal(w[j], Reciprocal::enclosure);
      if (((G(i, i) - G(i, j)) - (G(j, i) - G(j, j)) + ideal).is_negative()) {
        return true;
      }
    }
  }
  return false;
}

/// Narrows every w_i to what the others leave of the unit; false when the box misses the simplex.
bool contract(Point& w) {
  for (int round = 0; round < 2; ++round) {
    for (int i = 0; i < w.size(); ++i) {
      Interval rest(1.0);
      for (int j = 0; j < w.size(); ++j) {
        if (j != i) {
          rest -= w[j];
        }
      }
      if (!intersect(w[i], rest)) {
        return false;
      }
    }
  }
  return true;
}

/// A point on the simplex: stored doubles, except that the largest entry is one minus the others.
Point on_simplex(const Composition& x) {
  Point result(x.size());
  int pivot = 0;
  for (int i = 0; i < x.size(); ++i) {
    result[i] = Interval(x[i]);
    pivot = x[i] > x[pivot] ? i : pivot;
  }
  Interval rest(1.0);
  for (int i = 0; i < x.size(); ++i) {
    if (i != pivot) {
      rest -= result[i];
    }
  }
  result[pivot] = rest;
  return result;
}

/// A point of the box on the simplex; false when rounding pushes it out of the box.
bool middle(const Point& w, Point& c) {
  double low = 0.0;
  double high = 0.0;
  for (const Interval& side : w) {
    low += side.lower();
    high += side.upper();
  }
  const double share = high > low ? std::clamp((1.0 - low) / (high - low), 0.0, 1.0) : 0.5;
  Composition point(w.size());
  for (int i = 0; i < w.size(); ++i) {
    point[i] = w[i].lower() + share * w[i].width();
  }
  c = on_simplex(point);
  for (int i = 0; i < w.size(); ++i) {
    if (!w[i].contains(c[i]) || !c[i].is_positive()) {
      return false;
    }
  }
  return true;
}

/// tpd and its gradient (the s_i) at one point.
struct PointValue {
  Vec<Interval> s;
  Vec<Interval> ln_w_minus_d;
  Interval tpd;
};

class TangentPlaneProof {
 public:
  TangentPlaneProof(const Mixture& face, double temperature_K, const Composition& x)
      : face_(face), T_(temperature_K), x_(on_simplex(x)), d_(face.ln_gamma(T_, x_)) {
    for (int i = 0; i < x_.size(); ++i) {
      d_[i] += log(x_[i]);
    }
  }

  [[nodiscard]] PointValue at(const Point& c) const {
    const Vec<Interval> ln_gamma = face_.ln_gamma(T_, c);
    PointValue value;
    value.s = Vec<Interval>(c.size());
    value.ln_w_minus_d = Vec<Interval>(c.size());
    value.tpd = Interval(0.0);
    for (int i = 0; i < c.size(); ++i) {
      value.ln_w_minus_d[i] = log(c[i]) - d_[i];
      value.s[i] = value.ln_w_minus_d[i] + ln_gamma[i];
      value.tpd += c[i] * value.s[i];
    }
    return value;
  }

  StabilityProof run(std::int64_t max_boxes) {
    find_convex_neighbourhood();
    StabilityProof result;
    std::vector<Point> open{Point(x_.size(), Interval(0.0, 1.0))};
    while (!open.empty()) {
      Point box = open.back();
      open.pop_back();
      if (++result.boxes > max_boxes) {
        return result;
      }
      if (!contract(box) || dismissed(box)) {
        continue;
      }
      if (!split(box, open)) {
        return result;
      }
    }
    result.proved = true;
    return result;
  }

 private:
  /// The largest box around x, in steps, where tpd is convex (rule 4).
  void find_convex_neighbourhood() {
    LnGammaGradient<Interval> gradient;
    for (double radius = 0.7; radius > 1e-5; radius *= 0.7) {
      Point box(x_.size());
      for (int i = 0; i < x_.size(); ++i) {
        box[i] = Interval(std::max(0.0, x_[i].lower() - radius), std::min(1.0, x_[i].upper() + radius));
      }
      Point tight = box;
      if (!contract(tight)) {
        continue;
      }
      face_.ln_gamma_with_gradient(T_, tight, gradient);
      if (positive_definite(least_curvature(tight, gradient.d_dx))) {
        neighbourhood_ = box;
        return;
      }
    }
  }

  [[nodiscard]] bool in_neighbourhood(const Point& box) const {
    for (int i = 0; i < neighbourhood_.size(); ++i) {
      if (!neighbourhood_[i].contains(box[i])) {
        return false;
      }
    }
    return !neighbourhood_.empty();
  }

  [[nodiscard]] bool dismissed(const Point& box) const {
    if (in_neighbourhood(box)) {
      return true;
    }
    LnGammaGradient<Interval> gradient;
    face_.ln_gamma_with_gradient(T_, box, gradient);
    if (cannot_be_stationary_below(box, gradient.value)) {
      return true;
    }
    if (curves_down(box, gradient.d_dx)) {
      return true;
    }
    Point c;
    if (!middle(box, c)) {
      return false;
    }
    const PointValue centre = at(c);
    if (!(centre.tpd.lower() > 0.0)) {
      return false;
    }
    if (bounded_below(box, c, centre.tpd, centre.ln_w_minus_d, gradient.value)) {
      return true;
    }
    return supported_by_plane(box, c, centre.s, least_curvature(box, gradient.d_dx));
  }

  /// Rule 1.
  [[nodiscard]] bool cannot_be_stationary_below(const Point& box, const Vec<Interval>& ln_gamma) const {
    Interval common(-kInfinity, 0.0);
    for (int i = 0; i < box.size(); ++i) {
      if (!intersect(common, log(box[i]) + ln_gamma[i] - d_[i])) {
        return true;
      }
    }
    return false;
  }

  /// Rule 2: tpd(c) + sum_i (w_i - c_i) (point_i + range_i) >= 0 for all w of the box on the simplex. The part with the
  /// middle of each range is linear in w and bounded exactly; the rest by |w_i - c_i| times half the width.
  [[nodiscard]] static bool bounded_below(const Point& box, const Point& c, const Interval& tpd,
                                          const Vec<Interval>& point, const Vec<Interval>& range) {
    Vec<Interval> factor(box.size());
    Interval rest = tpd;
    for (int i = 0; i < box.size(); ++i) {
      const Interval middle(range[i].mid());
      factor[i] = point[i] + middle;
      rest += (box[i] - c[i]) * (range[i] - middle) - c[i] * factor[i];
    }
    return (simplex_sum(box.begin(), factor.begin(), box.size()) + rest).lower() >= 0.0;
  }

  /// Rule 5: tpd(w) >= sum_i w_i s_i(c) + 1/2 delta.R.delta, delta = w - c. If the plane stays above L > 0 on the box,
  /// then it is enough that R + diag(2 L/(k r_a^2)) is positive definite, k rows, |delta_a| <= r_a: the addition is
  /// worth at most L.
  [[nodiscard]] static bool supported_by_plane(const Point& box, const Point& c, const Vec<Interval>& s, Curvature R) {
    const double lowest = simplex_sum(box.begin(), s.begin(), box.size()).lower();
    if (!(lowest >= 0.0)) {
      return false;
    }
    for (std::size_t a = 0; a < static_cast<std::size_t>(R.size); ++a) {
      const int i = R.index[a];
      const Interval reach((box[i] - c[i]).magnitude());
      const Interval addition = (2.0 * Interval(lowest)) / (square(reach) * static_cast<double>(R.size));
      R.entry[a][a] += addition.lower();
    }
    return positive_definite(R);
  }

  /// Halves the widest side; false when it cannot be halved any more.
  static bool split(const Point& box, std::vector<Point>& open) {
    int widest = 0;
    for (int i = 1; i < box.size(); ++i) {
      if (box[i].width() > box[widest].width()) {
        widest = i;
      }
    }
    const double cut = box[widest].mid();
    if (!(cut > box[widest].lower() && cut < box[widest].upper())) {
      return false;
    }
    for (const Interval& half : {Interval(box[widest].lower(), cut), Interval(cut, box[widest].upper())}) {
      Point part = box;
      part[widest] = half;
      open.push_back(part);
    }
    return true;
  }

  const Mixture& face_;
  Interval T_;
  Point x_;
  Vec<Interval> d_;
  Point neighbourhood_;  ///< empty: none found
};

}  // namespace

StabilityProof prove_stable(const Mixture& face, double temperature_K, const Composition& x, std::int64_t max_boxes) {
  expects(x.size() == face.size() && x.size() <= kMostProvedComponents, "stability proof: unsuitable size");
  for (const double fraction : x) {
    expects(fraction > 0.0, "stability proof: a component is absent");
  }
  return TangentPlaneProof(face, temperature_K, x).run(max_boxes);
}

bool proves_unstable(const Mixture& face, double temperature_K, const Composition& x, const Composition& w) {
  expects(x.size() == face.size() && w.size() == face.size(),
          "stability proof: composition and mixture differ in size");
  for (const double value : w) {
    if (!(value > 0.0)) {
      return false;
    }
  }
  return TangentPlaneProof(face, temperature_K, x).at(on_simplex(w)).tpd.is_negative();
}

}  // namespace stillshed
