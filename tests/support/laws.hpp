/// Laws that every activity model obeys, whatever its parameters. One call per model:
///     expect_activity_laws(model, {.name = "nrtl", .t_low_K = 280, .t_high_K = 420});
#pragma once

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <random>
#include <string>

#include "models/derivatives.hpp"
#include "models/interval.hpp"
#include "models/scalar.hpp"

namespace stillshed::laws {

struct LawOptions {
  std::string name;
  double t_low_K = 280.0;
  double t_high_K = 420.0;
  unsigned seed = 20240611;
  int points = 300;  ///< ten times as many when STILLSHED_FULL=1
};

inline int scaled(int count) {
  const char* full = std::getenv("STILLSHED_FULL");
  return full != nullptr && std::string(full) == "1" ? 10 * count : count;
}

inline double uniform(std::mt19937_64& random, double low, double high) {
  return std::uniform_real_distribution<double>(low, high)(random);
}

/// Uniform on the simplex; every third point has one zero (a face), every seventh only one component (a corner).
inline Composition random_composition(std::mt19937_64& random, int n, int draw = 1) {
  Composition x(n);
  double total = 0.0;
  const int skipped = draw % 3 == 0 ? static_cast<int>(random() % static_cast<unsigned>(n)) : -1;
  const int only = draw % 7 == 0 ? static_cast<int>(random() % static_cast<unsigned>(n)) : -1;
  for (int i = 0; i < n; ++i) {
    x[i] = (i == skipped && n > 1) || (only >= 0 && i != only) ? 0.0 : -std::log(uniform(random, 1e-12, 1.0));
    total += x[i];
  }
  if (!(total > 0.0)) {
    x[0] = total = 1.0;
  }
  for (double& value : x) {
    value /= total;
  }
  return x;
}

/// A box around x inside [0, 1]^n.
struct CompositionBox {
  Vec<Interval> x;
  Interval T;
};
inline CompositionBox box_around(const Composition& x, double T, double half_width, double half_width_K) {
  CompositionBox box;
  for (const double value : x) {
    box.x.push_back(Interval(std::max(0.0, value - half_width), std::min(1.0, value + half_width)));
  }
  box.T = Interval(T - half_width_K, T + half_width_K);
  return box;
}

/// A point of the simplex inside the box, on the way from its centre to a random composition.
inline Composition point_in(const CompositionBox& box, const Composition& centre, std::mt19937_64& random, int draw) {
  const Composition target = random_composition(random, centre.size(), draw);
  double share = 1.0;
  for (int i = 0; i < centre.size(); ++i) {
    const double step = target[i] - centre[i];
    if (step > 0.0) {
      share = std::min(share, (box.x[i].upper() - centre[i]) / step);
    } else if (step < 0.0) {
      share = std::min(share, (box.x[i].lower() - centre[i]) / step);
    }
  }
  share *= draw % 2 == 0 ? 1.0 : uniform(random, 0.0, 1.0);
  Composition point(centre.size());
  for (int i = 0; i < centre.size(); ++i) {
    point[i] = std::clamp(centre[i] + share * (target[i] - centre[i]), box.x[i].lower(), box.x[i].upper());
  }
  return point;
}

/// The double result is itself rounded, so it may lie outside an exact enclosure by that much.
inline bool encloses(const Interval& interval, double value, double scale) {
  const double rounding = 2e-13 * (1.0 + std::abs(scale));
  return interval.lower() <= value + rounding && value - rounding <= interval.upper();
}

inline std::string text(const Interval& interval) {
  return "[" + std::to_string(interval.lower()) + ", " + std::to_string(interval.upper()) + "]";
}

template <class Model>
LnGammaGradient<double> analytic(const Model& model, double T, const Composition& x) {
  LnGammaGradient<double> out;
  model.ln_gamma_with_gradient(T, x, out);
  return out;
}

template <class S, class Model>
LnGammaGradient<S> by_jets(const Model& model, const S& T, const Vec<S>& x) {
  return gradient_by_jets(T, x, [&model](const auto& t, const auto& y) { return model.ln_gamma(t, y); });
}

/// sum_i x_i d ln gamma_i = 0 along every direction of the simplex.
template <class Model>
void expect_gibbs_duhem(const Model& model, double T, const Composition& x) {
  const auto g = by_jets<double>(model, T, x);
  const int n = x.size();
  for (int j = 1; j < n; ++j) {
    double sum = 0.0;
    double scale = 1.0;
    for (int i = 0; i < n; ++i) {
      const double slope = g.d_dx(i, j) - g.d_dx(i, 0);
      sum += x[i] * slope;
      scale = std::max(scale, std::abs(x[i] * slope));
    }
    EXPECT_NEAR(sum, 0.0, 1e-12 * scale) << "Gibbs-Duhem, direction " << j;
  }
}

template <class Model>
void expect_pure_components_are_ideal(const Model& model, double T) {
  for (int i = 0; i < model.size(); ++i) {
    Composition x(model.size());
    x[i] = 1.0;
    EXPECT_NEAR(model.ln_gamma(T, x)[i], 0.0, 1e-13) << "pure component " << i;
    const auto g = analytic(model, T, x);
    for (int k = 0; k < model.size(); ++k) {
      EXPECT_TRUE(std::isfinite(g.value[k]) && std::isfinite(g.d_dT[k])) << "corner " << i;
      for (int j = 0; j < model.size(); ++j) {
        EXPECT_TRUE(std::isfinite(g.d_dx(k, j))) << "gradient at corner " << i;
      }
    }
  }
}

/// Renaming the components renames the answer.
template <class Model>
void expect_permutation(const Model& model, double T, const Composition& x, std::mt19937_64& random) {
  Members order;
  for (int i = 0; i < x.size(); ++i) {
    order.push_back(i);
  }
  std::shuffle(order.begin(), order.end(), random);
  Composition renamed;
  for (const int i : order) {
    renamed.push_back(x[i]);
  }
  const auto original = model.ln_gamma(T, x);
  const auto permuted = model.face(order).ln_gamma(T, renamed);
  for (int k = 0; k < order.size(); ++k) {
    EXPECT_NEAR(permuted[k], original[order[k]], 1e-13 * (1.0 + std::abs(original[order[k]]))) << "permutation";
  }
}

/// A component with x = 0 changes nothing for the others.
template <class Model>
void expect_faces(const Model& model, double T, const Composition& x) {
  Members present;
  Composition part;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      present.push_back(i);
      part.push_back(x[i]);
    }
  }
  const auto whole = model.ln_gamma(T, x);
  const auto face = model.face(present).ln_gamma(T, part);
  for (int k = 0; k < present.size(); ++k) {
    EXPECT_NEAR(face[k], whole[present[k]], 1e-13 * (1.0 + std::abs(face[k]))) << "face, component " << present[k];
  }
}

