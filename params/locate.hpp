/// Where the parameters are, and the one call that reads them.
///
/// Looked for in this order; the first place that exists is used:
///   1. the environment variable STILLSHED_PARAMS: a compact file, or a folder with the JSON files (read strictly)
///      or with a compact file. Set but unusable: an error, nothing else is tried.
///   2. ../share/stillshed/stillshed.params from the folder of the running program (an installed program)
///   3. the compact file of the build tree
#pragma once

#include <filesystem>

#include "params/records.hpp"

namespace stillshed {

/// The file or folder to read. Throws InputError that lists the places looked at.
[[nodiscard]] std::filesystem::path find_parameters();

/// Facts of a compact file, or of a folder with JSON files or a compact file.
[[nodiscard]] Facts load_facts(const std::filesystem::path& place);

/// load_facts(find_parameters()).
[[nodiscard]] Facts load_facts();

}  // namespace stillshed
