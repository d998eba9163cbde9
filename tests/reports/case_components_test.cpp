/// Components defined outright.
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

std::string two_components(const std::string& pressure, const std::string& more = "") {
  return R"({"stillshed_case": 1, "components": [{"id": "A", "molar_mass_g_mol": 60, "vapour_pressure": )" + pressure +
         more +
         R"(}, {"id": "B", "molar_mass_g_mol": 90, "vapour_pressure": {"form": "clausius-clapeyron", "boiling_point_K": 360, "H_K": 4000}}],
         "stream": {"A": "1 mol", "B": "1 mol"}, "model": "ideal"})";
}

double boiling_K(const Case& input) {
  return input.user_components[0]->pressure.boiling_point_K(101325.0);
}

TEST(CaseComponents, ClausiusClapeyron) {
  const Case input =
      case_from(two_components(R"({"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000})"));
  EXPECT_NEAR(boiling_K(input), 350.0, 1e-9);
  EXPECT_EQ(input.user_components[0]->molar_mass_g_mol, 60.0);
  EXPECT_EQ(input.stream[0].id, "A");
  // ln(P/101325) = H (1/Tb - 1/T)
  EXPECT_NEAR(input.user_components[0]->pressure.ln_psat(340.0),
              std::log(101325.0) + 4000.0 * (1.0 / 350.0 - 1.0 / 340.0), 1e-12);
}

/// The same curve as on file, typed in by hand.
TEST(CaseComponents, OtherFormsReadTheirCoefficients) {
  for (const char* id : {"acetone", "water", "2-propanol"}) {
    for (const PressureSet& set : catalog().by_id(id)->pressure_sets) {
      static const std::map<PressureForm, std::vector<std::string>> keys = {
          {PressureForm::antoine_log10, {"A", "B", "C"}},
          {PressureForm::wagner_25, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
          {PressureForm::wagner_36, {"a", "b", "c", "d", "Tc_K", "Pc_Pa"}},
          {PressureForm::wagner_water, {"a1", "a2", "a3", "a4", "a5", "a6", "Tc_K", "Pc_Pa"}},
          {PressureForm::perry_101, {"C1", "C2", "C3", "C4", "C5"}}};
      std::string text = R"({"form": ")" + std::string(to_string(set.form)) + "\"";
      for (std::size_t k = 0; k < keys.at(set.form).size(); ++k) {
        std::ostringstream number;
        number.precision(17);
        number << set.coefficients[k];
        text += ", \"" + keys.at(set.form)[k] + "\": " + number.str();
      }
      text += ", \"t_min_K\": " + std::to_string(*set.t_min_K) + ", \"t_max_K\": " + std::to_string(*set.t_max_K) + "}";
      const Case input = case_from(two_components(text));
      EXPECT_NEAR(boiling_K(input), PressureCurve(set).boiling_point_K(101325.0), 1e-6) << set.id;
    }
  }
}

TEST(CaseComponents, WhatIsWrongIsSaidAtItsPlace) {
  const std::string place = "/components/0/vapour_pressure";
  EXPECT_TRUE(tells(problems_of(two_components(R"({"form": "antoine"})")), place + "/form", "antoine-log10"));
  EXPECT_TRUE(tells(problems_of(two_components(R"({"form": "clausius-clapeyron", "boiling_point_K": 350})")),
                    place + "/H_K", "nothing"));
  EXPECT_TRUE(
      tells(problems_of(two_components(R"({"form": "clausius-clapeyron", "boiling_point_K": -1, "H_K": 4000})")),
            place + "/boiling_point_K", "above zero"));
  EXPECT_TRUE(tells(problems_of(two_components(R"({"form": "antoine-log10", "A": 9, "B": 1200, "C": -50})")),
                    place + "/t_min_K", "range"));
  EXPECT_TRUE(tells(problems_of(two_components(
                        R"({"form": "antoine-log10", "A": 9, "B": -1200, "C": -50, "t_min_K": 280, "t_max_K": 380})")),
                    place, ""));  // falls with temperature
  EXPECT_TRUE(tells(
      problems_of(two_components(R"({"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000, "X": 1})")),
      place + "/X", "unknown key"));
  EXPECT_TRUE(tells(problems_of(two_components(R"({"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000})",
                                               R"(, "density": 1)")),
                    "/components/0/density", "unknown key"));
}

TEST(CaseComponents, DuplicatesReservedNamesAndForeignModels) {
  const std::string own =
      R"({"id": "A", "molar_mass_g_mol": 60, "vapour_pressure": {"form": "clausius-clapeyron", "boiling_point_K": 350, "H_K": 4000}})";
  EXPECT_TRUE(tells(problems_of(R"({"stillshed_case": 1, "components": [)" + own + ", " + own +
                                R"(], "stream": {"A": "1 mol"}, "model": "ideal"})"),
                    "/components/1", "each component once"));
  std::string residue = own;
  residue.replace(residue.find("\"A\""), 3, "\"residue\"");
  EXPECT_TRUE(tells(problems_of(R"({"stillshed_case": 1, "components": [)" + residue +
                                R"(], "stream": {"A": "1 mol"}, "model": "ideal"})"),
                    "/components/0/id", "reserved"));
  EXPECT_TRUE(tells(problems_of(R"({"stillshed_case": 1, "components": [)" + own +
                                R"(, "water"], "stream": {"A": "1 mol", "water": "1 mol"}})"),
                    "/model", "groups"));
}

}  // namespace
}  // namespace stillshed::test
