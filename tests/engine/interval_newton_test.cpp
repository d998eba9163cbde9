#include "engine/interval_newton.hpp"

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

KnownCase any_case(Random& random) {
  switch (random.below(4)) {
    case 0: return testing::planted_nrtl_ternary(random);
    case 1: return testing::planted_redlich_kister_ternary(random, 1 + random.below(3));
    case 2: return testing::near_corner(random, std::pow(10.0, random.uniform(-6.0, -2.0)));
    default: return testing::random_margules(random, 2 + random.below(4));
  }
}

/// A box of random sides that holds the root, anywhere in it, clipped to the simplex's corners.
SearchBox box_with(const Composition& x, double T, Random& random) {
  SearchBox box{Vec<Interval>(x.size()), Interval(0.0)};
  const double scale = std::pow(10.0, random.uniform(-8.0, 0.0));
  for (int i = 0; i < x.size(); ++i) {
    box.x[i] = Interval(std::max(0.0, x[i] - scale * random.uniform(0.0, 1.0)),
                        std::min(1.0, x[i] + scale * random.uniform(0.0, 1.0)));
  }
  box.T = Interval(T - 30.0 * scale * random.uniform(0.0, 1.0), T + 30.0 * scale * random.uniform(0.0, 1.0));
  return box;
}

/// True when the box still holds the root, up to the accuracy to which the root itself is known.
bool holds(const SearchBox& box, const Composition& x, double T) {
  constexpr double kKnown = 1e-12;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] < box.x[i].lower() - kKnown || x[i] > box.x[i].upper() + kKnown) {
      return false;
    }
  }
  return T >= box.T.lower() - 1e3 * kKnown && T <= box.T.upper() + 1e3 * kKnown;
}

/// All tests of one box; false when a root in it was lost.
bool keeps(const FaceSystem& system, const Composition& x, double T, SearchBox box, double mutation) {
  IntervalNewton newton(system, mutation);
  FaceEnclosure enclosure;
  if (!IntervalNewton::cut_to_simplex(box) || !holds(box, x, T)) {
    return false;
  }
  system.enclose(box, enclosure);
  if (newton.narrow_by_value(enclosure, box) == Narrowing::empty || !holds(box, x, T)) {
    return false;
  }
  newton.set_centre(box);
  newton.set_gradient(enclosure);
  if (newton.narrow_by_mean_value(box) == Narrowing::empty || !holds(box, x, T)) {
    return false;
  }
  return !newton.precondition() || (newton.narrow_by_newton(box) != Narrowing::empty && holds(box, x, T));
}

struct Losses {
  int boxes = 0;
  int lost = 0;
};

Losses attack(double mutation, int cases) {
  Losses losses;
  for (int k = 0; k < cases; ++k) {
    Random random(static_cast<std::uint64_t>(900 + k));
    const KnownCase known = any_case(random);
    for (const KnownRoot& root : known.roots) {
      const FaceSystem system(known.mixture.face(root.members), kAtmosphere_Pa);
      Composition x(root.members.size());
      for (int i = 0; i < x.size(); ++i) {
        x[i] = root.x[root.members[i]];
      }
      for (int box = 0; box < 12; ++box) {
        ++losses.boxes;
        losses.lost += keeps(system, x, root.temperature_K, box_with(x, root.temperature_K, random), mutation) ? 0 : 1;
      }
    }
  }
  return losses;
}

TEST(IntervalNewton, no_test_of_a_box_ever_loses_a_root) {
  const Losses losses = attack(1.0, 250);
  EXPECT_GT(losses.boxes, 5000);
  EXPECT_EQ(losses.lost, 0);
}

TEST(IntervalNewton, a_weakened_bound_is_noticed) {
  // The test above would be worth nothing if it let wrong bounds pass.
  EXPECT_GT(attack(0.5, 250).lost, 0);
  EXPECT_GT(attack(0.0, 250).lost, 50);
}

TEST(IntervalNewton, unbounded_enclosures_narrow_nothing) {
  Random random(1);
  const FaceSystem system(testing::random_nrtl(random, 3), kAtmosphere_Pa);
  SearchBox box{Vec<Interval>(3, Interval(0.1, 0.6)), Interval(340.0, 350.0)};
  const SearchBox before = box;
  IntervalNewton newton(system, 1.0);
  FaceEnclosure enclosure;
  system.enclose(box, enclosure);
  newton.set_centre(box);
  const auto spoil = [&](const Interval& by) {
    FaceEnclosure spoilt = enclosure;
    for (int i = 0; i < 3; ++i) {
      spoilt.ln_gamma.value[i] = by;
      spoilt.ln_gamma.d_dT[i] = by;
      spoilt.p[i] = by;
      spoilt.p_dT[i] = by;
      for (int j = 0; j < 3; ++j) {
        spoilt.ln_gamma.d_dx(i, j) = by;
      }
    }
    return spoilt;
  };
  const double infinity = std::numeric_limits<double>::infinity();
  const Interval nothing_known[] = {Interval::whole(), Interval(std::nan(""), 1.0), Interval(1.0, std::nan("")),
                                    Interval(2.0, 1.0), Interval(-infinity, infinity)};
  for (const Interval& by : nothing_known) {
    const FaceEnclosure spoilt = spoil(by);
    newton.set_gradient(spoilt);
    EXPECT_EQ(newton.narrow_by_value(spoilt, box), Narrowing::unchanged);
    EXPECT_EQ(newton.narrow_by_mean_value(box), Narrowing::unchanged);
    EXPECT_FALSE(newton.precondition());
    EXPECT_TRUE(inside(before, box) && inside(box, before));
  }
}

