#include "engine/node_type.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "engine/bubble_point.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using testing::symmetric_mixture;

double boiling_K(const Mixture& mixture, const Composition& x) {
  return bubble_point(mixture, x, kAtmosphere_Pa).temperature_K;
}

TEST(NodeType, symmetric_ternary_in_closed_form) {
  // gE = A (x1 x2 + x1 x3 + x2 x3): inside the triangle d(x - y)/dx = A/3 on the simplex, twice; on an edge A/2.
  const Mixture mixture = symmetric_mixture(3, 1.2);
  const Composition middle{1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0};
  const NodeAnalysis ternary = analyse_node(mixture, kAtmosphere_Pa, {0, 1, 2}, middle, boiling_K(mixture, middle));
  EXPECT_EQ(ternary.node, NodeType::unstable_node);
  EXPECT_EQ(ternary.boiling, Boiling::minimum);
  ASSERT_EQ(ternary.eigenvalues.size(), 2U);
  EXPECT_NEAR(ternary.eigenvalues[0], 0.4, 1e-12);
  EXPECT_NEAR(ternary.eigenvalues[1], 0.4, 1e-12);
  EXPECT_FALSE(ternary.complex_pair);

  const Composition edge{0.5, 0.5, 0.0};
  const NodeAnalysis binary = analyse_node(mixture, kAtmosphere_Pa, {0, 1}, edge, boiling_K(mixture, edge));
  EXPECT_EQ(binary.node, NodeType::saddle);
  EXPECT_EQ(binary.boiling, Boiling::minimum);
  ASSERT_EQ(binary.eigenvalues.size(), 2U);
  EXPECT_NEAR(binary.eigenvalues[0], 0.6, 1e-12);
  // ln K_3 = (1.2 - 0.3) - 0.3: the third component has ln gamma = A - A/4, and ln(Psat/P) = -A/4.
  EXPECT_NEAR(binary.eigenvalues[1], 1.0 - std::exp(0.6), 1e-9);

  const NodeAnalysis pure = analyse_node(mixture, kAtmosphere_Pa, {1}, {0.0, 1.0, 0.0}, 350.0);
  EXPECT_EQ(pure.node, NodeType::stable_node);
  EXPECT_EQ(pure.inside, 0);
  EXPECT_NEAR(pure.eigenvalues[0], 1.0 - std::exp(1.2), 1e-9);
}

TEST(NodeType, maximum_azeotrope_is_a_stable_node_of_its_edge) {
  const Mixture mixture = symmetric_mixture(2, -0.8);
  const NodeAnalysis found = analyse_node(mixture, kAtmosphere_Pa, {0, 1}, {0.5, 0.5}, boiling_K(mixture, {0.5, 0.5}));
  EXPECT_EQ(found.node, NodeType::stable_node);
  EXPECT_EQ(found.boiling, Boiling::maximum);
  EXPECT_EQ(found.negative_inside, 1);
  EXPECT_NEAR(found.eigenvalues[0], -0.4, 1e-12);
}

TEST(NodeType, saddle_azeotrope) {
  // Equal boiling points: all (A x)_i are equal. With x1 = x2 = a: a - (1 - 2a) = -2a, so a = 1/5.
  const Mixture mixture =
      margules_mixture({350.0, 350.0, 350.0}, {{0.0, 1.0, -1.0}, {1.0, 0.0, -1.0}, {-1.0, -1.0, 0.0}});
  const Composition x{0.2, 0.2, 0.6};
  const double temperature_K = boiling_K(mixture, x);
  const Vec<double> ln_k = mixture.ln_k(temperature_K, x, std::log(kAtmosphere_Pa));
  for (int i = 0; i < 3; ++i) {
    ASSERT_NEAR(ln_k[i], 0.0, 1e-12);
  }
  const NodeAnalysis found = analyse_node(mixture, kAtmosphere_Pa, {0, 1, 2}, x, temperature_K);
  EXPECT_EQ(found.node, NodeType::saddle);
  EXPECT_EQ(found.boiling, Boiling::saddle);
  EXPECT_EQ(found.negative_inside, 1);
}

