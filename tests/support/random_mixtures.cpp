#include "tests/support/random_mixtures.hpp"

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <utility>

#include "tests/support/independent_search.hpp"

namespace stillshed::testing {
namespace {

constexpr double kEqualH_K = 4000.0;

Members first_members(int size) {
  Members members;
  for (int i = 0; i < size; ++i) {
    members.push_back(i);
  }
  return members;
}

/// Boiling points that make x a root at T: ln gamma_i + H (1/Tb_i - 1/T) = 0.
std::vector<double> boiling_points_for(const ActivityModel& model, const Composition& x, double T, double H_K) {
  const Vec<double> ln_gamma = std::visit([&](const auto& m) { return m.ln_gamma(T, x); }, model);
  std::vector<double> boiling;
  for (const double value : ln_gamma) {
    boiling.push_back(1.0 / (1.0 / T - value / H_K));
  }
  return boiling;
}

/// ln gamma_1 - ln gamma_2 of a binary whose model does not depend on T.
double difference(const ActivityModel& model, double x1) {
  const Vec<double> ln_gamma = std::visit(
      [&](const auto& m) {
        return m.ln_gamma(350.0, Vec<double>{x1, 1.0 - x1});
      },
      model);
  return ln_gamma[0] - ln_gamma[1];
}

/// Case of a binary with equal H and all its roots.
KnownCase binary_case(const ActivityModel& model, double boiling_1_K, double boiling_2_K) {
  KnownCase result;
  result.mixture = simple_mixture({boiling_1_K, boiling_2_K}, model);
  result.all = true;
  const double level = kEqualH_K * (1.0 / boiling_1_K - 1.0 / boiling_2_K);
  for (const double x1 : roots_on_unit_interval([&](double x) { return difference(model, x) + level; })) {
    const Composition x{x1, 1.0 - x1};
    const Vec<double> ln_gamma = std::visit([&](const auto& m) { return m.ln_gamma(350.0, x); }, model);
    result.roots.push_back({first_members(2), x, 1.0 / (1.0 / boiling_1_K + ln_gamma[0] / kEqualH_K)});
  }
  return result;
}

/// Redlich-Kister model of all pairs, `terms` coefficients each, from one flat list.
RedlichKister redlich_kister(int size, int terms, const Eigen::VectorXd& c) {
  std::vector<RedlichKisterPair> pairs;
  Eigen::Index at = 0;
  for (int i = 0; i < size; ++i) {
    for (int j = i + 1; j < size; ++j) {
      RedlichKisterPair pair{i, j, {}};
      for (int m = 0; m < terms; ++m) {
        pair.c.push_back(c[at++]);
      }
      pairs.push_back(pair);
    }
  }
  return {size, pairs};
}

/// Coefficients closest to `wish` for which every point of `points` is a root: f_i = f_last is linear in them.
Eigen::VectorXd plant(int size, int terms, const std::vector<Composition>& points, const std::vector<double>& boiling,
                      const Eigen::VectorXd& wish) {
  const auto columns = wish.size();
  const auto rows = static_cast<Eigen::Index>(points.size()) * (size - 1);
  Eigen::MatrixXd a(rows, columns);
  Eigen::VectorXd b(rows);
  for (Eigen::Index column = 0; column < columns; ++column) {
    const RedlichKister unit = redlich_kister(size, terms, Eigen::VectorXd::Unit(columns, column));
    Eigen::Index row = 0;
    for (const Composition& x : points) {
      const Vec<double> ln_gamma = unit.ln_gamma(350.0, x);
      for (int i = 0; i + 1 < size; ++i) {
        a(row++, column) = ln_gamma[i] - ln_gamma[size - 1];
      }
    }
  }
  for (Eigen::Index row = 0; row < rows; ++row) {
    const auto i = static_cast<std::size_t>(row % (size - 1));
    b[row] = -kEqualH_K * (1.0 / boiling[i] - 1.0 / boiling.back());
  }
  const Eigen::VectorXd change = a.completeOrthogonalDecomposition().solve(b - a * wish);
  return wish + change;
}

/// Temperature at which sum x_i f_i = 0 for equal H and a model without T.
double temperature_of(const ActivityModel& model, const std::vector<double>& boiling, const Composition& x) {
  const Vec<double> ln_gamma = std::visit([&](const auto& m) { return m.ln_gamma(350.0, x); }, model);
  double inverse = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    inverse += x[i] * (1.0 / boiling[static_cast<std::size_t>(i)] + ln_gamma[i] / kEqualH_K);
  }
  return 1.0 / inverse;
}

}  // namespace

