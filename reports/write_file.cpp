#include "reports/write_file.hpp"

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <filesystem>
#include <fstream>
#include <sstream>

#include "params/errors.hpp"

namespace stillshed {
namespace {

constexpr const char* kWritable = "a file that can be written";

[[noreturn]] void refuse(const std::string& path, const std::string& found, const char* allowed) {
  throw InputError(Problem{path, found, allowed, ""});
}

/// A file descriptor that closes itself, and a temporary file that goes away unless it was renamed.
struct TemporaryFile {
  explicit TemporaryFile(std::string target) : path(std::move(target)) { descriptor = ::mkstemp(path.data()); }
  TemporaryFile(const TemporaryFile&) = delete;
  TemporaryFile& operator=(const TemporaryFile&) = delete;
  ~TemporaryFile() {
    if (descriptor >= 0) {
      ::close(descriptor);
      if (!kept) {
        ::unlink(path.c_str());
      }
    }
  }
  std::string path;
  int descriptor = -1;
  bool kept = false;
};

/// Permissions a new file would get (mkstemp gives 0600).
mode_t usual_permissions() {
  const mode_t mask = ::umask(0);
  ::umask(mask);
  return static_cast<mode_t>(0666) & ~mask;
}

/// True for a pipe or a device, which is written as it stands: renaming would replace it. InputError for a folder.
bool written_in_place(const std::string& path) {
  std::error_code error;
  if (std::filesystem::is_directory(path, error)) {
    refuse(path, "a folder", kWritable);
  }
  return std::filesystem::exists(path, error) && !std::filesystem::is_regular_file(path, error);
}

}  // namespace

void expect_writable(const std::string& path) {
  if (!written_in_place(path) && TemporaryFile(path + ".XXXXXX").descriptor < 0) {
    refuse(path, std::strerror(errno), kWritable);
  }
}

void write_file(const std::string& path, std::string_view text) {
  if (written_in_place(path)) {
    std::ofstream out(path, std::ios::binary);
    out.write(text.data(), static_cast<std::streamsize>(text.size()));
    if (!out.flush()) {
      refuse(path, "writing failed", kWritable);
    }
    return;
  }
  TemporaryFile temporary(path + ".XXXXXX");
  if (temporary.descriptor < 0) {
    refuse(path, std::strerror(errno), kWritable);
  }
  std::size_t done = 0;
  while (done < text.size()) {
    const ssize_t written = ::write(temporary.descriptor, text.data() + done, text.size() - done);
    if (written < 0 && errno == EINTR) {
      continue;
    }
    if (written < 0) {
      refuse(path, std::strerror(errno), kWritable);
    }
    done += static_cast<std::size_t>(written);
  }
  ::fchmod(temporary.descriptor, usual_permissions());
  if (::rename(temporary.path.c_str(), path.c_str()) != 0) {
    refuse(path, std::strerror(errno), kWritable);
  }
  temporary.kept = true;
}

std::string read_file(const std::string& path, std::size_t most_bytes) {
  std::error_code error;
  if (std::filesystem::is_directory(path, error)) {
    refuse(path, "a folder", "a file that can be read");
  }
  std::ifstream in(path, std::ios::binary);
  if (!in) {
    refuse(path, std::strerror(errno), "a file that can be read");
  }
  std::string text;
  char block[1U << 16U];
  while (in.read(block, sizeof block) || in.gcount() > 0) {
    text.append(block, static_cast<std::size_t>(in.gcount()));
    if (text.size() > most_bytes) {
      refuse(path, "more than " + std::to_string(most_bytes >> 20U) + " MB", "a case file");
    }
  }
  if (in.bad()) {
    refuse(path, "reading failed", "a file that can be read");
  }
  return text;
}

void make_folder(const std::string& path) {
  std::error_code error;
  std::filesystem::create_directories(path, error);
  if (error || !std::filesystem::is_directory(path)) {
    refuse(path, error ? error.message() : "not a folder", "a folder that exists or can be made");
  }
}

}  // namespace stillshed
