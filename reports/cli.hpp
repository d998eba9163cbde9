/// The program as one function: words in, text out, exit code back.
///
/// | exit | meaning                                                                              |
/// |------|--------------------------------------------------------------------------------------|
/// | 0    | every requested part computed and no NO CALL                                         |
/// | 1    | `check` found a mismatch                                                             |
/// | 2    | bad input: every problem is listed, nothing computed, nothing written                |
/// | 3    | answered in part: some NO CALL, undecided, degenerate or partial result, named in it |
/// | 70   | our own fault                                                                        |
/// | 130  | interrupted: what was found so far is written, marked as stopped                     |
#pragma once

#include <iosfwd>
#include <string>
#include <vector>

namespace stillshed {

/// `words` without the program's name. Text for people and JSON go to `out`, problems to `err`.
/// Colour is used only when `out` is the terminal and NO_COLOR is not set.
int run_program(const std::vector<std::string>& words, std::ostream& out, std::ostream& err);

}  // namespace stillshed
