#include "models/derivatives.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

// f_i = T x_i^2 + sum_j x_j has known derivatives; nine components need three chunks of four directions.
TEST(Derivatives, ChunksCoverEveryVariable) {
  const auto f = [](const auto& T, const auto& x) {
    auto result = x;
    auto sum = x[0];
    for (int i = 1; i < x.size(); ++i) {
      sum = sum + x[i];
    }
    for (int i = 0; i < x.size(); ++i) {
      result[i] = T * x[i] * x[i] + sum;
    }
    return result;
  };
  for (const int n : {1, 3, 4, 7, 9}) {
    Vec<double> x(n);
    for (int i = 0; i < n; ++i) {
      x[i] = 0.1 * (i + 1);
    }
    const auto g = gradient_by_jets(5.0, x, f);
    for (int i = 0; i < n; ++i) {
      EXPECT_NEAR(g.d_dT[i], x[i] * x[i], 1e-15);
      for (int j = 0; j < n; ++j) {
        EXPECT_NEAR(g.d_dx(i, j), (i == j ? 10.0 * x[i] : 0.0) + 1.0, 1e-14) << n << i << j;
      }
    }
  }
}

}  // namespace
}  // namespace stillshed
