#include "params/cas.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(Cas, AcceptsPublishedNumbers) {
  for (const char* number : {"7732-18-5", "67-56-1", "64-17-5", "109-99-9", "96-47-9", "138495-42-8"}) {
    EXPECT_TRUE(is_valid_cas(number)) << number;
  }
}

TEST(Cas, RefusesEveryOtherCheckDigit) {
  for (char digit = '0'; digit <= '9'; ++digit) {
    EXPECT_EQ(is_valid_cas(std::string("67-56-") + digit), digit == '1') << digit;
  }
}

TEST(Cas, RefusesSwappedNeighbours) {
  EXPECT_TRUE(is_valid_cas("109-99-9"));
  EXPECT_FALSE(is_valid_cas("190-99-9"));
  EXPECT_FALSE(is_valid_cas("76-56-1"));
}

TEST(Cas, ShapeAloneIsSeparateFromTheDigit) {
  EXPECT_TRUE(looks_like_cas("67-56-2"));
  for (const char* text : {"", "-", "6-56-1", "67-5-1", "67-56-12", "6756-1", "67-56-x", "12345678-56-1", "67 56 1"}) {
    EXPECT_FALSE(looks_like_cas(text)) << text;
    EXPECT_FALSE(is_valid_cas(text)) << text;
  }
}

}  // namespace
}  // namespace stillshed
