/// One task on one case: from what the user asked to everything there is to tell.
///
/// A pure function of its arguments (apart from the elapsed time): the same case, facts and seed give the same answer
/// whatever the executor. Nothing is printed. Bad endings are entries of `incomplete` and NO CALL verdicts, not
/// exceptions; InputError only where a component has no data at all.
///
/// | what                                    | consequence                                                     |
/// |-----------------------------------------|-----------------------------------------------------------------|
/// | limit of severity no-call (limits.hpp)  | every product NO CALL with that reason                          |
/// | a pressure above 0.8 Pc                 | nothing is computed: there may be no boiling point              |
/// | missing pair                            | faces without it surveyed; products bounded (missing_pairs.hpp) |
/// | a liquid that splits                    | `phase-split-needed` for the face; verdicts are the engine's    |
/// | more than 1 wt% of salts                | every product NO CALL, `salt-present`                           |
/// | more than 5 wt% not identified          | every product NO CALL, `unknowns-too-large`                     |
/// | four and more components                | survey only; maps and reach are not drawn: products NO CALL     |
#pragma once

#include <stop_token>

#include "params/catalog.hpp"
#include "reports/answer.hpp"

namespace stillshed {

struct RunOptions {
  std::uint64_t seed = 1;
  std::stop_token stop;
  ProgressFn progress;
  Executor executor;  ///< empty: serial
};

inline constexpr double kLargeSaltShare = 0.01;
inline constexpr double kLargeUnknownShare = 0.05;
inline constexpr int kMapUpTo = 3;  ///< components

[[nodiscard]] Answer run_case(const Case& input, const Catalog& catalog, Task task, const RunOptions& options = {});

/// Exit code of an answer whose task was cut short.
inline constexpr int kInterruptedExit = 130;

}  // namespace stillshed
