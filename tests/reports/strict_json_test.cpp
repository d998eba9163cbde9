#include "reports/strict_json.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

namespace stillshed {
namespace {

using testing::HasSubstr;

std::vector<Problem> problems_of(const std::string& text) {
  try {
    static_cast<void>(parse_strict_json(text, "case.json"));
  } catch (const InputError& error) {
    return error.problems();
  }
  return {};
}

TEST(StrictJson, KeepsTheOrderOfKeys) {
  const OrderedJson json = parse_strict_json(R"({"z": 1, "a": 2})", "x");
  EXPECT_EQ(json.dump(), R"({"z":1,"a":2})");
}

TEST(StrictJson, MalformedTextHasLineAndColumn) {
  const auto problems = problems_of("{\n  \"a\": 1,\n  \"b\": }\n");
  ASSERT_EQ(problems.size(), 1U);
  EXPECT_EQ(problems[0].where, "case.json: line 3, column 8");
  EXPECT_THAT(problems[0].found, HasSubstr("malformed JSON"));
  EXPECT_EQ(problems_of("").size(), 1U);
  EXPECT_EQ(problems_of("{\"a\": NaN}")[0].where, "case.json: line 1, column 7");
  EXPECT_EQ(problems_of("{} {}").size(), 1U);
  EXPECT_EQ(problems_of("{\"a\": 1e999}").size(), 1U);
}

TEST(StrictJson, EveryRepeatedKeyWithItsPointer) {
  const auto problems = problems_of(R"({"a": 1, "a": 2, "list": [{}, {"b/c": 1, "b/c": 2}]})");
  ASSERT_EQ(problems.size(), 2U);
  EXPECT_EQ(problems[0].where, "case.json: /a");
  EXPECT_EQ(problems[1].where, "case.json: /list/1/b~1c");
}

TEST(StrictJson, TheSameKeyInTwoObjectsIsFine) {
  EXPECT_TRUE(problems_of(R"({"x": {"a": 1}, "y": {"a": 2}, "z": [{"a": 1}, {"a": 1}]})").empty());
}

TEST(StrictJson, BriefTextIsNeverHalfACharacter) {
  const std::string text = brief_json(OrderedJson(std::string(58, 'x') + "\u00e9\u00e9\u00e9"));
  EXPECT_LE(text.size(), 63U);
  EXPECT_NO_THROW(static_cast<void>(OrderedJson(text).dump()));
}

TEST(NearestWord, OnlyWhatIsNear) {
  EXPECT_EQ(nearest_word("reprot", {"report", "survey"}), "report");
  EXPECT_EQ(nearest_word("xyzzy", {"report", "survey"}), "");
}

}  // namespace
}  // namespace stillshed
