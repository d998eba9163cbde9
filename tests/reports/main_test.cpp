/// The program as it is installed: exit codes reach the shell, and it starts fast enough to be used in loops.
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <cstdlib>
#include <string>

namespace stillshed::test {
namespace {

int exit_of(const std::string& words) {
  const int status = std::system((std::string(STILLSHED_PROGRAM) + " " + words + " > /dev/null 2>&1").c_str());
  return WIFEXITED(status) ? WEXITSTATUS(status) : -1;
}

TEST(Program, ExitCodesReachTheShell) {
  EXPECT_EQ(exit_of("--version"), 0);
  EXPECT_EQ(exit_of("survey acetone=50 methanol=50 --basis wt%"), 0);
  EXPECT_EQ(exit_of("survey water=50 toluene=50 --basis wt%"), 3);
  EXPECT_EQ(exit_of("survey acetone=50"), 2);
  EXPECT_EQ(exit_of("nonsense"), 2);
}

TEST(Program, FullDeviceIsAProblemNotASilentLoss) {
  EXPECT_EQ(exit_of("survey acetone=50 methanol=50 --basis wt% --json /dev/full"), 2);
}

}  // namespace
}  // namespace stillshed::test
