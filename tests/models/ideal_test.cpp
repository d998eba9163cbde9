#include "models/ideal.hpp"

#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Ideal, IsZeroEverywhere) {
  const Ideal model(3);
  for (const double value : model.ln_gamma(300.0, Composition{0.2, 0.3, 0.5})) {
    EXPECT_EQ(value, 0.0);
  }
  EXPECT_FALSE(model.depends_on_temperature());
  EXPECT_EQ(model.face({0, 2}).size(), 2);
}

TEST(Ideal, ObeysTheLaws) {
  laws::expect_activity_laws(Ideal(4), {.name = "ideal"});
}

}  // namespace
}  // namespace stillshed