TEST(NodeType, inside_eigenvalues_equal_those_of_the_bubble_point_gradient) {
  const Mixture mixture = symmetric_mixture(3, 1.7);
  const Composition x{1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0};
  const BubblePoint point = bubble_point(mixture, x, kAtmosphere_Pa);
  const BubbleGradient gradient = bubble_gradient(mixture, x, kAtmosphere_Pa, point);
  // Symmetric case: exchanging 1 and 2 is an eigenvector, (1, -1, 0).
  const double along = 1.0 - (gradient.dy_dx(0, 0) - gradient.dy_dx(0, 1));
  const NodeAnalysis found = analyse_node(mixture, kAtmosphere_Pa, {0, 1, 2}, x, point.temperature_K);
  EXPECT_NEAR(found.eigenvalues[0], along, 1e-11);
}

TEST(NodeType, twins_and_zero_eigenvalues_are_degenerate) {
  const Mixture twins = symmetric_mixture(2, 0.0);
  const NodeAnalysis inside = analyse_node(twins, kAtmosphere_Pa, {0, 1}, {0.5, 0.5}, 350.0);
  EXPECT_EQ(inside.node, NodeType::degenerate);
  EXPECT_EQ(inside.boiling, Boiling::inflection);
  EXPECT_EQ(analyse_node(twins, kAtmosphere_Pa, {0}, {1.0, 0.0}, 350.0).node, NodeType::degenerate);
  EXPECT_EQ(node_from_eigenvalues({0.5, 0.9 * kZeroEigenvalue}), NodeType::degenerate);
  EXPECT_EQ(node_from_eigenvalues({0.5, -1.1 * kZeroEigenvalue}), NodeType::saddle);
  EXPECT_EQ(node_from_eigenvalues({}), NodeType::degenerate);
  EXPECT_EQ(node_from_eigenvalues({std::nan("")}), NodeType::degenerate);
}

TEST(NodeType, pure_component_is_typed_by_a_volatility_close_to_one) {
  // ln alpha = A (1 - 2 x_1) + H (1/T1 - 1/T2): 1e-6 and 1e-10 at x_1 = 1.
  const auto at_pure = [](double ln_alpha) {
    const double boiling_2 = 1.0 / (1.0 / 350.0 - (0.5 + ln_alpha) / 4000.0);
    const Mixture mixture = margules_mixture({350.0, boiling_2}, {{0.0, 0.5}, {0.5, 0.0}});
    return analyse_node(mixture, kAtmosphere_Pa, {0}, {1.0, 0.0}, 350.0).node;
  };
  EXPECT_EQ(at_pure(1e-6), NodeType::unstable_node);
  EXPECT_EQ(at_pure(-1e-6), NodeType::stable_node);
  EXPECT_EQ(at_pure(1e-10), NodeType::degenerate);
}

TEST(NodeType, azeotrope_next_to_a_corner_is_typed_by_its_small_eigenvalue) {
  // ln(gamma_1/gamma_2) = A (1 - 2 x1) = H (1/T1 - 1/T2): choose T2 so that x2 = 1e-5.
  const double A = 0.9;
  const double x2 = 1e-5;
  const double boiling_2 = 1.0 / (1.0 / 350.0 - A * (1.0 - 2.0 * x2) / 4000.0);
  const Mixture mixture = margules_mixture({350.0, boiling_2}, {{0.0, A}, {A, 0.0}});
  const Composition x{1.0 - x2, x2};
  const NodeAnalysis found = analyse_node(mixture, kAtmosphere_Pa, {0, 1}, x, boiling_K(mixture, x));
  EXPECT_NEAR(found.eigenvalues[0], 2.0 * A * x2 * (1.0 - x2), 1e-12);
  EXPECT_EQ(found.node, NodeType::unstable_node);
}

}  // namespace
}  // namespace stillshed
