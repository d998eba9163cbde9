/// Amounts of a stream: bases, sums, rest, ranges, what does not boil.
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

double mole_fraction(const Case& input, const std::string& id) {
  for (const StreamEntry& entry : input.stream) {
    if (entry.id == id) {
      return entry.mole_fraction;
    }
  }
  return -1.0;
}

// Molar masses 58.080 and 18.015 g/mol: 50/50 wt% is 23.672 mol% acetone.
constexpr double kAcetoneOfHalf = (50.0 / 58.08) / (50.0 / 58.08 + 50.0 / 18.015);

TEST(CaseAmounts, MassPercent) {
  const Case input = case_from(with_stream(R"({"acetone": "50 wt%", "water": "50 wt%"})"));
  EXPECT_NEAR(mole_fraction(input, "acetone"), kAcetoneOfHalf, 1e-5);
  EXPECT_DOUBLE_EQ(input.stream[0].mass_fraction, 0.5);
  EXPECT_FALSE(input.amount_kg.has_value());
}

TEST(CaseAmounts, TheSameMixtureInEveryBasis) {
  for (const char* stream :
       {R"({"acetone": "0.5 w/w", "water": "0.5 w/w"})", R"({"acetone": "500 g/kg", "water": "rest"})",
        R"({"acetone": "2 kg", "water": "2000 g"})", R"({"acetone": "500000 ppm", "water": "balance"})",
        R"({"acetone": "50,0 wt%", "water": "50\u00a0wt%"})"}) {
    EXPECT_NEAR(mole_fraction(case_from(with_stream(stream)), "acetone"), kAcetoneOfHalf, 1e-5) << stream;
  }
  const Case moles = case_from(with_stream(R"({"acetone": "30 mol%", "water": "70 mol%"})"));
  EXPECT_NEAR(mole_fraction(moles, "acetone"), 0.3, 1e-12);
  const Case amounts = case_from(with_stream(R"({"acetone": "3 mol", "water": "0.007 kmol"})"));
  EXPECT_NEAR(mole_fraction(amounts, "acetone"), 0.3, 1e-12);
  EXPECT_NEAR(*amounts.amount_kg, 0.3 * 0.58080 + 0.7 * 0.18015, 1e-3);
}

TEST(CaseAmounts, VolumesUseTheDensityOnFileAndSayIt) {
  const Case input = case_from(with_stream(R"({"acetone": "50 vol%", "water": "50 vol%"})"));
  const double acetone = catalog().by_id("acetone")->liquid_density_kg_m3->value;
  const double water = catalog().by_id("water")->liquid_density_kg_m3->value;
  EXPECT_NEAR(input.stream[0].mass_fraction, acetone / (acetone + water), 1e-12);
  EXPECT_TRUE(any_contains(input.notes, "density of acetone"));
  const Case litres = case_from(with_stream(R"({"acetone": "2 L", "water": "2 L"})"));
  EXPECT_NEAR(*litres.amount_kg, 2e-3 * (acetone + water), 1e-9);
}

TEST(CaseAmounts, SumWithinHalfAPercentIsRescaledWithANote) {
  const Case input = case_from(with_stream(R"({"acetone": "49.8 wt%", "water": "49.8 wt%"})"));
  EXPECT_DOUBLE_EQ(input.stream[0].mass_fraction, 0.5);
  EXPECT_TRUE(any_contains(input.notes, "add up to 99.6 wt%"));
  EXPECT_TRUE(problems_of(with_stream(R"({"acetone": "49.75 wt%", "water": "49.75 wt%"})")).empty());
}

TEST(CaseAmounts, SumBeyondHalfAPercentIsRefusedAndShown) {
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "41 wt%", "water": "57 wt%"})")), "/stream", "98 wt%"));
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "60 mol%", "water": "60 mol%"})")), "/stream", "120 mol%"));
}

TEST(CaseAmounts, RestIsWhatIsMissing) {
  const Case input = case_from(with_stream(R"({"acetone": "41 wt%", "water": "rest", "residue": "2 wt%"})"));
  EXPECT_NEAR(input.stream[1].mass_fraction, 0.57, 1e-12);
  EXPECT_TRUE(any_contains(input.notes, "water is the rest: 57 wt%"));
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "100 wt%", "water": "rest"})")), "/stream/water", "nothing left"));
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "rest", "water": "rest", "ethanol": "5 wt%"})")),
                    "/stream/water", "second \"rest\""));
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "5 kg", "water": "rest"})")), "/stream/water", "rest"));
}

