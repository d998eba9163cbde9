/// Attacks on the proof: planted roots must always lie in a listed or an undecided box, whatever the budget.
#include "engine/face_proof.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::KnownCase;
using testing::KnownRoot;
using testing::Random;

bool holds(const Box& box, const Composition& x, double T) {
  constexpr double kKnown = 1e-12;  // accuracy of the planted numbers
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] < box.lower[i] - kKnown || x[i] > box.upper[i] + kKnown) {
      return false;
    }
  }
  return T >= box.t_lower_K - 1e3 * kKnown && T <= box.t_upper_K + 1e3 * kKnown;
}

/// In how many boxes of a result (roots and undecided) a point lies.
int times_held(const ProofResult& result, const Composition& x, double T) {
  int count = 0;
  for (const CertifiedRoot& root : result.roots) {
    count += holds(root.box, x, T) ? 1 : 0;
  }
  for (const Box& box : result.undecided) {
    count += holds(box, x, T) ? 1 : 0;
  }
  return count;
}

Composition part(const KnownRoot& root) {
  Composition x;
  for (const int i : root.members) {
    x.push_back(root.x[i]);
  }
  return x;
}

FaceSystem system_of(const KnownCase& known, const KnownRoot& root) {
  return {known.mixture.face(root.members), kAtmosphere_Pa};
}

KnownCase any_case(int k) {
  Random random(static_cast<std::uint64_t>(3000 + k));
  const double trace = std::pow(10.0, random.uniform(-6.0, -4.0));
  switch (k % 6) {
    case 0: return testing::planted_nrtl_ternary(random);
    case 1: return testing::planted_redlich_kister_ternary(random, 1 + random.below(3));
    case 2: return testing::planted_nrtl_binary(random);
    case 3: return testing::near_corner(random, trace);
    case 4: return testing::near_edge(random, trace);
    default: return testing::random_margules(random, 3 + random.below(2));
  }
}

TEST(FaceProof, finds_planted_roots_without_being_told) {
  int roots = 0;
  for (int k = 0; k < 120; ++k) {
    const KnownCase known = any_case(k);
    for (const KnownRoot& root : known.roots) {
      const ProofResult result = prove_face(system_of(known, root), {});
      EXPECT_EQ(result.status, Status::complete) << k;
      EXPECT_EQ(times_held(result, part(root), root.temperature_K), 1) << k;
      ++roots;
    }
  }
  EXPECT_GT(roots, 200);
}

TEST(FaceProof, told_or_not_the_answer_is_the_same) {
  for (int k = 0; k < 30; ++k) {
    const KnownCase known = any_case(k);
    for (const KnownRoot& root : known.roots) {
      const FaceSystem system = system_of(known, root);
      const ProofResult untold = prove_face(system, {});
      const ProofResult told = prove_face(system, {{part(root), root.temperature_K}});
      ASSERT_EQ(untold.roots.size(), told.roots.size()) << k;
      for (std::size_t r = 0; r < told.roots.size(); ++r) {
        for (int i = 0; i < part(root).size(); ++i) {
          EXPECT_NEAR(untold.roots[r].x[i], told.roots[r].x[i], 1e-10);
        }
      }
    }
  }
}

TEST(FaceProof, a_spent_budget_loses_no_root) {
  for (int k = 0; k < 60; ++k) {
    const KnownCase known = any_case(k);
    for (const KnownRoot& root : known.roots) {
      const FaceSystem system = system_of(known, root);
      for (const std::int64_t budget : {1, 3, 10, 30}) {
        ProofOptions options;
        options.max_boxes = budget;
        const ProofResult result = prove_face(system, {}, options);
        EXPECT_GE(times_held(result, part(root), root.temperature_K), 1) << k << " budget " << budget;
        EXPECT_LE(result.boxes, budget);
        EXPECT_EQ(result.undecided.empty(), result.status == Status::complete);
      }
    }
  }
}

/// Share of planted roots that a proof with scaled gradient radii loses while it claims completeness.
int lost_with(double mutation, int cases) {
  int lost = 0;
  for (int k = 0; k < cases; ++k) {
    const KnownCase known = any_case(k);
    for (const KnownRoot& root : known.roots) {
      ProofOptions options;
      options.mutation = mutation;
      options.max_boxes = 20'000;
      const ProofResult result = prove_face(system_of(known, root), {}, options);
      lost += times_held(result, part(root), root.temperature_K) == 0 ? 1 : 0;
    }
  }
  return lost;
}

TEST(FaceProof, a_weakened_bound_is_noticed) {
  EXPECT_EQ(lost_with(1.0, 60), 0);
  // Several rules watch each box, so a root survives moderate damage; single tests of a box do not
  // (interval_newton_test.cpp).
  EXPECT_GT(lost_with(0.1, 120), 0);
  EXPECT_GT(lost_with(0.0, 60), 10);
}

