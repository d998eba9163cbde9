#include "reports/substance.hpp"

#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

TEST(Substance, WordsForWhatDoesNotBoil) {
  for (const char* name : {"residue", "Solids", "NV", "heel"}) {
    EXPECT_EQ(nonvolatile_kind(name), NonvolatileKind::residue) << name;
  }
  for (const char* name : {"NaCl", "sodium chloride", "Ammonium acetate", "lithium salts"}) {
    EXPECT_EQ(nonvolatile_kind(name), NonvolatileKind::salt) << name;
  }
  EXPECT_EQ(nonvolatile_kind("others"), NonvolatileKind::unknown);
  EXPECT_FALSE(nonvolatile_kind("acetone").has_value());
}

/// No substance on file may hide behind a word for what does not boil.
TEST(Substance, NoSubstanceOnFileIsTakenForASalt) {
  for (const ComponentRecord& record : catalog().facts().components) {
    EXPECT_FALSE(nonvolatile_kind(record.id).has_value()) << record.id;
    EXPECT_FALSE(nonvolatile_kind(record.name).has_value()) << record.name;
    for (const std::string& synonym : record.synonyms) {
      EXPECT_FALSE(nonvolatile_kind(synonym).has_value()) << synonym;
    }
  }
}

TEST(Substance, ProblemsTellChoicesAndSuggestions) {
  const Problem ambiguous = substance_problem("here", "TCE", catalog().find("TCE"));
  EXPECT_NE(ambiguous.found.find("ambiguous"), std::string::npos);
  EXPECT_NE(ambiguous.allowed.find("trichloroethylene (79-01-6)"), std::string::npos);
  const Problem unknown = substance_problem("here", "tolune", catalog().find("tolune"));
  EXPECT_NE(unknown.remedy.find("toluene"), std::string::npos);
}

}  // namespace
}  // namespace stillshed::test
