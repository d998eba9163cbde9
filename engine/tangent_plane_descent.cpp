#include "engine/tangent_plane_descent.hpp"

#include <Eigen/Cholesky>
#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

using SmallMatrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kMaxComponents, kMaxComponents>;
using SmallVector = Eigen::Matrix<double, Eigen::Dynamic, 1, 0, kMaxComponents, 1>;

constexpr int kSubstitutions = 3;  // enough to bring very dilute components to their place
constexpr int kMaxIterations = 120;
constexpr int kMaxAttempts = 40;         // at one step: the shift has then grown beyond any curvature
constexpr double kStationary = 1e-11;    // size of the gradient in 2 sqrt(W)
constexpr double kNoDescentLeft = 1e-7;  // gradient at which a step that gains nothing means a minimum within rounding

}  // namespace

/// tm with its gradient and curvature in the variables 2 sqrt(W).
struct TangentPlaneDescent::Model {
  double tm = 0.0;
  SmallVector gradient;
  SmallMatrix curvature;
  [[nodiscard]] double steepness() const { return gradient.cwiseAbs().maxCoeff(); }
};

Composition normalised(const Composition& amounts) {
  Composition result = amounts;
  double sum = 0.0;
  for (const double value : amounts) {
    sum += value;
  }
  for (double& value : result) {
    value /= sum;
  }
  return result;
}

double bounded_exp(double exponent) {
  constexpr double kLargest = 60.0;
  return std::exp(std::clamp(exponent, -kLargest, kLargest));
}

Descent TangentPlaneDescent::run(const Composition& start) const {
  Composition W = start;
  for (int k = 0; k < kSubstitutions; ++k) {
    W = substitute(W);
  }
  Model here = evaluate(W);
  double shift = 0.0;
  Descent result;
  for (int iteration = 0; iteration < kMaxIterations && std::isfinite(here.tm); ++iteration) {
    if (here.steepness() < kStationary) {
      result.converged = true;
      break;
    }
    if (!step(W, here, shift)) {
      result.converged = here.steepness() < kNoDescentLeft;
      break;
    }
  }
  result.w = normalised(W);
  result.tpd = distance(result.w);
  return result;
}

double TangentPlaneDescent::distance(const Composition& w) const {
  const Vec<double> ln_gamma = face_.ln_gamma(temperature_K_, w);
  double sum = 0.0;
  for (int i = 0; i < w.size(); ++i) {
    sum += w[i] > 0.0 ? w[i] * (std::log(w[i]) + ln_gamma[i] - d_[i]) : 0.0;
  }
  return sum;
}

/// W_i = exp(d_i - ln g_i(w)): the fixed-point form of s_i = 0.
Composition TangentPlaneDescent::substitute(const Composition& from) const {
  const Vec<double> ln_gamma = face_.ln_gamma(temperature_K_, normalised(from));
  Composition W(from.size());
  for (int i = 0; i < from.size(); ++i) {
    W[i] = bounded_exp(d_[i] - ln_gamma[i]);
  }
  return W;
}

TangentPlaneDescent::Model TangentPlaneDescent::evaluate(const Composition& W) const {
  const int n = W.size();
  const Composition w = normalised(W);
  LnGammaGradient<double> ln_gamma;
  face_.ln_gamma_with_gradient(temperature_K_, w, ln_gamma);
  double total = 0.0;
  for (const double value : W) {
    total += value;
  }
  Model out;
  out.tm = 1.0;
  out.gradient.resize(n);
  out.curvature.resize(n, n);
  for (int i = 0; i < n; ++i) {
    const double s = std::log(W[i]) + ln_gamma.value[i] - d_[i];
    out.tm += W[i] * (s - 1.0);
    out.gradient(i) = std::sqrt(W[i]) * s;
    double mean = 0.0;
    for (int j = 0; j < n; ++j) {
      mean += w[j] * ln_gamma.d_dx(i, j);
    }
    for (int j = 0; j < n; ++j) {
      out.curvature(i, j) = std::sqrt(W[i] * W[j]) * (ln_gamma.d_dx(i, j) - mean) / total;
    }
    out.curvature(i, i) += 1.0 + 0.5 * s;
  }
  return out;
}

/// One Newton step with as much shift of the curvature as descent needs. False: no step lowers tm.
bool TangentPlaneDescent::step(Composition& W, Model& here, double& shift) const {
  const int n = W.size();
  for (int attempt = 0; attempt < kMaxAttempts; ++attempt) {
    SmallMatrix shifted = here.curvature;
    shifted.diagonal().array() += shift;
    const Eigen::LLT<SmallMatrix> factor(shifted);
    if (factor.info() == Eigen::Success) {
      const SmallVector change = factor.solve(here.gradient);
      Composition trial(n);
      for (int i = 0; i < n; ++i) {
        const double root = std::sqrt(W[i]);
        // Never through zero, where the form has a false stationary point.
        const double moved = std::clamp(root - 0.5 * change(i), 0.2 * root, 3.0 * root + 0.1);
        trial[i] = moved * moved;
      }
      const Model there = evaluate(trial);
      const bool falls = there.tm < here.tm;
      const bool flatter =
          there.tm <= here.tm + 1e-15 * std::abs(here.tm) && there.gradient.norm() < here.gradient.norm();
      if (falls || flatter) {
        W = trial;
        here = there;
        shift = shift > 1e-3 ? 0.1 * shift : 0.0;
        return true;
      }
    }
    shift = std::max(4.0 * shift, 1e-2);
  }
  return false;
}

}  // namespace stillshed
