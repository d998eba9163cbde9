#include "engine/survey.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <atomic>
#include <cmath>
#include <thread>

#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::margules_mixture;
using testing::simple_mixture;
using testing::square_matrix;
using testing::symmetric_mixture;

std::vector<const Azeotrope*> of_size(const Survey& survey, int members) {
  std::vector<const Azeotrope*> result;
  for (const Azeotrope& azeotrope : survey.azeotropes) {
    if (azeotrope.point.members.size() == members) {
      result.push_back(&azeotrope);
    }
  }
  return result;
}

const Azeotrope* find(const Survey& survey, const Composition& x, double tolerance) {
  for (const Azeotrope& azeotrope : survey.azeotropes) {
    double largest = 0.0;
    for (int i = 0; i < x.size(); ++i) {
      largest = std::max(largest, std::abs(azeotrope.point.x[i] - x[i]));
    }
    if (largest <= tolerance) {
      return &azeotrope;
    }
  }
  return nullptr;
}

/// NRTL without temperature dependence, one alpha.
Mixture nrtl(const std::vector<double>& boiling_K, const std::vector<std::vector<double>>& a, double alpha) {
  NrtlParameters parameters(static_cast<int>(boiling_K.size()));
  parameters.tau.a = square_matrix(a);
  for (int i = 0; i < parameters.alpha.size(); ++i) {
    for (int j = 0; j < parameters.alpha.size(); ++j) {
      parameters.alpha(i, j) = i == j ? 0.0 : alpha;
    }
  }
  return simple_mixture(boiling_K, Nrtl(parameters));
}

void expect_point(const Survey& survey, const Composition& x, double temperature_K, NodeType node, double tolerance,
                  double tolerance_K) {
  const Azeotrope* azeotrope = find(survey, x, tolerance);
  ASSERT_NE(azeotrope, nullptr) << "nothing at " << x[0] << " " << x[1];
  EXPECT_NEAR(azeotrope->point.temperature_K, temperature_K, tolerance_K);
  EXPECT_EQ(azeotrope->point.node, node);
  EXPECT_TRUE(azeotrope->proved);
  for (int i = 0; i < x.size(); ++i) {
    EXPECT_LE(azeotrope->box.lower[i], azeotrope->point.x[i]);
    EXPECT_GE(azeotrope->box.upper[i], azeotrope->point.x[i]);
  }
}

/// One azeotrope at the barycentre of every face: 1/T = 1/350 + 0.6 (k - 1)/(4000 k).
class SymmetricTest : public ::testing::TestWithParam<int> {};

TEST_P(SymmetricTest, every_face_has_its_barycentre) {
  const int n = GetParam();
  const Survey result = survey(symmetric_mixture(n, 1.2), kAtmosphere_Pa);
  ASSERT_EQ(result.azeotropes.size(), (std::size_t{1} << static_cast<unsigned>(n)) - static_cast<std::size_t>(n) - 1);
  for (const Azeotrope& azeotrope : result.azeotropes) {
    const int k = azeotrope.point.members.size();
    EXPECT_NEAR(azeotrope.point.temperature_K, 1.0 / (1.0 / 350.0 + 0.6 * (k - 1) / (4000.0 * k)), 1e-9);
    for (const int i : azeotrope.point.members) {
      EXPECT_NEAR(azeotrope.point.x[i], 1.0 / k, 1e-10);
    }
    EXPECT_EQ(azeotrope.boiling, Boiling::minimum);
    EXPECT_EQ(azeotrope.point.node, k == n ? NodeType::unstable_node : NodeType::saddle);
  }
  EXPECT_EQ(result.index_rule_holds, std::optional<bool>(true));
  EXPECT_EQ(result.status, n <= 5 ? Status::complete : Status::not_run);
  EXPECT_TRUE(result.rejected.empty());
}

INSTANTIATE_TEST_SUITE_P(Sizes, SymmetricTest, ::testing::Values(2, 3, 4, 5, 8));

