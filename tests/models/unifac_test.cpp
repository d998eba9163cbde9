#include "models/unifac.hpp"

#include <gmock/gmock.h>

#include <algorithm>
#include <cmath>
#include <utility>

#include "params/load.hpp"
#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Unifac, OriginalObeysTheLaws) {
  laws::expect_activity_laws(samples::unifac(GroupModel::unifac, samples::ethanol_benzene_water()), {.name = "unifac"});
}

TEST(Unifac, DortmundObeysTheLaws) {
  laws::expect_activity_laws(samples::unifac(GroupModel::dortmund, samples::ethanol_benzene_water()),
                             {.name = "unifac-dortmund"});
}

// The reference vectors carry their own tables; those on file must be the same numbers.
TEST(Unifac, TablesOfTheReferenceVectorsAreThoseOnFile) {
  const Facts facts = load_parameter_folder(STILLSHED_TEST_DATA "/../params");
  for (const GroupModel kind : {GroupModel::unifac, GroupModel::dortmund}) {
    const GroupTable& ours = samples::group_table(kind);
    const GroupTable& on_file = kind == GroupModel::unifac ? facts.unifac : facts.dortmund;
    EXPECT_EQ(ours.combinatorial_exponent, on_file.combinatorial_exponent);
    for (const auto& [id, subgroup] : ours.subgroups) {
      ASSERT_EQ(on_file.subgroups.count(id), 1U) << id;
      EXPECT_EQ(subgroup.R, on_file.subgroups.at(id).R) << id;
      EXPECT_EQ(subgroup.Q, on_file.subgroups.at(id).Q) << id;
      EXPECT_EQ(subgroup.main_group, on_file.subgroups.at(id).main_group) << id;
    }
    for (const auto& [pair, value] : ours.interactions) {
      ASSERT_EQ(on_file.interactions.count(pair), 1U) << pair.first << "-" << pair.second;
      EXPECT_EQ(value.a_K, on_file.interactions.at(pair).a_K) << pair.first << "-" << pair.second;
      EXPECT_EQ(value.b, on_file.interactions.at(pair).b);
      EXPECT_EQ(value.c_per_K, on_file.interactions.at(pair).c_per_K);
    }
  }
}

TEST(Unifac, FiveComponentsObeyTheLaws) {
  const samples::GroupMixture five{
      {"acetone", "methanol", "water", "n-hexane", "benzene"},
      {samples::groups({{1, 1}, {18, 1}}), samples::groups({{15, 1}}), samples::groups({{16, 1}}),
       samples::groups({{1, 2}, {2, 4}}), samples::groups({{9, 6}})}};
  for (const GroupModel kind : {GroupModel::unifac, GroupModel::dortmund}) {
    laws::expect_activity_laws(samples::unifac(kind, five), {.name = "five components", .points = 60});
  }
}

TEST(Unifac, MissingGroupPairIsNamedAndNeverZero) {
  GroupTable table = samples::group_table(GroupModel::unifac);
  table.interactions.erase({3, 7});
  table.interactions.erase({7, 3});
  const auto mixture = samples::ethanol_benzene_water();
  try {
    const Unifac model(table, mixture.groups, mixture.names);
    FAIL() << "accepted";
  } catch (const InputError& error) {
    ASSERT_EQ(error.problems().size(), 1U) << error.what();
    EXPECT_THAT(error.what(), testing::AllOf(testing::HasSubstr("ACH"), testing::HasSubstr("H2O"),
                                             testing::HasSubstr("benzene"), testing::HasSubstr("water")));
  }
  const auto missing = missing_group_pairs(table, mixture.groups);
  ASSERT_EQ(missing.size(), 1U);
  EXPECT_EQ(missing[0].component_i, 1);
  EXPECT_EQ(missing[0].component_j, 2);
}

TEST(Unifac, FillersAreOnRequestOnly) {
  GroupTable table = samples::group_table(GroupModel::unifac);
  table.interactions.erase({3, 7});
  table.interactions.erase({7, 3});
  const auto mixture = samples::ethanol_benzene_water();
  const Unifac filled(table, mixture.groups, mixture.names, {.fill_missing = true});
  const Unifac whole = samples::unifac(GroupModel::unifac, mixture);
  const Composition x{0.3, 0.3, 0.4};
  EXPECT_GT(std::abs(filled.ln_gamma(350.0, x)[2] - whole.ln_gamma(350.0, x)[2]), 0.1);
  // The faces that do not need the missing pair are untouched.
  const Composition edge{0.4, 0.6};
  EXPECT_EQ(filled.face({0, 1}).ln_gamma(350.0, edge)[0], whole.face({0, 1}).ln_gamma(350.0, edge)[0]);
}

TEST(Unifac, ComponentWithoutGroupsIsRefused) {
  auto mixture = samples::ethanol_benzene_water();
  mixture.groups[0].groups.clear();
  EXPECT_THROW(static_cast<void>(samples::unifac(GroupModel::unifac, mixture)), InputError);
}

TEST(Unifac, ExponentOverARangeOfTemperatureIsSharp) {
  // Dortmund parameters whose terms run against each other, along each other, and turn inside the range.
  const GroupInteraction cases[] = {
      {500.0, -3.0, 4e-3}, {-300.0, 1.0, -2.5e-3}, {2777.0, -4.674, 1.551e-3}, {-200.0, 0.5, 3e-3}};
  for (const GroupInteraction& p : cases) {
    for (const auto& [low, high] : {std::pair(300.0, 400.0), std::pair(345.0, 346.0), std::pair(200.0, 600.0)}) {
      const Interval T(low, high);
      const Interval range = group_exponent(p, T, 1.0 / T);
      double least = HUGE_VAL;
      double most = -HUGE_VAL;
      for (int k = 0; k <= 4000; ++k) {
        const double t = low + (high - low) * k / 4000.0;
        const double value = p.a_K / t + p.b + p.c_per_K * t;
        least = std::min(least, value);
        most = std::max(most, value);
      }
      EXPECT_LE(range.lower(), least);
      EXPECT_GE(range.upper(), most);
      EXPECT_NEAR(range.lower(), least, 1e-6);
      EXPECT_NEAR(range.upper(), most, 1e-6);
    }
  }
}

}  // namespace
}  // namespace stillshed
