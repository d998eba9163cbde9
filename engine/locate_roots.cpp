#include "engine/locate_roots.hpp"

#include <algorithm>
#include <cmath>
#include <random>

namespace stillshed {
namespace {

constexpr int kMaxIterations = 60;
constexpr double kResidual = 1e-11;

int largest(const Composition& x) {
  return static_cast<int>(std::max_element(x.begin(), x.end()) - x.begin());
}

std::vector<Composition> starts_of(int n, const std::vector<Composition>& nearby, std::uint64_t seed) {
  std::vector<Composition> starts;
  starts.emplace_back(n, 1.0 / n);
  starts.insert(starts.end(), nearby.begin(), nearby.end());
  if (n <= 6) {
    for (int i = 0; i < n; ++i) {
      for (const double rich : {0.9, 0.99}) {
        Composition x(n, (1.0 - rich) / std::max(1, n - 1));
        x[i] = rich;
        starts.push_back(x);
      }
      for (int j = 0; j < i && n > 2; ++j) {
        Composition x(n, 0.1 / (n - 2));
        x[i] = x[j] = 0.45;
        starts.push_back(x);
      }
    }
  }
  std::mt19937_64 generator(seed * 1000003 + static_cast<std::uint64_t>(n));
  std::exponential_distribution<double> exponential(1.0);
  const int random = n <= 5 ? 8 * n : 4;
  for (int k = 0; k < random; ++k) {
    Composition x(n);
    double sum = 0.0;
    for (double& value : x) {
      value = exponential(generator);
      sum += value;
    }
    for (double& value : x) {
      value /= sum;
    }
    starts.push_back(x);
  }
  return starts;
}

bool same_root(const LocatedRoot& a, const LocatedRoot& b) {
  // A nearly double root is only found to the square root of rounding.
  const double loose = std::min(a.regularity, b.regularity) < 1e-6 ? 1e-5 : 1e-8;
  for (int i = 0; i < a.x.size(); ++i) {
    if (std::abs(a.x[i] - b.x[i]) > loose * std::max(1e-3, std::max(a.x[i], b.x[i]))) {
      return false;
    }
  }
  return true;
}

}  // namespace

double start_temperature(const FaceSystem& system, const Composition& x) {
  double T = 0.0;
  for (int i = 0; i < system.size(); ++i) {
    T += x[i] * system.face().boiling_point_K(i, std::exp(system.ln_pressure()));
  }
  for (int step = 0; step < 4; ++step) {
    const Vec<double> f = system.residual(x, T);
    double sum = 0.0;
    double slope = 0.0;
    for (int i = 0; i < system.size(); ++i) {
      sum += x[i] * f[i];
      slope += x[i] * system.face().component(i).pressure.d_ln_psat_dT(T);
    }
    T = std::clamp(T - sum / slope, 0.6 * T, 1.6 * T);
  }
  return T;
}

bool polish_root(const FaceSystem& system, Composition& x, double& T, double& regularity) {
  const int n = system.size();
  SmallVector f;
  SmallMatrix jacobian;
  for (int iteration = 0; iteration < kMaxIterations; ++iteration) {
    const int dependent = largest(x);
    system.evaluate(x, T, dependent, f, jacobian);
    const double miss = f.cwiseAbs().maxCoeff();
    if (!std::isfinite(miss)) {
      return false;
    }
    // Scale the temperature column so that singular values compare like with like.
    jacobian.col(n - 1) *= T;
    const Eigen::PartialPivLU<SmallMatrix> lu(jacobian);
    const SmallVector step = lu.solve(f);
    if (!step.allFinite()) {
      return false;
    }
    Composition change(n, 0.0);
    for (int c = 0; c + 1 < n; ++c) {
      const int i = member_of_unknown(c, dependent);
      change[i] = -step[c];
      change[dependent] += step[c];
    }
    double scale = std::min(1.0, 0.15 / std::max(1e-300, std::abs(step[n - 1])));
    for (int i = 0; i < n; ++i) {
      if (change[i] < 0.0) {
        scale = std::min(scale, 0.95 * x[i] / -change[i]);
      }
    }
    double moved = 0.0;
    for (int i = 0; i < n; ++i) {
      x[i] += scale * change[i];
      moved = std::max(moved, std::abs(scale * change[i]) / std::max(x[i], 1e-300));
    }
    T -= scale * step[n - 1] * T;
    if (*std::min_element(x.begin(), x.end()) < 1e-13) {
      return false;  // runs into a sub-face, whose own search finds what is there
    }
    if (miss < kResidual && (moved < 1e-11 || iteration > 40)) {
      const Eigen::JacobiSVD<SmallMatrix> svd(jacobian);
      regularity = svd.singularValues()[n - 1] / svd.singularValues()[0];
      return true;
    }
  }
  return false;
}

std::vector<LocatedRoot> locate_roots(const FaceSystem& system, const std::vector<Composition>& nearby,
                                      std::uint64_t seed) {
  std::vector<LocatedRoot> roots;
  for (const Composition& start : starts_of(system.size(), nearby, seed)) {
    LocatedRoot root{start, start_temperature(system, start), 0.0};
    if (!polish_root(system, root.x, root.temperature_K, root.regularity)) {
      continue;
    }
    if (std::none_of(roots.begin(), roots.end(), [&](const LocatedRoot& known) { return same_root(known, root); })) {
      roots.push_back(root);
    }
  }
  std::sort(roots.begin(), roots.end(), [](const LocatedRoot& a, const LocatedRoot& b) {
    return a.temperature_K != b.temperature_K
               ? a.temperature_K < b.temperature_K
               : std::lexicographical_compare(a.x.begin(), a.x.end(), b.x.begin(), b.x.end());
  });
  return roots;
}

}  // namespace stillshed
