#include "reports/model_choice.hpp"

#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

ModelChoice choose(const std::vector<std::string>& ids, const std::string& model = "auto") {
  Case input;
  input.model = model;
  std::vector<const ComponentRecord*> records;
  for (const std::string& id : ids) {
    records.push_back(catalog().by_id(id));
    EXPECT_NE(records.back(), nullptr) << id;
  }
  return choose_model(input, records, catalog().facts());
}

TEST(ModelChoice, DortmundWhereItCoversEveryPair) {
  const ModelChoice choice = choose({"acetone", "methanol", "water"});
  EXPECT_EQ(choice.kind, "unifac-dortmund");
  EXPECT_TRUE(choice.missing.empty());
  ASSERT_EQ(choice.pairs.size(), 3U);
  EXPECT_EQ(choice.pairs[0].evidence, Evidence::predicted);
  EXPECT_NE(choice.pairs[0].record.find("unifac-dortmund groups"), std::string::npos);
}

/// Whatever is chosen, the rule holds: checked on every pair of common solvents.
TEST(ModelChoice, FollowsTheRuleOnManyPairs) {
  const std::vector<std::string> ids = {
      "water",      "acetone",         "methanol",     "tetrahydrofuran", "dimethyl-sulfoxide",
      "chloroform", "ethylene-glycol", "acetonitrile", "triethylamine",   "n-methyl-2-pyrrolidone",
      "toluene"};
  int fell_back = 0;
  int missing = 0;
  for (std::size_t a = 0; a < ids.size(); ++a) {
    for (std::size_t b = a + 1; b < ids.size(); ++b) {
      const std::vector<std::string> pair = {ids[a], ids[b]};
      const auto covered = [&](GroupModel model) {
        return catalog().has_groups(model, pair[0]) && catalog().has_groups(model, pair[1]) &&
               catalog().group_gaps(model, pair).empty();
      };
      const ModelChoice choice = choose(pair);
      const bool complete = choice.missing.empty() && choice.refusal.empty();
      EXPECT_EQ(complete, covered(GroupModel::dortmund) || covered(GroupModel::unifac)) << pair[0] << " " << pair[1];
      if (covered(GroupModel::dortmund)) {
        EXPECT_EQ(choice.kind, "unifac-dortmund");
      } else if (covered(GroupModel::unifac)) {
        EXPECT_EQ(choice.kind, "unifac");
        ++fell_back;
      } else {
        EXPECT_EQ(choice.pairs[0].evidence, Evidence::none);
        ++missing;
      }
    }
  }
  EXPECT_GT(fell_back, 0);
  EXPECT_GT(missing, 0);
}

TEST(ModelChoice, MissingPairsNameTheirGroups) {
  const ModelChoice choice = choose({"ethylene-glycol", "chloroform"}, "unifac");
  ASSERT_EQ(choice.missing.size(), 1U);
  EXPECT_EQ(choice.missing[0].i, 0);
  EXPECT_EQ(choice.missing[0].j, 1);
  EXPECT_NE(choice.missing[0].groups.find("31"), std::string::npos);
  EXPECT_NE(choice.missing[0].groups.find("23"), std::string::npos);
}

TEST(ModelChoice, AsAskedFor) {
  EXPECT_EQ(choose({"acetone", "water"}, "unifac").kind, "unifac");
  const ModelChoice ideal = choose({"acetone", "water"}, "ideal");
  EXPECT_EQ(ideal.kind, "ideal");
  EXPECT_EQ(ideal.pairs[0].evidence, Evidence::user);
  Case input;
  input.model = "user";
  input.user_model = Margules(Matrix<double>(2, 0.0));
  EXPECT_EQ(choose_model(input, {nullptr, nullptr}, catalog().facts()).kind, "margules");
}

}  // namespace
}  // namespace stillshed::test
