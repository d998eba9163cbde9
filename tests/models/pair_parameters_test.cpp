#include "models/pair_parameters.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/models/sample_models.hpp"

namespace stillshed {
namespace {

TEST(PairParameters, FormAndSlope) {
  const PairParameters p = samples::wilson_full();
  const double T = 333.0;
  const auto shared = p.temperature(T, true);
  EXPECT_NEAR(p.at(0, 1, shared), -0.4 - 150.0 / T + 0.03 * std::log(T) + 2e-4 * T, 1e-15);
  const double step = 1e-3;
  const double difference =
      (p.at(0, 1, p.temperature(T + step, true)) - p.at(0, 1, p.temperature(T - step, true))) / (2.0 * step);
  EXPECT_NEAR(p.slope(0, 1, shared), difference, 1e-9);
}

TEST(PairParameters, KnowsWhatItDependsOn) {
  PairParameters p(2);
  p.a(0, 1) = 1.0;
  EXPECT_FALSE(p.depends_on_temperature());
  EXPECT_FALSE(p.uses_ln_T());
  p.f_per_K(1, 0) = 1e-4;
  EXPECT_TRUE(p.depends_on_temperature());
  p.e(1, 0) = 0.1;
  EXPECT_TRUE(p.uses_ln_T());
  EXPECT_FALSE(p.face({0}).depends_on_temperature());
}

}  // namespace
}  // namespace stillshed
