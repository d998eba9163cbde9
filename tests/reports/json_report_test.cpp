#include "reports/json_report.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>
#include <functional>
#include <nlohmann/json.hpp>

#include "params/errors.hpp"
#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

using Json = nlohmann::ordered_json;
using ::testing::ElementsAre;
using testing_support::is_valid;
using testing_support::result_schema;

std::vector<std::string> keys(const Json& object) {
  std::vector<std::string> names;
  for (const auto& [key, value] : object.items()) {
    names.push_back(key);
  }
  return names;
}

TEST(JsonReport, IsValidUnderTheSchema) {
  EXPECT_TRUE(is_valid(json_text(sample::ternary()), result_schema()));
  EXPECT_TRUE(is_valid(json_text(sample::binary()), result_schema()));
}

TEST(JsonReport, SchemaRefusesWhatItDoesNotKnow) {
  Json document = Json::parse(json_text(sample::ternary()));
  document["feed"]["surprise"] = 1;
  EXPECT_FALSE(is_valid(document.dump(), result_schema()));
  document["feed"].erase("surprise");
  EXPECT_TRUE(is_valid(document.dump(), result_schema()));
  document["products"][0]["verdict"] = "maybe";
  EXPECT_FALSE(is_valid(document.dump(), result_schema()));
}

TEST(JsonReport, KeyOrderIsTheContract) {
  EXPECT_THAT(keys(Json::parse(json_text(sample::ternary()))),
              ElementsAre("stillshed_result", "status", "input", "seed", "versions", "pressure_Pa", "model",
                          "components", "azeotropes", "measured_only", "rejected_roots", "fixed_points", "proof",
                          "index_rule", "boundaries", "regions", "curves", "feed", "batch", "sequences", "stages",
                          "products", "cautions", "notes", "provenance", "timing"));
}

TEST(JsonReport, OnlyComputedBlocks) {
  Answer answer = sample::ternary();
  answer.chart.reset();
  answer.position.reset();
  answer.reach.reset();
  const Json document = Json::parse(json_text(answer));
  EXPECT_TRUE(document.contains("azeotropes"));
  EXPECT_FALSE(document.contains("boundaries"));
  EXPECT_FALSE(document.contains("feed"));
  EXPECT_FALSE(document.contains("products"));
  EXPECT_TRUE(is_valid(json_text(answer), result_schema()));
  answer.survey.reset();
  EXPECT_FALSE(Json::parse(json_text(answer)).contains("proof"));
  EXPECT_TRUE(is_valid(json_text(answer), result_schema()));
}

TEST(JsonReport, CompositionsFollowTheStreamOrder) {
  Answer answer = sample::binary();
  answer.mixture = Mixture({sample::component("zeta", "", 20.0), sample::component("alpha", "", 60.0)}, Ideal(2));
  const Json document = Json::parse(json_text(answer));
  EXPECT_THAT(keys(document["feed"]["mole_fractions"]), ElementsAre("zeta", "alpha"));
  EXPECT_DOUBLE_EQ(document["feed"]["mole_fractions"]["zeta"].get<double>(), 0.4);
  EXPECT_NEAR(document["feed"]["mass_fractions"]["zeta"].get<double>(), 0.4 * 20.0 / (0.4 * 20.0 + 0.6 * 60.0), 1e-15);
}

TEST(JsonReport, BalancesCanBeRecomputed) {
  const Answer answer = sample::ternary();
  const Json document = Json::parse(json_text(answer));
  double kg = document["batch"][0]["heel"]["kg"].get<double>();
  for (const Json& cut : document["batch"][0]["cuts"]) {
    kg += cut["kg"].get<double>();
  }
  // The cuts written here close in moles, not per component; the mass follows from their compositions.
  const Composition& x = answer.feed;
  const double charge = x[0] * 58.08 + x[1] * 32.04 + x[2] * 18.015;
  const auto mass = [](double a, double b, double c) { return a * 58.08 + b * 32.04 + c * 18.015; };
  const double expected = 0.35 * mass(0.78, 0.22, 0.0) + 0.25 * mass(0.0, 0.99, 0.01) + 0.4 * mass(0.0, 0.0, 1.0);
  EXPECT_NEAR(kg, 4200.0 * 0.98 * expected / charge, 1e-9);
  EXPECT_EQ(document["sequences"][0]["products"]["acetone"]["stream"], "sequences[0].streams[0]");
  EXPECT_NEAR(document["sequences"][0]["products"]["acetone"]["recovery"].get<double>(), 0.35 * 0.78 / 0.31, 1e-12);
}

TEST(JsonReport, EveryNullHasAReason) {
  const Json document = Json::parse(json_text(sample::binary()));
  int nulls = 0;
  const std::function<void(const Json&, const std::string&)> visit = [&](const Json& node, const std::string& path) {
    if (node.is_object()) {
      for (const auto& [key, value] : node.items()) {
        if (value.is_null()) {
          ++nulls;
          ASSERT_TRUE(node.contains("why_null") && node["why_null"].contains(key)) << path << "/" << key;
        }
        visit(value, path + "/" + key);
      }
    } else if (node.is_array()) {
      for (const Json& value : node) {
        visit(value, path + "/[]");
      }
    }
  };
  visit(document, "");
  EXPECT_GT(nulls, 3);
}

TEST(JsonReport, RefusesNotANumber) {
  Answer answer = sample::ternary();
  answer.survey->azeotropes[0].point.temperature_K = std::nan("");
  EXPECT_THROW((void)json_text(answer), LogicError);
}

TEST(JsonReport, OnlyTimingDiffersBetweenRuns) {
  Answer first = sample::ternary();
  Answer second = sample::ternary();
  second.elapsed_s = 17.0;
  Json one = Json::parse(json_text(first));
  Json two = Json::parse(json_text(second));
  EXPECT_NE(one, two);
  one.erase("timing");
  two.erase("timing");
  EXPECT_EQ(one.dump(), two.dump());
}

TEST(JsonReport, EvidenceOfAnAzeotrope) {
  Answer answer = sample::ternary();
  EXPECT_EQ(Json::parse(json_text(answer))["azeotropes"][0]["evidence"], "M");
  answer.measured[0][0].dT_K = 0.6;
  EXPECT_EQ(Json::parse(json_text(answer))["azeotropes"][0]["evidence"], "P");
}

}  // namespace
}  // namespace stillshed
