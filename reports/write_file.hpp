/// Files written whole or not at all.
#pragma once

#include <string>
#include <string_view>

namespace stillshed {

/// Writes beside the target, then renames: a reader never sees half a file, and an interrupted run leaves the old one.
/// InputError when the file cannot be written; nothing is left behind then.
void write_file(const std::string& path, std::string_view text);

/// InputError when `path` could not be written; leaves no trace. Asked before long work.
void expect_writable(const std::string& path);

/// The whole file. InputError when it cannot be read, or is larger than `most_bytes`.
[[nodiscard]] std::string read_file(const std::string& path, std::size_t most_bytes = 16U << 20U);

/// Makes a folder with its parents. InputError when that fails.
void make_folder(const std::string& path);

}  // namespace stillshed
