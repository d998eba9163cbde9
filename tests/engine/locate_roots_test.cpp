#include "engine/locate_roots.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

TEST(LocateRoots, finds_the_planted_root_to_rounding) {
  for (int k = 0; k < 40; ++k) {
    testing::Random random(static_cast<std::uint64_t>(500 + k));
    const testing::KnownCase known = testing::planted_nrtl_ternary(random);
    const FaceSystem system(known.mixture, kAtmosphere_Pa);
    LocateOptions options;
    options.spread = 60;
    const std::vector<LocatedRoot> roots = locate_roots(system, options);
    const LocatedRoot planted{known.roots[0].x, known.roots[0].temperature_K};
    const auto found =
        std::find_if(roots.begin(), roots.end(), [&](const LocatedRoot& r) { return same_root(r, planted); });
    ASSERT_NE(found, roots.end()) << k;
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(found->x[i], planted.x[i], 1e-10);
    }
    EXPECT_NEAR(found->temperature_K, 345.0, 1e-8);
  }
}

TEST(LocateRoots, reaches_a_root_at_one_part_per_million_from_afar) {
  testing::Random random(4);
  const testing::KnownCase known = testing::near_corner(random, 1e-6);
  const FaceSystem system(known.mixture, kAtmosphere_Pa);
  const std::vector<LocatedRoot> roots = locate_roots(system);
  ASSERT_EQ(roots.size(), 1U);
  EXPECT_NEAR(std::min(roots[0].x[0], roots[0].x[1]), 1e-6, 1e-12);
}

TEST(LocateRoots, root_just_outside_is_not_reported) {
  testing::Random random(5);
  const testing::KnownCase known = testing::near_corner(random, -1e-6);
  EXPECT_TRUE(locate_roots(FaceSystem(known.mixture, kAtmosphere_Pa)).empty());
}

TEST(LocateRoots, same_answer_every_time_and_sorted) {
  testing::Random random(6);
  const testing::KnownCase known = testing::planted_redlich_kister_ternary(random, 3);
  const FaceSystem system(known.mixture, kAtmosphere_Pa);
  const std::vector<LocatedRoot> first = locate_roots(system);
  const std::vector<LocatedRoot> second = locate_roots(system);
  ASSERT_EQ(first.size(), second.size());
  for (std::size_t k = 0; k < first.size(); ++k) {
    EXPECT_EQ(first[k].x, second[k].x);
  }
  EXPECT_TRUE(std::is_sorted(first.begin(), first.end(), [](const LocatedRoot& a, const LocatedRoot& b) {
    return a.temperature_K < b.temperature_K;
  }));
}

TEST(LocateRoots, traces_tell_roots_apart) {
  EXPECT_FALSE(same_root({{1e-6, 1.0 - 1e-6}, 350.0}, {{2e-6, 1.0 - 2e-6}, 350.0}));
  EXPECT_FALSE(same_root({{0.3, 0.7}, 350.0}, {{0.30001, 0.69999}, 350.0}));
  EXPECT_TRUE(same_root({{0.3, 0.7}, 350.0}, {{0.3 + 1e-9, 0.7 - 1e-9}, 350.0}));
}

TEST(LocateRoots, starting_temperature_solves_the_bubble_equation_nearly) {
  testing::Random random(8);
  const Mixture mixture = testing::random_nrtl(random, 3);
  const FaceSystem system(mixture, kAtmosphere_Pa);
  const Composition x = random.composition(3);
  const double T = start_temperature(system, x);
  const Vec<double> ln_k = mixture.ln_k(T, x, std::log(kAtmosphere_Pa));
  EXPECT_NEAR(x[0] * ln_k[0] + x[1] * ln_k[1] + x[2] * ln_k[2], 0.0, 1e-3);
}

TEST(LocateRoots, sequence_covers_the_simplex_evenly) {
  // Each third of the triangle next to a vertex gets its share, and no point repeats.
  std::array<int, 3> near{};
  for (std::uint64_t k = 0; k < 900; ++k) {
    const Composition x = simplex_sequence(3, k, 1);
    EXPECT_NEAR(x[0] + x[1] + x[2], 1.0, 1e-14);
    EXPECT_GT(*std::min_element(x.begin(), x.end()), 0.0);
    ++near[static_cast<std::size_t>(std::max_element(x.begin(), x.end()) - x.begin())];
  }
  for (const int count : near) {
    EXPECT_NEAR(count, 300, 30);
  }
  EXPECT_FALSE(simplex_sequence(3, 0, 1) == simplex_sequence(3, 0, 2));
}

}  // namespace
}  // namespace stillshed
