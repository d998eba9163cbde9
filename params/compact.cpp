#include "params/compact.hpp"

#include <fstream>
#include <iterator>
#include <system_error>

#include "params/compact_archive.hpp"
#include "params/errors.hpp"

namespace stillshed {
namespace {

constexpr std::string_view kMagic = "STILLSHD";
constexpr std::size_t kHeaderBytes = 8 + 4 + 8 + 8;

/// FNV-1a over words of 8 bytes (the last one padded with zeros): quick, and enough against damage.
std::uint64_t checksum(std::string_view bytes) {
  constexpr std::uint64_t kOffset = 14695981039346656037ULL;
  constexpr std::uint64_t kPrime = 1099511628211ULL;
  std::uint64_t hash = kOffset;
  for (std::size_t start = 0; start < bytes.size(); start += 8) {
    std::uint64_t word = 0;
    const std::string_view part = bytes.substr(start, 8);
    for (std::size_t k = 0; k < part.size(); ++k) {
      word |= std::uint64_t{static_cast<unsigned char>(part[k])} << (8 * k);
    }
    hash = (hash ^ word) * kPrime;
    hash ^= hash >> 32;
  }
  return hash;
}

[[noreturn]] void refuse(const std::string& name, const std::string& found, const std::string& allowed) {
  throw InputError(Problem{name, found, allowed, "build or install the program again"});
}

}  // namespace

std::string to_compact(const Facts& facts) {
  CompactWriter body_writer;
  Facts copy = facts;  // one description of the fields serves both directions, hence no const
  transfer(body_writer, copy);
  const std::string body = body_writer.take();
  CompactWriter header;
  header.raw(kCompactFormat, 4);
  header.raw(body.size(), 8);
  header.raw(checksum(body), 8);
  return std::string(kMagic) + header.take() + body;
}

Facts from_compact(std::string_view bytes, const std::string& name) {
  if (bytes.size() < kHeaderBytes || bytes.substr(0, kMagic.size()) != kMagic) {
    refuse(name, "another kind of file", "a compact parameter file");
  }
  CompactReader header(bytes.substr(kMagic.size(), kHeaderBytes - kMagic.size()));
  const std::uint64_t format = header.raw(4);
  if (format != kCompactFormat) {
    refuse(name, "format " + std::to_string(format), "format " + std::to_string(kCompactFormat));
  }
  const std::uint64_t length = header.raw(8);
  const std::uint64_t wanted = header.raw(8);
  const std::string_view body = bytes.substr(kHeaderBytes);
  if (body.size() != length) {
    refuse(name, std::to_string(body.size()) + " bytes", std::to_string(length) + " bytes");
  }
  if (checksum(body) != wanted) {
    refuse(name, "a wrong checksum", "an undamaged file");
  }
  Facts facts;
  try {
    CompactReader reader(body);
    transfer(reader, facts);
    if (!reader.at_end()) {
      refuse(name, "bytes after the end", "an undamaged file");
    }
  } catch (const CompactDamage& damage) {
    refuse(name, damage.what(), "an undamaged file");
  }
  return facts;
}

void write_compact_file(const Facts& facts, const std::filesystem::path& path) {
  const std::string bytes = to_compact(facts);
  std::filesystem::path draft = path;
  draft += ".tmp";
  std::ofstream stream(draft, std::ios::binary | std::ios::trunc);
  stream.write(bytes.data(), static_cast<std::streamsize>(bytes.size()));
  stream.close();
  std::error_code error;
  if (stream) {
    std::filesystem::rename(draft, path, error);
  }
  if (!stream || error) {
    std::error_code ignored;
    std::filesystem::remove(draft, ignored);
    throw InputError(Problem{path.string(), "a place that cannot be written", "a writable path", "check the path"});
  }
}

Facts read_compact_file(const std::filesystem::path& path) {
  std::ifstream stream(path, std::ios::binary | std::ios::ate);
  if (!stream) {
    refuse(path.string(), "no readable file", "a compact parameter file");
  }
  std::string bytes(static_cast<std::size_t>(stream.tellg()), '\0');
  stream.seekg(0);
  stream.read(bytes.data(), static_cast<std::streamsize>(bytes.size()));
  if (!stream) {
    refuse(path.string(), "a file that cannot be read to its end", "a compact parameter file");
  }
  return from_compact(bytes, path.string());
}

}  // namespace stillshed
