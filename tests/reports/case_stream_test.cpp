/// Names of a stream: order, duplicates, ambiguous and unknown names.
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

TEST(CaseStream, KeepsItsOrder) {
  const Case input = case_from(with_stream(R"({"water": "1 kg", "acetone": "1 kg", "methanol": "1 kg"})"));
  EXPECT_EQ(input.stream[0].id, "water");
  EXPECT_EQ(input.stream[1].id, "acetone");
  EXPECT_EQ(input.stream[2].id, "methanol");
}

TEST(CaseStream, NamesSynonymsAndCasNumbers) {
  const Case input = case_from(with_stream(R"({"IPA": "1 kg", "78-93-3": "1 kg", "Ethyl Acetate": "1 kg"})"));
  EXPECT_EQ(input.stream[0].id, "2-propanol");
  EXPECT_EQ(input.stream[0].given_name, "IPA");
  EXPECT_EQ(input.stream[1].id, "2-butanone");
  EXPECT_EQ(input.stream[2].id, "ethyl-acetate");
}

TEST(CaseStream, DuplicatesBySynonymAndByCas) {
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"IPA": "50 wt%", "isopropanol": "50 wt%"})")), "/stream/isopropanol",
                    "the same as \"IPA\""));
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetone": "50 wt%", "67-64-1": "50 wt%"})")), "/stream/67-64-1", "acetone"));
  EXPECT_TRUE(tells(problems_of(R"({"stillshed_case": 1, "stream": {"acetone": "50 wt%", "acetone": "50 wt%"}})"),
                    "/stream/acetone", "twice"));
}

TEST(CaseStream, AmbiguousNamesAreRefusedWithTheChoices) {
  const auto problems = problems_of(with_stream(R"({"TCE": "50 wt%", "DMA": "50 wt%"})"));
  EXPECT_TRUE(tells(problems, "/stream/TCE", "trichloroethylene"));
  EXPECT_TRUE(tells(problems, "/stream/DMA", "ambiguous"));
}

TEST(CaseStream, UnknownNamesGetSuggestionsNeverCorrections) {
  EXPECT_TRUE(
      tells(problems_of(with_stream(R"({"acetonee": "50 wt%", "water": "50 wt%"})")), "/stream/acetonee", "acetone"));
}

TEST(CaseStream, WithComponentsEveryNameMustBeThere) {
  const std::string model = R"(, "model": "unifac", "components": ["water", "acetone"])";
  const Case input = case_from(with_stream(R"({"acetone": "50 wt%", "water": "50 wt%"})", model));
  EXPECT_EQ(input.stream[0].id, "water");  // the order of "components"
  EXPECT_TRUE(tells(problems_of(with_stream(R"({"acetone": "50 wt%", "ethanol": "50 wt%"})", model)), "/stream/ethanol",
                    "names in \"components\""));
}

}  // namespace
}  // namespace stillshed::test
