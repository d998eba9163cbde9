/// Readers of single values, and where a problem is said to be.
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

CaseContext context() {
  CaseContext result;
  result.source = "x.json";
  result.spoken["/pressure"] = "--pressure \"1\"";
  return result;
}

TEST(CaseContext, PlacesAreSpokenAsTheyWereWritten) {
  EXPECT_EQ(context().at("/stream/a"), "x.json: /stream/a");
  EXPECT_EQ(context().at(""), "x.json: /");
  EXPECT_EQ(context().at("/pressure"), "x.json: --pressure \"1\"");
}

TEST(CaseContext, SingleValues) {
  CaseContext c = context();
  EXPECT_EQ(read_text(c, "/a", "x", "a text"), "x");
  EXPECT_EQ(read_finite(c, "/a", 1.5), 1.5);
  EXPECT_EQ(read_positive(c, "/a", 2), 2.0);
  EXPECT_EQ(read_whole(c, "/a", 7, 1, 10), 7);
  EXPECT_TRUE(c.problems.empty());
  EXPECT_FALSE(read_text(c, "/a", 1, "a text").has_value());
  EXPECT_FALSE(read_finite(c, "/a", "1").has_value());
  EXPECT_FALSE(read_finite(c, "/a", true).has_value());
  EXPECT_FALSE(read_positive(c, "/a", 0).has_value());
  EXPECT_FALSE(read_whole(c, "/a", 11, 1, 10).has_value());
  EXPECT_FALSE(read_whole(c, "/a", 2.5, 1, 10).has_value());
  EXPECT_FALSE(read_whole(c, "/a", 1e300, 1, 10).has_value());
  EXPECT_EQ(c.problems.size(), 7U);
}

TEST(CaseContext, EveryUnknownKey) {
  CaseContext c = context();
  EXPECT_TRUE(read_object(c, "/o", OrderedJson{{"good", 1}, {"godd", 2}, {"zzzzzz", 3}}, {"good"}));
  ASSERT_EQ(c.problems.size(), 2U);
  EXPECT_EQ(c.problems[0].where, "x.json: /o/godd");
  EXPECT_EQ(c.problems[0].remedy, "did you mean \"good\"?");
  EXPECT_TRUE(c.problems[1].remedy.empty());
  EXPECT_FALSE(read_object(c, "/o", 3, {"good"}));
}

}  // namespace
}  // namespace stillshed
