/// One trigger at a time, on the cautions on file.
#include "reports/cautions_rules.hpp"

#include <set>

#include "reports/run_case.hpp"
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

Answer vouched(const std::string& stream, const std::string& more = "") {
  return run_case(case_from(with_stream(stream, more)), catalog(), Task::vouch);
}

const Caution* find(const Answer& answer, const std::string& code, const std::string& text = "") {
  for (const Caution& caution : answer.cautions) {
    if (caution.code == code && caution.text.find(text) != std::string::npos) {
      return &caution;
    }
  }
  return nullptr;
}

std::string half(const std::string& a, const std::string& b) {
  return "{\"" + a + "\": \"50 wt%\", \"" + b + "\": \"50 wt%\"}";
}

TEST(Cautions, SubstancesBringTheirOwn) {
  const struct {
    const char* a;
    const char* b;
    const char* code;
    bool expected;
  } rows[] = {
      {"THF", "water", "C2", true},
      {"toluene", "water", "C2", false},
      {"DMSO", "water", "C4", true},
      {"DMF", "water", "C5", true},
      {"nitromethane", "water", "C7", true},
      {"acetone", "chloroform", "C9", true},
      {"DCM", "triethylamine", "C9", true},
      {"acetone", "water", "C9", false},
      {"diethyl ether", "ethanol", "C11", true},
      {"acetone", "water", "C12", true},
      {"toluene", "methanol", "C13", true},
      {"benzene", "methanol", "C14", true},
      {"NMP", "water", "C15", true},
      {"DCM", "methanol", "C16", true},
      {"methanol", "water", "C22", true},
      {"acetone", "water", "C1", true},
      {"acetone", "water", "C14", false},
  };
  for (const auto& row : rows) {
    EXPECT_EQ(find(vouched(half(row.a, row.b)), row.code) != nullptr, row.expected)
        << row.a << " " << row.b << " " << row.code;
  }
}

TEST(Cautions, NameTheSubstances) {
  const Answer answer = vouched(half("THF", "water"));
  ASSERT_NE(find(answer, "C2"), nullptr);
  EXPECT_EQ(find(answer, "C2")->substances, std::vector<std::string>{"tetrahydrofuran"});
  EXPECT_TRUE(find(answer, "C2")->above_verdict);
}

TEST(Cautions, PressureAndVacuum) {
  const std::string stream = half("acetone", "water");
  EXPECT_EQ(find(vouched(stream, R"(, "pressure": "1 bar")"), "C20"), nullptr);
  EXPECT_EQ(find(vouched(stream, R"(, "pressure": "1 bar")"), "C21"), nullptr);
  EXPECT_NE(find(vouched(stream, R"(, "pressure": "2 bar")"), "C20"), nullptr);
  EXPECT_NE(find(vouched(stream, R"(, "pressure": "100 mbar")"), "C21"), nullptr);
  EXPECT_NE(find(vouched(stream, R"(, "pressure": "4 bar")"), "C24"), nullptr);  // ideal vapour stretched
  EXPECT_EQ(find(vouched(stream, R"(, "pressure": "1 bar")"), "C24"), nullptr);
}

TEST(Cautions, WhatTheUserDeclares) {
  const std::string dcm = half("DCM", "methanol");
  EXPECT_EQ(find(vouched(dcm), "C6"), nullptr);
  EXPECT_NE(find(vouched(dcm, R"(, "declared": ["azides"])"), "C6"), nullptr);
  EXPECT_EQ(find(vouched(half("acetone", "water"), R"(, "declared": ["azides"])"), "C6"), nullptr);
  EXPECT_NE(find(vouched(half("acetone", "water"), R"(, "declared": ["hydrogen-peroxide"])"), "C10"), nullptr);
  EXPECT_NE(find(vouched(half("toluene", "water"), R"(, "declared": ["nitration"])"), "C7"), nullptr);
  EXPECT_NE(find(vouched(half("toluene", "water"), R"(, "declared": ["unknown-history"])"), "C8"), nullptr);
  EXPECT_NE(find(vouched(half("toluene", "water"), R"(, "declared": ["US"])"), "C17"), nullptr);
  EXPECT_NE(find(vouched(half("toluene", "water"), R"(, "declared": ["pharmaceutical"])"), "C18"), nullptr);
  EXPECT_EQ(find(vouched(half("toluene", "water")), "C18"), nullptr);
}

TEST(Cautions, UnknownsAboveOnePercent) {
  EXPECT_NE(find(vouched(R"({"acetone": "49 wt%", "water": "49 wt%", "others": "2 wt%"})"), "C8"), nullptr);
  EXPECT_EQ(find(vouched(R"({"acetone": "50 wt%", "water": "49.5 wt%", "others": "0.5 wt%"})"), "C8"), nullptr);
}

TEST(Cautions, RegulatedOnlyAboveTheShareOfTheRule) {
  EXPECT_EQ(find(vouched(R"({"NMP": "0.1 wt%", "water": "99.9 wt%"})"), "C15"), nullptr);
}

TEST(Cautions, AboveTheVerdictComesFirst) {
  const Answer answer = vouched(half("THF", "DMSO"));
  bool below_seen = false;
  for (const Caution& caution : answer.cautions) {
    EXPECT_FALSE(below_seen && caution.above_verdict);
    below_seen = below_seen || !caution.above_verdict;
  }
}

TEST(Cautions, DryPotAndTwoLiquids) {
  Answer answer = vouched(half("acetone", "water"));
  const std::vector<const ComponentRecord*> records = {catalog().by_id("acetone"), catalog().by_id("water")};
  const auto codes = [&] {
    std::set<std::string> found;
    for (const Caution& caution : cautions_for(answer, records, catalog().facts(), false)) {
      found.insert(caution.code);
    }
    return found;
  };
  EXPECT_EQ(codes().count("C3"), 0U);
  answer.reach.emplace();
  answer.reach->batch.emplace_back();
  answer.reach->batch[0].cuts.emplace_back();
  EXPECT_EQ(codes().count("C3"), 1U);
  answer.input.residue_mass_fraction = 0.2;
  EXPECT_EQ(codes().count("C3"), 0U);
  EXPECT_EQ(codes().count("C23"), 0U);
  answer.feed_stability.emplace();
  answer.feed_stability->outcome = Stability::unstable;
  EXPECT_EQ(codes().count("C23"), 1U);
}

}  // namespace
}  // namespace stillshed::test