/// Binary Redlich-Kister with ln gamma_1 - ln gamma_2 = -0.6 (d - 0.2)^2 + gap, d = x_1 - x_2, by c_0 = -0.24, c_1 =
/// 0.4.
Mixture nearly_tangent(double gap) {
  // f_1 - f_2 at d = 0 is 0.5 c_1 + 4000 (1/Tb_1 - 1/Tb_2), and shall be -0.6 * 0.04 + gap.
  const double at_zero = 0.5 * 0.4 + 0.6 * 0.04 - gap;
  return testing::simple_mixture({1.0 / (1.0 / 350.0 - at_zero / 4000.0), 350.0},
                                 RedlichKister(2, {{0, 1, {-0.24, 0.4}}}));
}

TEST(FaceProof, tangent_and_nearly_tangent_roots) {
  for (const double gap : {0.0, 1e-15, 1e-13, 1e-11, 1e-9, 1e-7, 1e-5, 1e-3}) {
    const FaceSystem system(nearly_tangent(gap), kAtmosphere_Pa);
    const ProofResult result = prove_face(system, {});
    EXPECT_TRUE(result.status == Status::complete || result.status == Status::degenerate) << gap;
    EXPECT_LT(result.boxes, 5'000) << gap;
    const double reach = std::sqrt(gap / 0.6);
    for (const double d : {0.2 - reach, 0.2 + reach}) {
      const double x = 0.5 * (1.0 + d);
      // The rounding of the boiling point alone moves a double root by 1e-8.
      const bool near = std::any_of(result.roots.begin(), result.roots.end(), [&](const CertifiedRoot& root) {
        return root.box.lower[0] - 1e-7 <= x && x <= root.box.upper[0] + 1e-7;
      });
      EXPECT_TRUE(near) << gap;
    }
    if (gap >= 1e-11) {
      EXPECT_EQ(result.status, Status::complete) << gap;
      EXPECT_EQ(result.roots.size(), 2U) << gap;
    } else if (gap <= 1e-15) {
      EXPECT_EQ(result.status, Status::degenerate) << gap;
      EXPECT_EQ(result.roots.size(), 1U) << gap;
      EXPECT_TRUE(result.roots[0].cluster);
      EXPECT_NEAR(result.roots[0].x[0], 0.6, 1e-6);
    }
  }
  for (const double gap : {-1e-11, -1e-9, -1e-6, -1e-3}) {
    const ProofResult result = prove_face(FaceSystem(nearly_tangent(gap), kAtmosphere_Pa), {});
    EXPECT_EQ(result.status, Status::complete) << gap;
    EXPECT_TRUE(result.roots.empty()) << gap;
    EXPECT_LT(result.boxes, 5'000) << gap;
  }
}

TEST(FaceProof, twins_end_in_one_cluster_within_bounds) {
  for (const int n : {2, 3, 4}) {
    const ProofResult result = prove_face(FaceSystem(testing::symmetric_mixture(n, 0.0), kAtmosphere_Pa), {});
    EXPECT_EQ(result.status, Status::degenerate);
    ASSERT_EQ(result.roots.size(), 1U);
    EXPECT_TRUE(result.roots[0].cluster);
    for (int i = 0; i < n; ++i) {
      EXPECT_EQ(result.roots[0].box.lower[i], 0.0);
      EXPECT_EQ(result.roots[0].box.upper[i], 1.0);
    }
    EXPECT_LT(result.boxes, 200'000) << n;
  }
}

TEST(FaceProof, cluster_width_limits_how_deep_it_looks) {
  const FaceSystem system(nearly_tangent(0.0), kAtmosphere_Pa);
  ProofOptions coarse;
  coarse.cluster_width = 1e-4;
  const ProofResult rough = prove_face(system, {}, coarse);
  const ProofResult fine = prove_face(system, {});
  EXPECT_LT(rough.boxes, fine.boxes);
  ASSERT_EQ(rough.roots.size(), 1U);
  EXPECT_GT(rough.roots[0].box.upper[0] - rough.roots[0].box.lower[0],
            fine.roots[0].box.upper[0] - fine.roots[0].box.lower[0]);
}

TEST(FaceProof, certified_boxes_lie_in_the_open_face) {
  for (int k = 0; k < 60; ++k) {
    const KnownCase known = any_case(k);
    for (const KnownRoot& root : known.roots) {
      for (const CertifiedRoot& certified : prove_face(system_of(known, root), {}).roots) {
        EXPECT_GT(*std::min_element(certified.box.lower.begin(), certified.box.lower.end()), 0.0);
        EXPECT_TRUE(holds(certified.box, certified.x, certified.temperature_K));
      }
    }
  }
}

TEST(FaceProof, stop_is_obeyed) {
  std::stop_source source;
  source.request_stop();
  ProofOptions options;
  options.stop = source.get_token();
  const ProofResult result = prove_face(FaceSystem(testing::symmetric_mixture(4, 1.2), kAtmosphere_Pa), {}, options);
  EXPECT_EQ(result.status, Status::stopped);
  EXPECT_FALSE(result.undecided.empty());
}

TEST(FaceProof, bracket_and_boxes_are_reported) {
  const ProofResult result = prove_face(FaceSystem(testing::symmetric_mixture(3, 1.2), kAtmosphere_Pa), {});
  EXPECT_EQ(result.status, Status::complete);
  EXPECT_GT(result.boxes, 0);
  EXPECT_LT(result.t_lower_K, 338.2);
  EXPECT_GT(result.t_upper_K, 338.2);
}

}  // namespace
}  // namespace stillshed
