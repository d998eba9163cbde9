#include "params/names.hpp"

#include <gtest/gtest.h>

#include <random>

namespace stillshed {
namespace {

TEST(Names, SpacesHyphensAndCaseDoNotMatter) {
  EXPECT_EQ(normalised_name("2-MeTHF"), normalised_name("2 Me THF"));
  EXPECT_EQ(normalised_name("N,N-Dimethylformamide"), normalised_name("n-n-dimethylformamide"));
  EXPECT_EQ(normalised_name("Hunig's base"), "hunigsbase");
}

TEST(Names, DigitsStay) {
  EXPECT_NE(normalised_name("1-propanol"), normalised_name("2-propanol"));
}

TEST(Names, DistanceOfKnownPairs) {
  EXPECT_EQ(edit_distance("", ""), 0);
  EXPECT_EQ(edit_distance("acetone", ""), 7);
  EXPECT_EQ(edit_distance("kitten", "sitting"), 3);
  EXPECT_EQ(edit_distance("toluene", "tolueen"), 1);  // neighbours swapped
  EXPECT_EQ(edit_distance("ca", "abc"), 3);           // the restricted distance never edits a swap again
}

TEST(Names, DistanceIsSymmetricAndBounded) {
  std::mt19937 random(1);
  std::uniform_int_distribution<int> letter('a', 'd');
  std::uniform_int_distribution<std::size_t> length(0, 8);
  const auto word = [&] {
    std::string text(length(random), ' ');
    for (char& c : text) {
      c = static_cast<char>(letter(random));
    }
    return text;
  };
  for (int k = 0; k < 2000; ++k) {
    const std::string a = word();
    const std::string b = word();
    const int distance = edit_distance(a, b);
    EXPECT_EQ(distance, edit_distance(b, a));
    EXPECT_EQ(distance == 0, a == b);
    EXPECT_LE(distance, static_cast<int>(std::max(a.size(), b.size())));
    EXPECT_GE(distance, std::abs(static_cast<int>(a.size()) - static_cast<int>(b.size())));
  }
}

}  // namespace
}  // namespace stillshed
