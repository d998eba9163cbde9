#include "tests/support/front_door.hpp"

#include <unistd.h>

#include <algorithm>
#include <atomic>
#include <cctype>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <sstream>

#include "reports/cli.hpp"

namespace stillshed::test {

std::string temporary_path(const std::string& suffix) {
  static std::atomic<int> counter{0};
  const auto folder = std::filesystem::temp_directory_path() / ("stillshed-test-" + std::to_string(getpid()));
  std::filesystem::create_directories(folder);
  return (folder / (std::to_string(counter++) + suffix)).string();
}

RunResult run(const std::vector<std::string>& words) {
  std::ostringstream out;
  std::ostringstream err;
  RunResult result;
  result.exit = run_program(words, out, err);
  result.out = out.str();
  result.err = err.str();
  result.result = Json::parse(result.out, nullptr, false);
  if (result.result.is_discarded()) {
    result.result = nullptr;
  }
  return result;
}

RunResult run_case(const std::string& task, const Json& case_json, const std::vector<std::string>& extra) {
  const std::string path = temporary_path(".json");
  std::ofstream(path) << case_json.dump(1);
  std::vector<std::string> words = {task, path, "--json", "-"};
  words.insert(words.end(), extra.begin(), extra.end());
  RunResult result = run(words);
  std::filesystem::remove(path);
  return result;
}

Json reference_cases(const std::string& file) {
  std::ifstream in(std::string(STILLSHED_TEST_DATA) + "/reference/" + file);
  return Json::parse(in).at("cases");
}

std::vector<Json> with_components(const Json& list, const Json& components) {
  std::vector<Json> found;
  for (const Json& record : list) {
    if (record.at("components") == components) {
      found.push_back(record);
    }
  }
  return found;
}

double composition_difference(const Json& found, const Json& expected) {
  double worst = 0.0;
  for (const auto& [id, x] : expected.items()) {
    const double value = found.contains(id) ? found.at(id).get<double>() : 0.0;
    worst = std::max(worst, std::abs(value - x.get<double>()));
  }
  return worst;
}

std::string test_name(const std::string& id) {
  std::string name;
  for (const char c : id) {
    if (c == '+') {
      name += "plus";
    } else if (c == '-') {
      name += "_";
    } else if (std::isalnum(static_cast<unsigned char>(c)) != 0) {
      name += c;
    }
  }
  return name;
}

}  // namespace stillshed::test
