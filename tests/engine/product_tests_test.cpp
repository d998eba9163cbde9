#include "engine/product_tests.hpp"

#include <gtest/gtest.h>

#include "models/ideal.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

Mixture heavy_and_light() {
  const Mixture plain = testing::simple_mixture({350.0, 360.0}, Ideal(2));
  std::vector<MixtureComponent> components = plain.components();
  components[0].molar_mass_g_mol = 46.069;
  components[1].molar_mass_g_mol = 18.015;
  return {components, Ideal(2)};
}

using What = ProductTest::What;

TEST(ProductTests, EachTestUsesItsOwnBasis) {
  const Mixture mixture = heavy_and_light();
  const Composition x = {0.9608056197087118, 1.0 - 0.9608056197087118};
  const TestOutcome mole = evaluate({What::purity, 0, true, 0.975, Basis::mole}, mixture, x, 1.0);
  const TestOutcome mass = evaluate({What::purity, 0, true, 0.975, Basis::mass}, mixture, x, 1.0);
  EXPECT_NEAR(mole.limit, 0.9608056197087118, 1e-15);
  EXPECT_NEAR(mass.limit, 0.9842985203391914, 1e-12);
  EXPECT_FALSE(mole.pass);
  EXPECT_TRUE(mass.pass);
  EXPECT_NEAR(mass.margin, 0.0092985203391914, 1e-12);
}

TEST(ProductTests, ImpuritiesAndRecoveries) {
  const Mixture mixture = heavy_and_light();
  const TestOutcome impurity = evaluate({What::impurity, 1, false, 0.003, Basis::mole}, mixture, {0.998, 0.002}, 0.4);
  EXPECT_TRUE(impurity.pass);
  EXPECT_NEAR(impurity.margin, 0.001, 1e-15);
  const TestOutcome recovery = evaluate({What::recovery, 0, true, 0.5, Basis::mole}, mixture, {0.998, 0.002}, 0.4);
  EXPECT_FALSE(recovery.pass);
  EXPECT_DOUBLE_EQ(recovery.limit, 0.4);
}

TEST(ProductTests, RoomIsAShareOfWhatTheTestAllows) {
  const Mixture mixture = heavy_and_light();
  const auto purity = [&](double x, double spec) {
    return evaluate({What::purity, 0, true, spec, Basis::mole}, mixture, {x, 1.0 - x}, 1.0);
  };
  EXPECT_TRUE(has_room(purity(0.996, 0.995), 0.2));
  EXPECT_FALSE(has_room(purity(0.9959, 0.995), 0.2));
  EXPECT_FALSE(has_room(purity(0.995, 0.995), 0.2));  // met, no room
  EXPECT_TRUE(purity(0.995, 0.995).pass);
  EXPECT_FALSE(has_room(purity(1.0, 1.0), 0.2));  // a spec that allows nothing leaves no room
  EXPECT_TRUE(has_room(evaluate({What::impurity, 1, false, 0.01, Basis::mole}, mixture, {0.992, 0.008}, 1.0), 0.2));
  EXPECT_FALSE(has_room(evaluate({What::impurity, 1, false, 0.01, Basis::mole}, mixture, {0.991, 0.009}, 1.0), 0.2));
}

TEST(ProductTests, RecoveryAskedForReplacesTheDefault) {
  ProductSpec spec;
  EXPECT_DOUBLE_EQ(spec.required_recovery(), 0.5);
  spec.tests = {{What::recovery, 0, true, 0.3, Basis::mole}, {What::recovery, 0, true, 0.4, Basis::mole}};
  EXPECT_DOUBLE_EQ(spec.required_recovery(), 0.4);
}

}  // namespace
}  // namespace stillshed