TEST(CaseAmounts, RangesUseTheirMiddle) {
  const Case input =
      case_from(with_stream(R"({"n-heptane": "55-75 wt%", "ethyl acetate": "20-40 wt%", "IPA": "<10 wt%"})"));
  EXPECT_NEAR(input.stream[0].mass_fraction, 0.65, 1e-12);
  EXPECT_NEAR(*input.stream[0].low, 0.55, 1e-12);
  EXPECT_NEAR(*input.stream[0].high, 0.75, 1e-12);
  EXPECT_EQ(input.stream[2].low, 0.0);
  EXPECT_TRUE(any_contains(input.notes, "range"));
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "10-20 wt%", "water": "30-40 wt%"})")), "/stream", "40 to 60"));
}

TEST(CaseAmounts, ResidueIsKeptInTheBalanceOnly) {
  const Case input = case_from(with_stream(R"({"acetone": "49 wt%", "water": "49 wt%", "residue": "2 wt%"})"));
  ASSERT_EQ(input.stream.size(), 2U);
  EXPECT_NEAR(mole_fraction(input, "acetone"), kAcetoneOfHalf, 1e-5);
  EXPECT_NEAR(input.residue_mass_fraction, 0.02, 1e-12);
  // Beside mole percentages the residue is a share of the whole mass.
  const Case moles = case_from(with_stream(R"({"acetone": "50 mol%", "water": "50 mol%", "solids": "10 wt%"})"));
  EXPECT_NEAR(mole_fraction(moles, "acetone"), 0.5, 1e-12);
  EXPECT_NEAR(moles.residue_mass_fraction, 0.1, 1e-12);
  const Case kilograms = case_from(with_stream(R"({"acetone": "45 kg", "water": "45 kg", "residue": "10 kg"})"));
  EXPECT_NEAR(kilograms.residue_mass_fraction, 0.1, 1e-12);
  EXPECT_NEAR(*kilograms.amount_kg, 100.0, 1e-9);
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "50 mol%", "water": "49 mol%", "residue": "1 mol%"})")),
                    "/stream/residue", "wt%"));
}

TEST(CaseAmounts, SaltsAndUnknownsAreKnownAsSuch) {
  const Case input =
      case_from(with_stream(R"({"acetone": "49 wt%", "water": "48 wt%", "NaCl": "1 wt%", "others": "2 wt%"})"));
  EXPECT_NEAR(input.salt_mass_fraction, 0.01, 1e-12);
  EXPECT_NEAR(input.unknown_mass_fraction, 0.02, 1e-12);
  EXPECT_NEAR(input.residue_mass_fraction, 0.03, 1e-12);
  EXPECT_EQ(input.salts, std::vector<std::string>{"NaCl"});
  EXPECT_TRUE(any_contains(input.notes, "not modelled"));
}

TEST(CaseAmounts, ZeroAmountsAreDroppedWithANote) {
  const Case input = case_from(with_stream(R"({"acetone": "50 wt%", "ethanol": "0 wt%", "water": "50 wt%"})"));
  EXPECT_EQ(input.stream.size(), 2U);
  EXPECT_TRUE(any_contains(input.notes, "ethanol has amount zero"));
}

TEST(CaseAmounts, OneBasisForAll) {
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "50 wt%", "water": "50 mol%"})")), "/stream/water", "same basis"));
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "50 wt%", "water": "50 kg"})")), "/stream/water", "same basis"));
}

TEST(CaseAmounts, TwoToTwelveComponents) {
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "100 wt%"})")), "/stream", "one component"));
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "98 wt%", "residue": "2 wt%"})")), "/stream", "one component"));
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "50 wt%", "water": "0 wt%", "residue": "50 wt%"})")),
                    "/stream", "one component"));
  const char* thirteen =
      R"({"acetone": "1 mol", "methanol": "1 mol", "ethanol": "1 mol", "water": "1 mol", "1-propanol": "1 mol",
      "2-propanol": "1 mol", "toluene": "1 mol", "benzene": "1 mol", "n-hexane": "1 mol", "n-heptane": "1 mol",
      "ethyl acetate": "1 mol", "THF": "1 mol", "chloroform": "1 mol"})";
  EXPECT_TRUE(tells(problems_of(with_stream(thirteen)), "/stream", "13 components"));
}

TEST(CaseAmounts, NegativeAndNotANumber) {
  const auto problems =
      problems_of(with_stream(R"({"acetone": "-3 wt%", "water": "nan wt%", "ethanol": "1,234 wt%"})"));
  EXPECT_TRUE(tells(problems, "/stream/acetone", "below zero"));
  EXPECT_TRUE(tells(problems, "/stream/water", "not a finite number"));
  EXPECT_TRUE(tells(problems, "/stream/ethanol", "comma"));
}

}  // namespace
}  // namespace stillshed::test
