#include "params/locate.hpp"

#include <cstdlib>
#include <system_error>
#include <vector>

#include "params/compact.hpp"
#include "params/errors.hpp"
#include "params/load.hpp"

namespace stillshed {
namespace {

namespace fs = std::filesystem;

bool is_there(const fs::path& path) {
  std::error_code error;
  return fs::exists(path, error) && !error;
}

std::vector<fs::path> usual_places() {
  std::vector<fs::path> places;
  std::error_code error;
  const fs::path program = fs::read_symlink("/proc/self/exe", error);
  if (!error) {
    places.push_back(program.parent_path().parent_path() / "share" / "stillshed" / kCompactFileName);
  }
  places.emplace_back(STILLSHED_BUILD_PARAMS);  // set by params/CMakeLists.txt
  return places;
}

}  // namespace

fs::path find_parameters() {
  if (const char* variable = std::getenv("STILLSHED_PARAMS"); variable != nullptr && *variable != '\0') {
    if (!is_there(variable)) {
      throw InputError(Problem{"STILLSHED_PARAMS", variable, "an existing folder or compact parameter file",
                               "correct the variable or unset it"});
    }
    return variable;
  }
  std::string looked;
  for (const fs::path& place : usual_places()) {
    if (is_there(place)) {
      return place;
    }
    looked += (looked.empty() ? "" : " or ") + place.string();
  }
  throw InputError(Problem{"parameters", "no file", looked, "install the program or set STILLSHED_PARAMS"});
}

Facts load_facts(const fs::path& place) {
  std::error_code error;
  if (!fs::is_directory(place, error)) {
    return read_compact_file(place);
  }
  if (is_there(place / kParameterFiles.front())) {
    return load_parameter_folder(place);
  }
  return read_compact_file(place / kCompactFileName);
}

Facts load_facts() {
  return load_facts(find_parameters());
}

}  // namespace stillshed
