#include "models/unifac.hpp"

#include <gmock/gmock.h>

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
  EXPECT_THROW(samples::unifac(GroupModel::unifac, mixture), InputError);
}

}  // namespace
}  // namespace stillshed
