#include "engine/bubble_point.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillshed {
namespace {

constexpr double kResidual = 1e-13;       // |F| accepted as zero: the rounding of ln K
constexpr double kUpdateError = 1e-12;    // accepted error of ln K after the last, first-order update
constexpr double kSmallestSecant = 1e-9;  // relative step in T below which a difference quotient is noise
constexpr int kMaxEvaluations = 100;

/// ln K of every component with its slope d ln K/d ln T, and F = ln sum x_i K_i with its slope.
struct State {
  double temperature_K = 0.0;
  Vec<double> ln_gamma;
  Vec<double> ln_k;
  Vec<double> ln_k_slope;
  double F = 0.0;
  double slope = 0.0;
};

/// Evaluates F. The slope of ln Psat is exact; that of ln gamma is the difference quotient to the previous evaluation:
/// nothing for models without temperature dependence, and good to the last step for the others.
class BoilingFunction {
 public:
  BoilingFunction(const Mixture& mixture, const Composition& x, double pressure_Pa)
      : mixture_(mixture), x_(x), ln_pressure_(std::log(pressure_Pa)), gamma_slope_(x.size(), 0.0) {}

  void evaluate(double temperature_K, State& state) {
    const int n = x_.size();
    const Vec<double> ln_gamma = mixture_.ln_gamma(temperature_K, x_);
    const double step = evaluations_ > 0 ? std::log(temperature_K / state.temperature_K) : 0.0;
    if (std::abs(step) > kSmallestSecant) {
      for (int i = 0; i < n; ++i) {
        gamma_slope_[i] = (ln_gamma[i] - state.ln_gamma[i]) / step;
      }
    }
    ++evaluations_;
    state.temperature_K = temperature_K;
    state.ln_gamma = ln_gamma;
    state.ln_k = Vec<double>(n);
    state.ln_k_slope = Vec<double>(n);
    double sum = 0.0;
    double weighted_slope = 0.0;
    for (int i = 0; i < n; ++i) {
      const PressureCurve& pressure = mixture_.component(i).pressure;
      state.ln_k[i] = ln_gamma[i] + pressure.ln_psat(temperature_K) - ln_pressure_;
      state.ln_k_slope[i] = gamma_slope_[i] + pressure.d_ln_psat_dT(temperature_K) * temperature_K;
      if (x_[i] > 0.0) {
        const double y = x_[i] * std::exp(state.ln_k[i]);
        sum += y;
        weighted_slope += y * state.ln_k_slope[i];
      }
    }
    state.F = std::log(sum);
    state.slope = weighted_slope / sum;
  }
  [[nodiscard]] int evaluations() const { return evaluations_; }

 private:
  const Mixture& mixture_;
  const Composition& x_;
  double ln_pressure_ = 0.0;
  Vec<double> gamma_slope_;
  int evaluations_ = 0;
};

/// Temperatures with F < 0 and F > 0 seen so far.
struct Bracket {
  double below_K = 0.0;
  double above_K = std::numeric_limits<double>::infinity();
  void note(double temperature_K, double F) {
    if (F < 0.0) {
      below_K = std::max(below_K, temperature_K);
    } else {
      above_K = std::min(above_K, temperature_K);
    }
  }
  [[nodiscard]] bool closed() const { return below_K > 0.0 && std::isfinite(above_K); }
  [[nodiscard]] double middle() const { return 2.0 / (1.0 / below_K + 1.0 / above_K); }
};

double next_temperature(const State& at, const Bracket& bracket) {
  const double T = at.temperature_K;
  double next = at.F > 0.0 ? T / 1.2 : T * 1.2;
  if (at.slope > 0.0) {
    // F is nearly linear in 1/T. One step changes 1/T by at most a half: more would leave the sense of any formula.
    next = T / std::clamp(1.0 + at.F / at.slope, 0.67, 1.5);
  }
  const bool outside = !(next > bracket.below_K && next < bracket.above_K);
  return outside && bracket.closed() ? bracket.middle() : next;
}

double starting_temperature(const Mixture& mixture, const Composition& x, double pressure_Pa) {
  double inverse = 0.0;
  double total = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      inverse += x[i] / mixture.boiling_point_K(i, pressure_Pa);
      total += x[i];
    }
  }
  return total / inverse;
}

/// Fills T, y and K from the last evaluation, moved to F = 0 along the straight lines ln K over 1/T.
void finish(const Composition& x, const State& at, BubblePoint& point) {
  const int n = x.size();
  const double shift = -at.F / at.slope;
  point.status = Status::complete;
  point.temperature_K = at.temperature_K / (1.0 - shift);
  point.slope = at.slope;
  point.k = Vec<double>(n);
  point.y = Composition(n);
  double sum = 0.0;
  for (int i = 0; i < n; ++i) {
    point.k[i] = std::exp(at.ln_k[i] + at.ln_k_slope[i] * shift);
    point.y[i] = x[i] * point.k[i];
    sum += point.y[i];
  }
  for (int i = 0; i < n; ++i) {
    point.y[i] /= sum;
  }
}