/// Jets agree with central differences along the simplex and in T.
template <class Model>
void expect_jets_match_differences(const Model& model, double T, const Composition& x) {
  const int n = x.size();
  const auto g = by_jets<double>(model, T, x);
  const double step = 2e-6;
  for (int j = 1; j < n; ++j) {
    if (x[j] < step || x[0] < step) {
      continue;  // a central difference needs room on both sides; faces are covered by the analytic law
    }
    Composition plus = x;
    Composition minus = x;
    plus[j] += step;
    plus[0] -= step;
    minus[j] -= step;
    minus[0] += step;
    const auto up = model.ln_gamma(T, plus);
    const auto down = model.ln_gamma(T, minus);
    for (int i = 0; i < n; ++i) {
      const double slope = g.d_dx(i, j) - g.d_dx(i, 0);
      EXPECT_NEAR((up[i] - down[i]) / (2.0 * step), slope, 2e-7 * (1.0 + std::abs(slope)) * (1.0 + 1e-3 / x[j] / x[0]))
          << "difference, d ln g_" << i << "/dx_" << j;
    }
  }
  const double step_K = 1e-3 * T;
  const auto up = model.ln_gamma(T + step_K, x);
  const auto down = model.ln_gamma(T - step_K, x);
  for (int i = 0; i < n; ++i) {
    EXPECT_NEAR((up[i] - down[i]) / (2.0 * step_K), g.d_dT[i], 2e-5 * (std::abs(g.d_dT[i]) + 1e-2))
        << "difference, d ln g_" << i << "/dT";
  }
}

