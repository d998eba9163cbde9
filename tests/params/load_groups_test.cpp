#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;
using ::testing::IsSupersetOf;

// Hansen et al. (1991) and the papers before it: CH2-H2O 1318/300, subgroup CH3 0.9011/0.848.
TEST(LoadGroups, OriginalTableAsPublished) {
  const GroupTable& table = test::loaded_facts().unifac;
  EXPECT_EQ(table.model, GroupModel::unifac);
  EXPECT_DOUBLE_EQ(table.combinatorial_exponent, 1.0);
  EXPECT_EQ(table.main_groups.size(), 54U);
  EXPECT_EQ(table.subgroups.size(), 113U);
  EXPECT_DOUBLE_EQ(table.subgroups.at(1).R, 0.9011);
  EXPECT_DOUBLE_EQ(table.subgroups.at(1).Q, 0.848);
  EXPECT_DOUBLE_EQ(table.interactions.at({1, 7}).a_K, 1318.0);
  EXPECT_DOUBLE_EQ(table.interactions.at({7, 1}).a_K, 300.0);
  EXPECT_EQ(table.interactions.at({7, 1}).b, 0.0);
  EXPECT_EQ(table.recommended_low_K, 275.0);
  EXPECT_FALSE(table.notes.empty());
}

// Gmehling et al. (1993): CH2-H2O 1391.3, -3.6156, 0.001144 and -17.253, 0.8389, 0.0009021.
TEST(LoadGroups, DortmundTableAsPublished) {
  const GroupTable& table = test::loaded_facts().dortmund;
  EXPECT_DOUBLE_EQ(table.combinatorial_exponent, 0.75);
  EXPECT_EQ(table.main_groups.size(), 63U);
  EXPECT_EQ(table.subgroups.size(), 125U);
  EXPECT_EQ(table.interactions.at({1, 7}), (GroupInteraction{1391.3, -3.6156, 0.001144}));
  EXPECT_EQ(table.interactions.at({7, 1}), (GroupInteraction{-17.253, 0.8389, 0.0009021}));
  EXPECT_EQ(table.superseded.size(), 11U);
  EXPECT_FALSE(table.interactions.contains({1, 1}));
}

TEST(LoadGroups, EveryPairStandsBothWays) {
  for (const GroupTable* table : {&test::loaded_facts().unifac, &test::loaded_facts().dortmund}) {
    for (const auto& [pair, interaction] : table->interactions) {
      EXPECT_TRUE(table->interactions.contains({pair.second, pair.first})) << pair.first << '-' << pair.second;
    }
  }
}

TEST(LoadGroups, EveryClassOfProblem) {
  const test::ParameterFolder folder;
  const std::string file = "unifac.json";
  folder.replace(file, R"({"m": 1, "n": 2, "mn": [86.02], "nm": [-35.36], "class": 1})",
                 R"({"m": 1, "n": 2, "mn": [86.02], "class": 1})");
  folder.replace(file, R"({"m": 1, "n": 3, )", R"({"m": 1, "n": 555, )");
  folder.replace(file, R"({"m": 1, "n": 4, )", R"({"m": 1, "n": 5, )");
  folder.replace(file, R"({"m": 1, "n": 6, )", R"({"m": 6, "n": 1, )");
  folder.replace(file, R"("id": 2, "main_group": 1, )", R"("id": 2, "main_group": 999, )");
  folder.replace(file, R"("name": "CH", "R": 0.4469, "Q": 0.228)", R"("name": "CH", "R": 0, "Q": -1)");
  folder.replace(file, R"({"id": 16, "main_group": 7, )", R"({"id": 15, "main_group": 6, )");
  folder.replace(file, R"("hansen-1991")", R"("hansen")");
  EXPECT_THAT(
      folder.problems(),
      IsSupersetOf({HasSubstr("/interactions/0/nm: found 0 numbers, allowed a [K]"),
                    HasSubstr("/interactions/1/n: found 555, allowed an id of main_groups"),
                    HasSubstr("/interactions/3: found pair 1-5 a second time"),
                    HasSubstr("/interactions/4/m: found 6 with n = 1, allowed m below n"),
                    HasSubstr("/subgroups/1/main_group: found 999"), HasSubstr("/subgroups/2/R: found 0"),
                    HasSubstr("/subgroups/2/Q: found -1"), HasSubstr("/subgroups/15/id: found 15 a second time"),
                    HasSubstr("/main_groups: found group 7 (H2O) without a subgroup"),
                    HasSubstr("/sources: found \"hansen\"")}));
}

TEST(LoadGroups, DortmundWantsThreeNumbers) {
  const test::ParameterFolder folder;
  folder.replace("unifac_dortmund.json", "\"mn\": [189.66, -0.27232, 0]", "\"mn\": [189.66]");
  EXPECT_THAT(folder.problems(),
              testing::ElementsAre(HasSubstr("/interactions/0/mn: found 1 numbers, allowed a [K], b")));
}

}  // namespace
}  // namespace stillshed
