#include "engine/interval_newton.hpp"

#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

constexpr double kNothing = 1e-11;
/// Rounding of sums of a dozen mole fractions.
constexpr double kSumSlack = 1e-15;

int largest(const Composition& x) {
  return static_cast<int>(std::max_element(x.begin(), x.end()) - x.begin());
}

Interval widened(const Interval& value, double factor) {
  if (factor == 1.0) {
    return value;
  }
  const double mid = value.mid();
  const double radius = 0.5 * value.width() * factor;
  return {mid - radius, mid + radius};
}

}  // namespace

bool IntervalNewton::cut_to_simplex(SearchBox& box) const {
  const int n = system_.size();
  double low = 0.0;
  double high = 0.0;
  for (const Interval& x : box.x) {
    low += x.lower();
    high += x.upper();
  }
  if (low > 1.0 + kSumSlack || high < 1.0 - kSumSlack) {
    return false;
  }
  for (int i = 0; i < n; ++i) {
    const Interval room(1.0 - (high - box.x[i].upper()) - kSumSlack, 1.0 - (low - box.x[i].lower()) + kSumSlack);
    if (!intersect(box.x[i], room)) {
      return false;
    }
  }
  return true;
}

Composition IntervalNewton::centre(const SearchBox& box) const {
  const int n = system_.size();
  Composition m(n);
  double rest = 1.0;
  double slack = 0.0;
  for (int i = 0; i < n; ++i) {
    m[i] = box.x[i].mid();
    rest -= m[i];
    slack += 0.5 * box.x[i].width();
  }
  if (slack > 0.0) {
    const double share = std::clamp(rest / slack, -1.0, 1.0);
    for (int i = 0; i < n; ++i) {
      m[i] = std::clamp(m[i] + share * 0.5 * box.x[i].width(), box.x[i].lower(), box.x[i].upper());
    }
  }
  return m;
}

const Interval& IntervalNewton::unknown(const SearchBox& box, int c) const {
  return c == system_.size() - 1 ? box.T : box.x[member_of_unknown(c, dependent_)];
}

bool IntervalNewton::jacobian(const SearchBox& box, int dependent) {
  const int n = system_.size();
  dependent_ = dependent;
  system_.face().ln_k_with_gradient(box.T, box.x, system_.ln_pressure(), gradient_);
  J_ = IntervalMatrix(n);
  bool bounded = true;
  for (int i = 0; i < n; ++i) {
    for (int c = 0; c + 1 < n; ++c) {
      J_(i, c) = widened(gradient_.d_dx(i, member_of_unknown(c, dependent)) - gradient_.d_dx(i, dependent), mutation_);
      bounded = bounded && J_(i, c).is_bounded();
    }
    J_(i, n - 1) = widened(gradient_.d_dT[i], mutation_);
    bounded = bounded && J_(i, n - 1).is_bounded();
  }
  return bounded;
}

bool IntervalNewton::precondition() {
  const int n = system_.size();
  SmallMatrix middle(n, n);
  for (int i = 0; i < n; ++i) {
    for (int c = 0; c < n; ++c) {
      middle(i, c) = J_(i, c).mid();
    }
  }
  Y_ = middle.inverse();
  if (!Y_.allFinite()) {
    return false;
  }
  A_ = IntervalMatrix(n);
  for (int r = 0; r < n; ++r) {
    for (int c = 0; c < n; ++c) {
      Interval sum = J_(0, c) * Y_(r, 0);
      for (int k = 1; k < n; ++k) {
        sum += J_(k, c) * Y_(r, k);
      }
      A_(r, c) = sum;
    }
  }
  return true;
}

/// |I - Y J| rad (+ shift) < rad, the contraction test.
bool IntervalNewton::contracts(const SearchBox& box, const Vec<double>* shift) const {
  const int n = system_.size();
  for (int r = 0; r < n; ++r) {
    double sum = shift != nullptr ? (*shift)[r] : 0.0;
    for (int c = 0; c < n; ++c) {
      const Interval entry = r == c ? 1.0 - A_(r, c) : A_(r, c);
      sum += entry.magnitude() * 0.5 * unknown(box, c).width();
    }
    if (!(sum * (1.0 + 1e-12) < 0.5 * unknown(box, r).width())) {
      return false;
    }
  }
  return true;
}

Vec<Interval> IntervalNewton::residual_at(const Composition& m, double T, int dependent) const {
  const int n = system_.size();
  Vec<Interval> x(n);
  Interval rest(1.0);
  for (int i = 0; i < n; ++i) {
    if (i != dependent) {
      x[i] = Interval(m[i]);
      rest -= x[i];
    }
  }
  x[dependent] = rest;
  return system_.face().ln_k(Interval(T), x, system_.ln_pressure());
}

/// Hansen-Sengupta sweep; false when the box is excluded.
bool IntervalNewton::newton(SearchBox& box, const Composition& m) {
  const int n = system_.size();
  const double T = box.T.mid();
  const Vec<Interval> f = residual_at(m, T, dependent_);
  Vec<Interval> offset(n);
  for (int c = 0; c < n; ++c) {
    const double at = c == n - 1 ? T : m[member_of_unknown(c, dependent_)];
    offset[c] = unknown(box, c) - at;
  }
  for (int r = 0; r < n; ++r) {
    Interval sum(0.0);
    for (int k = 0; k < n; ++k) {
      sum += f[k] * Y_(r, k);
    }
    for (int c = 0; c < n; ++c) {
      if (c != r) {
        sum += A_(r, c) * offset[c];
      }
    }
    if (A_(r, r).contains_zero()) {
      if (!(sum + A_(r, r) * offset[r]).contains_zero()) {
        return false;
      }
      continue;
    }
    const Interval step = -sum / A_(r, r);
    if (!intersect(offset[r], step)) {
      return false;
    }
    if (r == n - 1) {
      if (!intersect(box.T, offset[r] + T)) {
        return false;
      }
    } else {
      const int i = member_of_unknown(r, dependent_);
      if (!intersect(box.x[i], offset[r] + m[i])) {
        return false;
      }
    }
  }
  return true;
}