double Random::uniform(double lower, double upper) {
  constexpr double kScale = 1.0 / 9007199254740992.0;  // 2^-53
  return lower + (upper - lower) * (static_cast<double>(engine_() >> 11U) * kScale);
}

Composition Random::composition(int size) {
  Composition x(size);
  double sum = 0.0;
  for (double& value : x) {
    value = -std::log(uniform(1e-12, 1.0));
    sum += value;
  }
  for (double& value : x) {
    value /= sum;
  }
  return x;
}

std::vector<KnownRoot> margules_roots(const Matrix<double>& A, const std::vector<double>& boiling_points_K,
                                      const std::vector<double>& H_K) {
  // A x = q - H/Tb + H u with q = x.A.x/2 and u = 1/T, so x = q a + b + u c; sum x = 1 leaves one quadratic in u.
  const int n = A.size();
  std::vector<KnownRoot> roots;
  for (unsigned mask = 3; mask < (1U << n); ++mask) {
    Members members;
    for (int i = 0; i < n; ++i) {
      if ((mask >> i & 1U) != 0U) {
        members.push_back(i);
      }
    }
    const Eigen::Index m = members.size();
    if (m < 2) {
      continue;
    }
    Eigen::MatrixXd part(m, m);
    Eigen::MatrixXd right(m, 3);
    for (Eigen::Index i = 0; i < m; ++i) {
      const int k = members[static_cast<int>(i)];
      for (Eigen::Index j = 0; j < m; ++j) {
        part(i, j) = A(k, members[static_cast<int>(j)]);
      }
      const double H = H_K[static_cast<std::size_t>(k)];
      right.row(i) << 1.0, -H / boiling_points_K[static_cast<std::size_t>(k)], H;
    }
    const Eigen::MatrixXd abc = part.fullPivLu().solve(right);
    const double sum_a = abc.col(0).sum();
    // q = q0 + q1 u, x = x0 + x1 u, then q = x.A.x/2.
    const double q0 = (1.0 - abc.col(1).sum()) / sum_a;
    const double q1 = -abc.col(2).sum() / sum_a;
    const Eigen::VectorXd x0 = q0 * abc.col(0) + abc.col(1);
    const Eigen::VectorXd x1 = q1 * abc.col(0) + abc.col(2);
    const double c2 = 0.5 * x1.dot(part * x1);
    const double c1 = x0.dot(part * x1) - q1;
    const double c0 = 0.5 * x0.dot(part * x0) - q0;
    const double discriminant = c1 * c1 - 4.0 * c2 * c0;
    if (discriminant < 0.0) {
      continue;
    }
    const double stable = -0.5 * (c1 + std::copysign(std::sqrt(discriminant), c1));
    for (const double u : {stable / c2, c0 / stable}) {
      const Eigen::VectorXd x = x0 + u * x1;
      if (!(u > 0.0) || !std::isfinite(u) || !(x.minCoeff() > 0.0)) {
        continue;
      }
      KnownRoot root{members, Composition(n, 0.0), 1.0 / u};
      for (Eigen::Index i = 0; i < m; ++i) {
        root.x[members[static_cast<int>(i)]] = x[i];
      }
      roots.push_back(root);
    }
  }
  return roots;
}

