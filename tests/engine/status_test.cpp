#include "engine/status.hpp"

#include <gtest/gtest.h>

#include <string>
#include <vector>

namespace stillshed {
namespace {

TEST(Status, WordsOfTheContract) {
  EXPECT_STREQ(to_string(Status::not_run), "not-run");
  EXPECT_STREQ(to_string(Status::degenerate), "degenerate");
  EXPECT_STREQ(to_string(Reason::azeotrope_ceiling), "azeotrope-ceiling");
  EXPECT_STREQ(to_string(Reason::acid_vapour), "acid-vapour");
}

TEST(Executor, SerialRunsEveryIndexInOrder) {
  std::vector<std::size_t> seen;
  run_serially(4, [&](std::size_t k) { seen.push_back(k); });
  EXPECT_EQ(seen, (std::vector<std::size_t>{0, 1, 2, 3}));
}

}  // namespace
}  // namespace stillshed
