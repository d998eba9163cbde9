#include "reports/quick_form.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

namespace stillshed {
namespace {

struct Written {
  OrderedJson json = OrderedJson::object();
  SpokenWords spoken;
  Problems problems;
};

Written write(const QuickForm& form) {
  Written result;
  write_quick_form(form, result.json, result.spoken, result.problems);
  return result;
}

TEST(QuickForm, TheExampleOfTheHelp) {
  QuickForm form;
  form.stream = {"acetone=42", "methanol=33", "water=23", "residue=2"};
  form.basis = "wt%";
  form.pressure = "1atm";
  form.products = {"acetone >= 99.5 wt%", "acetone: water <= 0.3 wt%", "methanol"};
  form.stages = 25;
  const Written result = write(form);
  EXPECT_TRUE(result.problems.empty());
  EXPECT_EQ(
      result.json.dump(),
      R"({"stillshed_case":1,"stream":{"acetone":"42 wt%","methanol":"33 wt%","water":"23 wt%","residue":"2 wt%"},)"
      R"("pressure":"1atm","products":{"acetone":[">= 99.5 wt%","water <= 0.3 wt%"],"methanol":[]},"plant":{"stages":25}})");
  EXPECT_EQ(result.spoken.at("/stream/acetone"), "acetone=42");
}

TEST(QuickForm, UnitsOfTheirOwnRestAndRanges) {
  QuickForm form;
  form.stream = {"acetone=55-75", "methanol=<0.1", "water=rest", "ethanol=2 wt%", "residue=1"};
  form.basis = "mol%";
  const OrderedJson stream = write(form).json.at("stream");
  EXPECT_EQ(stream.at("acetone"), "55-75 mol%");
  EXPECT_EQ(stream.at("methanol"), "<0.1 mol%");
  EXPECT_EQ(stream.at("water"), "rest");
  EXPECT_EQ(stream.at("ethanol"), "2 wt%");
  EXPECT_EQ(stream.at("residue"), "1 wt%");
}

TEST(QuickForm, WithoutABasisNumbersStayBare) {
  QuickForm form;
  form.stream = {"acetone=42"};
  EXPECT_EQ(write(form).json.at("stream").at("acetone"), "42");
}

TEST(QuickForm, BadWords) {
  QuickForm form;
  form.stream = {"=42", "acetone=", "water=1", "water=2"};
  form.products = {">= 99 wt%"};
  EXPECT_EQ(write(form).problems.size(), 4U);
  form.basis = "%";
  EXPECT_EQ(write(form).problems.front().where, "command line: --basis");
  form.basis = "bar";
  EXPECT_EQ(write(form).problems.front().found, "\"bar\"");
}

TEST(QuickForm, OptionsReplaceBlocksOfACaseFile) {
  Written result;
  result.json = OrderedJson::parse(R"({"stillshed_case": 1, "pressure": "1 atm", "plant": {"coolant": "5 degC"}})");
  QuickForm form;
  form.pressure = "2 bar";
  form.stages = 7;
  write_quick_form(form, result.json, result.spoken, result.problems);
  EXPECT_EQ(result.json.at("pressure"), "2 bar");
  EXPECT_EQ(result.json.at("plant").dump(), R"({"coolant":"5 degC","stages":7})");
}

TEST(QuickForm, StreamWordsHaveAnEqualsSign) {
  EXPECT_TRUE(is_stream_word("acetone=42"));
  EXPECT_FALSE(is_stream_word("tank.json"));
}

}  // namespace
}  // namespace stillshed
