// stillshed_pack FOLDER FILE: strict load of the JSON files, then the compact file. A bad data file fails the build.
#include <cstdio>
#include <exception>

#include "params/compact.hpp"
#include "params/errors.hpp"
#include "params/load.hpp"

int main(int count, char** words) {
  constexpr int kBadInput = 2;
  constexpr int kOwnFault = 70;
  if (count != 3) {
    std::fputs("usage: stillshed_pack FOLDER FILE\n", stderr);
    return kBadInput;
  }
  try {
    stillshed::write_compact_file(stillshed::load_parameter_folder(words[1]), words[2]);
  } catch (const stillshed::InputError& error) {
    std::fprintf(stderr, "%s\n", error.what());
    return kBadInput;
  } catch (const std::exception& error) {
    std::fprintf(stderr, "stillshed_pack: %s\n", error.what());
    return kOwnFault;
  }
  return 0;
}
