#include "params/errors.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

TEST(Errors, OneProblemOnOneLine) {
  const Problem problem{"file.json /a/0", "1.7", "0 to 1", "check the sign"};
  EXPECT_EQ(problem.text(), "file.json /a/0: found 1.7, allowed 0 to 1; check the sign");
  EXPECT_EQ((Problem{"x", "", "", "do it"}).text(), "x; do it");
  EXPECT_EQ((Problem{"x", "", "a number", ""}).text(), "x: allowed a number");
}

TEST(Errors, InputErrorCarriesAllProblems) {
  const InputError error({{"a", "1", "2", ""}, {"b", "3", "4", ""}});
  EXPECT_EQ(error.problems().size(), 2U);
  EXPECT_STREQ(error.what(), "a: found 1, allowed 2\nb: found 3, allowed 4");
}

TEST(Errors, ExpectsThrowsOnlyOnFailure) {
  EXPECT_NO_THROW(expects(true, "fine"));
  EXPECT_THROW(expects(false, "broken"), LogicError);
}

}  // namespace
}  // namespace stillshed
