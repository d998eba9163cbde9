/// A case as a whole: versions, unknown keys, defaults, everything wrong at once, the schema.
#include "reports/case_reader.hpp"

#include <fstream>
#include <sstream>

#include "tests/reports/input_fixtures.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed::test {
namespace {

using testing_support::is_valid;

const char* const kTank = R"({ "stillshed_case": 1, "title": "Tank",
  "stream": {"acetone": "41 wt%", "methanol": "33 wt%", "water": "24 wt%", "residue": "2 wt%"}, "amount": "4.2 t",
  "pressure": "0.5 barg", "model": "auto",
  "products": {"acetone": [">= 99.5 wt%", "water <= 0.3 wt%", "recovery >= 90 %"]},
  "plant": {"stages": 25, "pressure_window": ["0.1 bar", "4 bar"], "coolant": "25 degC", "heating": "150 degC", "decanter": "30"},
  "declared": ["EU"] })";

TEST(CaseReader, ReadsEveryBlock) {
  const Case input = case_from(kTank);
  EXPECT_EQ(input.title, "Tank");
  ASSERT_EQ(input.stream.size(), 3U);
  EXPECT_EQ(input.stream[0].id, "acetone");
  EXPECT_EQ(input.stream[2].given_amount, "24 wt%");
  EXPECT_NEAR(input.residue_mass_fraction, 0.02, 1e-12);
  EXPECT_EQ(input.amount_kg, 4200.0);
  EXPECT_EQ(input.pressure_Pa, 151325.0);
  EXPECT_EQ(input.given_pressure, "0.5 barg");
  EXPECT_EQ(input.model, "auto");
  ASSERT_EQ(input.products.size(), 1U);
  EXPECT_EQ(input.products[0].tests.size(), 3U);
  EXPECT_EQ(input.plant.stages, 25);
  EXPECT_EQ(input.plant.pressure_low_Pa, 1e4);
  EXPECT_EQ(input.plant.coolant_K, 298.15);
  EXPECT_EQ(input.plant.decanter_K, 303.15);
  EXPECT_EQ(input.declared, std::vector<std::string>{"EU"});
  EXPECT_NE(input.echo_json.find("\"residue\":\"2 wt%\""), std::string::npos);
}

TEST(CaseReader, DefaultsAreNoted) {
  const Case input = case_from(with_stream(R"({"acetone": "50 wt%", "water": "50 wt%"})"));
  EXPECT_EQ(input.pressure_Pa, 101325.0);
  EXPECT_TRUE(any_contains(input.notes, "1 atm"));
  ASSERT_EQ(input.products.size(), 2U);
  EXPECT_TRUE(input.products[1].default_tests);
  EXPECT_EQ(input.products[1].tests[0].component, 1);
}

TEST(CaseReader, AllProblemsAtOnce) {
  const auto problems = problems_of(R"({"stillshed_case": 2, "titel": "x",
    "stream": {"acetone": "50", "warter": "50 wt%"}, "pressure": "1 furlong", "model": "nrtl",
    "products": {"acetone": ["99.5 wt%"]}, "plant": {"stages": 0, "coolant": "5 bar"}, "declared": ["gossip"]})");
  EXPECT_TRUE(tells(problems, "/stillshed_case", "1, the version"));
  EXPECT_TRUE(tells(problems, "/titel", "did you mean \"title\""));
  EXPECT_TRUE(tells(problems, "/stream/acetone", "without a unit"));
  EXPECT_TRUE(tells(problems, "/stream/warter", "nearest: water"));
  EXPECT_TRUE(tells(problems, "/pressure", "furlong"));
  EXPECT_TRUE(tells(problems, "/model", "no nrtl records are on file"));
  EXPECT_TRUE(tells(problems, "/products/acetone", "which side"));
  EXPECT_TRUE(tells(problems, "/plant/stages", "whole number"));
  EXPECT_TRUE(tells(problems, "/plant/coolant", "degC"));
  EXPECT_TRUE(tells(problems, "/declared/0", "azides"));
}

TEST(CaseReader, OnlyOurObjects) {
  for (const char* text : {"[]", "3", "{}", R"({"stillshed_case": 1})", R"({"stillshed_case": 1, "stream": []})",
                           R"({"stillshed_case": 1, "stream": {}})",
                           R"({"stillshed_case": "1", "stream": {"acetone": "1 kg", "water": "1 kg"}})",
                           R"({"stillshed_case": 1, "stream": {"acetone": 41, "water": 59}})"}) {
    EXPECT_FALSE(problems_of(text).empty()) << text;
  }
}

TEST(CaseReader, TotalInMolesIsOfWhatBoils) {
  const Case input = case_from(
      with_stream(R"({"acetone": "50 mol%", "water": "50 mol%", "residue": "10 wt%"})", R"(, "amount": "2 kmol")"));
  EXPECT_NEAR(*input.amount_kg, (58.08 + 18.015) / 0.9, 0.01);
}

TEST(CaseReader, ModelNames) {
  const std::string stream = R"({"acetone": "50 wt%", "water": "50 wt%"})";
  for (const char* model : {"auto", "unifac", "unifac-dortmund", "ideal"}) {
    EXPECT_EQ(case_from(with_stream(stream, R"(, "model": ")" + std::string(model) + "\"")).model, model);
  }
  EXPECT_TRUE(tells(problems_of(with_stream(stream, R"(, "model": "unifacc")")), "/model", "did you mean \"unifac\""));
}

/// The schema accepts what the reader accepts, and refuses the plain mistakes that a schema can see.
TEST(CaseReader, TheSchemaAgrees) {
  const std::string schema = STILLSHED_TEST_DATA "/../reports/schema/case.schema.json";
  EXPECT_TRUE(is_valid(kTank, schema));
  EXPECT_FALSE(is_valid(with_stream(R"({"acetone": "50 wt%", "water": "50 wt%"})", R"(, "titel": "x")"), schema));
  EXPECT_FALSE(is_valid(with_stream(R"({"acetone": 50, "water": 50})"), schema));
  for (const char* name : {"closed_form_cases.json", "adversarial_cases.json"}) {
    std::ifstream in(std::string(STILLSHED_TEST_DATA) + "/reference/" + name);
    const OrderedJson cases = OrderedJson::parse(in).at("cases");
    std::string all;
    for (const OrderedJson& problem : cases) {
      if (problem.contains("case")) {
        EXPECT_TRUE(problems_of(problem.at("case").dump()).empty()) << problem.at("id");
        if (all.empty() || problem.at("id") == "ADV-04-nrtl-double") {
          all = problem.at("case").dump();
          EXPECT_TRUE(is_valid(all, schema)) << problem.at("id");
        }
      }
    }
  }
}

}  // namespace
}  // namespace stillshed::test
