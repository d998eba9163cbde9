#include "reports/missing_pairs.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

namespace stillshed {
namespace {

Mixture filled(int n) {
  std::vector<MixtureComponent> components;
  Matrix<double> A(n, 0.4);
  for (int i = 0; i < n; ++i) {
    A(i, i) = 0.0;
    MixtureComponent component;
    component.id = std::string(1, static_cast<char>('A' + i));
    component.molar_mass_g_mol = 60.0;
    PressureSet set;
    set.form = PressureForm::clausius_clapeyron;
    set.coefficients = {350.0 + 5.0 * i, 4000.0};
    component.pressure = PressureCurve(set);
    components.push_back(component);
  }
  return Mixture(components, Margules(A));
}

TEST(MissingPairs, EveryCornerAndTheCentreIsReached) {
  const Mixture base = filled(3);
  const std::vector<Mixture> mixtures = bounding_mixtures(base, {{0, 2, "x"}}, 101325.0);
  ASSERT_EQ(mixtures.size(), 5U);
  std::vector<std::pair<double, double>> found;
  for (const Mixture& mixture : mixtures) {
    const double i_in_j = mixture.ln_gamma(355.0, Composition{0.0, 0.0, 1.0})[0];
    const double j_in_i = mixture.ln_gamma(355.0, Composition{1.0, 0.0, 0.0})[2];
    found.emplace_back(i_in_j, j_in_i);
    // Other pairs keep what they have.
    EXPECT_NEAR(mixture.ln_gamma(355.0, Composition{0.0, 1.0, 0.0})[0], 0.4, 1e-12);
  }
  for (const auto& [i, j] : std::vector<std::pair<double, double>>{{-1, -1}, {-1, 3}, {3, -1}, {3, 3}, {1, 1}}) {
    const double wanted_i = i;
    const double wanted_j = j;
    EXPECT_TRUE(std::any_of(found.begin(), found.end(),
                            [&](const auto& point) {
                              return std::abs(point.first - wanted_i) < 1e-9 &&
                                     std::abs(point.second - wanted_j) < 1e-9;
                            }))
        << i << " " << j;
  }
}

TEST(MissingPairs, AllCombinationsOfTwoNoneOfThree) {
  const Mixture base = filled(4);
  EXPECT_EQ(bounding_mixtures(base, {{0, 1, ""}, {2, 3, ""}}, 101325.0).size(), 25U);
  EXPECT_TRUE(bounding_mixtures(base, {{0, 1, ""}, {2, 3, ""}, {0, 2, ""}}, 101325.0).empty());
}

TEST(MissingPairs, WhatAMissingPairDecidesIsForgotten) {
  Survey survey;
  survey.status = Status::complete;
  survey.index_rule_holds = true;
  for (int i = 0; i < 3; ++i) {
    FixedPoint pure;
    pure.members = {i};
    pure.node = NodeType::saddle;
    survey.pure.push_back(pure);
  }
  for (const Members& members : {Members{0, 1}, Members{0, 2}, Members{1, 2}, Members{0, 1, 2}}) {
    FaceProof face;
    face.members = members;
    face.status = Status::complete;
    survey.faces.push_back(face);
    Azeotrope azeotrope;
    azeotrope.point.members = members;
    azeotrope.point.node = NodeType::saddle;
    survey.azeotropes.push_back(azeotrope);
  }
  forget_missing_pairs(survey, {{0, 2, ""}});
  ASSERT_EQ(survey.azeotropes.size(), 2U);
  // Component 2 beside 0, component 0 beside 2: their K is not known there.
  EXPECT_EQ(survey.azeotropes[0].point.node, NodeType::degenerate);
  EXPECT_EQ(survey.azeotropes[1].point.node, NodeType::degenerate);
  EXPECT_EQ(survey.pure[0].node, NodeType::degenerate);
  EXPECT_EQ(survey.pure[1].node, NodeType::saddle);
  EXPECT_EQ(survey.faces[0].status, Status::complete);
  EXPECT_EQ(survey.faces[1].status, Status::not_run);
  EXPECT_EQ(survey.faces[3].note, "missing-pair");
  EXPECT_FALSE(survey.index_rule_holds.has_value());
  EXPECT_EQ(survey.status, Status::undecided);
}

TEST(MissingPairs, AVerdictIsKeptOnlyWhenItIsTheSameEverywhere) {
  const std::vector<Mixture> mixtures = bounding_mixtures(filled(2), {{0, 1, ""}}, 101325.0);
  int calls = 0;
  const auto common = common_verdicts(mixtures, 3, [&](const Mixture&) {
    ++calls;
    return std::vector<Verdict>{Verdict::shut, calls == 3 ? Verdict::open : Verdict::capped, Verdict::no_call};
  });
  EXPECT_EQ(calls, 5);
  EXPECT_EQ(common[0], Verdict::shut);
  EXPECT_FALSE(common[1].has_value());
  EXPECT_FALSE(common[2].has_value());
  EXPECT_FALSE(
      common_verdicts({}, 1, [](const Mixture&) { return std::vector<Verdict>{Verdict::open}; })[0].has_value());
}

}  // namespace
}  // namespace stillshed
