/// Pieces of the checks of tests/reports/adversarial_test.cpp: one run per task of a record, and the longer
/// comparisons.
#pragma once

#include <map>
#include <string>

#include "tests/support/front_door.hpp"

namespace stillshed::test {

struct Check {
  const Json& problem;
  const Json& expected;
  std::map<std::string, RunResult> runs;  // by task

  explicit Check(const Json& p) : problem(p), expected(p.at("expected")) {
    for (const Json& task : p.at("tasks")) {
      const std::string name = task;
      if (name == "survey" || name == "chart" || name == "reach" || name == "report") {
        runs.emplace(name, run_case(name, p.at("case")));
      }
    }
  }
  double tolerance(const char* key, double otherwise) const { return problem.at("tolerance").value(key, otherwise); }
  /// The first run whose result holds this block.
  const Json& block(const char* name) const {
    for (const auto& [task, run] : runs) {
      if (!run.result.is_null() && run.result.contains(name) && !run.result.at(name).is_null()) {
        return run.result.at(name);
      }
    }
    static const Json nothing;
    return nothing;
  }
  const Json& product(const std::string& id) const {
    for (const Json& product : block("products")) {
      if (product.at("component") == id) {
        return product;
      }
    }
    static const Json nothing;
    return nothing;
  }
};

[[nodiscard]] double x_of(const Json& composition, const std::string& id);
/// Azeotropes of two liquids are not searched yet: a record that lists one must end incomplete, index rule open.
[[nodiscard]] bool needs_two_liquids(const Check& c);
void check_azeotropes(const Check& c);
void check_cuts(const Check& c);
void check_cuts_kg(const Check& c);
void check_boundary_points(const Check& c);
void check_verdicts(const Check& c, const Json& verdicts);
void check_reason(const Check& c);
void check_rejected(const Check& c);
/// What leaves the top of N stages at total reflux, the pot being stage 1.
[[nodiscard]] double stage_head(const Check& c, int stages);
[[nodiscard]] double distance_of_feed(const Check& c);
[[nodiscard]] double best_stream_recovery(const Check& c, const std::string& id, double least_purity);
[[nodiscard]] bool has_first_column(const Check& c, const char* split, const Json& distillate, const Json& bottoms,
                                    double tolerance);
[[nodiscard]] std::string end_node(const Check& c);

}  // namespace stillshed::test
