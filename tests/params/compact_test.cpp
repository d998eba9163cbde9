#include "params/compact.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <fstream>

#include "parameter_folder.hpp"
#include "params/errors.hpp"

namespace stillshed {
namespace {

using ::testing::HasSubstr;

std::string message_of(const std::string& bytes) {
  try {
    (void)from_compact(bytes, "x.params");
  } catch (const InputError& error) {
    return error.what();
  }
  return "accepted";
}

TEST(Compact, RoundTripKeepsEverything) {
  const Facts& facts = test::loaded_facts();
  EXPECT_TRUE(from_compact(to_compact(facts), "memory") == facts);
}

TEST(Compact, EmptyFactsToo) {
  EXPECT_TRUE(from_compact(to_compact(Facts{}), "memory") == Facts{});
}

TEST(Compact, ThroughAFile) {
  const test::ParameterFolder folder;
  const auto path = folder.path() / kCompactFileName;
  write_compact_file(test::loaded_facts(), path);
  EXPECT_TRUE(read_compact_file(path) == test::loaded_facts());
  EXPECT_FALSE(std::filesystem::exists(path.string() + ".tmp"));
}

TEST(Compact, DamageIsNamed) {
  const std::string good = to_compact(test::loaded_facts());
  EXPECT_THAT(message_of(""), HasSubstr("x.params: found another kind of file"));
  EXPECT_THAT(message_of("{\"stillshed_components\": 1}          "), HasSubstr("another kind of file"));
  std::string other_format = good;
  other_format[8] = 9;
  EXPECT_THAT(message_of(other_format), HasSubstr("found format 9, allowed format 1"));
  EXPECT_THAT(message_of(good.substr(0, good.size() - 1)), HasSubstr("bytes, allowed"));
  EXPECT_THAT(message_of(good + 'x'), HasSubstr("bytes, allowed"));
}

TEST(Compact, OneChangedByteAnywhereIsFound) {
  const std::string good = to_compact(test::loaded_facts());
  for (std::size_t at = 28; at < good.size(); at += good.size() / 97) {
    std::string bad = good;
    bad[at] = static_cast<char>(bad[at] ^ 0x10);
    EXPECT_THAT(message_of(bad), HasSubstr("found a wrong checksum, allowed an undamaged file")) << at;
  }
}

/// A body that passes length and checksum but makes no sense must be refused, never crash.
TEST(Compact, NonsenseBehindAGoodHeader) {
  const std::string empty = to_compact(Facts{});
  for (std::size_t cut = 0; cut < empty.size() - 28; cut += 7) {
    std::string body = empty.substr(28, cut);
    if (body.size() >= 4) {
      body[0] = '\xff';  // a text longer than the file
      body[1] = '\xff';
    }
    // Same construction as the writer's header, with the checksum of the spoilt body.
    std::string bytes = empty.substr(0, 12);
    for (int k = 0; k < 8; ++k) {
      bytes += static_cast<char>(body.size() >> (8 * k) & 0xff);
    }
    std::uint64_t hash = 14695981039346656037ULL;
    for (std::size_t start = 0; start < body.size(); start += 8) {
      std::uint64_t word = 0;
      for (std::size_t k = 0; k < std::min<std::size_t>(8, body.size() - start); ++k) {
        word |= std::uint64_t{static_cast<unsigned char>(body[start + k])} << (8 * k);
      }
      hash = (hash ^ word) * 1099511628211ULL;
      hash ^= hash >> 32;
    }
    for (int k = 0; k < 8; ++k) {
      bytes += static_cast<char>(hash >> (8 * k) & 0xff);
    }
    EXPECT_THAT(message_of(bytes + body), HasSubstr("allowed an undamaged file")) << cut;
  }
}

TEST(Compact, UnreadableAndUnwritablePlaces) {
  EXPECT_THROW((void)read_compact_file("/nonexistent/stillshed.params"), InputError);
  EXPECT_THROW(write_compact_file(Facts{}, "/nonexistent/stillshed.params"), InputError);
}

}  // namespace
}  // namespace stillshed
