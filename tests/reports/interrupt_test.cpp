#include "reports/interrupt.hpp"

#include <gtest/gtest.h>

namespace stillshed {
namespace {

int seen_by_the_outer_handler = 0;
void outer_handler(int /*number*/) {
  ++seen_by_the_outer_handler;
}

TEST(Interrupt, ASignalAsksToStopAndTheFormerHandlerComesBack) {
  struct sigaction former {};
  struct sigaction outer {};
  outer.sa_handler = outer_handler;
  sigaction(SIGINT, &outer, &former);
  {
    InterruptGuard guard;
    const std::stop_token token = guard.token();
    EXPECT_FALSE(guard.poll());
    EXPECT_FALSE(token.stop_requested());
    std::raise(SIGINT);
    EXPECT_TRUE(guard.interrupted());
    EXPECT_TRUE(guard.poll());
    EXPECT_TRUE(token.stop_requested());
  }
  EXPECT_EQ(seen_by_the_outer_handler, 0);
  std::raise(SIGINT);
  EXPECT_EQ(seen_by_the_outer_handler, 1);
  {
    InterruptGuard fresh;  // a former signal is forgotten
    EXPECT_FALSE(fresh.poll());
  }
  sigaction(SIGINT, &former, nullptr);
}

}  // namespace
}  // namespace stillshed
