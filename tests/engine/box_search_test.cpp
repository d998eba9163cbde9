#include "engine/box_search.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace stillshed {
namespace {

SearchBox unit(int size) {
  return {Vec<Interval>(size, Interval(0.0, 1.0)), Interval(300.0, 300.0)};
}

/// Zeros of x - t in one dimension, found by bisection alone.
struct PointProblem {
  double target = 0.3;
  double width = 1e-3;
  std::vector<SearchBox> leaves;
  BoxOutcome reduce(SearchBox& box) const {
    return box.x[0].contains(target) ? BoxOutcome::kept : BoxOutcome::dismissed;
  }
  [[nodiscard]] bool narrow(const SearchBox& box) const { return widest(box) <= width; }
  void leaf(const SearchBox& box) { leaves.push_back(box); }
  static void halve(const SearchBox& box, SearchBox& first, SearchBox& second) {
    first = box;
    second = box;
    first.x[0] = Interval(box.x[0].lower(), box.x[0].mid());
    second.x[0] = Interval(box.x[0].mid(), box.x[0].upper());
  }
};

/// The same by a contraction that halves the distance to the target.
struct ShrinkingProblem : PointProblem {
  int calls = 0;
  BoxOutcome reduce(SearchBox& box) {
    ++calls;
    const Interval side = box.x[0];
    if (!side.contains(target)) {
      return BoxOutcome::dismissed;
    }
    if (side.width() < width) {
      return BoxOutcome::kept;
    }
    box.x[0] = Interval(0.5 * (side.lower() + target), 0.5 * (side.upper() + target));
    return BoxOutcome::reduced;
  }
};

TEST(BoxSearch, bisection_ends_in_the_boxes_that_hold_the_target) {
  PointProblem problem;
  const BoxSearchResult result = search_boxes(problem, unit(1), {});
  EXPECT_TRUE(result.finished);
  EXPECT_TRUE(result.open.empty());
  ASSERT_EQ(problem.leaves.size(), 1U);
  EXPECT_TRUE(problem.leaves[0].x[0].contains(0.3));
  EXPECT_LE(problem.leaves[0].x[0].width(), 1e-3);
  EXPECT_EQ(result.boxes, 21);  // ten levels, two boxes each, and the whole
}

TEST(BoxSearch, target_on_a_dividing_plane_is_kept_on_both_sides) {
  PointProblem problem;
  problem.target = 0.5;
  EXPECT_TRUE(search_boxes(problem, unit(1), {}).finished);
  ASSERT_EQ(problem.leaves.size(), 2U);
  EXPECT_TRUE(problem.leaves[0].x[0].contains(0.5) && problem.leaves[1].x[0].contains(0.5));
}

TEST(BoxSearch, reduced_boxes_are_not_halved) {
  ShrinkingProblem problem;
  const BoxSearchResult result = search_boxes(problem, unit(1), {});
  EXPECT_TRUE(result.finished);
  EXPECT_EQ(problem.leaves.size(), 1U);
  EXPECT_EQ(result.boxes, problem.calls);
  EXPECT_EQ(result.boxes, 11);
}

TEST(BoxSearch, budget_keeps_the_rest_open) {
  for (const std::int64_t budget : {1, 2, 5, 12}) {
    PointProblem problem;
    const BoxSearchResult result = search_boxes(problem, unit(1), {budget, {}});
    EXPECT_FALSE(result.finished);
    EXPECT_FALSE(result.stopped);
    EXPECT_EQ(result.boxes, budget);
    // The target is in no leaf yet, so an open box must hold it.
    bool held = !problem.leaves.empty();
    for (const SearchBox& box : result.open) {
      held = held || box.x[0].contains(problem.target);
    }
    EXPECT_TRUE(held);
  }
}

TEST(BoxSearch, stop_request_keeps_the_rest_open) {
  std::stop_source source;
  source.request_stop();
  PointProblem problem;
  const BoxSearchResult result = search_boxes(problem, unit(1), {100, source.get_token()});
  EXPECT_TRUE(result.stopped);
  EXPECT_EQ(result.boxes, 0);
  EXPECT_EQ(result.open.size(), 1U);
}

TEST(BoxSearch, boxes_inside_touching_and_hull) {
  const SearchBox small{{Interval(0.2, 0.3), Interval(0.7, 0.8)}, Interval(300.0, 301.0)};
  const SearchBox large{{Interval(0.1, 0.3), Interval(0.7, 0.9)}, Interval(299.0, 301.0)};
  EXPECT_TRUE(inside(small, large));
  EXPECT_FALSE(inside(large, small));
  EXPECT_FALSE(inside(small, {large.x, Interval(300.5, 301.0)}));
  const SearchBox beside{{Interval(0.31, 0.4), Interval(0.6, 0.69)}, Interval(300.0, 301.0)};
  EXPECT_FALSE(touching(small, beside, 0.0));
  EXPECT_TRUE(touching(small, beside, 0.011));
  const SearchBox both = hull(small, beside);
  EXPECT_TRUE(inside(small, both) && inside(beside, both));
  EXPECT_DOUBLE_EQ(widest(both), 0.2);
  EXPECT_DOUBLE_EQ(widest({small.x, Interval(300.0, 330.0)}), 30.0 / kKelvinPerFraction);
}

}  // namespace
}  // namespace stillshed
