/// A private copy of the parameter files that a test may spoil.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "params/records.hpp"

namespace stillshed::test {

/// The parameter files of the source tree.
[[nodiscard]] std::filesystem::path source_parameters();
/// Loaded once, strictly.
[[nodiscard]] const Facts& loaded_facts();

class ParameterFolder {
 public:
  ParameterFolder();  ///< a copy of every file in a fresh temporary folder
  ~ParameterFolder();
  ParameterFolder(const ParameterFolder&) = delete;
  ParameterFolder& operator=(const ParameterFolder&) = delete;

  [[nodiscard]] const std::filesystem::path& path() const { return path_; }
  /// Replaces the first `from`; a test failure when the file does not hold it.
  void replace(const std::string& file, const std::string& from, const std::string& to) const;
  void write(const std::string& file, const std::string& text) const;
  void remove(const std::string& file) const;
  /// The messages of a strict load; empty when it succeeds.
  [[nodiscard]] std::vector<std::string> problems() const;

 private:
  std::filesystem::path path_;
};

}  // namespace stillshed::test
