#include "engine/dew_point.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

constexpr int kUnknowns = kMaxComponents + 1;
using System = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kUnknowns, kUnknowns>;
using Unknowns = Eigen::Matrix<double, Eigen::Dynamic, 1, 0, kUnknowns, 1>;

constexpr double kResidual = 1e-11;
constexpr int kMaxIterations = 60;

/// ln x of the components present and ln T.
struct State {
  Vec<double> ln_x;
  double ln_T = 0.0;
};

/// Equations of condensation with ln gamma scaled by `share`: share 0 is the ideal liquid, 1 the model.
class Condensation {
 public:
  Condensation(const Mixture& mixture, const Composition& y, double pressure_Pa)
      : mixture_(mixture), ln_pressure_(std::log(pressure_Pa)) {
    for (int i = 0; i < y.size(); ++i) {
      if (y[i] > 0.0) {
        members_.push_back(i);
        ln_y_.push_back(std::log(y[i]));
      }
    }
  }
  [[nodiscard]] const Members& members() const { return members_; }
  [[nodiscard]] double ln_y(int a) const { return ln_y_[a]; }

  [[nodiscard]] Composition liquid(const State& state) const {
    Composition x(mixture_.size(), 0.0);
    for (int a = 0; a < members_.size(); ++a) {
      x[members_[a]] = std::exp(state.ln_x[a]);
    }
    return x;
  }

  /// Residuals and their derivatives by (ln x, ln T); gamma is taken at the normalised liquid.
  void evaluate(const State& state, double share, Unknowns& residual, System& jacobian) const {
    const int m = members_.size();
    const double temperature_K = std::exp(state.ln_T);
    Composition x = liquid(state);
    double sum = 0.0;
    for (const double value : x) {
      sum += value;
    }
    for (double& value : x) {
      value /= sum;
    }
    LnGammaGradient<double> gradient;
    mixture_.ln_gamma_with_gradient(temperature_K, x, gradient);
    residual.resize(m + 1);
    jacobian.setZero(m + 1, m + 1);
    for (int a = 0; a < m; ++a) {
      const int i = members_[a];
      const PressureCurve& pressure = mixture_.component(i).pressure;
      const double ln_k = share * gradient.value[i] + pressure.ln_psat(temperature_K) - ln_pressure_;
      residual(a) = state.ln_x[a] + ln_k - ln_y_[a];
      double mean = 0.0;
      for (int b = 0; b < m; ++b) {
        mean += x[members_[b]] * gradient.d_dx(i, members_[b]);
      }
      for (int b = 0; b < m; ++b) {
        jacobian(a, b) = share * x[members_[b]] * (gradient.d_dx(i, members_[b]) - mean);
      }
      jacobian(a, a) += 1.0;
      jacobian(a, m) = temperature_K * (share * gradient.d_dT[i] + pressure.d_ln_psat_dT(temperature_K));
    }
    residual(m) = std::log(sum);
    for (int b = 0; b < m; ++b) {
      jacobian(m, b) = x[members_[b]];
    }
  }

 private:
  const Mixture& mixture_;
  Members members_;
  Vec<double> ln_y_;
  double ln_pressure_ = 0.0;
};

/// Damped Newton; true when converged.
bool newton(const Condensation& equations, double share, State& state) {
  const int m = equations.members().size();
  Unknowns residual;
  System jacobian;
  for (int iteration = 0; iteration < kMaxIterations; ++iteration) {
    equations.evaluate(state, share, residual, jacobian);
    const double size = residual.cwiseAbs().maxCoeff();
    if (!std::isfinite(size)) {
      return false;
    }
    const Unknowns step = jacobian.partialPivLu().solve(-residual);
    const double largest = step.head(m).cwiseAbs().maxCoeff();
    const double damping = std::min({1.0, 1.5 / std::max(largest, 1e-300), 0.1 / std::max(std::abs(step(m)), 1e-300)});
    if (!std::isfinite(damping) || !step.allFinite()) {
      return false;
    }
    for (int a = 0; a < m; ++a) {
      state.ln_x[a] += damping * step(a);
    }
    state.ln_T += damping * step(m);
    if (size < kResidual && damping == 1.0) {
      return true;
    }
  }
  return false;
}

/// The ideal liquid of this vapour: x_i proportional to y_i / Psat_i, T from the boiling points.
State ideal_start(const Mixture& mixture, const Condensation& equations, double pressure_Pa) {
  State state;
  const Members& members = equations.members();
  double T = 0.0;
  for (int a = 0; a < members.size(); ++a) {
    T += std::exp(equations.ln_y(a)) * mixture.boiling_point_K(members[a], pressure_Pa);
  }
  state.ln_T = std::log(T);
  state.ln_x = Vec<double>(members.size());
  double sum = 0.0;
  for (int a = 0; a < members.size(); ++a) {
    state.ln_x[a] = equations.ln_y(a) - mixture.ln_psat(members[a], T) + std::log(pressure_Pa);
    sum += std::exp(state.ln_x[a]);
  }
  for (double& value : state.ln_x) {
    value -= std::log(sum);
  }
  return state;
}

/// From the ideal liquid to the model in steps of `share` that halve on failure.
bool continuation(const Condensation& equations, State& state) {
  double share = 0.0;
  double step = 0.25;
  if (!newton(equations, 0.0, state)) {
    return false;
  }
  while (share < 1.0) {
    State trial = state;
    const double next = std::min(1.0, share + step);
    if (newton(equations, next, trial)) {
      state = trial;
      share = next;
      step *= 1.5;
    } else {
      step *= 0.5;
      if (step < 1e-4) {
        return false;
      }
    }
  }
  return true;
}

}  // namespace

DewPoint dew_point(const Mixture& mixture, const Composition& y, double pressure_Pa, double guess_K,
                   const Composition& guess_x) {
  expects(y.size() == mixture.size() && y.size() > 0, "dew point: composition and mixture differ in size");
  expects(pressure_Pa > 0.0, "dew point: pressure must be positive");
  const Condensation equations(mixture, y, pressure_Pa);
  const State ideal = ideal_start(mixture, equations, pressure_Pa);
  State state = ideal;
  if (guess_K > 0.0) {
    state.ln_T = std::log(guess_K);
  }
  if (guess_x.size() == y.size()) {
    for (int a = 0; a < equations.members().size(); ++a) {
      state.ln_x[a] = std::log(std::max(guess_x[equations.members()[a]], 1e-12));
    }
  }
  bool converged = newton(equations, 1.0, state);
  if (!converged) {
    state = ideal;
    converged = continuation(equations, state);
  }
  DewPoint point;
  point.status = converged ? Status::complete : Status::undecided;
  if (!converged) {
    point.reason = Reason::not_converged;
  }
  point.temperature_K = std::exp(state.ln_T);
  point.x = equations.liquid(state);
  double sum = 0.0;
  for (const double value : point.x) {
    sum += value;
  }
  for (double& value : point.x) {
    value /= sum;
  }
  return point;
}

}  // namespace stillshed
