#include "engine/stability_proof.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <cstdlib>
#include <numeric>
#include <random>

#include "engine/stability.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::margules_mixture;
using testing::simple_mixture;
using testing::square_matrix;
using testing::symmetric_mixture;

constexpr double kTemperature_K = 330.0;

TEST(StabilityProof, proves_what_is_stable) {
  EXPECT_TRUE(prove_stable(symmetric_mixture(2, 1.9), kTemperature_K, {0.5, 0.5}, 10000).proved);
  EXPECT_TRUE(prove_stable(symmetric_mixture(3, 2.7), kTemperature_K, {0.3, 0.3, 0.4}, 50000).proved);
  EXPECT_TRUE(prove_stable(symmetric_mixture(4, 2.0), kTemperature_K, {0.25, 0.25, 0.25, 0.25}, 50000).proved);
  // Two liquids elsewhere, this one outside the binodal.
  EXPECT_TRUE(prove_stable(symmetric_mixture(2, 3.0), kTemperature_K, {0.07, 0.93}, 10000).proved);
}

TEST(StabilityProof, never_proves_what_is_not) {
  // Unstable by margins down to 1e-9 RT, at every budget: the search for a proof must not close.
  for (const double A : {2.0001, 2.001, 2.1, 3.0, 5.0}) {
    EXPECT_FALSE(prove_stable(symmetric_mixture(2, A), kTemperature_K, {0.5, 0.5}, 20000).proved) << A;
  }
  for (const double shift : {1e-7, 1e-5, 1e-3, 0.1}) {
    EXPECT_FALSE(prove_stable(symmetric_mixture(3, 4.0 * std::log(2.0) + shift), kTemperature_K,
                              {1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0}, 30000)
                     .proved)
        << shift;
  }
  // Just inside the binodal x = 0.0707201816...: the plane is undercut far away only.
  for (const double shift : {1e-9, 1e-7, 1e-4}) {
    const double x = 0.07072018168028912 + shift;
    EXPECT_FALSE(prove_stable(symmetric_mixture(2, 3.0), kTemperature_K, {x, 1.0 - x}, 20000).proved) << shift;
  }
}

TEST(StabilityProof, closes_near_the_turning_points) {
  EXPECT_TRUE(prove_stable(symmetric_mixture(2, 1.999), kTemperature_K, {0.5, 0.5}, 10000).proved);
  EXPECT_TRUE(prove_stable(symmetric_mixture(3, 4.0 * std::log(2.0) - 1e-5), kTemperature_K,
                           {1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0}, 50000)
                  .proved);
}

TEST(StabilityProof, no_proof_where_a_witness_exists) {
  // Random NRTL liquids of two to four components; where a lower liquid is certain, the proof must not close.
  std::mt19937_64 random(77);
  std::uniform_real_distribution<double> tau(-1.0, 3.5);
  std::uniform_real_distribution<double> share(0.01, 1.0);
  const int cases = std::getenv("STILLSHED_FULL") != nullptr ? 5000 : 200;
  int unstable = 0;
  int proved = 0;
  for (int k = 0; k < cases; ++k) {
    const int n = 2 + k % 3;
    NrtlParameters parameters(n);
    Composition x(n);
    for (int i = 0; i < n; ++i) {
      x[i] = share(random);
      for (int j = 0; j < n; ++j) {
        parameters.tau.a(i, j) = i == j ? 0.0 : tau(random);
        parameters.alpha(i, j) = i == j ? 0.0 : 0.3;
      }
    }
    const double sum = std::accumulate(x.begin(), x.end(), 0.0);
    for (double& value : x) {
      value /= sum;
    }
    const Mixture mixture = simple_mixture(std::vector<double>(static_cast<std::size_t>(n), 350.0), Nrtl(parameters));
    StabilityOptions search_only;
    search_only.proof_up_to = 0;
    const StabilityResult searched = test_stability(mixture, kTemperature_K, x, search_only);
    const bool closed = prove_stable(mixture, kTemperature_K, x, 3000).proved;
    if (searched.outcome == Stability::unstable) {
      ++unstable;
      EXPECT_FALSE(closed) << "case " << k << ", tpd " << searched.tpd_min;
    }
    proved += closed ? 1 : 0;
  }
  EXPECT_GT(unstable, cases / 10);
  EXPECT_GT(proved, cases / 4);
}

TEST(StabilityProof, budget_is_respected) {
  const StabilityProof proof = prove_stable(symmetric_mixture(3, 2.7), kTemperature_K, {0.3, 0.3, 0.4}, 10);
  EXPECT_FALSE(proof.proved);
  EXPECT_LE(proof.boxes, 11);
}

TEST(StabilityProof, compositions_next_to_faces) {
  for (const double trace : {1e-3, 1e-6, 1e-9, 1e-13}) {
    EXPECT_TRUE(prove_stable(symmetric_mixture(3, 1.5), kTemperature_K, {trace, 0.4, 0.6 - trace}, 50000).proved)
        << trace;
    EXPECT_TRUE(prove_stable(symmetric_mixture(2, 3.0), kTemperature_K, {trace, 1.0 - trace}, 50000).proved) << trace;
  }
}

TEST(StabilityProof, temperature_dependent_nrtl) {
  NrtlParameters parameters(3);
  parameters.tau.a = square_matrix({{0.0, 0.6, 0.2}, {-0.7, 0.0, 0.1}, {0.4, 1.0, 0.0}});
  parameters.tau.b_K = square_matrix({{0.0, 100.0, 50.0}, {30.0, 0.0, 100.0}, {60.0, 100.0, 0.0}});
  parameters.alpha = square_matrix({{0.0, 0.3, 0.3}, {0.3, 0.0, 0.3}, {0.3, 0.3, 0.0}});
  const Mixture mixture = simple_mixture({330.0, 340.0, 350.0}, Nrtl(parameters));
  EXPECT_TRUE(prove_stable(mixture, kTemperature_K, {0.3, 0.3, 0.4}, 20000).proved);
}

TEST(StabilityProof, a_witness_of_instability_needs_no_search) {
  const Mixture mixture = symmetric_mixture(2, 3.0);
  EXPECT_TRUE(proves_unstable(mixture, kTemperature_K, {0.5, 0.5}, {0.07, 0.93}));
  EXPECT_FALSE(proves_unstable(mixture, kTemperature_K, {0.5, 0.5}, {0.5, 0.5}));
  EXPECT_FALSE(proves_unstable(mixture, kTemperature_K, {0.05, 0.95}, {0.95, 0.05}));
  EXPECT_FALSE(proves_unstable(mixture, kTemperature_K, {0.5, 0.5}, {0.0, 1.0}));
}

}  // namespace
}  // namespace stillshed
