#include "engine/locate_roots.hpp"

#include <algorithm>
#include <cmath>

#include "engine/small_linear.hpp"

namespace stillshed {
namespace {

constexpr int kMostSteps = 60;
constexpr double kLargestMove = 0.3;        ///< mole fraction, one step
constexpr double kLargestHeating_K = 40.0;  ///< one step
constexpr double kKeepShare = 0.1;          ///< a step leaves at least this share of each fraction
constexpr double kTiny = 1e-9;       ///< a fraction below it that the linear model sends negative has left the face
constexpr double kVanished = 1e-15;  ///< a fraction below it has left in any case
constexpr double kConverged = 1e-15;
constexpr double kResidual = 1e-11;  ///< accepted |f| at the end

/// Newton step of all x (sum zero) and T; false when singular.
bool newton_step(const LnGammaGradient<double>& f, std::array<double, kMostUnknowns>& step) {
  const auto n = static_cast<std::size_t>(f.value.size());
  SquareArray a;
  for (std::size_t i = 0; i < n; ++i) {
    for (std::size_t j = 0; j < n; ++j) {
      a[i][j] = f.d_dx(static_cast<int>(i), static_cast<int>(j));
    }
    a[i][n] = f.d_dT[static_cast<int>(i)];
    a[n][i] = 1.0;
    step[i] = -f.value[static_cast<int>(i)];
  }
  a[n][n] = 0.0;
  step[n] = 0.0;
  return solve_in_place(a, step, n + 1);
}

double largest_residual(const LnGammaGradient<double>& f) {
  double largest = 0.0;
  for (const double value : f.value) {
    largest = std::max(largest, std::abs(value));
    if (!std::isfinite(value)) {
      return value;
    }
  }
  return largest;
}

/// Share of the step that stays inside the limits above.
double damping(const LocatedRoot& at, const std::array<double, kMostUnknowns>& step) {
  const auto n = static_cast<std::size_t>(at.x.size());
  double share = std::min(1.0, kLargestHeating_K / (std::abs(step[n]) + 1e-300));
  for (std::size_t i = 0; i < n; ++i) {
    const double x = at.x[static_cast<int>(i)];
    share = std::min(share, kLargestMove / (std::abs(step[i]) + 1e-300));
    if (step[i] < 0.0) {
      share = std::min(share, (1.0 - kKeepShare) * x / -step[i]);
    }
  }
  return share;
}

std::vector<Composition> starting_compositions(int n, const LocateOptions& options) {
  std::vector<Composition> starts;
  const double even = 1.0 / n;
  starts.emplace_back(n, even);
  constexpr double kRich = 0.8;
  for (int i = 0; i < n; ++i) {
    Composition x(n, (1.0 - kRich) * even);
    x[i] += kRich;
    starts.push_back(x);
  }
  starts.insert(starts.end(), options.nearby.begin(), options.nearby.end());
  for (int k = 0; k < options.spread; ++k) {
    starts.push_back(simplex_sequence(n, static_cast<std::uint64_t>(k), options.seed));
  }
  return starts;
}

}  // namespace

Composition simplex_sequence(int size, std::uint64_t index, std::uint64_t seed) {
  // Additive recurrence with the powers of 1/g, g the root of g^size = g + 1 (a generalised golden ratio), carried to
  // the simplex by exponential spacings.
  double g = 2.0;
  for (int k = 0; k < 40; ++k) {
    g = std::pow(1.0 + g, 1.0 / size);
  }
  Composition x(size);
  double total = 0.0;
  double share = 1.0;
  for (int i = 0; i < size; ++i) {
    share /= g;
    const double shift = 0.5 + 0.61803398874989485 * static_cast<double>(seed % 1'000'003ULL);
    const double u = std::fmod(shift + static_cast<double>(index + 1) * share, 1.0);
    x[i] = -std::log(std::clamp(u, 1e-9, 1.0 - 1e-9));
    total += x[i];
  }
  for (double& fraction : x) {
    fraction /= total;
  }
  return x;
}

double start_temperature(const FaceSystem& system, const Composition& x) {
  double T = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    T += x[i] * system.boiling_points_K()[i];
  }
  LnGammaGradient<double> f;
  constexpr int kSteps = 2;
  for (int step = 0; step < kSteps; ++step) {
    system.evaluate(x, T, f);
    double sum = 0.0;
    double slope = 0.0;
    for (int i = 0; i < x.size(); ++i) {
      sum += x[i] * f.value[i];
      slope += x[i] * f.d_dT[i];
    }
    if (slope > 0.0) {
      T -= std::clamp(sum / slope, -kLargestHeating_K, kLargestHeating_K);
    }
  }
  return T;
}

std::optional<LocatedRoot> newton_from(const FaceSystem& system, LocatedRoot at) {
  const auto n = static_cast<std::size_t>(system.size());
  LnGammaGradient<double> f;
  std::array<double, kMostUnknowns> step{};
  double last_size = 1e300;
  for (int k = 0; k < kMostSteps; ++k) {
    system.evaluate(at.x, at.temperature_K, f);
    if (!newton_step(f, step)) {
      break;
    }
    const double share = damping(at, step);
    double size = std::abs(step[n]) / at.temperature_K;
    double total = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
      double& x = at.x[static_cast<int>(i)];
      const bool leaves = x < kTiny && step[i] < -2.0 * x;
      size = std::max(size, std::abs(step[i]));
      x += share * step[i];
      if (leaves || !(x > kVanished)) {
        return std::nullopt;
      }
      total += x;
    }
    for (double& x : at.x) {
      x /= total;
    }
    at.temperature_K += share * step[n];
    if (!(at.temperature_K > 0.0)) {
      return std::nullopt;
    }
    // Converged, or as close as rounding lets it come.
    if (size <= kConverged || (size < 1e-11 && size >= 0.5 * last_size)) {
      break;
    }
    last_size = size;
  }
  system.evaluate(at.x, at.temperature_K, f);
  if (!(largest_residual(f) <= kResidual)) {
    return std::nullopt;
  }
  return at;
}

bool same_root(const LocatedRoot& a, const LocatedRoot& b) {
  for (int i = 0; i < a.x.size(); ++i) {
    if (std::abs(a.x[i] - b.x[i]) > 1e-6 * std::min(a.x[i], b.x[i]) + 1e-12) {
      return false;
    }
  }
  return true;
}

std::vector<LocatedRoot> locate_roots(const FaceSystem& system, const LocateOptions& options) {
  std::vector<LocatedRoot> roots;
  for (const Composition& x : starting_compositions(system.size(), options)) {
    const std::optional<LocatedRoot> root = newton_from(system, {x, start_temperature(system, x)});
    if (root && std::none_of(roots.begin(), roots.end(), [&](const LocatedRoot& r) { return same_root(r, *root); })) {
      roots.push_back(*root);
    }
  }
  std::sort(roots.begin(), roots.end(), [](const LocatedRoot& a, const LocatedRoot& b) {
    if (a.temperature_K != b.temperature_K) {
      return a.temperature_K < b.temperature_K;
    }
    return std::lexicographical_compare(a.x.begin(), a.x.end(), b.x.begin(), b.x.end());
  });
  return roots;
}

}  // namespace stillshed
