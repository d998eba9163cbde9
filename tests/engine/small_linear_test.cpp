#include "engine/small_linear.hpp"

#include <gtest/gtest.h>

#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

SquareArray random_array(testing::Random& random, std::size_t size) {
  SquareArray a{};
  for (std::size_t i = 0; i < size; ++i) {
    for (std::size_t j = 0; j < size; ++j) {
      a[i][j] = random.uniform(-1.0, 1.0);
    }
  }
  return a;
}

TEST(SmallLinear, solution_satisfies_the_equations) {
  testing::Random random(1);
  for (std::size_t size = 1; size <= kMostUnknowns; ++size) {
    const SquareArray a = random_array(random, size);
    std::array<double, kMostUnknowns> y{};
    for (std::size_t i = 0; i < size; ++i) {
      y[i] = random.uniform(-1.0, 1.0);
    }
    std::array<double, kMostUnknowns> b{};
    for (std::size_t i = 0; i < size; ++i) {
      for (std::size_t j = 0; j < size; ++j) {
        b[i] += a[i][j] * y[j];
      }
    }
    SquareArray work = a;
    ASSERT_TRUE(solve_in_place(work, b, size));
    for (std::size_t i = 0; i < size; ++i) {
      EXPECT_NEAR(b[i], y[i], 1e-10);
    }
  }
}

TEST(SmallLinear, inverse_times_matrix_is_unity) {
  testing::Random random(2);
  for (std::size_t size = 1; size <= kMostUnknowns; ++size) {
    const SquareArray a = random_array(random, size);
    SquareArray work = a;
    SquareArray inverse{};
    ASSERT_TRUE(invert(work, inverse, size));
    for (std::size_t i = 0; i < size; ++i) {
      for (std::size_t j = 0; j < size; ++j) {
        double sum = 0.0;
        for (std::size_t k = 0; k < size; ++k) {
          sum += inverse[i][k] * a[k][j];
        }
        EXPECT_NEAR(sum, i == j ? 1.0 : 0.0, 1e-10);
      }
    }
  }
}

TEST(SmallLinear, zero_on_the_diagonal_is_no_obstacle) {
  SquareArray a{};
  a[0][1] = 2.0;
  a[1][0] = 4.0;
  std::array<double, kMostUnknowns> b{6.0, 8.0};
  SquareArray work = a;
  ASSERT_TRUE(solve_in_place(work, b, 2));
  EXPECT_DOUBLE_EQ(b[0], 2.0);
  EXPECT_DOUBLE_EQ(b[1], 3.0);
}

TEST(SmallLinear, singular_and_undefined_matrices_are_refused) {
  SquareArray inverse{};
  SquareArray singular{};
  singular[0] = {1.0, 2.0};
  singular[1] = {2.0, 4.0};
  SquareArray work = singular;
  EXPECT_FALSE(invert(work, inverse, 2));
  std::array<double, kMostUnknowns> b{1.0, 1.0};
  EXPECT_FALSE(solve_in_place(singular, b, 2));
  for (const double bad : {std::nan(""), HUGE_VAL}) {
    SquareArray undefined{};
    undefined[0] = {1.0, bad};
    undefined[1] = {0.5, 3.0};
    EXPECT_FALSE(invert(undefined, inverse, 2)) << bad;
  }
}

}  // namespace
}  // namespace stillshed
