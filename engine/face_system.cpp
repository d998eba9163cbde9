#include "engine/face_system.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "models/means.hpp"

namespace stillshed {
namespace {

constexpr double kWindowBelow = 0.5;  ///< of the lowest boiling point
constexpr double kWindowAbove = 1.5;  ///< of the highest boiling point
constexpr double kFirstSlice = 0.02;  ///< relative width of the slices next to the boiling points
constexpr double kSliceGrowth = 1.6;  ///< they widen outward, where the vapour pressure decides at once
constexpr double kThinnestSlice = 0.005;

/// True when interval evaluation shows that no temperature of the slice can belong to a root.
bool slice_is_empty(const FaceSystem& system, const Interval& slice) {
  const Vec<Interval> anywhere(system.size(), Interval(0.0, 1.0));
  const Vec<Interval> f = system.value(anywhere, slice);
  return !simplex_sum(anywhere.begin(), f.begin(), system.size()).contains_zero() ||
         std::any_of(f.begin(), f.end(), [](const Interval& f_i) { return !f_i.contains_zero(); });
}

/// Adds the part of the slice that may hold a root to the hull `found`; halves a slice that cannot be dismissed at
/// once.
void test_slice(const FaceSystem& system, const Interval& slice, Interval& found) {
  if (found.contains(slice) || slice_is_empty(system, slice)) {
    return;
  }
  if (slice.width() <= kThinnestSlice * slice.lower()) {
    found = hull(found, slice);
    return;
  }
  const double middle = slice.mid();
  test_slice(system, Interval(slice.lower(), middle), found);
  test_slice(system, Interval(middle, slice.upper()), found);
}

}  // namespace

FaceSystem::FaceSystem(Mixture face, double pressure_Pa)
    : face_(std::move(face)),
      ln_pressure_(std::log(pressure_Pa)),
      ln_pressure_enclosure_(log(Interval(pressure_Pa))),
      depends_on_temperature_(face_.depends_on_temperature()),
      boiling_points_(face_.size()) {
  for (int i = 0; i < size(); ++i) {
    boiling_points_[i] = face_.boiling_point_K(i, pressure_Pa);
  }
}

void FaceSystem::evaluate(const Composition& x, double temperature_K, LnGammaGradient<double>& out) const {
  face_.ln_k_with_gradient(temperature_K, x, ln_pressure_, out);
}

Interval FaceSystem::p(int i, const Interval& temperature_K) const {
  return face_.ln_psat(i, temperature_K) - ln_pressure_enclosure_;
}

Vec<Interval> FaceSystem::value(const Vec<Interval>& x, const Interval& temperature_K) const {
  Vec<Interval> result = face_.ln_gamma(temperature_K, x);
  for (int i = 0; i < size(); ++i) {
    result[i] += p(i, temperature_K);
  }
  return result;
}

void FaceSystem::enclose(const SearchBox& box, FaceEnclosure& out) const {
  face_.ln_gamma_with_gradient(box.T, box.x, out.ln_gamma);
  out.p = Vec<Interval>(size());
  out.p_dT = Vec<Interval>(size());
  for (int i = 0; i < size(); ++i) {
    out.p[i] = p(i, box.T);
    out.p_dT[i] = face_.component(i).pressure.d_ln_psat_dT(box.T);
  }
}

Interval temperature_bracket(const FaceSystem& system) {
  const Vec<double>& boiling = system.boiling_points_K();
  const double coldest = *std::min_element(boiling.begin(), boiling.end());
  const double hottest = *std::max_element(boiling.begin(), boiling.end());
  Interval found(coldest, hottest);
  double width = kFirstSlice;
  for (double end = coldest; end > kWindowBelow * coldest; width *= kSliceGrowth) {
    const double next = std::max(end * (1.0 - width), kWindowBelow * coldest);
    test_slice(system, Interval(next, end), found);
    end = next;
  }
  width = kFirstSlice;
  for (double end = hottest; end < kWindowAbove * hottest; width *= kSliceGrowth) {
    const double next = std::min(end * (1.0 + width), kWindowAbove * hottest);
    test_slice(system, Interval(end, next), found);
    end = next;
  }
  return found;
}

}  // namespace stillshed
