/// Strict reading of the parameter files (JSON) of a folder: the long way, used at build time and by `check`.
///
/// Refused, all in one InputError with file and JSON pointer: malformed JSON (line and column), missing, unknown and
/// repeated keys, wrong types and bounds, links to sources, components or groups that do not exist, CAS check digits,
/// names that mean two components, vapour pressure that does not rise over its range or misses the normal boiling
/// point by more than 1 K, group pairs given one way only. Units are converted here and nowhere else.
/// Formats: params/README.md and params/schema/.
#pragma once

#include <array>
#include <filesystem>
#include <string>

#include "params/records.hpp"

namespace stillshed {

/// The files of a parameter folder, in the order in which they are read.
inline constexpr std::array<const char*, 10> kParameterFiles = {
    "sources.json", "unifac.json",   "unifac_dortmund.json", "components.json",   "vapour_pressure.json",
    "names.json",   "cautions.json", "ich_q3c.json",         "check_values.json", "measured_azeotropes.json"};

/// Everything in the folder. Throws InputError with every problem of every file.
[[nodiscard]] Facts load_parameter_folder(const std::filesystem::path& folder);

}  // namespace stillshed
