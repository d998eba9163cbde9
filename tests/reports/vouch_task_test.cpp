#include "reports/vouch_task.hpp"

#include "reports/format.hpp"
#include "reports/run_case.hpp"
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

TEST(VouchTask, SourceRangeAndEvidenceOfEveryParameter) {
  const Answer answer =
      run_case(case_from(with_stream(R"({"acetone": "50 wt%", "water": "30 wt%", "methanol": "20 wt%"})")), catalog(),
               Task::vouch);
  EXPECT_FALSE(answer.survey.has_value());
  const std::string text = vouch_text(answer, 80);
  for (const MixtureComponent& component : answer.mixture.components()) {
    EXPECT_NE(text.find(component.id + ": " + component.pressure.set().id), std::string::npos);
  }
  for (const char* part : {"F  acetone", "P  acetone + water: unifac-dortmund", "sources", "evidence: F fitted"}) {
    EXPECT_NE(text.find(part), std::string::npos) << part;
  }
  std::istringstream lines(text);
  for (std::string line; std::getline(lines, line);) {
    EXPECT_LE(display_width(line), 110) << line;
  }
}

TEST(VouchTask, MissingPairsStandOut) {
  const Answer answer = run_case(
      case_from(with_stream(R"({"ethylene glycol": "50 wt%", "chloroform": "50 wt%"})", R"(, "model": "unifac")")),
      catalog(), Task::vouch);
  EXPECT_EQ(answer.exit_code, 3);
  EXPECT_NE(vouch_text(answer).find("missing-pair"), std::string::npos);
}

}  // namespace
}  // namespace stillshed::test
