#include "engine/stability.hpp"

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <cmath>
#include <random>
#include <variant>

#include "engine/stability_proof.hpp"
#include "engine/tangent_plane_descent.hpp"

namespace stillshed {
namespace {

using SmallMatrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kMaxComponents, kMaxComponents>;
using SmallVector = Eigen::Matrix<double, Eigen::Dynamic, 1, 0, kMaxComponents, 1>;

constexpr double kSamePlace = 1e-5;  // a stationary point this close to x is x itself

Members present(const Composition& x) {
  Members members;
  for (int i = 0; i < x.size(); ++i) {
    expects(x[i] >= 0.0, "stability: negative mole fraction");
    if (x[i] > 0.0) {
      members.push_back(i);
    }
  }
  return members;
}

Composition in_face(const Composition& x, const Members& members) {
  Composition result(members.size());
  for (int a = 0; a < members.size(); ++a) {
    result[a] = x[members[a]];
  }
  return result;
}

Composition in_mixture(const Composition& x, const Members& members, int size) {
  Composition result(size, 0.0);
  for (int a = 0; a < members.size(); ++a) {
    result[members[a]] = x[a];
  }
  return result;
}

/// The reference liquid within its face: no component is absent.
struct Reference {
  Composition x;
  Vec<double> d;  ///< ln x_i + ln g_i(x)
};

Softness softest_in_face(const Mixture& face, double temperature_K, const Composition& x) {
  const int n = x.size();
  LnGammaGradient<double> model;
  face.ln_gamma_with_gradient(temperature_K, x, model);
  SmallMatrix curvature(n, n);
  SmallVector root(n);
  for (int i = 0; i < n; ++i) {
    root(i) = std::sqrt(x[i]);
  }
  for (int i = 0; i < n; ++i) {
    for (int j = 0; j < n; ++j) {
      curvature(i, j) = root(i) * root(j) * 0.5 * (model.d_dx(i, j) + model.d_dx(j, i));
    }
    curvature(i, i) += 1.0;
  }
  // Along sqrt(x) nothing but the amount of liquid changes: give that direction more curvature than any other.
  const SmallMatrix amount = root * root.transpose() / root.squaredNorm();
  const SmallMatrix outside = SmallMatrix::Identity(n, n) - amount;
  const SmallMatrix projected = outside * curvature * outside + 2.0 * curvature.norm() * amount;
  const Eigen::SelfAdjointEigenSolver<SmallMatrix> solver(projected);
  Softness result;
  result.curvature = solver.eigenvalues()(0);
  result.direction = Composition(n);
  double sum = 0.0;
  for (int i = 0; i < n; ++i) {
    result.direction[i] = root(i) * solver.eigenvectors()(i, 0);
    sum += result.direction[i];
  }
  for (int i = 0; i < n; ++i) {
    result.direction[i] -= sum * x[i];
  }
  return result;
}

/// x moved along `direction` by `share` of the way to the boundary of the simplex.
Composition moved(const Composition& x, const Composition& direction, double sign, double share) {
  double room = 1e300;
  for (int i = 0; i < x.size(); ++i) {
    const double rate = sign * direction[i];
    if (rate < 0.0) {
      room = std::min(room, -x[i] / rate);
    }
  }
  Composition result = x;
  for (int i = 0; i < x.size(); ++i) {
    result[i] = std::max(0.0, x[i] + share * room * sign * direction[i]);
  }
  return normalised(result);
}

/// Pure liquids, both ways along the softest direction, and what the caller gave: enough to find nearly every split.
std::vector<Composition> first_starts(const Reference& reference, const Softness& softness,
                                      const StabilityOptions& options, const Members& members) {
  const int n = reference.x.size();
  std::vector<Composition> starts;
  for (int k = 0; k < n; ++k) {
    Composition pure(n, 0.0);
    pure[k] = 1.0;
    starts.push_back(pure);
  }
  for (const double share : {0.02, 0.5}) {
    starts.push_back(moved(reference.x, softness.direction, 1.0, share));
    starts.push_back(moved(reference.x, softness.direction, -1.0, share));
  }
  for (const Composition& given : options.starts) {
    expects(given.size() > members[members.size() - 1], "stability: a starting point has the wrong size");
    starts.push_back(normalised(in_face(given, members)));
  }
  return starts;
}

/// Midpoints of pairs, the barycentre, the reply of an ideal liquid, far along the softest direction, seeded points.
std::vector<Composition> further_starts(const Reference& reference, const Softness& softness,
                                        const StabilityOptions& options) {
  const int n = reference.x.size();
  std::vector<Composition> starts;
  for (int a = 0; a < n; ++a) {
    for (int b = a + 1; b < n; ++b) {
      Composition middle(n, 0.0);
      middle[a] = 0.5;
      middle[b] = 0.5;
      starts.push_back(middle);
    }
  }
  starts.push_back(Composition(n, 1.0 / n));
  Composition ideal(n);
  for (int i = 0; i < n; ++i) {
    ideal[i] = bounded_exp(reference.d[i]);
  }
  starts.push_back(normalised(ideal));
  starts.push_back(moved(reference.x, softness.direction, 1.0, 0.95));
  starts.push_back(moved(reference.x, softness.direction, -1.0, 0.95));
  std::mt19937_64 random(options.seed);
  const int seeded = n <= 3 ? 3 : 4 * n;
  for (int k = 0; k < seeded; ++k) {
    Composition start(n);
    for (double& value : start) {
      // Cubed exponentials: points near faces and edges as often as in the middle.
      const double u = (static_cast<double>(random() >> 11) + 0.5) * 0x1.0p-53;
      value = -std::log(u) * std::log(u) * std::log(u);
    }
    starts.push_back(normalised(start));
  }
  return starts;
}

/// What the descents found so far.
struct Findings {
  double tpd = 0.0;
  Composition w;           ///< of the lowest tpd; x when that is the trivial solution
  bool conclusive = true;  ///< every start converged, none to a tpd too close to zero away from x
};

void search(const TangentPlaneDescent& descent, const Reference& reference, const std::vector<Composition>& starts,
            Findings& best) {
  for (const Composition& start : starts) {
    const Descent end = descent.run(start);
    double distance = 0.0;
    for (int i = 0; i < end.w.size(); ++i) {
      distance = std::max(distance, std::abs(end.w[i] - reference.x[i]));
    }
    // Negated comparisons also catch NaN.
    const bool trivial = !(distance > kSamePlace) && !(std::abs(end.tpd) > kTpdNoise);
    best.conclusive = best.conclusive && end.converged && (trivial || std::abs(end.tpd) > kTpdNoise);
    if (!trivial && end.tpd < best.tpd) {
      best.tpd = end.tpd;
      best.w = end.w;
    }
  }
}

/// The test of a liquid in which every component is present.
StabilityResult test_face(const Mixture& face, double temperature_K, const Composition& x, const Members& members,
                          const StabilityOptions& options) {
  Reference reference;
  reference.x = x;
  reference.d = face.ln_gamma(temperature_K, x);
  for (int i = 0; i < x.size(); ++i) {
    reference.d[i] += std::log(x[i]);
  }
  const Softness softness = softest_in_face(face, temperature_K, x);
  const TangentPlaneDescent descent(face, temperature_K, reference.d);
  Findings found;
  found.w = x;
  search(descent, reference, first_starts(reference, softness, options, members), found);
  const bool provable = x.size() <= std::min(options.proof_up_to, kMostProvedComponents);
  if (found.tpd >= -kTpdNoise && provable && prove_stable(face, temperature_K, x, options.max_boxes).proved) {
    return {Stability::stable, true, 0.0, x};
  }
  search(descent, reference, further_starts(reference, softness, options), found);
  StabilityResult result{Stability::not_concluded, false, found.tpd, found.w};
  if (found.tpd < -kTpdNoise) {
    result.proved = proves_unstable(face, temperature_K, x, found.w);
    result.outcome = result.proved ? Stability::unstable : Stability::not_concluded;
  } else if (found.conclusive && softness.curvature > kSoftCurvature) {
    result.outcome = Stability::stable;
  }
  return result;
}

}  // namespace

bool never_splits(const Mixture& mixture) {
  const bool convex =
      std::holds_alternative<Ideal>(mixture.activity()) || std::holds_alternative<Wilson>(mixture.activity());
  return convex && !mixture.corrected();
}

StabilityResult test_stability(const Mixture& mixture, double temperature_K, const Composition& x,
                               const StabilityOptions& options) {
  expects(x.size() == mixture.size(), "stability: composition and mixture differ in size");
  const Members members = present(x);
  expects(!members.empty(), "stability: empty liquid");
  const Composition within = normalised(in_face(x, members));
  if (members.size() == 1 || never_splits(mixture)) {
    return {Stability::stable, true, 0.0, in_mixture(within, members, mixture.size())};
  }
  StabilityResult result = members.size() == mixture.size()
                               ? test_face(mixture, temperature_K, within, members, options)
                               : test_face(mixture.face(members), temperature_K, within, members, options);
  result.incipient = in_mixture(result.incipient, members, mixture.size());
  return result;
}

double tangent_plane_distance(const Mixture& mixture, double temperature_K, const Composition& x,
                              const Composition& w) {
  expects(x.size() == mixture.size() && w.size() == mixture.size(),
          "stability: composition and mixture differ in size");
  const Vec<double> at_x = mixture.ln_gamma(temperature_K, x);
  const Vec<double> at_w = mixture.ln_gamma(temperature_K, w);
  double sum = 0.0;
  for (int i = 0; i < w.size(); ++i) {
    sum += w[i] > 0.0 ? w[i] * (std::log(w[i] / x[i]) + at_w[i] - at_x[i]) : 0.0;
  }
  return sum;
}

Softness softest_direction(const Mixture& mixture, double temperature_K, const Composition& x) {
  expects(x.size() == mixture.size(), "stability: composition and mixture differ in size");
  const Members members = present(x);
  Softness result;
  result.direction = Composition(mixture.size(), 0.0);
  if (members.size() < 2) {
    return result;
  }
  const bool whole = members.size() == mixture.size();
  const Softness inside = whole ? softest_in_face(mixture, temperature_K, x)
                                : softest_in_face(mixture.face(members), temperature_K, in_face(x, members));
  return {inside.curvature, in_mixture(inside.direction, members, mixture.size())};
}

}  // namespace stillshed
