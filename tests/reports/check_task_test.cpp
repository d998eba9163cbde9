#include "reports/check_task.hpp"

#include "tests/reports/input_fixtures.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed::test {
namespace {

Facts a_copy_of_the_facts() {
  return catalog().facts();
}

TEST(CheckTask, EveryPublishedValueIsMet) {
  const CheckAnswer answer = run_checks(catalog());
  EXPECT_GE(answer.lines.size(), catalog().facts().check_values.size());
  for (const CheckLine& line : answer.lines) {
    EXPECT_TRUE(line.agrees) << line.id << ": " << line.what << " " << line.computed << " " << line.published;
    EXPECT_FALSE(line.source.empty());
  }
  EXPECT_EQ(answer.mismatches(), 0);
  EXPECT_NE(check_text(answer).find("all agree"), std::string::npos);
  EXPECT_TRUE(
      testing_support::is_valid(check_json(answer), STILLSHED_TEST_DATA "/../reports/schema/check.schema.json"));
}

/// Each kind of check notices a wrong number.
TEST(CheckTask, AWrongValueIsAMismatch) {
  for (const CheckKind kind :
       {CheckKind::activity, CheckKind::boiling_point, CheckKind::fenske, CheckKind::azeotropes}) {
    Facts facts = a_copy_of_the_facts();
    std::vector<CheckValue> kept;
    for (CheckValue check : facts.check_values) {
      if (check.kind == kind && kept.empty()) {
        if (kind == CheckKind::azeotropes) {
          ASSERT_FALSE(check.azeotropes.empty());
          check.azeotropes.pop_back();
        } else {
          check.expected.front() *= 1.2;
        }
        kept.push_back(check);
      }
    }
    ASSERT_EQ(kept.size(), 1U);
    facts.check_values = kept;
    const CheckAnswer answer = run_checks(Catalog(std::move(facts)));
    EXPECT_EQ(answer.mismatches(), 1) << to_string(kind);
    EXPECT_NE(check_text(answer).find("MISMATCH"), std::string::npos);
  }
}

TEST(CheckTask, WhatCannotBeComputedIsAMismatch) {
  Facts facts = a_copy_of_the_facts();
  CheckValue broken;
  broken.id = "broken";
  broken.kind = CheckKind::azeotropes;
  broken.case_json = "{}";
  facts.check_values = {broken};
  const CheckAnswer answer = run_checks(Catalog(std::move(facts)));
  ASSERT_EQ(answer.lines.size(), 1U);
  EXPECT_FALSE(answer.lines[0].agrees);
}

}  // namespace
}  // namespace stillshed::test
