// Interval against MPFI (200-bit end points): every operation, seeded random operands of every kind.
// The witness is rounded to 200 bits, 147 more than a double carries: a result that MPFI does not hold is a broken
// bound.
#include "models/interval.hpp"

#include <gtest/gtest.h>
#include <mpfi.h>

#include <cmath>
#include <cstdlib>
#include <random>
#include <string>
#include <type_traits>

namespace stillshed {
namespace {

constexpr double kInfinity = std::numeric_limits<double>::infinity();
constexpr double kNan = std::numeric_limits<double>::quiet_NaN();

class Exact {
 public:
  Exact() { mpfi_init2(value, 200); }
  ~Exact() { mpfi_clear(value); }
  Exact(const Exact&) = delete;
  Exact& operator=(const Exact&) = delete;
  mpfi_t value;
};

bool holds(const Interval& ours, const Exact& exact) {
  return mpfr_cmp_d(&exact.value->left, ours.lower()) >= 0 && mpfr_cmp_d(&exact.value->right, ours.upper()) <= 0;
}

/// Widest acceptable excess, units in the last place of the larger exact end point.
bool is_tight(const Interval& ours, const Exact& exact, double ulps) {
  const double left = mpfr_get_d(&exact.value->left, MPFR_RNDD);
  const double right = mpfr_get_d(&exact.value->right, MPFR_RNDU);
  const double room = ulps * 2.3e-16 * std::max(std::abs(left), std::abs(right)) + 2e-300;
  return left - ours.lower() <= room && ours.upper() - right <= room;
}

int random_operations() {
  const char* full = std::getenv("STILLSHED_FULL");
  return full != nullptr && std::string(full) == "1" ? 20'000'000 : 1'000'000;
}

class Operands {
 public:
  explicit Operands(unsigned seed) : random_(seed) {}
  std::uint64_t bits() { return random_(); }
  double uniform(double low, double high) { return std::uniform_real_distribution<double>(low, high)(random_); }

  /// Magnitudes from 1e-12 to 1e12, now and then 0, 1 or an extreme.
  double number() {
    switch (random_() % 16) {
      case 0: return 0.0;
      case 1: return random_() % 2 == 0 ? 1.0 : -1.0;
      case 2: return uniform(-1.0, 1.0) * 1e-160;  // products of two underflow
      case 3: return uniform(-1.0, 1.0) * 1e150;
      default: return (random_() % 2 == 0 ? 1.0 : -1.0) * std::pow(10.0, uniform(-12.0, 12.0));
    }
  }
  /// Points, narrow and wide intervals.
  Interval interval() {
    const double a = number();
    switch (random_() % 4) {
      case 0: return a;
      case 1: return {a, a + std::abs(a) * std::pow(10.0, uniform(-16.0, 0.0))};
      default: {
        const double b = number();
        return {std::min(a, b), std::max(a, b)};
      }
    }
  }
  Interval positive(double low_exponent, double high_exponent) {
    const double a = std::pow(10.0, uniform(low_exponent, high_exponent));
    return random_() % 3 == 0 ? Interval(a) : Interval(a, a * (1.0 + std::pow(10.0, uniform(-16.0, 1.0))));
  }
  Interval fraction() {
    const double a = random_() % 8 == 0 ? 0.0 : uniform(0.0, 1.0);
    return random_() % 3 == 0 ? Interval(a) : Interval(a, std::min(1.0, a + std::pow(10.0, uniform(-16.0, 0.0))));
  }

