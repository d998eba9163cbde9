#include "models/uniquac.hpp"

#include <gmock/gmock.h>

#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Uniquac, ObeysTheLawsWithItsOwnResidualSurface) {
  const Uniquac model(samples::uniquac_full());
  laws::expect_activity_laws(model, {.name = "uniquac"});
}

TEST(Uniquac, PartsAddUp) {
  const Uniquac model(samples::uniquac_full());
  const Composition x{0.2, 0.5, 0.3};
  const auto whole = model.ln_gamma(340.0, x);
  const auto size = model.combinatorial(x);
  const auto rest = model.residual(340.0, x);
  for (int i = 0; i < 3; ++i) {
    EXPECT_NEAR(whole[i], size[i] + rest[i], 1e-15);
  }
}

TEST(Uniquac, ListsEveryBadEntry) {
  UniquacParameters p = samples::uniquac_full();
  p.r[1] = 0.0;
  p.q_residual[2] = -1.0;
  p.ln_tau.b_K(0, 0) = 5.0;
  try {
    const Uniquac model(p);
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_EQ(error.problems().size(), 3U) << error.what();
  }
}

}  // namespace
}  // namespace stillshed
