#include "reports/answer.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(AnswerTest, EvidenceMarksAreTheLettersOfTheVocabulary) {
  EXPECT_STREQ(to_string(Evidence::fitted), "F");
  EXPECT_STREQ(to_string(Evidence::stretched), "X");
  EXPECT_STREQ(to_string(Evidence::predicted), "P");
  EXPECT_STREQ(to_string(Evidence::user), "U");
  EXPECT_STREQ(to_string(Evidence::none), "0");
}

}  // namespace
}  // namespace stillshed
