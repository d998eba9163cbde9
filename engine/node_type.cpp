#include "engine/node_type.hpp"

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

constexpr int kMost = kMaxComponents;
using SmallMatrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kMost, kMost>;

/// Imaginary parts up to this share of the largest eigenvalue are rounding.
constexpr double kImaginaryRounding = 1e-7;

/// d(x - y)/dx on the simplex of the face, in the coordinates of all members but the largest.
SmallMatrix inside_jacobian(const Mixture& mixture, const Members& members, const Composition& x,
                            double temperature_K) {
  LnGammaGradient<double> gradient;
  mixture.ln_gamma_with_gradient(temperature_K, x, gradient);
  int pivot = 0;
  for (int a = 1; a < members.size(); ++a) {
    if (x[members[a]] > x[members[pivot]]) {
      pivot = a;
    }
  }
  const int m = members.size() - 1;
  SmallMatrix jacobian(m, m);
  int row = 0;
  for (int a = 0; a < members.size(); ++a) {
    if (a == pivot) {
      continue;
    }
    int column = 0;
    for (int b = 0; b < members.size(); ++b) {
      if (b != pivot) {
        jacobian(row, column++) =
            -x[members[a]] * (gradient.d_dx(members[a], members[b]) - gradient.d_dx(members[a], members[pivot]));
      }
    }
    ++row;
  }
  return jacobian;
}

Boiling boiling_from(NodeType inside) {
  switch (inside) {
    case NodeType::unstable_node: return Boiling::minimum;
    case NodeType::stable_node: return Boiling::maximum;
    case NodeType::saddle: return Boiling::saddle;
    case NodeType::degenerate: return Boiling::inflection;
  }
  return Boiling::inflection;
}

}  // namespace

NodeType node_from_eigenvalues(const std::vector<double>& eigenvalues, double zero) {
  int positive = 0;
  int negative = 0;
  for (const double value : eigenvalues) {
    if (!(std::abs(value) >= zero)) {
      return NodeType::degenerate;
    }
    (value > 0.0 ? positive : negative) += 1;
  }
  if (positive + negative == 0) {
    return NodeType::degenerate;
  }
  if (negative == 0) {
    return NodeType::unstable_node;
  }
  return positive == 0 ? NodeType::stable_node : NodeType::saddle;
}

NodeAnalysis analyse_node(const Mixture& mixture, double pressure_Pa, const Members& members, const Composition& x,
                          double temperature_K) {
  expects(x.size() == mixture.size() && !members.empty(), "node type: composition and mixture differ in size");
  NodeAnalysis result;
  result.inside = members.size() - 1;
  if (result.inside > 0) {
    const SmallMatrix jacobian = inside_jacobian(mixture, members, x, temperature_K);
    const Eigen::EigenSolver<SmallMatrix> solver(jacobian, false);
    const double scale = solver.eigenvalues().cwiseAbs().maxCoeff();
    for (int a = 0; a < result.inside; ++a) {
      const std::complex<double> value = solver.eigenvalues()(a);
      result.eigenvalues.push_back(value.real());
      result.complex_pair = result.complex_pair || std::abs(value.imag()) > kImaginaryRounding * scale;
      result.negative_inside += value.real() < 0.0 ? 1 : 0;
    }
    std::sort(result.eigenvalues.begin(), result.eigenvalues.end());
    result.boiling =
        result.complex_pair ? Boiling::inflection : boiling_from(node_from_eigenvalues(result.eigenvalues));
  }
  const Vec<double> ln_k = mixture.ln_k(temperature_K, x, std::log(pressure_Pa));
  for (int k = 0; k < mixture.size(); ++k) {
    if (std::find(members.begin(), members.end(), k) == members.end()) {
      result.eigenvalues.push_back(-std::expm1(ln_k[k]));
    }
  }
  const double zero = members.size() == 1 ? kZeroEigenvaluePure : kZeroEigenvalue;
  result.node = result.complex_pair ? NodeType::degenerate : node_from_eigenvalues(result.eigenvalues, zero);
  return result;
}

}  // namespace stillshed
