/// Models with the user's own numbers.
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

std::string with_model(const std::string& model,
                       const std::string& stream = R"({"a": "1 mol", "b": "1 mol", "c": "1 mol"})") {
  std::string components;
  for (const char* id : {"c", "a", "b"}) {
    components +=
        (components.empty() ? "" : ", ") + std::string(R"({"id": ")") + id +
        R"(", "molar_mass_g_mol": 60, "vapour_pressure": {"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000}})";
  }
  return R"({"stillshed_case": 1, "components": [)" + components + R"(], "stream": )" + stream + R"(, "model": )" +
         model + "}";
}

double ln_gamma(const Case& input, int i, const Composition& x) {
  return std::visit([&](const auto& model) { return model.ln_gamma(350.0, x)[i]; }, *input.user_model);
}

TEST(CaseModel, MatricesFollowTheOrderOfComponents) {
  const Case input =
      case_from(with_model(R"({"kind": "margules", "A": [[0, 1.0, 0.2], [1.0, 0, 0.3], [0.2, 0.3, 0]]})"));
  EXPECT_EQ(input.stream[0].id, "c");
  EXPECT_NEAR(ln_gamma(input, 0, {0.0, 1.0, 0.0}), 1.0, 1e-12);  // c at infinite dilution in a
  EXPECT_NEAR(ln_gamma(input, 0, {0.0, 0.0, 1.0}), 0.2, 1e-12);  // c in b
}

TEST(CaseModel, RowsOfAbsentComponentsAreDropped) {
  const Case input = case_from(with_model(R"({"kind": "margules", "A": [[0, 1.0, 0.2], [1.0, 0, 0.3], [0.2, 0.3, 0]]})",
                                          R"({"b": "1 mol", "a": "0 mol", "c": "1 mol"})"));
  ASSERT_EQ(input.stream.size(), 2U);
  EXPECT_EQ(input.stream[1].id, "b");
  EXPECT_NEAR(ln_gamma(input, 0, {0.0, 1.0}), 0.2, 1e-12);
}

TEST(CaseModel, RedlichKisterByIndexAndByName) {
  const Case by_index =
      case_from(with_model(R"({"kind": "redlich-kister", "pairs": [{"i": 1, "j": 2, "c": [0.5, 0.1]}]})"));
  const Case by_name =
      case_from(with_model(R"({"kind": "redlich-kister", "pairs": [{"i": "a", "j": "b", "c": [0.5, 0.1]}]})"));
  EXPECT_NEAR(ln_gamma(by_index, 1, {0.0, 0.0, 1.0}), 0.4, 1e-12);  // c0 - c1
  EXPECT_NEAR(ln_gamma(by_name, 2, {0.0, 1.0, 0.0}), 0.6, 1e-12);   // c0 + c1
}

TEST(CaseModel, NrtlWilsonUniquac) {
  const std::string b = R"("b_K": [[0, 100, 0], [200, 0, 0], [0, 0, 0]])";
  const Case nrtl = case_from(with_model(R"({"kind": "nrtl", )" + b + R"(, "alpha": 0.3})"));
  const double tau01 = 100.0 / 350.0;
  const double tau10 = 200.0 / 350.0;
  EXPECT_NEAR(ln_gamma(nrtl, 0, {0.0, 1.0, 0.0}), tau10 + tau01 * std::exp(-0.3 * tau01), 1e-12);
  const Case wilson = case_from(with_model(R"({"kind": "wilson", )" + b + "}"));
  EXPECT_NEAR(ln_gamma(wilson, 0, {0.0, 1.0, 0.0}), 1.0 - tau01 - std::exp(tau10), 1e-12);
  const Case uniquac = case_from(with_model(R"({"kind": "uniquac", "r": [1, 1, 1], "q": [1, 1, 1], )" + b + "}"));
  EXPECT_NEAR(ln_gamma(uniquac, 0, {0.0, 1.0, 0.0}), 1.0 - tau10 - std::exp(tau01), 1e-12);
}

TEST(CaseModel, WhatIsWrongIsSaidAtItsPlace) {
  EXPECT_TRUE(
      tells(problems_of(with_model(R"({"kind": "margules", "A": [[0, 1], [1, 0]]})")), "/model/A", "3 rows of 3"));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"kind": "margules", "A": [[0, 1, 1], [2, 0, 1], [1, 1, 0]]})")),
                    "/model/A/1/0", "mirror"));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"kind": "margules", "A": [[0, 1, 1], [1, 0, "x"], [1, 1, 0]]})")),
                    "/model/A/1/2", "number"));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"kind": "margules", "a": 1})")), "/model/a", "unknown key"));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"kind": "nrtl", "alpha": 0.3})")), "/model", "no pair parameters"));
  EXPECT_TRUE(
      tells(problems_of(with_model(R"({"kind": "nrtl", "a": [[0,1,1],[1,0,1],[1,1,0]]})")), "/model/alpha", "nothing"));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"kind": "nrtI"})")), "/model/kind", "did you mean \"nrtl\""));
  EXPECT_TRUE(tells(problems_of(with_model(R"({"A": []})")), "/model/kind", "nothing"));
  EXPECT_TRUE(
      tells(problems_of(with_model(
                R"({"kind": "redlich-kister", "pairs": [{"i": 0, "j": 7, "c": [1]}, {"i": "zz", "j": 1, "c": [1]}]})")),
            "/model/pairs/0/j", "from 0 to 2"));
  EXPECT_TRUE(tells(
      problems_of(
          R"({"stillshed_case": 1, "stream": {"acetone": "1 mol", "water": "1 mol"}, "model": {"kind": "margules", "A": [[0, 1], [1, 0]]}})"),
      "/components", "order of the model's matrices"));
}

}  // namespace
}  // namespace stillshed::test
