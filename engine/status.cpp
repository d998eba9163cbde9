#include "engine/status.hpp"

namespace stillshed {

const char* to_string(Status status) {
  switch (status) {
    case Status::not_run: return "not-run";
    case Status::complete: return "complete";
    case Status::degenerate: return "degenerate";
    case Status::undecided: return "undecided";
    case Status::stopped: return "stopped";
    case Status::not_applicable: return "not-applicable";
  }
  return "unknown";
}

const char* to_string(Reason reason) {
  switch (reason) {
    case Reason::azeotrope_ceiling: return "azeotrope-ceiling";
    case Reason::boundary_between: return "boundary-between";
    case Reason::pinch: return "pinch";
    case Reason::phase_split_needed: return "phase-split-needed";
    case Reason::too_hot: return "too-hot";
    case Reason::too_cold_to_condense: return "too-cold-to-condense";
    case Reason::outside_data: return "outside-data";
    case Reason::above_critical: return "above-critical";
    case Reason::freezes: return "freezes";
    case Reason::missing_pair: return "missing-pair";
    case Reason::needs_second_feed: return "needs-second-feed";
    case Reason::acid_vapour: return "acid-vapour";
    case Reason::salt_present: return "salt-present";
    case Reason::reacts: return "reacts";
    case Reason::unknowns_too_large: return "unknowns-too-large";
    case Reason::not_converged: return "not-converged";
    case Reason::multiple_bubble_points: return "multiple-bubble-points";
  }
  return "unknown";
}

void run_serially(std::size_t count, const std::function<void(std::size_t)>& body) {
  for (std::size_t i = 0; i < count; ++i) {
    body(i);
  }
}

}  // namespace stillshed