 private:
  std::mt19937_64 random_;
};

void set(Exact& exact, const Interval& a) {
  mpfi_interv_d(exact.value, a.lower(), a.upper());
}

std::string text(const Interval& a) {
  char buffer[80];
  std::snprintf(buffer, sizeof buffer, "[%.17g, %.17g]", a.lower(), a.upper());
  return buffer;
}

TEST(Interval, ArithmeticHoldsTheExactResult) {
  constexpr unsigned seed = 977;
  Operands draw(seed);
  Exact a;
  Exact b;
  Exact c;
  for (int k = 0; k < random_operations(); ++k) {
    const Interval x = draw.interval();
    const Interval y = draw.interval();
    set(a, x);
    set(b, y);
    Interval ours;
    switch (k % 8) {
      case 0: ours = x + y, mpfi_add(c.value, a.value, b.value); break;
      case 1: ours = x - y, mpfi_sub(c.value, a.value, b.value); break;
      case 2: ours = x * y, mpfi_mul(c.value, a.value, b.value); break;
      case 3:
        if (y.contains_zero()) {
          ASSERT_TRUE((x / y).contains(Interval::whole())) << text(y);
          continue;
        }
        ours = x / y, mpfi_div(c.value, a.value, b.value);
        break;
      case 4: ours = x + y.lower(), mpfi_add_d(c.value, a.value, y.lower()); break;
      case 5: ours = y.upper() - x, mpfi_d_sub(c.value, y.upper(), a.value); break;
      case 6: ours = x * y.lower(), mpfi_mul_d(c.value, a.value, y.lower()); break;
      default: ours = square(x), mpfi_sqr(c.value, a.value); break;
    }
    ASSERT_TRUE(holds(ours, c)) << "operation " << k % 8 << " of " << text(x) << text(y) << " seed " << seed;
    ASSERT_TRUE(!ours.is_bounded() || is_tight(ours, c, 4.0)) << "operation " << k % 8 << " of " << text(x) << text(y);
  }
}

TEST(Interval, ElementaryFunctionsHoldTheExactResult) {
  constexpr unsigned seed = 31337;
  Operands draw(seed);
  Exact a;
  Exact b;
  Exact c;
  for (int k = 0; k < random_operations() / 5; ++k) {
    Interval x;
    Interval ours;
    switch (k % 6) {
      case 0:
        x = Interval(draw.uniform(-30.0, 30.0));
        if (draw.bits() % 2 == 0) {
          x += Interval(0.0, std::pow(10.0, draw.uniform(-16.0, 1.0)));
        }
        set(a, x);
        ours = exp(x), mpfi_exp(c.value, a.value);
        break;
      case 1:
        x = draw.positive(-20.0, 20.0);
        set(a, x);
        ours = log(x), mpfi_log(c.value, a.value);
        break;
      case 2:  // near 1, where the result is small
        x = Interval(1.0 + draw.uniform(-1.0, 1.0) * std::pow(10.0, draw.uniform(-16.0, -1.0)));
        set(a, x);
        ours = log(x), mpfi_log(c.value, a.value);
        break;
      case 3:
        x = draw.positive(-20.0, 20.0);
        set(a, x);
        ours = sqrt(x), mpfi_sqrt(c.value, a.value);
        break;
      case 4: {  // the half-integer powers of the Wagner equations
        x = draw.fraction();
        const int doubled = 3 + static_cast<int>(draw.bits() % 13);
        set(a, x);
        ours = pow(x, 0.5 * doubled);
        mpfi_sqrt(b.value, a.value);
        mpfi_set_ui(c.value, 1);
        for (int power = 0; power < doubled; ++power) {
          mpfi_mul(c.value, c.value, b.value);
        }
        break;
      }
      default: {  // x ln x: falls to -1/e at 1/e, so the witness takes the hull of end points and turning point
        x = draw.fraction();
        ours = xlogx(x);
        for (const double end : {x.lower(), x.upper()}) {
          mpfi_set_d(a.value, end);
          mpfi_set_ui(c.value, 0);
          if (end > 0.0) {
            mpfi_log(b.value, a.value);
            mpfi_mul(c.value, a.value, b.value);
          }
          ASSERT_TRUE(holds(ours, c)) << text(x);
        }
        if (x.contains(0.36787944117144233)) {
          mpfi_set_si(a.value, -1);
          mpfi_exp(c.value, a.value);
          mpfi_neg(c.value, c.value);
          ASSERT_TRUE(holds(ours, c)) << text(x);
        }
        continue;
      }
    }
    ASSERT_TRUE(holds(ours, c)) << "function " << k % 6 << " of " << text(x) << " gives " << text(ours) << " seed "
                                << seed;
    ASSERT_TRUE(is_tight(ours, c, 8.0)) << "function " << k % 6 << " of " << text(x);
  }
}

/// Chains of operations on fractions and positive numbers, the mix that models use: rounding must never accumulate
/// away.
TEST(Interval, ChainsHoldTheExactResult) {
  Operands draw(5);
  Exact x;
  Exact y;
  Exact z;
  for (int k = 0; k < random_operations() / 50; ++k) {
    const Interval a = draw.fraction();
    const Interval b = draw.positive(-3.0, 3.0);
    Interval ours = a;
    set(x, a);
    set(y, b);
    mpfi_set(z.value, x.value);
    for (int step = 0; step < 20; ++step) {
      switch (draw.bits() % 4) {
        case 0: ours += b, mpfi_add(z.value, z.value, y.value); break;
        case 1: ours *= a, mpfi_mul(z.value, z.value, x.value); break;
        case 2: ours -= a, mpfi_sub(z.value, z.value, x.value); break;
        default: ours /= b, mpfi_div(z.value, z.value, y.value); break;
      }
      ASSERT_TRUE(holds(ours, z)) << text(a) << text(b);
    }
  }
}

TEST(Interval, NothingIsConcludedFromUselessOperands) {
  const auto is_whole = [](const Interval& a) { return a.lower() == -kInfinity && a.upper() == kInfinity; };
  for (const Interval& useless : {Interval(kNan), Interval(kNan, 1.0), Interval(0.0, kNan), Interval(2.0, 1.0),
                                  Interval(kInfinity), Interval(-kInfinity)}) {
    EXPECT_TRUE(is_whole(useless)) << text(useless);
    EXPECT_TRUE(is_whole(useless + 1.0));
    EXPECT_TRUE(is_whole(useless * Interval(1.0, 2.0)));
    EXPECT_TRUE(is_whole(Interval(0.0) * useless));
    EXPECT_TRUE(is_whole(Interval(1.0) / useless));
    EXPECT_TRUE(is_whole(log(useless)));
    EXPECT_TRUE(is_whole(sqrt(useless)));
    EXPECT_TRUE(is_whole(xlogx(useless)));
    EXPECT_TRUE(exp(useless).contains(Interval(0.0, kInfinity)));
    EXPECT_TRUE(is_whole(hull(useless, 1.0)));
    Interval common(0.0, 1.0);
    EXPECT_TRUE(intersect(common, useless));
    EXPECT_EQ(common.upper(), 1.0);
  }
  EXPECT_TRUE(is_whole(log(Interval(-1.0, 2.0))));
  EXPECT_TRUE(is_whole(sqrt(Interval(-1e-30, 2.0))));
  EXPECT_TRUE(is_whole(Interval(1.0) / Interval(-1.0, 1.0)));
  EXPECT_TRUE(is_whole(Interval(1.0) / Interval(0.0, 1.0)));
  EXPECT_TRUE(is_whole(both(Interval(0.0, 1.0), Interval(2.0, 3.0))));
}

TEST(Interval, OverflowIsUnbounded) {
  const Interval huge(1e308, 1.7e308);
  EXPECT_EQ((huge + huge).upper(), kInfinity);
  EXPECT_TRUE((huge + huge).contains(1.7e308) || !(huge + huge).is_bounded());
  EXPECT_EQ((huge * huge).upper(), kInfinity);
  EXPECT_EQ((-huge * huge).lower(), -kInfinity);
  EXPECT_EQ(exp(Interval(1.0, 800.0)).upper(), kInfinity);
  EXPECT_TRUE(exp(Interval(800.0)).contains(1e308));
  EXPECT_GE(exp(Interval(-800.0)).lower(), 0.0);
  EXPECT_TRUE(std::isfinite(Interval::whole().mid()));
  EXPECT_TRUE(Interval(5.0, kInfinity).contains(Interval(5.0, kInfinity).mid()));
}

TEST(Interval, ZeroStaysAZeroFraction) {
  // A fraction that may be zero keeps its sign: everything on faces of the simplex rests on it.
  const Interval x(0.0, 0.5);
  EXPECT_EQ((x * Interval(0.1, 3.0)).lower(), 0.0);
  EXPECT_EQ((x * 3.0).lower(), 0.0);
  EXPECT_EQ((x / Interval(0.5, 2.0)).lower(), 0.0);
  EXPECT_EQ(square(Interval(-1.0, 2.0)).lower(), 0.0);
  EXPECT_EQ(xlogx(x).upper(), xlogx(Interval(0.0)).upper());
}

TEST(Interval, IntersectSaysWhenNothingIsLeft) {
  Interval a(0.0, 1.0);
  EXPECT_FALSE(intersect(a, Interval(1.5, 2.0)));
  EXPECT_EQ(a.upper(), 1.0);
  EXPECT_TRUE(intersect(a, Interval(1.0, 2.0)));
  EXPECT_EQ(a.lower(), 1.0);
}

// A model that branches must not compile (the build also tries one: tests/models/must_not_compile).
template <class S>
concept Orders = requires(S a, S b) {
  a < b;
}
|| requires(S a, S b) {
  a > b;
}
|| requires(S a, double b) {
  a < b;
}
|| requires(S a, S b) {
  a == b;
};
static_assert(!Orders<Interval>);
static_assert(Orders<double>);
static_assert(!std::is_convertible_v<Interval, double>);
static_assert(!std::is_convertible_v<Interval, bool>);

}  // namespace
}  // namespace stillshed
