#include "tests/support/independent_search.hpp"

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>

namespace stillshed::testing {

bool apart(const std::vector<Composition>& points, const Composition& x, double distance) {
  return std::none_of(points.begin(), points.end(), [&](const Composition& known) {
    double largest = 0.0;
    for (int i = 0; i < x.size(); ++i) {
      largest = std::max(largest, std::abs(known[i] - x[i]));
    }
    return largest < distance;
  });
}

std::vector<double> roots_on_unit_interval(const std::function<double(double)>& g) {
  std::vector<double> grid;
  for (double x = 1e-9; x < 2e-3; x *= 1.05) {
    grid.push_back(x);
    grid.push_back(1.0 - x);
  }
  constexpr int kEven = 4000;
  for (int k = 8; k <= kEven - 8; ++k) {
    grid.push_back(static_cast<double>(k) / kEven + 1.3e-6);
  }
  std::sort(grid.begin(), grid.end());
  std::vector<double> roots;
  for (std::size_t k = 1; k < grid.size(); ++k) {
    double low = grid[k - 1];
    double high = grid[k];
    const double at_low = g(low);
    if (at_low * g(high) > 0.0) {
      continue;
    }
    for (int step = 0; step < 80; ++step) {
      const double middle = 0.5 * (low + high);
      (at_low * g(middle) > 0.0 ? low : high) = middle;
    }
    roots.push_back(0.5 * (low + high));
  }
  return roots;
}

double residual(const Mixture& mixture, const KnownRoot& root, double pressure_Pa) {
  const Vec<double> ln_k = mixture.ln_k(root.temperature_K, root.x, std::log(pressure_Pa));
  double largest = 0.0;
  for (const int i : root.members) {
    largest = std::max(largest, std::abs(ln_k[i]));
  }
  return largest;
}

std::vector<KnownRoot> search_independently(const Mixture& mixture, const Members& members, double pressure_Pa,
                                            int starts, Random& random) {
  const Mixture face = mixture.face(members);
  const int n = members.size();
  const double ln_pressure = std::log(pressure_Pa);
  // Unknowns: the logarithms of the fractions relative to the last, and ln T.
  const auto composition_of = [&](const Eigen::VectorXd& z) {
    Composition x(n);
    double sum = 0.0;
    for (int i = 0; i < n; ++i) {
      x[i] = i + 1 < n ? std::exp(z[i]) : 1.0;
      sum += x[i];
    }
    for (double& value : x) {
      value /= sum;
    }
    return x;
  };
  const auto f = [&](const Eigen::VectorXd& z) {
    const Vec<double> ln_k = face.ln_k(std::exp(z[n - 1]), composition_of(z), ln_pressure);
    Eigen::VectorXd value(n);
    for (int i = 0; i < n; ++i) {
      value[i] = ln_k[i];
    }
    return value;
  };
  std::vector<KnownRoot> roots;
  for (int start = 0; start < starts; ++start) {
    const Composition x = random.composition(n);
    Eigen::VectorXd z(n);
    double T = 0.0;
    for (int i = 0; i < n; ++i) {
      T += x[i] * face.boiling_point_K(i, pressure_Pa);
      z[i] = std::log(x[i] / x[n - 1]);
    }
    z[n - 1] = std::log(T);
    bool converged = false;
    for (int step = 0; step < 50 && z.allFinite() && z.head(n - 1).cwiseAbs().maxCoeff() < 30.0; ++step) {
      const Eigen::VectorXd value = f(z);
      Eigen::MatrixXd jacobian(n, n);
      for (int j = 0; j < n; ++j) {
        Eigen::VectorXd up = z;
        Eigen::VectorXd down = z;
        constexpr double kStep = 1e-5;
        up[j] += kStep;
        down[j] -= kStep;
        jacobian.col(j) = (f(up) - f(down)) / (2.0 * kStep);
      }
      const Eigen::VectorXd move = -jacobian.partialPivLu().solve(value);
      const double scale = std::min(
          {1.0, 1.5 / (move.head(n - 1).cwiseAbs().maxCoeff() + 1e-300), 0.1 / (std::abs(move[n - 1]) + 1e-300)});
      z += scale * move;
      converged = scale == 1.0 && move.cwiseAbs().maxCoeff() < 1e-9;
      if (converged) {
        break;
      }
    }
    if (!converged || !(f(z).cwiseAbs().maxCoeff() < 1e-9)) {
      continue;
    }
    const Composition found = composition_of(z);
    if (*std::min_element(found.begin(), found.end()) < 1e-9) {
      continue;
    }
    KnownRoot root{members, Composition(mixture.size(), 0.0), std::exp(z[n - 1])};
    for (int i = 0; i < n; ++i) {
      root.x[members[i]] = found[i];
    }
    std::vector<Composition> known;
    for (const KnownRoot& other : roots) {
      known.push_back(other.x);
    }
    if (apart(known, root.x, 1e-6)) {
      roots.push_back(root);
    }
  }
  return roots;
}

}  // namespace stillshed::testing