KnownCase random_margules(Random& random, int size, double largest) {
  Matrix<double> A(size, 0.0);
  std::vector<double> boiling;
  std::vector<double> H;
  for (int i = 0; i < size; ++i) {
    for (int j = 0; j < i; ++j) {
      A(i, j) = A(j, i) = random.uniform(-largest, largest);
    }
    boiling.push_back(random.uniform(335.0, 365.0));
    H.push_back(random.uniform(3600.0, 5200.0));
  }
  KnownCase result;
  result.mixture = simple_mixture(boiling, Margules(A), H);
  result.roots = margules_roots(A, boiling, H);
  result.all = true;
  return result;
}

Mixture random_nrtl(Random& random, int size) {
  NrtlParameters parameters(size);
  std::vector<double> boiling;
  std::vector<double> H;
  for (int i = 0; i < size; ++i) {
    for (int j = 0; j < size; ++j) {
      if (i != j) {
        parameters.tau.a(i, j) = random.uniform(-0.5, 0.7);
        parameters.tau.b_K(i, j) = random.uniform(-150.0, 250.0);
      }
      if (j < i) {
        parameters.alpha(i, j) = parameters.alpha(j, i) = random.uniform(0.2, 0.47);
      }
    }
    boiling.push_back(random.uniform(330.0, 370.0));
    H.push_back(random.uniform(3600.0, 5200.0));
  }
  return simple_mixture(boiling, Nrtl(parameters), H);
}

KnownCase planted_nrtl_binary(Random& random) {
  while (true) {
    NrtlParameters parameters(2);
    parameters.tau.a(0, 1) = random.uniform(-1.5, 2.2);
    parameters.tau.a(1, 0) = random.uniform(-1.5, 2.2);
    parameters.alpha(0, 1) = parameters.alpha(1, 0) = random.uniform(0.2, 0.47);
    const ActivityModel model = Nrtl(parameters);
    // Two roots at one level exist where the difference of the ln gamma turns.
    constexpr int kSteps = 400;
    double turn = 0.0;
    for (int k = 1; k < kSteps; ++k) {
      const double x = static_cast<double>(k) / kSteps;
      const double step = 1.0 / kSteps;
      if ((difference(model, x) - difference(model, x - step)) * (difference(model, x + step) - difference(model, x)) <
          0.0) {
        turn = x;
      }
    }
    if (turn == 0.0) {
      continue;
    }
    const double top = difference(model, turn);
    const double left = difference(model, 0.0);
    const double right = difference(model, 1.0);
    const double nearer = std::abs(top - left) < std::abs(top - right) ? left : right;
    const double level = top + random.uniform(0.1, 0.95) * (nearer - top);
    // ln gamma_1 - ln gamma_2 + H (1/Tb_1 - 1/Tb_2) = 0 at that level.
    KnownCase result = binary_case(model, 1.0 / (1.0 / 350.0 - level / kEqualH_K), 350.0);
    if (result.roots.size() >= 2) {
      return result;
    }
  }
}

KnownCase planted_nrtl_ternary(Random& random) {
  NrtlParameters parameters(3);
  for (int i = 0; i < 3; ++i) {
    for (int j = 0; j < 3; ++j) {
      if (i != j) {
        parameters.tau.a(i, j) = random.uniform(-0.6, 1.2);
        parameters.alpha(i, j) = 0.47;
      }
    }
  }
  const ActivityModel model = Nrtl(parameters);
  const Composition x = random.composition(3);
  KnownCase result;
  const std::vector<double> boiling = boiling_points_for(model, x, 345.0, kEqualH_K);
  result.mixture = simple_mixture(boiling, model);
  result.roots.push_back({first_members(3), x, 345.0});
  return result;
}

