#include "reports/json_write.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <random>

#include "params/errors.hpp"

namespace stillshed {
namespace {

using Layout = JsonWriter::Layout;

TEST(JsonWrite, KeepsOrderAndLayout) {
  JsonWriter json;
  json.open_object();
  json.member("z", 1);
  json.open_object("a", Layout::inline_);
  json.member("y", true);
  json.member("x", "text");
  json.close();
  json.open_array("list");
  json.value(0.1);
  json.null();
  json.close();
  json.open_array("empty");
  json.close();
  json.member("unknown", std::optional<double>());
  json.member_raw("raw", "{\"k\": [1, 2]}");
  json.close();
  EXPECT_EQ(json.finish(),
            "{\n  \"z\": 1,\n  \"a\": {\"y\": true, \"x\": \"text\"},\n  \"list\": [\n    0.1,\n    null\n  ],\n"
            "  \"empty\": [],\n  \"unknown\": null,\n  \"raw\": {\"k\": [1, 2]}\n}\n");
}

TEST(JsonWrite, EscapesWhatJsonForbids) {
  JsonWriter json;
  json.value("quote \" backslash \\ newline \n tab \t bell \x07 µ");
  EXPECT_EQ(json.finish(), "\"quote \\\" backslash \\\\ newline \\n tab \\t bell \\u0007 µ\"\n");
}

TEST(JsonWrite, NumbersReadBackAsTheSameDouble) {
  std::mt19937_64 random(7);
  std::uniform_real_distribution<double> exponent(-300.0, 300.0);
  for (int k = 0; k < 2000; ++k) {
    const double number = std::pow(10.0, exponent(random)) * (k % 2 == 0 ? 1.0 : -1.0);
    JsonWriter json;
    json.value(number);
    const std::string text = json.finish();
    EXPECT_EQ(std::strtod(text.c_str(), nullptr), number) << text;
  }
}

TEST(JsonWrite, RefusesWhatIsNotANumberAndNamesThePath) {
  for (const double bad :
       {std::nan(""), std::numeric_limits<double>::infinity(), -std::numeric_limits<double>::infinity()}) {
    JsonWriter json;
    json.open_object();
    json.open_array("points");
    json.open_object();
    try {
      json.member("temperature_K", bad);
      FAIL() << "accepted " << bad;
    } catch (const LogicError& error) {
      EXPECT_NE(std::string(error.what()).find("/points/[]/temperature_K"), std::string::npos) << error.what();
    }
  }
}

TEST(JsonWrite, RefusesMisplacedCalls) {
  {
    JsonWriter json;
    json.open_object();
    EXPECT_THROW(json.value(1), LogicError);
    EXPECT_THROW((void)json.finish(), LogicError);
  }
  {
    JsonWriter json;
    json.open_array();
    EXPECT_THROW(json.member("key", 1), LogicError);
  }
  {
    JsonWriter json;
    json.value(1);
    EXPECT_THROW(json.value(2), LogicError);
    EXPECT_THROW(json.close(), LogicError);
  }
}

}  // namespace
}  // namespace stillshed
