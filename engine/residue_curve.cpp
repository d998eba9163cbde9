#include "engine/residue_curve.hpp"

#include <algorithm>
#include <array>
#include <boost/numeric/odeint/stepper/controlled_runge_kutta.hpp>
#include <boost/numeric/odeint/stepper/generation.hpp>
#include <boost/numeric/odeint/stepper/runge_kutta_dopri5.hpp>
#include <cmath>

#include "engine/bubble_point.hpp"
#include "engine/geometry.hpp"
#include "engine/index_rule.hpp"

namespace stillshed {
namespace {

using State = std::array<double, kMaxComponents>;

Composition to_composition(const State& state, int n) {
  Composition x(n);
  double sum = 0.0;
  for (int i = 0; i < n; ++i) {
    x[i] = std::max(0.0, state[static_cast<std::size_t>(i)]);
    sum += x[i];
  }
  for (double& value : x) {
    value /= sum;
  }
  return x;
}

State to_state(const Composition& x) {
  State state{};
  for (int i = 0; i < x.size(); ++i) {
    state[static_cast<std::size_t>(i)] = x[i];
  }
  return state;
}

/// x - y(x) with the sign of the direction; keeps the last temperature as the next guess.
struct Field {
  const Mixture& mixture;
  double pressure_Pa;
  double sign;
  double* temperature_K;
  bool* failed;

  void operator()(const State& state, State& derivative, double /*xi*/) const {
    const int n = mixture.size();
    const Composition x = to_composition(state, n);
    const BubblePoint point = bubble_point(mixture, x, pressure_Pa, *temperature_K);
    derivative.fill(0.0);
    if (point.status != Status::complete) {
      *failed = true;
      return;
    }
    *temperature_K = point.temperature_K;
    for (int i = 0; i < n; ++i) {
      derivative[static_cast<std::size_t>(i)] = sign * (x[i] - point.y[i]);
    }
  }
};

/// Fixed points that can end a curve of this face in this direction.
std::vector<int> possible_ends(const std::vector<FixedPoint>& fixed_points, const Composition& start, int direction) {
  Members face;
  for (int i = 0; i < start.size(); ++i) {
    if (start[i] > 0.0) {
      face.push_back(i);
    }
  }
  std::vector<int> ends;
  for (std::size_t k = 0; k < fixed_points.size(); ++k) {
    const FixedPoint& point = fixed_points[k];
    const bool within = std::all_of(point.members.begin(), point.members.end(),
                                    [&](int i) { return std::find(face.begin(), face.end(), i) != face.end(); });
    if (!within) {
      continue;
    }
    const std::vector<double> inside = eigenvalues_inside(point, face);
    // Degenerate directions cannot be trusted to repel.
    if (std::all_of(inside.begin(), inside.end(), [&](double e) { return direction * e < 1e-6; })) {
      ends.push_back(static_cast<int>(k));
    }
  }
  return ends;
}

/// Appends points of the Hermite cubic between two recorded states so that chords stay within `chord`.
void append_refined(const State& x0, const State& d0, const State& x1, const State& d1, double step, double t0,
                    double t1, int n, double chord, Curve& curve) {
  const auto at = [&](double s) {
    State p{};
    const double h00 = (1.0 + 2.0 * s) * (1.0 - s) * (1.0 - s);
    const double h10 = s * (1.0 - s) * (1.0 - s);
    const double h01 = s * s * (3.0 - 2.0 * s);
    const double h11 = s * s * (s - 1.0);
    for (std::size_t i = 0; i < static_cast<std::size_t>(n); ++i) {
      p[i] = h00 * x0[i] + h10 * step * d0[i] + h01 * x1[i] + h11 * step * d1[i];
    }
    return to_composition(p, n);
  };
  const double bend = distance(at(0.5), between(to_composition(x0, n), to_composition(x1, n), 0.5));
  const int pieces = std::clamp(static_cast<int>(std::ceil(std::sqrt(bend / chord))), 1, 64);
  for (int k = 1; k <= pieces; ++k) {
    const double s = static_cast<double>(k) / pieces;
    curve.points.push_back(k == pieces ? to_composition(x1, n) : at(s));
    curve.temperature_K.push_back((1.0 - s) * t0 + s * t1);
  }
}

}  // namespace

Trace trace_curve(const Mixture& mixture, double pressure_Pa, const std::vector<FixedPoint>& fixed_points,
                  const Composition& start, int direction, const TraceOptions& options) {
  namespace odeint = boost::numeric::odeint;
  const int n = mixture.size();
  Trace trace;
  const std::vector<int> ends = possible_ends(fixed_points, start, direction);
  bool failed = false;
  double temperature_K = 0.0;
  const Field field{mixture, pressure_Pa, static_cast<double>(direction), &temperature_K, &failed};
  auto stepper = odeint::make_controlled(options.tolerance, options.tolerance, odeint::runge_kutta_dopri5<State>());
  State x = to_state(start);
  State derivative{};
  field(x, derivative, 0.0);
  trace.curve.points.push_back(start);
  trace.curve.temperature_K.push_back(temperature_K);
  double xi = 0.0;
  double step = 0.01;
  for (int count = 0; count < options.max_steps && !failed; ++count) {
    for (const int k : ends) {
      const FixedPoint& point = fixed_points[static_cast<std::size_t>(k)];
      if (distance(point.x, trace.curve.points.back()) < options.capture) {
        if (distance(point.x, trace.curve.points.back()) > 0.0) {
          trace.curve.points.push_back(point.x);
          trace.curve.temperature_K.push_back(point.temperature_K);
        }
        trace.end = k;
        trace.status = Status::complete;
        return trace;
      }
    }
    const State before = x;
    const State before_derivative = derivative;
    const double before_T = temperature_K;
    const double before_xi = xi;
    while (stepper.try_step(field, x, xi, step) == odeint::fail) {
      if (failed || step < 1e-14) {
        failed = true;
        break;
      }
    }
    if (failed) {
      break;
    }
    x = to_state(to_composition(x, n));
    field(x, derivative, xi);
    // A step may grow without limit in slow regions; long steps are still refined below, but a cap keeps them honest.
    step = std::min(step, 2.0);
    append_refined(before, before_derivative, x, derivative, xi - before_xi, before_T, temperature_K, n, options.chord,
                   trace.curve);
  }
  trace.status = Status::undecided;
  return trace;
}

ResidueCurve residue_curve(const Mixture& mixture, double pressure_Pa, const std::vector<FixedPoint>& fixed_points,
                           const Composition& x) {
  const Trace colder = trace_curve(mixture, pressure_Pa, fixed_points, x, -1);
  const Trace hotter = trace_curve(mixture, pressure_Pa, fixed_points, x, +1);
  ResidueCurve result;
  result.status =
      colder.status == Status::complete && hotter.status == Status::complete ? Status::complete : Status::undecided;
  result.curve.points.assign(colder.curve.points.rbegin(), colder.curve.points.rend());
  result.curve.temperature_K.assign(colder.curve.temperature_K.rbegin(), colder.curve.temperature_K.rend());
  result.through = static_cast<int>(result.curve.points.size()) - 1;
  result.curve.points.insert(result.curve.points.end(), hotter.curve.points.begin() + 1, hotter.curve.points.end());
  result.curve.temperature_K.insert(result.curve.temperature_K.end(), hotter.curve.temperature_K.begin() + 1,
                                    hotter.curve.temperature_K.end());
  result.from = colder.end;
  result.to = hotter.end;
  return result;
}

}  // namespace stillshed
