#include "parameter_folder.hpp"

#include <gtest/gtest.h>
#include <unistd.h>

#include <fstream>
#include <iterator>

#include "params/errors.hpp"
#include "params/load.hpp"

namespace stillshed::test {
namespace {

std::string read(const std::filesystem::path& path) {
  std::ifstream stream(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

}  // namespace

std::filesystem::path source_parameters() {
  return std::filesystem::path(STILLSHED_TEST_DATA).parent_path() / "params";
}

const Facts& loaded_facts() {
  static const Facts facts = load_parameter_folder(source_parameters());
  return facts;
}

ParameterFolder::ParameterFolder() {
  static int count = 0;
  ++count;
  path_ = std::filesystem::temp_directory_path() /
          ("stillshed-params-" + std::to_string(::getpid()) + "-" + std::to_string(count));
  std::filesystem::create_directories(path_);
  for (const char* file : kParameterFiles) {
    std::filesystem::copy_file(source_parameters() / file, path_ / file);
  }
}

ParameterFolder::~ParameterFolder() {
  std::error_code ignored;
  std::filesystem::remove_all(path_, ignored);
}

void ParameterFolder::replace(const std::string& file, const std::string& from, const std::string& to) const {
  std::string text = read(path_ / file);
  const std::size_t at = text.find(from);
  ASSERT_NE(at, std::string::npos) << file << " does not hold: " << from;
  text.replace(at, from.size(), to);
  write(file, text);
}

void ParameterFolder::write(const std::string& file, const std::string& text) const {
  std::ofstream(path_ / file, std::ios::binary | std::ios::trunc) << text;
}

void ParameterFolder::remove(const std::string& file) const {
  std::filesystem::remove(path_ / file);
}

std::vector<std::string> ParameterFolder::problems() const {
  std::vector<std::string> texts;
  try {
    (void)load_parameter_folder(path_);
  } catch (const InputError& error) {
    for (const Problem& problem : error.problems()) {
      texts.push_back(problem.text());
    }
  }
  return texts;
}

}  // namespace stillshed::test