/// The analytic gradient is the Jet gradient, on faces and corners too.
template <class Model>
void expect_analytic_matches_jets(const Model& model, double T, const Composition& x) {
  const int n = x.size();
  const auto jets = by_jets<double>(model, T, x);
  const auto exact = analytic(model, T, x);
  for (int i = 0; i < n; ++i) {
    EXPECT_NEAR(exact.value[i], jets.value[i], 1e-13 * (1.0 + std::abs(jets.value[i])));
    EXPECT_NEAR(exact.d_dT[i], jets.d_dT[i], 1e-12 * (1.0 + std::abs(jets.d_dT[i]))) << "d ln g_" << i << "/dT";
    double scale = 1.0;
    for (int j = 0; j < n; ++j) {
      scale = std::max({scale, std::abs(jets.d_dx(i, j)), std::abs(exact.d_dx(i, j))});
    }
    for (int j = 1; j < n; ++j) {
      EXPECT_NEAR(exact.d_dx(i, j) - exact.d_dx(i, 0), jets.d_dx(i, j) - jets.d_dx(i, 0), 1e-12 * scale)
          << "d ln g_" << i << "/dx_" << j;
    }
  }
}

/// Intervals hold every sampled double, values and gradients, through the analytic and the Jet path.
template <class Model>
void expect_enclosure(const Model& model, const CompositionBox& box, const Composition& centre,
                      std::mt19937_64& random) {
  const int n = centre.size();
  LnGammaGradient<Interval> exact;
  model.ln_gamma_with_gradient(box.T, box.x, exact);
  const auto plain = model.ln_gamma(box.T, box.x);
  const auto jets = by_jets<Interval>(model, box.T, box.x);
  for (int draw = 0; draw < 12; ++draw) {
    const Composition x = point_in(box, centre, random, draw);
    const double T = draw % 3 == 0   ? box.T.lower()
                     : draw % 3 == 1 ? box.T.upper()
                                     : uniform(random, box.T.lower(), box.T.upper());
    const auto sample = analytic(model, T, x);
    const auto sample_jets = by_jets<double>(model, T, x);
    for (int i = 0; i < n; ++i) {
      EXPECT_TRUE(encloses(plain[i], sample.value[i], sample.value[i])) << "value " << i << text(plain[i]);
      EXPECT_TRUE(encloses(exact.value[i], sample.value[i], sample.value[i])) << "analytic value " << i;
      EXPECT_TRUE(encloses(jets.value[i], sample.value[i], sample.value[i])) << "jet value " << i;
      EXPECT_TRUE(encloses(exact.d_dT[i], sample.d_dT[i], sample.d_dT[i])) << "d/dT " << i << text(exact.d_dT[i]);
      EXPECT_TRUE(encloses(jets.d_dT[i], sample.d_dT[i], sample.d_dT[i])) << "jet d/dT " << i;
      for (int j = 0; j < n; ++j) {
        EXPECT_TRUE(encloses(exact.d_dx(i, j), sample.d_dx(i, j), 10.0 * sample.d_dx(i, j)))
            << "d_dx " << i << j << text(exact.d_dx(i, j)) << sample.d_dx(i, j);
        EXPECT_TRUE(encloses(jets.d_dx(i, j), sample_jets.d_dx(i, j), 10.0 * sample_jets.d_dx(i, j)))
            << "jet d_dx " << i << j << text(jets.d_dx(i, j)) << sample_jets.d_dx(i, j);
      }
    }
  }
}