BubblePoint solve(const Mixture& mixture, const Composition& x, double pressure_Pa, double guess_K) {
  BoilingFunction function(mixture, x, pressure_Pa);
  BubblePoint point;
  Bracket bracket;
  State at;
  const bool varies = mixture.depends_on_temperature();
  double T = guess_K;
  double last_step = varies ? 1.0 : 0.0;  // relative; before a second evaluation the slope of ln gamma is unknown
  while (function.evaluations() < kMaxEvaluations) {
    function.evaluate(T, at);
    if (!std::isfinite(at.F) || !std::isfinite(at.slope)) {
      break;
    }
    const double shift = std::abs(at.F / at.slope);
    if (at.slope > 0.0 && (shift * (shift + last_step) <= kUpdateError || std::abs(at.F) <= kResidual)) {
      finish(x, at, point);
      break;
    }
    bracket.note(T, at.F);
    const double next = next_temperature(at, bracket);
    if (next == T) {  // the bracket has shrunk to neighbouring numbers
      break;
    }
    last_step = varies ? std::abs(next / T - 1.0) : 0.0;
    T = next;
  }
  point.evaluations = function.evaluations();
  if (point.status != Status::complete) {
    point.status = Status::undecided;
    point.reason = at.slope > 0.0 ? Reason::not_converged : Reason::multiple_bubble_points;
    point.temperature_K = T;
  }
  return point;
}

/// What a scan over temperature saw: how often F crosses zero, and where it does first.
struct Crossings {
  int count = 0;
  double first_K = 0.0;
};

Crossings scan(const Mixture& mixture, const Composition& x, double pressure_Pa, int samples) {
  double coldest = std::numeric_limits<double>::infinity();
  double hottest = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      const double boiling = mixture.boiling_point_K(i, pressure_Pa);
      coldest = std::min(coldest, boiling);
      hottest = std::max(hottest, boiling);
    }
  }
  const double first_inverse = 1.0 / (0.6 * coldest);
  const double last_inverse = 1.0 / (1.6 * hottest);
  BoilingFunction function(mixture, x, pressure_Pa);
  Crossings result;
  State at;
  double previous_K = 0.0;
  bool previous_above = false;
  for (int s = 0; s < samples; ++s) {
    const double T = 1.0 / (first_inverse + (last_inverse - first_inverse) * s / (samples - 1));
    function.evaluate(T, at);
    const bool above = at.F >= 0.0;
    if (above != previous_above && ++result.count == 1) {
      result.first_K = s > 0 ? 0.5 * (T + previous_K) : T;
    }
    previous_above = above;
    previous_K = T;
  }
  return result;
}

void check_arguments(const Mixture& mixture, const Composition& x, double pressure_Pa) {
  expects(x.size() == mixture.size() && x.size() > 0, "bubble point: composition and mixture differ in size");
  expects(pressure_Pa > 0.0, "bubble point: pressure must be positive");
}

}  // namespace

BubblePoint bubble_point(const Mixture& mixture, const Composition& x, double pressure_Pa, double guess_K) {
  check_arguments(mixture, x, pressure_Pa);
  return solve(mixture, x, pressure_Pa, guess_K > 0.0 ? guess_K : starting_temperature(mixture, x, pressure_Pa));
}

BubblePoint bubble_point_scanned(const Mixture& mixture, const Composition& x, double pressure_Pa, int samples) {
  check_arguments(mixture, x, pressure_Pa);
  expects(samples >= 2, "bubble point: at least two samples");
  const Crossings crossings = scan(mixture, x, pressure_Pa, samples);
  BubblePoint point = bubble_point(mixture, x, pressure_Pa, crossings.first_K);
  point.evaluations += samples;
  if (crossings.count > 1) {
    point.status = Status::undecided;
    point.reason = Reason::multiple_bubble_points;
  }
  return point;
}

BubbleGradient bubble_gradient(const Mixture& mixture, const Composition& x, double pressure_Pa,
                               const BubblePoint& point) {
  check_arguments(mixture, x, pressure_Pa);
  expects(point.status == Status::complete, "bubble gradient: the bubble point is not complete");
  const int n = x.size();
  LnGammaGradient<double> ln_k;
  mixture.ln_k_with_gradient(point.temperature_K, x, std::log(pressure_Pa), ln_k);
  // sum_i x_i K_i = 1:  sum_i y_i dlnK_i/dT dT + sum_j (K_j + sum_i y_i dlnK_i/dx_j) dx_j = 0
  double slope = 0.0;
  for (int i = 0; i < n; ++i) {
    slope += point.y[i] * ln_k.d_dT[i];
  }
  BubbleGradient result;
  result.dT_dx = Vec<double>(n);
  result.dy_dx = Matrix<double>(n);
  for (int j = 0; j < n; ++j) {
    double change = point.k[j];
    for (int i = 0; i < n; ++i) {
      change += point.y[i] * ln_k.d_dx(i, j);
    }
    result.dT_dx[j] = -change / slope;
    for (int i = 0; i < n; ++i) {
      result.dy_dx(i, j) = point.y[i] * (ln_k.d_dx(i, j) + ln_k.d_dT[i] * result.dT_dx[j]);
    }
    result.dy_dx(j, j) += point.k[j];
  }
  return result;
}

}  // namespace stillshed
