/// Errors shared by every layer.
///
///   InputError  something a person gave us is wrong; carries *all* problems found (exit code 2)
///   LogicError  something we did is wrong: a broken invariant (exit code 70)
///
/// Calculations that end badly never throw: they return a Status (engine/status.hpp).
#pragma once

#include <stdexcept>
#include <string>
#include <vector>

namespace stillshed {

/// One thing wrong with an input: what was read, where, what is allowed, what to do.
struct Problem {
  std::string where;    ///< file and JSON pointer, option name, or line and column
  std::string found;    ///< what was read
  std::string allowed;  ///< what would have been accepted
  std::string remedy;   ///< what to do about it; may be empty

  /// "where: found X, allowed Y; do Z" on one line.
  [[nodiscard]] std::string text() const;
  friend bool operator==(const Problem&, const Problem&) = default;
};

/// All problems of one input, thrown once.
class InputError : public std::runtime_error {
 public:
  explicit InputError(std::vector<Problem> problems);
  explicit InputError(Problem problem);
  [[nodiscard]] const std::vector<Problem>& problems() const { return problems_; }

 private:
  std::vector<Problem> problems_;
};

/// A broken invariant of this program.
class LogicError : public std::logic_error {
 public:
  using std::logic_error::logic_error;
};

/// Throws LogicError unless `condition` holds; active in release builds, kept out of inner loops.
inline void expects(bool condition, const char* text) {
  if (!condition) {
    throw LogicError(text);
  }
}

}  // namespace stillshed
