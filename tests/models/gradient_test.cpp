#include "models/gradient.hpp"

#include <gtest/gtest.h>

#include "tests/models/sample_models.hpp"

namespace stillshed {
namespace {

// The promise of models/gradient.hpp that the proof rests on: differences within a row are reduced derivatives, so the
// interval difference encloses the slope of ln gamma along every segment of the simplex inside the box.
TEST(Gradient, MeanValueTheoremHoldsOnTheSimplex) {
  const Nrtl model(samples::nrtl_full());
  const Composition a{0.30, 0.40, 0.30};
  const Composition b{0.36, 0.33, 0.31};
  Vec<Interval> box;
  for (int i = 0; i < 3; ++i) {
    box.push_back(Interval(std::min(a[i], b[i]), std::max(a[i], b[i])));
  }
  const Interval T(330.0, 340.0);
  LnGammaGradient<Interval> g;
  model.ln_gamma_with_gradient(T, box, g);
  const auto at_a = model.ln_gamma(330.0, a);
  const auto at_b = model.ln_gamma(340.0, b);
  for (int i = 0; i < 3; ++i) {
    const Interval change = (g.d_dx(i, 0) - g.d_dx(i, 2)) * (b[0] - a[0]) +
                            (g.d_dx(i, 1) - g.d_dx(i, 2)) * (b[1] - a[1]) + g.d_dT[i] * 10.0;
    EXPECT_TRUE(change.contains(at_b[i] - at_a[i])) << i;
  }
}

}  // namespace
}  // namespace stillshed
