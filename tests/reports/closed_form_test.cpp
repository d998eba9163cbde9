/// Every closed-form problem through the front door: case file in, JSON out.
/// Source of the expected values: tests/reference/closed_form_cases.json (derived in closed form, kind "identity").
#include <gtest/gtest.h>

#include <cmath>
#include <set>

#include "tests/support/front_door.hpp"

namespace stillshed::test {
namespace {

/// Pairs every expected root with exactly one found root on the same face, within tolerance; nothing may be left over.
void expect_same_roots(const Json& found, const Json& expected, double x_tolerance, double t_tolerance_K) {
  EXPECT_EQ(found.size(), expected.size());
  std::set<std::size_t> used;
  for (const Json& root : expected) {
    bool matched = false;
    for (std::size_t k = 0; k < found.size() && !matched; ++k) {
      const Json& candidate = found[k];
      if (used.count(k) != 0 || candidate.at("components") != root.at("components") ||
          composition_difference(candidate.at("mole_fractions"), root.at("mole_fractions")) > x_tolerance) {
        continue;
      }
      matched = true;
      used.insert(k);
      if (!root.at("temperature_K").is_null()) {
        EXPECT_NEAR(candidate.at("temperature_K").get<double>(), root.at("temperature_K").get<double>(), t_tolerance_K);
      }
      for (const char* key : {"node", "boiling"}) {
        if (root.contains(key)) {
          EXPECT_EQ(candidate.at(key), root.at(key)) << root.dump();
        }
      }
    }
    EXPECT_TRUE(matched) << "not found: " << root.dump();
  }
}

class ClosedForm : public testing::TestWithParam<Json> {};

TEST_P(ClosedForm, SurveyMatches) {
  const Json& problem = GetParam();
  const Json& expected = problem.at("expected");
  const RunResult run = run_case("survey", problem.at("case"));
  ASSERT_FALSE(run.result.is_null()) << run.err;
  const double x_tolerance = problem.at("tolerance").at("x").get<double>();
  const double t_tolerance_K = problem.at("tolerance").at("T_K").get<double>();
  expect_same_roots(run.result.at("azeotropes"), expected.at("azeotropes"), x_tolerance, t_tolerance_K);
  if (expected.contains("rejected_roots")) {
    expect_same_roots(run.result.at("rejected_roots"), expected.at("rejected_roots"), x_tolerance, t_tolerance_K);
  }
  if (expected.contains("nodes")) {
    for (const Json& component : run.result.at("components")) {
      EXPECT_EQ(component.at("node"), expected.at("nodes").at(component.at("id").get<std::string>()));
    }
  }
  if (expected.contains("exit")) {
    EXPECT_EQ(run.exit, expected.at("exit").get<int>());
  }
  const Json& proof = run.result.at("proof");
  if (expected.contains("proof")) {
    const std::string state = expected.at("proof");
    if (state == "complete") {
      EXPECT_EQ(proof.at("status"), "complete");
    }
    for (const Json& face : proof.at("faces")) {
      const bool small = face.at("components").size() <= (run.result.at("components").size() <= 6 ? 5U : 4U);
      if (state == "degenerate") {
        EXPECT_EQ(face.at("status"), "degenerate");
      } else if (small) {
        EXPECT_EQ(face.at("status"), "complete") << face.at("components").dump();
      } else {
        EXPECT_EQ(face.at("status"), "not-run");
      }
    }
  }
  if (expected.contains("index_rule")) {
    EXPECT_TRUE(run.result.at("index_rule").at("holds").is_null());
  } else if (expected.contains("index_sum")) {
    EXPECT_EQ(run.result.at("index_rule").at("holds"), true);
    EXPECT_EQ(proof.at("faces").back().at("index").at("sum"), expected.at("index_sum"));
  }
}

std::vector<Json> closed_form_cases() {
  const Json cases = reference_cases("closed_form_cases.json");
  return {cases.begin(), cases.end()};
}

INSTANTIATE_TEST_SUITE_P(Cases, ClosedForm, testing::ValuesIn(closed_form_cases()),
                         [](const auto& test_info) { return test_name(test_info.param.at("id")); });

/// n equal components with A_ij = 1.2, Tb = 350 K, H = 4000 K: one azeotrope at the barycentre of every face, with
/// 1/T_k = 1/350 + 0.6 (k-1)/(4000 k). Derived here (closed form).
void expect_every_barycentre(int n) {
  Json problem = {{"stillshed_case", 1}, {"title", "symmetric"}, {"pressure", "1 atm"}};
  Json rows = Json::array();
  for (int i = 0; i < n; ++i) {
    const std::string id = "c" + std::to_string(i + 1);
    problem["components"].push_back(
        {{"id", id},
         {"molar_mass_g_mol", 60},
         {"vapour_pressure", {{"form", "clausius-clapeyron"}, {"boiling_point_K", 350.0}, {"H_K", 4000.0}}}});
    problem["stream"][id] = "1 mol";
    Json row = Json::array();
    for (int j = 0; j < n; ++j) {
      row.push_back(i == j ? 0.0 : 1.2);
    }
    rows.push_back(row);
  }
  problem["model"] = {{"kind", "margules"}, {"A", rows}};
  const RunResult run = run_case("survey", problem);
  ASSERT_FALSE(run.result.is_null()) << run.err;
  const Json& azeotropes = run.result.at("azeotropes");
  ASSERT_EQ(azeotropes.size(), (std::size_t{1} << n) - static_cast<std::size_t>(n) - 1);
  std::set<std::string> faces;
  for (const Json& azeotrope : azeotropes) {
    const double k = static_cast<double>(azeotrope.at("components").size());
    faces.insert(azeotrope.at("components").dump());
    EXPECT_NEAR(azeotrope.at("temperature_K").get<double>(), 1.0 / (1.0 / 350.0 + 0.6 * (k - 1.0) / (4000.0 * k)),
                1e-6);
    for (const auto& [id, x] : azeotrope.at("mole_fractions").items()) {
      EXPECT_TRUE(std::abs(x.get<double>() - 1.0 / k) < 1e-9 || x == 0.0) << id;
    }
    EXPECT_EQ(azeotrope.at("node"), static_cast<int>(k) == n ? "unstable-node" : "saddle");
  }
  EXPECT_EQ(faces.size(), azeotropes.size());
  EXPECT_EQ(run.result.at("index_rule").at("holds"), true);
}

TEST(SymmetricMixture, EightComponents) {
  expect_every_barycentre(8);
}
TEST(SymmetricMixture, TenComponents) {
  expect_every_barycentre(10);
}
TEST(SymmetricMixture, TwelveComponents) {
  expect_every_barycentre(12);
}

}  // namespace
}  // namespace stillshed::test