BoxState IntervalNewton::contract(SearchBox& box) {
  const int n = system_.size();
  const Composition m = centre(box);
  double total = 0.0;
  for (const double x : m) {
    total += x;
  }
  // T from each equation, mean-value form in T at fixed x-box.
  const double T = box.T.mid();
  const bool bounded = jacobian(box, largest(m));
  bool vanishing = true;
  for (int i = 0; i < n; ++i) {
    if (!gradient_.value[i].contains_zero()) {
      return BoxState::excluded;
    }
    vanishing = vanishing && gradient_.value[i].magnitude() < kNothing;
  }
  if (!simplex_sum(box.x.begin(), gradient_.value.begin(), n).contains_zero()) {
    return BoxState::excluded;
  }
  if (vanishing) {
    return BoxState::vanishing;
  }
  if (box.T.width() > 1e-3) {
    const Vec<Interval> at_T = system_.face().ln_k(Interval(T), box.x, system_.ln_pressure());
    for (int i = 0; i < n; ++i) {
      if (gradient_.d_dT[i].is_positive() && !intersect(box.T, T - at_T[i] / gradient_.d_dT[i])) {
        return BoxState::excluded;
      }
    }
  }
  if (!bounded || std::abs(total - 1.0) > 1e-12 || !precondition()) {
    return BoxState::unsettled;
  }
  const SearchBox before = box;
  if (!newton(box, m)) {
    return BoxState::excluded;
  }
  return contracts(before, nullptr) ? BoxState::regular : BoxState::unsettled;
}

bool IntervalNewton::is_regular(const SearchBox& box) {
  return jacobian(box, largest(centre(box))) && precondition() && contracts(box, nullptr);
}

bool IntervalNewton::verify(const LocatedRoot& root, SearchBox& enclosure) {
  const int n = system_.size();
  const int dependent = largest(root.x);
  double radius = 1e-12;
  for (int attempt = 0; attempt < 8; ++attempt, radius *= 8.0) {
    SearchBox box{Vec<Interval>(n), Interval(root.temperature_K - 100.0 * radius, root.temperature_K + 100.0 * radius)};
    double total = 0.0;
    for (int i = 0; i < n; ++i) {
      if (i != dependent) {
        const double r = std::min(radius, 0.25 * root.x[i]);  // stays inside the open face
        box.x[i] = Interval(root.x[i] - r, root.x[i] + r);
        total += r;
      }
    }
    // The dependent one takes whatever the others leave, so the test covers every z of the box.
    box.x[dependent] = Interval(root.x[dependent] - 1.01 * total - 1e-15, root.x[dependent] + 1.01 * total + 1e-15);
    if (!jacobian(box, dependent) || !precondition()) {
      continue;
    }
    const Vec<Interval> f = residual_at(root.x, root.temperature_K, dependent);
    Vec<double> shift(n);
    for (int r = 0; r < n; ++r) {
      Interval sum(0.0);
      for (int k = 0; k < n; ++k) {
        sum += f[k] * Y_(r, k);
      }
      shift[r] = sum.magnitude();
    }
    if (contracts(box, &shift)) {
      enclosure = box;
      return true;
    }
  }
  return false;
}

SearchBox IntervalNewton::largest_regular(const LocatedRoot& root, const SearchBox& enclosure) {
  const int n = system_.size();
  for (double radius = 0.2; radius > 1e-9; radius *= 0.5) {
    SearchBox box{Vec<Interval>(n), Interval(root.temperature_K - 60.0 * radius, root.temperature_K + 60.0 * radius)};
    for (int i = 0; i < n; ++i) {
      box.x[i] = Interval(std::max(0.0, root.x[i] - radius), std::min(1.0, root.x[i] + radius));
    }
    if (is_regular(box)) {
      return box;
    }
  }
  return enclosure;
}

double IntervalNewton::size_of(const SearchBox& box) const {
  double size = 1.0;
  for (const Interval& x : box.x) {
    size *= std::max(x.width(), 1e-14);
  }
  return size;
}

double IntervalNewton::widest(const SearchBox& box) const {
  double width = 0.0;
  for (const Interval& x : box.x) {
    width = std::max(width, x.width());
  }
  return width;
}

void IntervalNewton::bisect(SearchBox& box, SearchBox& other) {
  const int n = system_.size();
  // Split where the equations vary most over the box (smear rule); T only while it is really wide.
  int best = -1;
  double most = -1.0;
  for (int c = 0; c < n; ++c) {
    double slope = 0.0;
    for (int i = 0; i < n; ++i) {
      const double size = J_(i, c).magnitude();
      slope = std::max(slope, std::isfinite(size) ? size : 1e6);
    }
    const double smear = slope * unknown(box, c).width();
    if (smear > most) {
      most = smear;
      best = c;
    }
  }
  const auto halve = [](Interval& low, Interval& high) {
    const double middle = low.mid();
    high = Interval(middle, low.upper());
    low = Interval(low.lower(), middle);
  };
  if (best == n - 1) {
    halve(box.T, other.T);
  } else {
    const int i = member_of_unknown(best, dependent_);
    halve(box.x[i], other.x[i]);
  }
}

}  // namespace stillshed
