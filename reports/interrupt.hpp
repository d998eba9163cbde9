/// Ctrl-C while a calculation runs: the first one asks it to stop, the second ends the program at once.
#pragma once

#include <csignal>
#include <stop_token>

#include "engine/status.hpp"

namespace stillshed {

/// Catches SIGINT while it lives; puts the former handling back when it goes. One at a time.
class InterruptGuard {
 public:
  InterruptGuard();
  ~InterruptGuard();
  InterruptGuard(const InterruptGuard&) = delete;
  InterruptGuard& operator=(const InterruptGuard&) = delete;

  /// Asked to stop as soon as `poll` has seen a signal.
  [[nodiscard]] std::stop_token token() const { return source_.get_token(); }
  /// Called now and then by the calculation; true when a signal has come.
  bool poll();
  [[nodiscard]] bool interrupted() const;

 private:
  std::stop_source source_;
  struct sigaction former_ {};
};

}  // namespace stillshed
