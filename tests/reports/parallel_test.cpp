#include "reports/parallel.hpp"

#include <gtest/gtest.h>

#include <atomic>
#include <vector>

namespace stillshed {
namespace {

TEST(Parallel, EveryPieceOnce) {
  const Executor executor = parallel_executor();
  for (const std::size_t count : {0U, 1U, 2U, 1000U}) {
    std::vector<std::atomic<int>> done(count);
    executor(count, [&](std::size_t k) { ++done[k]; });
    for (const std::atomic<int>& times : done) {
      EXPECT_EQ(times, 1);
    }
  }
}

}  // namespace
}  // namespace stillshed
