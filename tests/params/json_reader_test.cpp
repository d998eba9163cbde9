#include "params/json_reader.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

namespace stillshed {
namespace {

using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::SizeIs;

std::vector<std::string> texts(const Problems& problems) {
  std::vector<std::string> result;
  for (const Problem& problem : problems) {
    result.push_back(problem.text());
  }
  return result;
}

std::vector<std::string> parse_problems(const std::string& text) {
  Problems problems;
  const JsonFile file("f.json", text, &problems);
  EXPECT_EQ(problems.empty(), file.root().has_value());
  return texts(problems);
}

TEST(JsonReader, MalformedTextHasLineAndColumn) {
  EXPECT_THAT(parse_problems("{\n \"a\": 1,\n \"b\": ,\n}"), ElementsAre(HasSubstr("f.json line 3, column 7")));
  EXPECT_THAT(parse_problems(""), ElementsAre(HasSubstr("line 1, column 1")));
  EXPECT_THAT(parse_problems("{\"a\": NaN}"), ElementsAre(HasSubstr("line 1, column 7")));
  EXPECT_THAT(parse_problems("{\"a\": 1"), ElementsAre(HasSubstr("line 1, column 8")));
  EXPECT_THAT(parse_problems("{\"a\": 1e999}"), SizeIs(1));
}

TEST(JsonReader, RepeatedKeysAtEveryDepth) {
  Problems problems;
  const JsonFile file("f.json", R"({"a": [1, {"b": 1, "c": {"d": 0, "d": 1}, "b": 2}], "a": 3})", &problems);
  EXPECT_THAT(texts(problems), ElementsAre(HasSubstr("f.json /a/1/c/d: found the key twice"),
                                           HasSubstr("f.json /a/1/b: found the key twice"),
                                           HasSubstr("f.json /a: found the key twice")));
}

TEST(JsonReader, EveryWrongValueIsReportedAndReadingGoesOn) {
  Problems problems;
  const JsonFile file(
      "f.json", R"({"t": 5, "e": "", "n": "x", "big": 11, "i": 1.5, "f": 1, "list": ["a", 2], "obj": [], "odd/~": 0})",
      &problems);
  const JsonNode root = file.root().value();
  EXPECT_TRUE(root.allow({"t", "e", "n", "big", "i", "f", "list", "obj"}));
  EXPECT_EQ(root.text("t"), "");
  EXPECT_EQ(root.text("e"), "");
  EXPECT_EQ(root.text("missing"), "");
  EXPECT_EQ(root.number("n"), 0.0);
  EXPECT_EQ(root.number("big", {0.0, 10.0}), 0.0);
  EXPECT_EQ(root.number("absent", kPositive), 0.0);
  EXPECT_EQ(root.integer("i", 1, 9), 1);
  EXPECT_TRUE(root.flag("f", true));
  EXPECT_THAT(root.texts("list"), ElementsAre("a"));
  EXPECT_FALSE(root.child("obj").value().allow({}));
  EXPECT_THAT(texts(problems),
              ElementsAre(HasSubstr("/odd~1~0: found an unknown key"), HasSubstr("/t: found 5, allowed a text"),
                          HasSubstr("/e: found an empty text"), HasSubstr("/missing: found nothing, allowed a text"),
                          HasSubstr("/n: found \"x\", allowed a number"), HasSubstr("/big: found 11, allowed 0 to 10"),
                          HasSubstr("/absent: found nothing, allowed a number above 0"),
                          HasSubstr("/i: found 1.5, allowed a whole number from 1 to 9"),
                          HasSubstr("/f: found 1, allowed true"), HasSubstr("/list/1: found 2, allowed a text"),
                          HasSubstr("/obj: found [], allowed an object")));
}

TEST(JsonReader, OptionalValuesMayBeAbsent) {
  Problems problems;
  const JsonFile file("f.json", "{}", &problems);
  const JsonNode root = file.root().value();
  EXPECT_FALSE(root.optional_number("a"));
  EXPECT_EQ(root.optional_text("a"), "");
  EXPECT_TRUE(root.items("a").empty());
  EXPECT_FALSE(root.child("a"));
  EXPECT_TRUE(problems.empty());
}

TEST(JsonReader, UnreadableFileIsAProblem) {
  Problems problems;
  EXPECT_EQ(read_text_file("/nonexistent/file.json", &problems), "");
  EXPECT_THAT(texts(problems), ElementsAre(HasSubstr("/nonexistent/file.json: found no readable file")));
}

}  // namespace
}  // namespace stillshed