TEST(IntervalNewton, cut_to_simplex_loses_no_composition) {
  Random random(2);
  for (int k = 0; k < 2000; ++k) {
    const Composition x = random.composition(2 + random.below(5));
    SearchBox box = box_with(x, 350.0, random);
    ASSERT_TRUE(IntervalNewton::cut_to_simplex(box));
    ASSERT_TRUE(holds(box, x, 350.0));
  }
  SearchBox below{Vec<Interval>(2, Interval(0.0, 0.4)), Interval(350.0)};
  EXPECT_FALSE(IntervalNewton::cut_to_simplex(below));
  SearchBox above{Vec<Interval>(2, Interval(0.6, 0.7)), Interval(350.0)};
  EXPECT_FALSE(IntervalNewton::cut_to_simplex(above));
  SearchBox one_sided{{Interval(0.0, 1.0), Interval(0.9, 1.0)}, Interval(350.0)};
  ASSERT_TRUE(IntervalNewton::cut_to_simplex(one_sided));
  EXPECT_NEAR(one_sided.x[0].upper(), 0.1, 1e-15);
}

TEST(IntervalNewton, centre_is_a_composition_of_the_box) {
  Random random(3);
  const FaceSystem system(testing::random_nrtl(random, 4), kAtmosphere_Pa);
  IntervalNewton newton(system, 1.0);
  for (int k = 0; k < 500; ++k) {
    SearchBox box = box_with(random.composition(4), 350.0, random);
    ASSERT_TRUE(IntervalNewton::cut_to_simplex(box));
    newton.set_centre(box);
    Interval sum(0.0);
    for (int i = 0; i < 4; ++i) {
      sum += newton.centre().x[i];
      EXPECT_TRUE(box.x[i].contains(newton.centre().x[i]));
      EXPECT_LT(newton.centre().x[i].width(), 1e-14);
    }
    EXPECT_TRUE(sum.contains(1.0));
    EXPECT_TRUE(box.T.contains(newton.centre().T));
  }
}

TEST(IntervalNewton, small_boxes_around_simple_roots_are_verified) {
  int verified = 0;
  int roots = 0;
  for (int k = 0; k < 40; ++k) {
    Random random(static_cast<std::uint64_t>(40 + k));
    const KnownCase known = testing::random_margules(random, 3);
    for (const KnownRoot& root : known.roots) {
      const FaceSystem system(known.mixture.face(root.members), kAtmosphere_Pa);
      const int n = root.members.size();
      Composition x(n);
      SearchBox box{Vec<Interval>(n), Interval(root.temperature_K - 1e-5, root.temperature_K + 1e-5)};
      int largest = 0;
      for (int i = 0; i < n; ++i) {
        x[i] = root.x[root.members[i]];
        box.x[i] = Interval(x[i] - 1e-8, x[i] + 1e-8);
        largest = x[i] > x[largest] ? i : largest;
      }
      box.x[largest] = Interval(x[largest] - 1e-7, x[largest] + 1e-7);
      IntervalNewton newton(system, 1.0);
      FaceEnclosure enclosure;
      newton.set_centre(box, x, root.temperature_K);
      system.enclose(box, enclosure);
      newton.set_gradient(enclosure);
      ++roots;
      verified += newton.precondition() && newton.regular() && newton.maps_into_itself(box) ? 1 : 0;
    }
  }
  EXPECT_GT(roots, 60);
  EXPECT_EQ(verified, roots);
}

TEST(IntervalNewton, box_without_a_root_is_not_verified) {
  const FaceSystem system(testing::symmetric_mixture(3, 1.2), kAtmosphere_Pa);
  IntervalNewton newton(system, 1.0);
  FaceEnclosure enclosure;
  const Composition beside{0.34, 0.33, 0.33};
  SearchBox box{{Interval(0.339, 0.341), Interval(0.329, 0.331), Interval(0.329, 0.331)}, Interval(338.1, 338.2)};
  newton.set_centre(box, beside, 338.16);
  system.enclose(box, enclosure);
  newton.set_gradient(enclosure);
  ASSERT_TRUE(newton.precondition());
  EXPECT_TRUE(newton.regular());
  EXPECT_FALSE(newton.maps_into_itself(box));
}

TEST(IntervalNewton, two_roots_are_never_called_one) {
  int wrong = 0;
  int pairs = 0;
  for (int k = 0; k < 60; ++k) {
    Random random(static_cast<std::uint64_t>(700 + k));
    const KnownCase known =
        k % 2 == 0 ? testing::planted_redlich_kister_ternary(random, 2) : testing::planted_nrtl_binary(random);
    const FaceSystem system(known.mixture, kAtmosphere_Pa);
    const int n = known.mixture.size();
    for (std::size_t a = 0; a < known.roots.size(); ++a) {
      for (std::size_t b = 0; b < a; ++b) {
        SearchBox box{Vec<Interval>(n),
                      Interval(std::min(known.roots[a].temperature_K, known.roots[b].temperature_K) - 1e-6,
                               std::max(known.roots[a].temperature_K, known.roots[b].temperature_K) + 1e-6)};
        for (int i = 0; i < n; ++i) {
          box.x[i] = Interval(std::min(known.roots[a].x[i], known.roots[b].x[i]) - 1e-9,
                              std::max(known.roots[a].x[i], known.roots[b].x[i]) + 1e-9);
        }
        IntervalNewton newton(system, 1.0);
        FaceEnclosure enclosure;
        newton.set_centre(box);
        system.enclose(box, enclosure);
        newton.set_gradient(enclosure);
        ++pairs;
        wrong += newton.precondition() && newton.regular() ? 1 : 0;
      }
    }
  }
  EXPECT_GE(pairs, 60);
  EXPECT_EQ(wrong, 0);
}

}  // namespace
}  // namespace stillshed
