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

/// One recorded state of the integration.
struct Record {
  State x{};
  State derivative{};
  double xi = 0.0;
  double temperature_K = 0.0;
};

/// The Hermite cubic between two recorded states, s from 0 to 1.
Composition on_cubic(const Record& first, const Record& last, double s, int n) {
  const double step = last.xi - first.xi;
  const double h00 = (1.0 + 2.0 * s) * (1.0 - s) * (1.0 - s);
  const double h10 = s * (1.0 - s) * (1.0 - s);
  const double h01 = s * s * (3.0 - 2.0 * s);
  const double h11 = s * s * (s - 1.0);
  State p{};
  for (std::size_t i = 0; i < static_cast<std::size_t>(n); ++i) {
    p[i] = h00 * first.x[i] + h10 * step * first.derivative[i] + h01 * last.x[i] + h11 * step * last.derivative[i];
  }
  return to_composition(p, n);
}

/// Appends the last record, and before it points of the cubic so that chords stay within `chord`. Their temperatures
/// are solved for: between records they are not linear. False when one of them has no bubble point.
bool append_refined(const Field& field, const Record& first, const Record& last, double chord, Curve& curve) {
  const int n = field.mixture.size();
  const double bend =
      distance(on_cubic(first, last, 0.5, n), between(to_composition(first.x, n), to_composition(last.x, n), 0.5));
  const int pieces = std::clamp(static_cast<int>(std::ceil(std::sqrt(bend / chord))), 1, 64);
  for (int k = 1; k < pieces; ++k) {
    const double s = static_cast<double>(k) / pieces;
    const Composition x = on_cubic(first, last, s, n);
    const double guess_K = (1.0 - s) * first.temperature_K + s * last.temperature_K;
    const BubblePoint point = bubble_point(field.mixture, x, field.pressure_Pa, guess_K);
    if (point.status != Status::complete) {
      return false;
    }
    curve.points.push_back(x);
    curve.temperature_K.push_back(point.temperature_K);
  }
  curve.points.push_back(to_composition(last.x, n));
  curve.temperature_K.push_back(last.temperature_K);
  return true;
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
  Record here;
  here.x = to_state(start);
  field(here.x, here.derivative, 0.0);
  here.temperature_K = temperature_K;
  trace.curve.points.push_back(start);
  trace.curve.temperature_K.push_back(temperature_K);
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
    const Record before = here;
    while (stepper.try_step(field, here.x, here.xi, step) == odeint::fail) {
      if (failed || step < 1e-14) {
        failed = true;
        break;
      }
    }
    if (failed) {
      break;
    }
    here.x = to_state(to_composition(here.x, n));
    field(here.x, here.derivative, here.xi);
    here.temperature_K = temperature_K;
    // A step may grow without limit in slow regions; long steps are still refined below, but a cap keeps them honest.
    step = std::min(step, 2.0);
    failed = failed || !append_refined(field, before, here, options.chord, trace.curve);
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