/// A part of a box has enclosures inside those of the box (up to rounding).
template <class Model>
void expect_sub_boxes(const Model& model, const CompositionBox& box, const CompositionBox& part) {
  LnGammaGradient<Interval> wide;
  LnGammaGradient<Interval> narrow;
  model.ln_gamma_with_gradient(box.T, box.x, wide);
  model.ln_gamma_with_gradient(part.T, part.x, narrow);
  const auto inside = [](const Interval& small, const Interval& large) {
    const double room = 1e-12 * (1.0 + small.magnitude());
    return large.lower() <= small.lower() + room && small.upper() - room <= large.upper();
  };
  for (int i = 0; i < box.x.size(); ++i) {
    EXPECT_TRUE(inside(narrow.value[i], wide.value[i])) << text(narrow.value[i]) << text(wide.value[i]);
    EXPECT_TRUE(inside(narrow.d_dT[i], wide.d_dT[i])) << text(narrow.d_dT[i]) << text(wide.d_dT[i]);
    for (int j = 0; j < box.x.size(); ++j) {
      EXPECT_TRUE(inside(narrow.d_dx(i, j), wide.d_dx(i, j))) << text(narrow.d_dx(i, j)) << text(wide.d_dx(i, j));
    }
  }
}

/// Boxes that say nothing (NaN, wrong order, unbounded) must lead to enclosures that exclude nothing.
template <class Model>
void expect_useless_boxes_exclude_nothing(const Model& model, const LawOptions& options) {
  constexpr double nan = std::numeric_limits<double>::quiet_NaN();
  constexpr double infinity = std::numeric_limits<double>::infinity();
  std::mt19937_64 random(options.seed);
  const int n = model.size();
  for (const Interval& bad : {Interval(nan), Interval(nan, 1.0), Interval(0.3, 0.2), Interval(-infinity, infinity)}) {
    for (int which = 0; which < n; ++which) {
      Vec<Interval> x(n, Interval(0.0, 1.0));
      x[which] = bad;
      LnGammaGradient<Interval> g;
      const Interval T(options.t_low_K, options.t_high_K);
      model.ln_gamma_with_gradient(T, x, g);
      for (int draw = 0; draw < 8; ++draw) {
        const auto sample =
            model.ln_gamma(uniform(random, options.t_low_K, options.t_high_K), random_composition(random, n, draw));
        for (int i = 0; i < n; ++i) {
          EXPECT_TRUE(encloses(g.value[i], sample[i], sample[i])) << "useless box, component " << i;
        }
      }
    }
  }
}

template <class Model>
void expect_activity_laws(const Model& model, const LawOptions& options) {
  SCOPED_TRACE(options.name + ", seed " + std::to_string(options.seed));
  std::mt19937_64 random(options.seed);
  const int n = model.size();
  expect_pure_components_are_ideal(model, 0.5 * (options.t_low_K + options.t_high_K));
  expect_useless_boxes_exclude_nothing(model, options);
  for (int draw = 0; draw < scaled(options.points) && !testing::Test::HasFailure(); ++draw) {
    const double T = uniform(random, options.t_low_K, options.t_high_K);
    const Composition x = random_composition(random, n, draw);
    expect_gibbs_duhem(model, T, x);
    expect_permutation(model, T, x, random);
    expect_faces(model, T, x);
    expect_jets_match_differences(model, T, x);
    expect_analytic_matches_jets(model, T, x);
    const double half_width = std::pow(10.0, uniform(random, -7.0, -0.3));
    const double half_width_K = std::pow(10.0, uniform(random, -6.0, 1.3));
    const CompositionBox box = box_around(x, T, half_width, half_width_K);
    expect_enclosure(model, box, x, random);
    expect_sub_boxes(model, box, box_around(x, T, 0.4 * half_width, 0.4 * half_width_K));
  }
}

}  // namespace stillshed::laws
