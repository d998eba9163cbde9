#include "reports/provenance.hpp"

#include "reports/run_case.hpp"
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

TEST(Provenance, RangesInWords) {
  PressureSet set;
  EXPECT_EQ(range_text(set), "valid everywhere");
  set.t_min_K = 273.16;
  set.t_max_K = 647.0;
  EXPECT_EQ(range_text(set), "from 273.16 to 647.00 K");
}

TEST(Provenance, EveryNumberHasALineThatResolves) {
  const Answer answer =
      run_case(case_from(with_stream(R"({"acetone": "50 wt%", "methanol": "50 wt%"})")), catalog(), Task::survey);
  EXPECT_TRUE(any_contains(answer.provenance, "vapour pressure of acetone: acetone/"));
  EXPECT_TRUE(any_contains(answer.provenance, "activity coefficients: "));
  EXPECT_TRUE(any_contains(answer.provenance, "measured azeotrope, tier A"));
  EXPECT_TRUE(any_contains(answer.provenance, "caution C12: "));
  EXPECT_TRUE(any_contains(answer.provenance, "flash point of methanol: "));
  for (const MixtureComponent& component : answer.mixture.components()) {
    const std::string key = component.pressure.set().source;
    EXPECT_NE(catalog().citation(key), key) << "a source without a citation";
    EXPECT_TRUE(any_contains(answer.provenance, catalog().citation(key)));
  }
}

}  // namespace
}  // namespace stillshed::test
