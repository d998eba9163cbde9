#include "models/margules.hpp"

#include <gmock/gmock.h>

#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Margules, ObeysTheLaws) {
  const Margules model(
      samples::matrix({{0, 1.2, -0.8, 0.3}, {1.2, 0, 1.9, -1.1}, {-0.8, 1.9, 0, 0.6}, {0.3, -1.1, 0.6, 0}}));
  laws::expect_activity_laws(model, {.name = "margules"});
}

TEST(Margules, BinaryClosedForm) {
  const Margules model(samples::matrix({{0, 0.95}, {0.95, 0}}));
  const auto ln_gamma = model.ln_gamma(300.0, Composition{0.3, 0.7});
  EXPECT_NEAR(ln_gamma[0], 0.95 * 0.7 * 0.7, 1e-15);
  EXPECT_NEAR(ln_gamma[1], 0.95 * 0.3 * 0.3, 1e-15);
}

TEST(Margules, AhujaExample15_18Azeotrope) {
  // P. Ahuja, Chemical Engineering Thermodynamics, Example 15.18: ln g = 0.95 x^2, P1 = 79.8, P2 = 40.5 kPa,
  // azeotrope at x1 = 0.856959 and 81.366308 kPa (half a unit of the last printed digit).
  const Margules model(samples::matrix({{0, 0.95}, {0.95, 0}}));
  const auto ln_gamma = model.ln_gamma(343.15, Composition{0.856959, 1.0 - 0.856959});
  EXPECT_NEAR(79.8 * std::exp(ln_gamma[0]), 81.366308, 1e-4);
  EXPECT_NEAR(40.5 * std::exp(ln_gamma[1]), 81.366308, 1e-4);
}

TEST(Margules, ListsEveryBadEntry) {
  constexpr double nan = std::numeric_limits<double>::quiet_NaN();
  try {
    const Margules model(samples::matrix({{0.5, 1.0, nan}, {2.0, 0, 0.1}, {0.0, 0.1, 0}}));
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_EQ(error.problems().size(), 4U) << error.what();  // diagonal, NaN, two mirror entries
    EXPECT_THAT(error.what(), testing::HasSubstr("margules/A/1/0"));
  }
}

}  // namespace
}  // namespace stillshed
