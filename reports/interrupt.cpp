#include "reports/interrupt.hpp"

#include <csignal>

namespace stillshed {
namespace {

// The only thing a signal handler may touch.
volatile std::sig_atomic_t signals_seen = 0;

void on_signal(int number) {
  signals_seen = 1;
  std::signal(number, SIG_DFL);  // the next one ends the program
}

}  // namespace

InterruptGuard::InterruptGuard() {
  signals_seen = 0;
  struct sigaction action {};
  action.sa_handler = on_signal;
  sigemptyset(&action.sa_mask);
  sigaction(SIGINT, &action, &former_);
}

InterruptGuard::~InterruptGuard() {
  sigaction(SIGINT, &former_, nullptr);
}

bool InterruptGuard::interrupted() const {
  return signals_seen != 0;
}

bool InterruptGuard::poll() {
  if (interrupted()) {
    source_.request_stop();
  }
  return interrupted();
}

}  // namespace stillshed