TEST(Survey, rows_of_the_parameters_follow_the_components) {
  const Survey result =
      survey(margules_mixture({330.0, 355.0, 365.0}, {{0.0, 0.3, 1.4}, {0.3, 0.0, 1.2}, {1.4, 1.2, 0.0}},
                              {3700.0, 4800.0, 4900.0}),
             kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  ASSERT_EQ(result.azeotropes.size(), 1U);
  EXPECT_EQ(result.azeotropes[0].point.id, "az1(B,C)");
  expect_point(result, {0.0, 0.65877923, 0.34122077}, 351.369195, NodeType::saddle, 1e-6, 1e-4);
  EXPECT_EQ(result.pure[0].node, NodeType::unstable_node);
  EXPECT_EQ(result.pure[1].node, NodeType::stable_node);
  EXPECT_EQ(result.pure[2].node, NodeType::stable_node);
}

TEST(Survey, maximum_and_minimum_in_one_binary) {
  const Survey result = survey(nrtl({350.0, 350.0}, {{0.0, 1.6}, {-0.9, 0.0}}, 0.47), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  ASSERT_EQ(result.azeotropes.size(), 2U);
  expect_point(result, {0.3132492401, 0.6867507599}, 350.693605, NodeType::stable_node, 1e-6, 1e-4);
  expect_point(result, {0.8709783335, 0.1290216665}, 349.617362, NodeType::unstable_node, 1e-6, 1e-4);
  EXPECT_EQ(result.faces.back().index_sum, std::optional<int>(0));
  EXPECT_EQ(result.azeotropes[0].boiling, Boiling::minimum);
  EXPECT_EQ(result.azeotropes[1].boiling, Boiling::maximum);
}

TEST(Survey, azeotrope_at_three_parts_per_million) {
  const Survey result = survey(nrtl({350.0, 350.0}, {{0.0, -1.0}, {1.6, 0.0}}, 0.47), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  ASSERT_EQ(result.azeotropes.size(), 2U);
  expect_point(result, {3.481334914e-06, 1.0 - 3.481334914e-06}, 350.0, NodeType::unstable_node, 3e-9, 1e-4);
  expect_point(result, {0.5747732979, 0.4252267021}, 351.629896, NodeType::stable_node, 1e-8, 1e-4);
}

TEST(Survey, three_ternary_azeotropes_close_together) {
  const Survey result =
      survey(nrtl({356.682, 350.057, 350.0}, {{0.0, 0.84, -0.03}, {0.06, 0.0, 0.18}, {0.84, -0.07, 0.0}}, 0.47),
             kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  ASSERT_EQ(of_size(result, 3).size(), 3U);
  ASSERT_EQ(of_size(result, 2).size(), 3U);
  expect_point(result, {0.3213282761, 0.3689241918, 0.309747532}, 347.478264, NodeType::saddle, 1e-5, 1e-4);
  expect_point(result, {0.3110999325, 0.2929043699, 0.3959956976}, 347.478226, NodeType::unstable_node, 1e-5, 1e-4);
  expect_point(result, {0.3091976699, 0.2738068773, 0.4169954528}, 347.478227, NodeType::saddle, 1e-5, 1e-4);
  EXPECT_EQ(result.faces.back().index_sum, std::optional<int>(2));
}

TEST(Survey, azeotrope_at_one_part_per_million_and_just_outside) {
  const auto of = [](double boiling_B_K) {
    return survey(margules_mixture({350.0, boiling_B_K}, {{0.0, 0.5}, {0.5, 0.0}}), kAtmosphere_Pa);
  };
  const Survey inside = of(366.013038404);
  EXPECT_EQ(inside.status, Status::complete);
  ASSERT_EQ(inside.azeotropes.size(), 1U);
  expect_point(inside, {0.999999, 1e-6}, 350.0, NodeType::unstable_node, 1e-9, 1e-6);
  const Survey outside = of(366.0131053868);
  EXPECT_EQ(outside.status, Status::complete);
  EXPECT_TRUE(outside.azeotropes.empty());
}

TEST(Survey, ternary_azeotrope_beside_a_binary_one) {
  const std::vector<std::vector<double>> A = {{0.0, 1.2, 0.9}, {1.2, 0.0, 0.8}, {0.9, 0.8, 0.0}};
  const std::vector<double> H = {3900.0, 4300.0, 4700.0};
  const Survey inside =
      survey(margules_mixture({352.578936679376, 355.349520682744, 359.734301159183}, A, H), kAtmosphere_Pa);
  EXPECT_EQ(inside.status, Status::complete);
  EXPECT_EQ(inside.azeotropes.size(), 4U);
  expect_point(inside, {0.55, 0.44999, 1e-5}, 345.0, NodeType::unstable_node, 2e-8, 1e-6);
  expect_point(inside, {0.55000458, 0.44999542, 0.0}, 345.0, NodeType::saddle, 2e-8, 1e-6);
  EXPECT_EQ(inside.index_rule_holds, std::optional<bool>(true));
  const Survey outside =
      survey(margules_mixture({352.579252240652, 355.349165355957, 359.734849082246}, A, H), kAtmosphere_Pa);
  EXPECT_EQ(outside.status, Status::complete);
  EXPECT_EQ(outside.azeotropes.size(), 3U);
  expect_point(outside, {0.54999542, 0.45000458, 0.0}, 345.0, NodeType::unstable_node, 2e-8, 1e-6);
}

TEST(Survey, quaternary_azeotrope_beside_a_ternary_one) {
  const Survey result =
      survey(margules_mixture({349.6619257895, 349.7342051935, 347.8525532324, 352.782064499},
                              {{0.0, 1.2, 0.9, 0.6}, {1.2, 0.0, 0.8, 1.0}, {0.9, 0.8, 0.0, 0.7}, {0.6, 1.0, 0.7, 0.0}},
                              {3900.0, 4300.0, 4700.0, 4100.0}),
             kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  EXPECT_EQ(result.azeotropes.size(), 11U);
  expect_point(result, {0.4, 0.35, 0.2499, 1e-4}, 340.0, NodeType::unstable_node, 1e-7, 1e-5);
  expect_point(result, {0.40005133, 0.35001521, 0.24993346, 0.0}, 340.0, NodeType::saddle, 1e-7, 1e-5);
  EXPECT_EQ(result.index_rule_holds, std::optional<bool>(true));
}

TEST(Survey, azeotrope_vanishes_with_pressure) {
  // x_A at which ln gamma_A - ln gamma_B = 0.9 (1 - 2 x_A) cancels the difference of vapour pressures.
  const Mixture mixture = margules_mixture({351.4, 373.15}, {{0.0, 0.9}, {0.9, 0.0}}, {4700.0, 5000.0});
  EXPECT_TRUE(survey(mixture, 0.32 * kAtmosphere_Pa).azeotropes.empty());
  EXPECT_EQ(survey(mixture, 0.32 * kAtmosphere_Pa).status, Status::complete);
  const std::vector<std::array<double, 3>> expected = {{0.35, 0.9979844566296514, 325.82555179043493},
                                                       {1.0, 0.9608056197087118, 351.3636795785367},
                                                       {10.0, 0.8795675313772549, 423.97575181631595}};
  for (const auto& [pressure_atm, x_A, temperature_K] : expected) {
    const Survey result = survey(mixture, pressure_atm * kAtmosphere_Pa);
    EXPECT_EQ(result.status, Status::complete);
    ASSERT_EQ(result.azeotropes.size(), 1U);
    EXPECT_NEAR(result.azeotropes[0].point.x[0], x_A, 1e-9);
    EXPECT_NEAR(result.azeotropes[0].point.temperature_K, temperature_K, 1e-6);
  }
}

TEST(Survey, twins_are_one_degenerate_record) {
  const Survey result = survey(margules_mixture({350.0, 350.0}, {{0.0, 0.0}, {0.0, 0.0}}), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::degenerate);
  ASSERT_EQ(result.azeotropes.size(), 1U);
  EXPECT_TRUE(result.azeotropes[0].cluster);
  EXPECT_FALSE(result.azeotropes[0].proved);
  EXPECT_EQ(result.azeotropes[0].point.node, NodeType::degenerate);
  EXPECT_EQ(result.azeotropes[0].box.lower[0], 0.0);
  EXPECT_EQ(result.azeotropes[0].box.upper[0], 1.0);
  EXPECT_LT(result.boxes, 20'000);
  EXPECT_FALSE(result.index_rule_holds.has_value());
}

TEST(Survey, twins_beside_a_third_component) {
  // A and B cannot be told apart; with C each forms an azeotrope, so a whole line of ternary roots exists.
  const Survey result = survey(
      margules_mixture({350.0, 350.0, 352.0}, {{0.0, 0.0, 1.0}, {0.0, 0.0, 1.0}, {1.0, 1.0, 0.0}}), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::degenerate);
  EXPECT_LT(result.boxes, 200'000);
  EXPECT_EQ(of_size(result, 3).size(), 1U);
  EXPECT_TRUE(of_size(result, 3)[0]->cluster);
  for (const Azeotrope* binary : of_size(result, 2)) {
    EXPECT_EQ(binary->cluster, binary->point.members == (Members{0, 1}));
  }
}

TEST(Survey, tangent_azeotrope_is_one_degenerate_record) {
  // Redlich-Kister with ln gamma_1 - ln gamma_2 = -0.6 (d - 0.2)^2: a double root at x_1 = 0.6.
  // c_0 + c_1 d gives -c_0 d + c_1 (1 - 3 d^2)/2.
  const double c_1 = 0.4;
  const double c_0 = -0.24;
  const double at = 0.5 * c_1 - 0.6 * 0.04 * -1.0;  // value at d = 0 minus that of the parabola
  const double boiling_K = 1.0 / (1.0 / 350.0 - at / 4000.0);
  const Mixture mixture = simple_mixture({boiling_K, 350.0}, RedlichKister(2, {{0, 1, {c_0, c_1}}}));
  const Survey result = survey(mixture, kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::degenerate);
  ASSERT_EQ(result.azeotropes.size(), 1U);
  EXPECT_TRUE(result.azeotropes[0].cluster);
  EXPECT_NEAR(result.azeotropes[0].point.x[0], 0.6, 1e-6);
  EXPECT_LE(result.azeotropes[0].box.lower[0], 0.6);
  EXPECT_GE(result.azeotropes[0].box.upper[0], 0.6);
  EXPECT_EQ(result.azeotropes[0].point.node, NodeType::degenerate);
  EXPECT_LT(result.boxes, 5'000);
}

TEST(Survey, root_exactly_on_a_vertex_is_degenerate) {
  // ln gamma of B at infinite dilution is exactly what its vapour pressure lacks, to rounding: K_B = 1 at pure A.
  const double boiling_B_K = 1.0 / (1.0 / 350.0 - 0.5 / 4000.0);
  const Survey result = survey(margules_mixture({350.0, boiling_B_K}, {{0.0, 0.5}, {0.5, 0.0}}), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::degenerate);
  ASSERT_EQ(result.azeotropes.size(), 1U);
  EXPECT_TRUE(result.azeotropes[0].cluster);
  EXPECT_LT(result.azeotropes[0].box.upper[1], 1e-6);
  EXPECT_EQ(result.pure[0].node, NodeType::degenerate);
}

TEST(Survey, unstable_liquid_is_rejected_and_the_index_rule_left_open) {
  const Survey result = survey(symmetric_mixture(3, 3.2), kAtmosphere_Pa);
  EXPECT_TRUE(result.azeotropes.empty());
  EXPECT_EQ(result.rejected.size(), 4U);
  EXPECT_TRUE(result.splits());
  for (const RejectedRoot& root : result.rejected) {
    EXPECT_EQ(root.stability.outcome, Stability::unstable);
    EXPECT_LT(root.stability.tpd_min, 0.0);
  }
  for (const FaceProof& face : result.faces) {
    EXPECT_EQ(face.status, Status::complete);
    EXPECT_FALSE(face.index_holds.has_value());
    EXPECT_EQ(face.note, "phase-split");
  }
  EXPECT_FALSE(result.index_rule_holds.has_value());
}

TEST(Survey, zeotropic_mixture_is_proved_empty) {
  const Survey result = survey(simple_mixture({340.0, 350.0, 360.0, 370.0}, Ideal(4)), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  EXPECT_TRUE(result.azeotropes.empty());
  EXPECT_EQ(result.faces.size(), 11U);
  EXPECT_EQ(result.index_rule_holds, std::optional<bool>(true));
}

TEST(Survey, one_component_has_nothing_to_prove) {
  const Survey result = survey(simple_mixture({340.0}, Ideal(1)), kAtmosphere_Pa);
  EXPECT_EQ(result.status, Status::complete);
  EXPECT_EQ(result.pure.size(), 1U);
  EXPECT_TRUE(result.faces.empty());
}

void expect_same(const Survey& a, const Survey& b) {
  EXPECT_EQ(a.boxes, b.boxes);
  ASSERT_EQ(a.azeotropes.size(), b.azeotropes.size());
  for (std::size_t k = 0; k < a.azeotropes.size(); ++k) {
    EXPECT_EQ(a.azeotropes[k].point.id, b.azeotropes[k].point.id);
    EXPECT_EQ(a.azeotropes[k].point.x, b.azeotropes[k].point.x);
    EXPECT_EQ(a.azeotropes[k].point.temperature_K, b.azeotropes[k].point.temperature_K);
    EXPECT_EQ(a.azeotropes[k].point.eigenvalues, b.azeotropes[k].point.eigenvalues);
    EXPECT_EQ(a.azeotropes[k].box.lower, b.azeotropes[k].box.lower);
  }
  ASSERT_EQ(a.faces.size(), b.faces.size());
  for (std::size_t k = 0; k < a.faces.size(); ++k) {
    EXPECT_EQ(a.faces[k].boxes, b.faces[k].boxes);
    EXPECT_EQ(a.faces[k].t_lower_K, b.faces[k].t_lower_K);
  }
}

TEST(Survey, threads_change_nothing) {
  testing::Random random(7);
  const Mixture mixture = testing::random_nrtl(random, 4);
  SurveyOptions options;
  const Survey serial = survey(mixture, kAtmosphere_Pa, options);
  options.executor = [](std::size_t count, const std::function<void(std::size_t)>& body) {
    std::atomic<std::size_t> next{0};
    std::vector<std::thread> threads;
    for (int k = 0; k < 3; ++k) {
      threads.emplace_back([&] {
        for (std::size_t i = next++; i < count; i = next++) {
          body(i);
        }
      });
    }
    for (std::thread& thread : threads) {
      thread.join();
    }
  };
  expect_same(serial, survey(mixture, kAtmosphere_Pa, options));
}

TEST(Survey, budget_leaves_the_rest_undecided) {
  testing::Random random(3);
  const Mixture mixture = testing::random_nrtl(random, 4);
  SurveyOptions options;
  options.max_boxes = 5;
  const Survey result = survey(mixture, kAtmosphere_Pa, options);
  EXPECT_EQ(result.status, Status::undecided);
  EXPECT_EQ(result.faces.back().status, Status::undecided);
  EXPECT_FALSE(result.faces.back().undecided.empty());
  EXPECT_LE(result.faces.back().boxes, 5);
  // What was located is reported all the same.
  EXPECT_EQ(result.azeotropes.size() + result.rejected.size(),
            survey(mixture, kAtmosphere_Pa).azeotropes.size() + survey(mixture, kAtmosphere_Pa).rejected.size());
}

TEST(Survey, stop_is_obeyed) {
  std::stop_source source;
  SurveyOptions options;
  options.stop = source.get_token();
  int calls = 0;
  options.progress = [&](const Progress& progress) {
    ++calls;
    EXPECT_GT(progress.done, 0);
    source.request_stop();
  };
  const Survey result = survey(symmetric_mixture(4, 1.2), kAtmosphere_Pa, options);
  EXPECT_EQ(result.status, Status::stopped);
  EXPECT_GE(calls, 1);
  EXPECT_EQ(result.azeotropes.size(), 6U) << "the binaries were done before the stop";
  EXPECT_EQ(result.faces.back().status, Status::stopped);
}

TEST(Survey, larger_faces_than_asked_for_are_searched_only) {
  SurveyOptions options;
  options.prove_up_to = 2;
  const Survey result = survey(symmetric_mixture(3, 1.2), kAtmosphere_Pa, options);
  EXPECT_EQ(result.status, Status::not_run);
  EXPECT_EQ(result.faces.back().status, Status::not_run);
  ASSERT_EQ(result.azeotropes.size(), 4U);
  EXPECT_EQ(of_size(result, 3)[0]->proved, false);
  EXPECT_EQ(of_size(result, 2)[0]->proved, true);
}

TEST(Survey, options_are_checked) {
  SurveyOptions options;
  EXPECT_TRUE(options.problems().empty());
  options.prove_up_to = 13;
  options.max_boxes = 0;
  options.cluster_width = 0.1;
  EXPECT_EQ(options.problems().size(), 3U);
  EXPECT_THROW(static_cast<void>(survey(symmetric_mixture(2, 1.0), kAtmosphere_Pa, options)), LogicError);
}

TEST(Survey, fixed_points_by_temperature) {
  const Survey result = survey(symmetric_mixture(3, 1.2), kAtmosphere_Pa);
  const std::vector<FixedPoint> points = result.fixed_points();
  ASSERT_EQ(points.size(), 7U);
  EXPECT_TRUE(std::is_sorted(points.begin(), points.end(), [](const FixedPoint& a, const FixedPoint& b) {
    return a.temperature_K < b.temperature_K;
  }));
  EXPECT_EQ(points[0].members.size(), 3);
}

}  // namespace
}  // namespace stillshed
