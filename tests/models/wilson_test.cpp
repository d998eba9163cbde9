#include "models/wilson.hpp"

#include <gmock/gmock.h>

#include "tests/models/sample_models.hpp"
#include "tests/support/laws.hpp"

namespace stillshed {
namespace {

TEST(Wilson, ObeysTheLaws) {
  const Wilson model(samples::wilson_full());
  EXPECT_TRUE(model.depends_on_temperature());
  laws::expect_activity_laws(model, {.name = "wilson"});
}

TEST(Wilson, ListsEveryBadEntry) {
  PairParameters p = samples::wilson_full();
  p.a(2, 2) = 1.0;
  p.f_per_K(0, 1) = std::numeric_limits<double>::quiet_NaN();
  try {
    const Wilson model(p);
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_EQ(error.problems().size(), 2U) << error.what();
  }
}

}  // namespace
}  // namespace stillshed
