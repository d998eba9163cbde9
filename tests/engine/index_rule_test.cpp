#include "engine/index_rule.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(IndexRule, expected_sum_alternates) {
  EXPECT_EQ(index_expected(2), 0);
  EXPECT_EQ(index_expected(3), 2);
  EXPECT_EQ(index_expected(4), 0);
  EXPECT_EQ(index_expected(5), 2);
}

TEST(IndexRule, zeotropic_ternary) {
  // Unstable node, saddle, stable node at the vertices: 2 - 2 + 2.
  EXPECT_EQ(index_sum({{1, {0.5, 0.3}}, {1, {-0.4, 0.6}}, {1, {-0.2, -0.7}}}), std::optional<int>(2));
}

TEST(IndexRule, ternary_with_a_minimum_azeotrope_on_one_edge) {
  // Vertices: two stable nodes and an unstable one; the binary azeotrope is a saddle of weight 4.
  EXPECT_EQ(index_sum({{1, {0.5, 0.3}}, {1, {-0.4, -0.6}}, {1, {-0.2, -0.7}}, {2, {0.1, -0.2}}}),
            std::optional<int>(2));
}

TEST(IndexRule, eigenvalue_without_sign_gives_no_sum) {
  EXPECT_EQ(index_sum({{1, {0.5, 1e-8}}}), std::nullopt);
  EXPECT_EQ(index_sum({{1, {0.5, std::numeric_limits<double>::quiet_NaN()}}}), std::nullopt);
}

TEST(IndexRule, eigenvalues_are_taken_inside_the_face) {
  FixedPoint point;
  point.members = {1, 3};
  point.x = {0.0, 0.4, 0.0, 0.6, 0.0};
  point.eigenvalues = {0.7, -0.1, -0.2, -0.3};  // inside its own edge, then components 0, 2, 4
  EXPECT_EQ(eigenvalues_inside(point, {1, 3}), std::vector<double>({0.7}));
  EXPECT_EQ(eigenvalues_inside(point, {1, 2, 3}), std::vector<double>({0.7, -0.2}));
  EXPECT_EQ(eigenvalues_inside(point, {0, 1, 3, 4}), std::vector<double>({0.7, -0.1, -0.3}));
  EXPECT_EQ(eigenvalues_inside(point, {0, 1, 2, 3, 4}), point.eigenvalues);
}

}  // namespace
}  // namespace stillshed
