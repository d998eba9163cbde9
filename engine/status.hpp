/// How a calculation ended, and what is worth telling about it. Calculations never throw for a bad ending.
#pragma once

#include <cstdint>
#include <functional>
#include <string>
#include <vector>

namespace stillshed {

enum class Status {
  not_run,
  complete,        ///< did everything it claims
  degenerate,      ///< complete, but some answer is a cluster no test can separate
  undecided,       ///< something could neither be found nor excluded (budget spent, no convergence)
  stopped,         ///< the caller asked to stop; what was found so far is kept
  not_applicable,  ///< the question does not arise, or is outside the stated validity (reason in the note)
};
[[nodiscard]] const char* to_string(Status status);  ///< "not-run", "complete", ...

/// Machine-readable reasons (design vocabulary).
enum class Reason {
  azeotrope_ceiling,
  boundary_between,
  pinch,
  phase_split_needed,
  too_hot,
  too_cold_to_condense,
  outside_data,
  above_critical,
  freezes,
  missing_pair,
  needs_second_feed,
  acid_vapour,
  salt_present,
  reacts,
  unknowns_too_large,
  not_converged,
  multiple_bubble_points,
};
[[nodiscard]] const char* to_string(Reason reason);  ///< "azeotrope-ceiling", ...

/// Runs body(0) .. body(count - 1), in any order, possibly in parallel. Results are merged by index, so
/// they do not depend on the number of threads. The engine starts no threads of its own.
using Executor = std::function<void(std::size_t count, const std::function<void(std::size_t)>& body)>;
/// One after the other, on the calling thread.
void run_serially(std::size_t count, const std::function<void(std::size_t)>& body);

/// Called now and then during long work.
struct Progress {
  const char* stage = "";
  std::int64_t done = 0;
  std::int64_t total = 0;  ///< 0 when not known
};
using ProgressFn = std::function<void(const Progress&)>;

}  // namespace stillshed
