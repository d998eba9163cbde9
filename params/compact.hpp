/// The compact parameter file: all Facts in one binary file that is read in a few milliseconds.
///
/// Layout: magic "STILLSHD", format number (4 bytes), length of the body (8 bytes), checksum of the body (8 bytes,
/// FNV-1a), body. Integers little-endian; numbers as IEEE 754 bit patterns; texts and lists with their length first.
/// The body carries Facts in declaration order, SHA-256 of the JSON files included. Written at build time by
/// stillshed_pack after a strict load, so that a file that passes the checksum holds data that passed every check.
///
/// Errors    InputError naming the file and what is wrong: no file, not ours, another format, cut short, damaged.
#pragma once

#include <cstdint>
#include <filesystem>
#include <string>
#include <string_view>

#include "params/records.hpp"

namespace stillshed {

inline constexpr std::uint32_t kCompactFormat = 1;
inline constexpr const char* kCompactFileName = "stillshed.params";

[[nodiscard]] std::string to_compact(const Facts& facts);
/// `name` stands in messages.
[[nodiscard]] Facts from_compact(std::string_view bytes, const std::string& name);

/// Written beside the target and renamed, so that nobody reads half a file.
void write_compact_file(const Facts& facts, const std::filesystem::path& path);
[[nodiscard]] Facts read_compact_file(const std::filesystem::path& path);

}  // namespace stillshed