KnownCase planted_redlich_kister_binary(Random& random, int count) {
  while (true) {
    const int terms = count + 1;
    std::vector<Composition> points;
    while (static_cast<int>(points.size()) < count) {
      const double x = random.uniform(0.02, 0.98);
      if (apart(points, {x, 1.0 - x}, 0.02)) {
        points.push_back({x, 1.0 - x});
      }
    }
    Eigen::VectorXd wish(terms);
    for (double& c : wish) {
      c = random.uniform(-0.8, 0.8);
    }
    const std::vector<double> boiling = {random.uniform(345.0, 355.0), 350.0};
    const Eigen::VectorXd c = plant(2, terms, points, boiling, wish);
    if (c.cwiseAbs().maxCoeff() > 3.0) {
      continue;
    }
    KnownCase result = binary_case(redlich_kister(2, terms, c), boiling[0], boiling[1]);
    if (static_cast<int>(result.roots.size()) >= count) {
      return result;
    }
  }
}

KnownCase planted_redlich_kister_ternary(Random& random, int count) {
  while (true) {
    const int terms = 3;
    std::vector<Composition> points;
    while (static_cast<int>(points.size()) < count) {
      const Composition x = random.composition(3);
      if (apart(points, x, 0.05)) {
        points.push_back(x);
      }
    }
    Eigen::VectorXd wish(3 * terms);
    for (double& c : wish) {
      c = random.uniform(-0.8, 0.8);
    }
    const std::vector<double> boiling = {random.uniform(345.0, 355.0), random.uniform(345.0, 355.0), 350.0};
    const Eigen::VectorXd c = plant(3, terms, points, boiling, wish);
    if (c.cwiseAbs().maxCoeff() > 3.0) {
      continue;
    }
    const ActivityModel model = redlich_kister(3, terms, c);
    KnownCase result;
    result.mixture = simple_mixture(boiling, model);
    for (const Composition& x : points) {
      result.roots.push_back({first_members(3), x, temperature_of(model, boiling, x)});
    }
    return result;
  }
}

KnownCase near_corner(Random& random, double trace) {
  // ln gamma_A - ln gamma_B = A12 (x_B - x_A) for two-suffix Margules.
  const double a = random.uniform(0.2, 1.5) * (random.below(2) == 0 ? 1.0 : -1.0);
  const bool rich_in_A = random.below(2) == 0;
  const double x_A = rich_in_A ? 1.0 - trace : trace;
  const double level = rich_in_A ? a * (2.0 * trace - 1.0) : a * (1.0 - 2.0 * trace);
  const double boiling_A = 350.0;
  const double boiling_B = 1.0 / (1.0 / boiling_A + level / kEqualH_K);
  KnownCase result;
  result.mixture = margules_mixture({boiling_A, boiling_B}, {{0.0, a}, {a, 0.0}});
  result.all = true;
  if (trace > 0.0) {
    const double x_B = 1.0 - x_A;
    result.roots.push_back({first_members(2), {x_A, x_B}, 1.0 / (1.0 / boiling_A + a * x_B * x_B / kEqualH_K)});
  }
  return result;
}

KnownCase near_edge(Random& random, double trace) {
  Matrix<double> A(3, 0.0);
  for (int i = 0; i < 3; ++i) {
    for (int j = 0; j < i; ++j) {
      A(i, j) = A(j, i) = random.uniform(0.4, 1.4);
    }
  }
  const double share = random.uniform(0.3, 0.7);
  const Composition x{share * (1.0 - trace), (1.0 - share) * (1.0 - trace), trace};
  std::vector<double> H;
  std::vector<double> boiling;
  const Vec<double> ln_gamma = Margules(A).ln_gamma(345.0, x);
  for (int i = 0; i < 3; ++i) {
    H.push_back(random.uniform(3800.0, 4800.0));
    boiling.push_back(1.0 / (1.0 / 345.0 - ln_gamma[i] / H.back()));
  }
  KnownCase result;
  result.mixture = simple_mixture(boiling, Margules(A), H);
  result.roots = margules_roots(A, boiling, H);
  result.all = true;
  return result;
}

}  // namespace stillshed::testing
