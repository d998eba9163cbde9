/// From a case to an answer: what is computed, what is refused, what is incomplete.
#include "reports/run_case.hpp"

#include <algorithm>

#include "reports/json_report.hpp"
#include "tests/reports/input_fixtures.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed::test {
namespace {

Answer run_on(const std::string& stream, const std::string& more, Task task, const RunOptions& options = {}) {
  return run_case(case_from(with_stream(stream, more)), catalog(), task, options);
}

bool incomplete_why(const Answer& answer, const std::string& why) {
  return std::any_of(answer.incomplete.begin(), answer.incomplete.end(),
                     [&](const Incomplete& item) { return item.why == why; });
}

bool all_no_call(const Answer& answer, Reason reason) {
  return answer.reach.has_value() && !answer.reach->products.empty() &&
         std::all_of(answer.reach->products.begin(), answer.reach->products.end(), [&](const ProductOutcome& product) {
           return product.verdict == Verdict::no_call &&
                  std::find(product.reasons.begin(), product.reasons.end(), reason) != product.reasons.end();
         });
}

const std::string kHalf = R"({"acetone": "50 wt%", "methanol": "50 wt%"})";

TEST(RunCase, SurveyOnly) {
  const Answer answer = run_on(kHalf, "", Task::survey);
  EXPECT_EQ(answer.exit_code, 0);
  ASSERT_TRUE(answer.survey.has_value());
  EXPECT_EQ(answer.survey->azeotropes.size(), 1U);
  EXPECT_FALSE(answer.chart.has_value());
  EXPECT_FALSE(answer.reach.has_value());
  EXPECT_EQ(answer.measured.size(), 1U);
  EXPECT_FALSE(answer.measured[0].empty());
  EXPECT_EQ(answer.pressure_evidence.size(), 2U);
  EXPECT_EQ(answer.params_sha256, catalog().facts().sha256);
  double sum = 0.0;
  for (const double x : answer.feed) {
    sum += x;
  }
  EXPECT_NEAR(sum, 1.0, 1e-12);
}

TEST(RunCase, AboveTheCriticalPressureNothingIsComputed) {
  const Answer answer =
      run_on(R"({"n-heptane": "50 mol%", "toluene": "50 mol%"})", R"(, "pressure": "30 bar")", Task::report);
  EXPECT_FALSE(answer.survey.has_value());
  EXPECT_EQ(answer.exit_code, 3);
  EXPECT_TRUE(all_no_call(answer, Reason::above_critical));
  EXPECT_TRUE(testing_support::is_valid(json_text(answer), testing_support::result_schema()));
}

TEST(RunCase, AcidVapourIsNoCallUnlessATrace) {
  EXPECT_TRUE(
      all_no_call(run_on(R"({"formic acid": "50 mol%", "water": "50 mol%"})", "", Task::reach), Reason::acid_vapour));
  const Answer trace =
      run_on(R"({"formic acid": "0.1 mol%", "water": "50 mol%", "acetone": "49.9 mol%"})", "", Task::reach);
  EXPECT_FALSE(all_no_call(trace, Reason::acid_vapour));
}

TEST(RunCase, AMissingPairIsNamedAndItsFaceNotSurveyed) {
  const Answer answer =
      run_on(R"({"ethylene glycol": "50 mol%", "chloroform": "50 mol%"})", R"(, "model": "unifac")", Task::report);
  EXPECT_EQ(answer.exit_code, 3);
  EXPECT_TRUE(all_no_call(answer, Reason::missing_pair));
  ASSERT_TRUE(answer.survey.has_value());
  EXPECT_TRUE(answer.survey->azeotropes.empty());
  EXPECT_EQ(answer.survey->faces.back().status, Status::not_run);
  EXPECT_FALSE(answer.survey->index_rule_holds.has_value());
  EXPECT_EQ(answer.product_evidence.at(0), Evidence::none);
  EXPECT_NE(answer.incomplete.at(0).where.find("31"), std::string::npos);
  EXPECT_TRUE(testing_support::is_valid(json_text(answer), testing_support::result_schema()));
}

TEST(RunCase, TheOtherFacesOfAMixtureWithAMissingPairStay) {
  const Answer answer = run_on(R"({"ethylene glycol": "30 mol%", "chloroform": "30 mol%", "methanol": "40 mol%"})",
                               R"(, "model": "unifac")", Task::survey);
  EXPECT_EQ(answer.exit_code, 3);
  int complete = 0;
  for (const FaceProof& face : answer.survey->faces) {
    complete += face.status == Status::complete ? 1 : 0;
  }
  EXPECT_EQ(complete, 2);
  const bool found =
      std::any_of(answer.survey->azeotropes.begin(), answer.survey->azeotropes.end(), [](const Azeotrope& azeotrope) {
        return azeotrope.point.members == Members{1, 2};
      });
  EXPECT_TRUE(found);  // chloroform + methanol
}

TEST(RunCase, SplittingLiquidsAreIncomplete) {
  const Answer answer = run_on(R"({"water": "50 wt%", "toluene": "50 wt%"})", "", Task::survey);
  EXPECT_EQ(answer.exit_code, 3);
  EXPECT_TRUE(incomplete_why(answer, "phase-split-needed"));
}

TEST(RunCase, ManySaltsAndManyUnknownsAreNoCall) {
  EXPECT_TRUE(all_no_call(run_on(R"({"acetone": "48 wt%", "methanol": "48 wt%", "NaCl": "4 wt%"})", "", Task::reach),
                          Reason::salt_present));
  EXPECT_TRUE(all_no_call(run_on(R"({"acetone": "45 wt%", "methanol": "45 wt%", "others": "10 wt%"})", "", Task::reach),
                          Reason::unknowns_too_large));
  EXPECT_FALSE(
      all_no_call(run_on(R"({"acetone": "50 wt%", "methanol": "49.8 wt%", "NaCl": "0.2 wt%"})", "", Task::reach),
                  Reason::salt_present));
}

TEST(RunCase, FourComponentsHaveASurveyAndNoMap) {
  const Answer answer =
      run_on(R"({"acetone": "25 mol%", "methanol": "25 mol%", "chloroform": "25 mol%", "ethanol": "25 mol%"})", "",
             Task::report);
  EXPECT_EQ(answer.exit_code, 3);
  EXPECT_EQ(answer.survey->faces.size(), 11U);
  EXPECT_FALSE(answer.chart.has_value());
  EXPECT_EQ(answer.reach->products.size(), 4U);
  EXPECT_TRUE(any_contains(answer.notes, "not drawn by this version"));
  EXPECT_TRUE(testing_support::is_valid(json_text(answer), testing_support::result_schema()));
}

TEST(RunCase, HighPressureIsNoCallWithNumbers) {
  const Answer answer = run_on(kHalf, R"(, "pressure": "12 bar")", Task::reach);
  EXPECT_TRUE(answer.survey.has_value());
  EXPECT_TRUE(all_no_call(answer, Reason::outside_data));
}

TEST(RunCase, AStopRequestIsKeptAndSaid) {
  std::stop_source source;
  source.request_stop();
  RunOptions options;
  options.stop = source.get_token();
  const Answer answer = run_on(kHalf, "", Task::report, options);
  EXPECT_EQ(answer.exit_code, kInterruptedExit);
  EXPECT_TRUE(incomplete_why(answer, "stopped"));
  EXPECT_TRUE(testing_support::is_valid(json_text(answer), testing_support::result_schema()));
}

TEST(RunCase, TheSameAnswerTwice) {
  Answer first = run_on(kHalf, "", Task::report);
  Answer second = run_on(kHalf, "", Task::report);
  first.elapsed_s = second.elapsed_s = 0.0;
  EXPECT_EQ(json_text(first), json_text(second));
}

}  // namespace
}  // namespace stillshed::test
