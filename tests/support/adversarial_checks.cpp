#include "tests/support/adversarial_checks.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

namespace stillshed::test {

double x_of(const Json& composition, const std::string& id) {
  return composition.contains(id) ? composition.at(id).get<double>() : 0.0;
}

bool needs_two_liquids(const Check& c) {
  if (c.expected.contains("ternary_heteroazeotropes")) {
    return true;
  }
  const Json& list = c.expected.at("azeotropes");
  return std::any_of(list.begin(), list.end(),
                     [](const Json& item) { return item.value("phase", "") == "heterogeneous"; });
}

void check_azeotropes(const Check& c) {
  const Json& found = c.block("azeotropes");
  ASSERT_TRUE(found.is_array());
  std::size_t expected = 0;
  for (const Json& wanted : c.expected.at("azeotropes")) {
    if (wanted.value("phase", "") == "heterogeneous") {
      continue;
    }
    ++expected;
    bool matched = false;
    for (const Json& candidate : with_components(found, wanted.at("components"))) {
      if (composition_difference(candidate.at("mole_fractions"), wanted.at("mole_fractions")) >
          c.tolerance("x", 1e-6)) {
        continue;
      }
      matched = true;
      EXPECT_NEAR(candidate.at("temperature_K").get<double>(), wanted.at("temperature_K").get<double>(),
                  c.tolerance("T_K", 1e-4));
      if (wanted.contains("node")) {
        const bool open = c.expected.contains("types_may_be") && candidate.at("node") == "degenerate";
        EXPECT_TRUE(open || candidate.at("node") == wanted.at("node")) << candidate.dump();
      }
      if (wanted.contains("boiling")) {
        EXPECT_EQ(candidate.at("boiling"), wanted.at("boiling"));
      }
    }
    EXPECT_TRUE(matched) << "not found: " << wanted.dump() << " among " << found.dump();
  }
  EXPECT_EQ(found.size(), expected);
}

void check_cuts(const Check& c) {
  const Json& batch = c.block("batch");
  ASSERT_TRUE(batch.is_array());
  const Json& rectifier = batch.at(0);
  ASSERT_EQ(rectifier.at("mode"), "rectifier");
  const Json& cuts = rectifier.at("cuts");
  const Json& wanted = c.expected.at("rectifier_cuts");
  ASSERT_EQ(cuts.size(), wanted.size()) << cuts.dump();
  const Json& components = c.block("components");
  for (std::size_t k = 0; k < wanted.size(); ++k) {
    EXPECT_NEAR(cuts[k].at("share_of_charge_mole").get<double>(), wanted[k].at("share").get<double>(),
                c.tolerance("share", 1e-6));
    for (std::size_t i = 0; i < components.size(); ++i) {
      EXPECT_NEAR(x_of(cuts[k].at("start"), components[i].at("id")), wanted[k].at("x")[i].get<double>(),
                  c.tolerance("x", 1e-6));
    }
  }
}

void check_cuts_kg(const Check& c) {
  const Json& cuts = c.block("batch").at(0).at("cuts");
  const Json& wanted = c.expected.at("rectifier_cuts_kg");
  ASSERT_EQ(cuts.size(), wanted.size());
  for (std::size_t k = 0; k < wanted.size(); ++k) {
    EXPECT_NEAR(cuts[k].at("kg").get<double>(), wanted[k].at("kg").get<double>(), c.tolerance("kg", 1e-3));
  }
}

void check_boundary_points(const Check& c) {
  const Json& boundaries = c.block("boundaries");
  ASSERT_EQ(boundaries.size(), 1U);
  const Json& points = boundaries[0].at("points");
  const Json& components = c.block("components");
  for (const Json& wanted : c.expected.at("boundary_points_mole")) {
    // Distance of the wanted point from the polyline.
    double best = 1.0;
    for (std::size_t k = 0; k + 1 < points.size(); ++k) {
      double along = 0.0;
      double length = 0.0;
      for (std::size_t i = 0; i < components.size(); ++i) {
        const std::string id = components[i].at("id");
        const double a = x_of(points[k], id);
        const double d = x_of(points[k + 1], id) - a;
        along += d * (wanted[i].get<double>() - a);
        length += d * d;
      }
      const double s = length > 0.0 ? std::min(1.0, std::max(0.0, along / length)) : 0.0;
      double distance = 0.0;
      for (std::size_t i = 0; i < components.size(); ++i) {
        const std::string id = components[i].at("id");
        const double a = x_of(points[k], id);
        const double at = a + s * (x_of(points[k + 1], id) - a);
        distance += (at - wanted[i].get<double>()) * (at - wanted[i].get<double>());
      }
      best = std::min(best, std::sqrt(distance));
    }
    EXPECT_LE(best, 1e-4) << wanted.dump();
  }
}

void check_verdicts(const Check& c, const Json& verdicts) {
  if (verdicts.is_string()) {  // one for all
    const Json& products = c.block("products");
    ASSERT_FALSE(products.empty());
    for (const Json& product : products) {
      EXPECT_EQ(product.at("verdict"), verdicts);
    }
    return;
  }
  for (const auto& [id, wanted] : verdicts.items()) {
    const std::string verdict = c.product(id).at("verdict");
    const std::string allowed = wanted;
    // "no-call or shut" lists alternatives
    EXPECT_NE((" " + allowed + " ").find(" " + verdict + " "), std::string::npos)
        << id << ": " << verdict << " not " << allowed;
  }
}

void check_reason(const Check& c) {
  const std::string reason = c.expected.at("reason");
  for (const auto& [task, run] : c.runs) {
    EXPECT_EQ(run.exit, 3);
    bool named = false;
    for (const Json& entry : run.result.at("status").at("incomplete")) {
      named = named || entry.at("why").get<std::string>().find(reason) != std::string::npos;
    }
    EXPECT_TRUE(named) << run.result.at("status").dump();
  }
}

void check_rejected(const Check& c) {
  const Json& found = c.block("rejected_roots");
  for (const Json& wanted : c.expected.at("rejected_roots")) {
    const auto candidates = with_components(found, wanted.at("components"));
    ASSERT_EQ(candidates.size(), 1U) << found.dump();
    for (std::size_t i = 0; i < wanted.at("components").size(); ++i) {
      EXPECT_NEAR(x_of(candidates[0].at("mole_fractions"), wanted.at("components")[i]), wanted.at("x")[i].get<double>(),
                  1e-6);
    }
    EXPECT_NEAR(candidates[0].at("temperature_K").get<double>(), wanted.at("T_K").get<double>(), 1e-4);
  }
}

double stage_head(const Check& c, int stages) {
  Json problem = c.problem.at("case");
  problem["plant"]["stages"] = stages;
  const RunResult run = run_case("reach", problem);
  EXPECT_FALSE(run.result.is_null()) << run.err;
  return x_of(run.result.at("stages").at("x").back(), "A");
}

double distance_of_feed(const Check& c) {
  return c.block("feed").at("distance").at("value").get<double>();
}

double best_stream_recovery(const Check& c, const std::string& id, double least_purity) {
  double recovery = 0.0;
  for (const Json& sequence : c.block("sequences")) {
    const Json& products = sequence.at("products");
    if (products.contains(id) && products.at(id).at("purity_mole").get<double>() >= least_purity) {
      recovery = std::max(recovery, products.at(id).at("recovery").get<double>());
    }
  }
  return recovery;
}

bool has_first_column(const Check& c, const char* split, const Json& distillate, const Json& bottoms,
                      double tolerance) {
  const Json& components = c.block("components");
  for (const Json& sequence : c.block("sequences")) {
    const Json& column = sequence.at("columns").at(0);
    double worst = column.at("split") == split ? 0.0 : 1.0;
    for (std::size_t i = 0; i < components.size(); ++i) {
      const std::string id = components[i].at("id");
      const auto miss = [&](const char* stream, const Json& wanted) {
        return std::abs(x_of(column.at(stream).at("mole_fractions"), id) - wanted[i].get<double>());
      };
      worst = std::max({worst, miss("distillate", distillate), miss("bottoms", bottoms)});
    }
    if (worst <= tolerance) {
      return true;
    }
  }
  return false;
}

std::string end_node(const Check& c) {
  return c.block("feed").at("residue_curve").at("to").get<std::string>();
}

}  // namespace stillshed::test
