#include "models/nrtl.hpp"

#include <gmock/gmock.h>

#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Nrtl, ObeysTheLawsWithEveryCoefficient) {
  const Nrtl model(samples::nrtl_full());
  EXPECT_TRUE(model.depends_on_temperature());
  laws::expect_activity_laws(model, {.name = "nrtl, a to f"});
}

TEST(Nrtl, ObeysTheLawsWithoutTemperature) {
  const Nrtl model(samples::nrtl_constant());
  EXPECT_FALSE(model.depends_on_temperature());
  laws::expect_activity_laws(model, {.name = "nrtl, constant"});
}

TEST(Nrtl, BinaryClosedForm) {
  NrtlParameters p(2);
  p.tau.a = samples::matrix({{0, 0.9}, {1.7, 0}});
  p.alpha = samples::matrix({{0, 0.3}, {0.3, 0}});
  const double x1 = 0.35;
  const double x2 = 0.65;
  const double G12 = std::exp(-0.3 * 0.9);
  const double G21 = std::exp(-0.3 * 1.7);
  const double first = G21 / (x1 + x2 * G21);
  const double second = x2 + x1 * G12;
  const auto ln_gamma = Nrtl(p).ln_gamma(300.0, Composition{x1, x2});
  EXPECT_NEAR(ln_gamma[0], x2 * x2 * (1.7 * first * first + 0.9 * G12 / (second * second)), 1e-15);
}

TEST(Nrtl, ListsEveryBadEntry) {
  NrtlParameters p = samples::nrtl_full();
  p.tau.a(1, 1) = 0.3;
  p.tau.b_K(0, 2) = std::numeric_limits<double>::infinity();
  p.alpha(0, 1) = 1.7;
  try {
    const Nrtl model(p);
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_EQ(error.problems().size(), 4U) << error.what();  // diagonal, infinite, range, symmetry
    EXPECT_THAT(error.what(), testing::HasSubstr("nrtl/alpha/0/1"));
  }
}

}  // namespace
}  // namespace stillshed
