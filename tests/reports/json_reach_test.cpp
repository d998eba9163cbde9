#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reports/json_report.hpp"
#include "tests/reports/sample_answer.hpp"

namespace stillshed {
namespace {

using Json = nlohmann::ordered_json;

TEST(JsonReach, ReferencesAreIds) {
  const Json document = Json::parse(json_text(sample::ternary()));
  EXPECT_EQ(document["boundaries"][0]["from"], "az1(acetone,methanol)");
  EXPECT_EQ(document["boundaries"][0]["to"], "water");
  EXPECT_EQ(document["regions"][0]["stable_node"], "water");
  EXPECT_EQ(document["feed"]["region"], "r1");
  EXPECT_EQ(document["feed"]["distance"]["boundary"], "b1");
  EXPECT_EQ(document["batch"][0]["cuts"][0]["fixed_point"], "az1(acetone,methanol)");
  EXPECT_EQ(document["feed"]["residue_curve"]["from"], "az1(acetone,methanol)");
}

TEST(JsonReach, DriftingCutHasTwoEndsAndNoFixedPoint) {
  const Json cut = Json::parse(json_text(sample::ternary()))["batch"][0]["cuts"][1];
  EXPECT_TRUE(cut["fixed_point"].is_null());
  EXPECT_TRUE(cut["why_null"].contains("fixed_point"));
  EXPECT_NE(cut["start"], cut["end"]);
  EXPECT_EQ(cut["on"], "b1");
  EXPECT_DOUBLE_EQ(cut["temperature_K"][0].get<double>(), 337.7);
}

TEST(JsonReach, DriftIsWrittenPieceByPiece) {
  Answer answer = sample::ternary();
  Cut& drifting = answer.reach->batch[0].cuts[1];
  drifting.drift = {{drifting.start, 0.25 * drifting.share}, {drifting.end, 0.75 * drifting.share}};
  const Json cuts = Json::parse(json_text(answer))["batch"][0]["cuts"];
  EXPECT_TRUE(cuts[0]["drift"].empty());
  ASSERT_EQ(cuts[1]["drift"].size(), 2U);
  EXPECT_EQ(cuts[1]["drift"][0]["mole_fractions"], cuts[1]["start"]);
  EXPECT_DOUBLE_EQ(cuts[1]["drift"][1]["share_of_charge_mole"].get<double>(), 0.75 * drifting.share);
}

TEST(JsonReach, ColumnsCloseTheirBalance) {
  const Json column = Json::parse(json_text(sample::ternary()))["sequences"][0]["columns"][0];
  EXPECT_NEAR(column["distillate"]["share_of_charge_mole"].get<double>() +
                  column["bottoms"]["share_of_charge_mole"].get<double>(),
              column["feed"]["share_of_charge_mole"].get<double>(), 1e-15);
  EXPECT_EQ(column["split"], "direct");
  EXPECT_EQ(column["fed_by"], "charge");
}

TEST(JsonReach, ProductCarriesItsTests) {
  const Json products = Json::parse(json_text(sample::ternary()))["products"];
  EXPECT_EQ(products[0]["verdict"], "capped");
  EXPECT_EQ(products[0]["tests"][0]["op"], ">=");
  EXPECT_EQ(products[0]["tests"][0]["basis"], "wt");
  EXPECT_EQ(products[0]["tests"][1]["component"], "water");
  EXPECT_EQ(products[0]["reasons"][0], "azeotrope-ceiling");
  EXPECT_EQ(products[2]["verdict"], "no-call");
  EXPECT_TRUE(products[2]["reading"].is_null());
}

TEST(JsonReach, OnABoundaryThereIsNoRegion) {
  Answer answer = sample::ternary();
  answer.position->region.reset();
  answer.position->on_boundary = true;
  const Json feed = Json::parse(json_text(answer))["feed"];
  EXPECT_TRUE(feed["region"].is_null());
  EXPECT_EQ(feed["why_null"]["region"], "on a boundary");
}

}  // namespace
}  // namespace stillshed
