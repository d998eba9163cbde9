/// Random and planted mixtures with known azeotropes, for property tests and benchmarks. Everything is seeded, and the
/// numbers are the same with every standard library.
///
/// Components as in simple_mixtures.hpp; the models do not depend on T except in `random_nrtl`.
#pragma once

#include <cstdint>
#include <random>
#include <vector>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed::testing {

class Random {
 public:
  explicit Random(std::uint64_t seed) : engine_(seed) {}
  [[nodiscard]] double uniform(double lower, double upper);
  [[nodiscard]] int below(int count) { return static_cast<int>(uniform(0.0, static_cast<double>(count))); }
  /// Spread evenly over the simplex.
  [[nodiscard]] Composition composition(int size);

 private:
  std::mt19937_64 engine_;
};

/// A composition of the whole mixture and its boiling temperature.
struct KnownRoot {
  Members members;
  Composition x;
  double temperature_K = 0.0;
};

struct KnownCase {
  Mixture mixture;
  std::vector<KnownRoot> roots;  ///< planted, or all there are when `all` is set
  bool all = false;              ///< `roots` is the complete list
};

/// Every root of every face of a two-suffix Margules mixture: one linear system and one quadratic each.
[[nodiscard]] std::vector<KnownRoot> margules_roots(const Matrix<double>& A,
                                                    const std::vector<double>& boiling_points_K,
                                                    const std::vector<double>& H_K);

/// |A| <= largest; no pair splits up to 2. The list of roots is complete.
[[nodiscard]] KnownCase random_margules(Random& random, int size, double largest = 1.9);
/// NRTL with tau = a + b/T; nothing is known about its roots.
[[nodiscard]] Mixture random_nrtl(Random& random, int size);
/// Binary NRTL whose boiling points are chosen so that two or three azeotropes exist; the list is complete.
[[nodiscard]] KnownCase planted_nrtl_binary(Random& random);
/// Ternary NRTL with one planted ternary azeotrope (one in fourteen has further ones).
[[nodiscard]] KnownCase planted_nrtl_ternary(Random& random);
/// Binary Redlich-Kister with `count` planted azeotropes (1 to 3); the list is complete.
[[nodiscard]] KnownCase planted_redlich_kister_binary(Random& random, int count);
/// Ternary Redlich-Kister with `count` planted ternary azeotropes (1 to 3).
[[nodiscard]] KnownCase planted_redlich_kister_ternary(Random& random, int count);
/// Binary with one azeotrope at a fraction of `trace` of either component: 1e-6, say. Negative: just outside, so there
/// is none. The list is complete.
[[nodiscard]] KnownCase near_corner(Random& random, double trace);
/// Ternary Margules with one azeotrope at a fraction of `trace` of the third component; the list is complete.
[[nodiscard]] KnownCase near_edge(Random& random, double trace);

}  // namespace stillshed::testing
