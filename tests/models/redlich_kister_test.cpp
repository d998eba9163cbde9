#include "models/redlich_kister.hpp"

#include <gmock/gmock.h>

#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

RedlichKister ternary() {
  return {3, {{0, 1, {0.8, -0.3, 0.2, 0.1}}, {2, 1, {1.1, 0.4}}, {0, 2, {-0.5, 0.0, 0.7}}}};
}

TEST(RedlichKister, ObeysTheLaws) {
  laws::expect_activity_laws(ternary(), {.name = "redlich-kister"});
}

TEST(RedlichKister, IsTheDerivativeOfItsGibbsEnergy) {
  // n gE/RT by moles; its derivative with respect to n_k is ln gamma_k.
  const auto energy = [](const Composition& moles) {
    double total = 0.0;
    for (const double n : moles) {
      total += n;
    }
    double sum = 0.0;
    const RedlichKister model = ternary();
    for (const auto& pair : model.pairs()) {
      const double a = moles[pair.i] / total;
      const double b = moles[pair.j] / total;
      double power = 1.0;
      for (const double c : pair.c) {
        sum += a * b * c * power;
        power *= a - b;
      }
    }
    return total * sum;
  };
  const Composition x{0.25, 0.35, 0.4};
  const auto ln_gamma = ternary().ln_gamma(300.0, x);
  for (int k = 0; k < 3; ++k) {
    Composition up = x;
    Composition down = x;
    up[k] += 1e-5;
    down[k] -= 1e-5;
    EXPECT_NEAR(ln_gamma[k], (energy(up) - energy(down)) / 2e-5, 1e-9);
  }
}

TEST(RedlichKister, ListsEveryBadEntry) {
  constexpr double nan = std::numeric_limits<double>::quiet_NaN();
  try {
    const RedlichKister model(3, {{0, 1, {1.0}}, {1, 0, {1.0}}, {0, 3, {1.0}}, {1, 2, {}}, {0, 2, {nan}}});
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_EQ(error.problems().size(), 4U) << error.what();
  }
}

}  // namespace
}  // namespace stillshed
