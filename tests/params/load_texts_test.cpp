#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <set>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;
using ::testing::IsSupersetOf;

TEST(LoadTexts, EveryCautionIsThere) {
  std::set<std::string> codes;
  for (const CautionRecord& caution : test::loaded_facts().cautions) {
    codes.insert(caution.code);
    const int number = std::stoi(caution.code.substr(1));
    EXPECT_EQ(caution.above_verdict, (number >= 2 && number <= 10) || number == 14) << caution.code;
  }
  EXPECT_EQ(codes.size(), 24U);
  EXPECT_THAT(test::loaded_facts().caution_closing, HasSubstr("qualified person"));
}

// ICH Q3C(R9): benzene class 1, 2 ppm; triethylamine and 2-methyltetrahydrofuran are class 3.
TEST(LoadTexts, ResidualLimits) {
  std::map<std::string, ResidualLimit> rows;
  for (const ResidualLimit& limit : test::loaded_facts().residual_limits) {
    rows[limit.component] = limit;
  }
  EXPECT_EQ(rows.at("benzene").limit_ppm, 2.0);
  EXPECT_EQ(rows.at("benzene").solvent_class, "1");
  EXPECT_EQ(rows.at("triethylamine").solvent_class, "3");
  EXPECT_EQ(rows.at("2-methyltetrahydrofuran").solvent_class, "3");
  EXPECT_EQ(rows.at("ethylene-glycol").limit_ppm, 620.0);
}

TEST(LoadTexts, EveryClassOfProblem) {
  const test::ParameterFolder folder;
  folder.replace("names.json", "[\"DMA\"]", "[\"DMA\", \"MeOH\", \"xylene\"]");
  folder.replace("cautions.json", "\"trigger\": \"near-dry\"", "\"trigger\": \"dry\"");
  folder.replace("cautions.json", "\"substances\": [\"dimethyl-sulfoxide\"]", "\"substances\": [\"dmso\"]");
  folder.replace("cautions.json", "\"with\": [\"chloroform\"], ", "");
  folder.replace("cautions.json", "\"hazards\": [\"energetic-nitro\"]", "\"hazards\": [\"loud\"]");
  folder.replace("ich_q3c.json", "\"class\": \"1\"", "\"class\": \"0\"");
  folder.replace("ich_q3c.json", "\"cas\": \"56-23-5\"", "\"cas\": \"67-66-3\"");
  EXPECT_THAT(folder.problems(),
              IsSupersetOf({HasSubstr("/ambiguous/0/names: found \"MeOH\", which names methanol"),
                            HasSubstr("/names: found \"xylene\" a second time"), HasSubstr("/trigger: found \"dry\""),
                            HasSubstr("/substances: found \"dmso\""), HasSubstr("/with: found 0 entries"),
                            HasSubstr("/hazards: found \"loud\""), HasSubstr("/limits/0/class: found \"0\""),
                            HasSubstr("/limits/1/cas: found \"67-66-3\", allowed the CAS number of the component")}));
}

}  // namespace
}  // namespace stillshed
