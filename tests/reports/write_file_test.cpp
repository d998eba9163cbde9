#include "reports/write_file.hpp"

#include <gtest/gtest.h>
#include <sys/stat.h>

#include <filesystem>

#include "params/errors.hpp"

namespace stillshed {
namespace {

class WriteFile : public testing::Test {
 protected:
  void SetUp() override {
    folder_ = std::filesystem::path(testing::TempDir()) / ("stillshed-write-" + std::to_string(getpid()));
    std::filesystem::create_directories(folder_);
  }
  void TearDown() override { std::filesystem::remove_all(folder_); }
  [[nodiscard]] std::string path(const char* name) const { return (folder_ / name).string(); }
  [[nodiscard]] long entries() const {
    return std::distance(std::filesystem::directory_iterator(folder_), std::filesystem::directory_iterator());
  }
  std::filesystem::path folder_;
};

TEST_F(WriteFile, WritesAndReplaces) {
  write_file(path("a"), "one");
  write_file(path("a"), "two");
  EXPECT_EQ(read_file(path("a")), "two");
  EXPECT_EQ(entries(), 1);
}

TEST_F(WriteFile, GivesTheUsualPermissions) {
  write_file(path("a"), "one");
  struct stat status {};
  ASSERT_EQ(stat(path("a").c_str(), &status), 0);
  const mode_t mask = umask(0);
  umask(mask);
  EXPECT_EQ(status.st_mode & 0777U, 0666U & ~mask);
}

TEST_F(WriteFile, LeavesNothingWhereItCannotWrite) {
  EXPECT_THROW(write_file(path("missing/a"), "one"), InputError);
  EXPECT_THROW(write_file(folder_.string(), "one"), InputError);
  EXPECT_THROW(expect_writable(path("missing/a")), InputError);
  expect_writable(path("b"));
  EXPECT_EQ(entries(), 0);
}

TEST_F(WriteFile, WritesADeviceInPlace) {
  write_file("/dev/null", "one");
  EXPECT_TRUE(std::filesystem::is_character_file("/dev/null"));
}

TEST_F(WriteFile, ReadsOnlyWhatIsAFileOfReasonableSize) {
  EXPECT_THROW(static_cast<void>(read_file(path("none"))), InputError);
  EXPECT_THROW(static_cast<void>(read_file(folder_.string())), InputError);
  write_file(path("a"), "0123456789");
  EXPECT_THROW(static_cast<void>(read_file(path("a"), 5)), InputError);
}

TEST_F(WriteFile, MakesFolders) {
  make_folder(path("x/y"));
  EXPECT_TRUE(std::filesystem::is_directory(path("x/y")));
  write_file(path("f"), "one");
  EXPECT_THROW(make_folder(path("f/g")), InputError);
}

}  // namespace
}  // namespace stillshed
