#include "engine/limits.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <utility>

#include "engine/bubble_point.hpp"

namespace stillshed {
namespace {

/// Four significant digits are enough for a phrase.
std::string number(double value) {
  char text[32];
  std::snprintf(text, sizeof text, "%.4g", value);
  return text;
}

class LimitCheck {
 public:
  LimitCheck(const Mixture& mixture, double pressure_Pa, const Composition& feed)
      : mixture_(mixture), pressure_Pa_(pressure_Pa), feed_(feed) {
    double sum = 0.0;
    for (const double amount : feed) {
      sum += amount;
    }
    expects(sum > 0.0, "limits: empty feed");
    for (double& share : feed_) {
      share /= sum;
    }
  }

  void pressure() {
    const std::string bar = number(pressure_Pa_ / 1e5) + " bar";
    if (pressure_Pa_ < kLowestPressure_Pa) {
      add(Severity::no_call, Reason::outside_data, {}, pressure_Pa_, kLowestPressure_Pa, bar + " is below 0.1 kPa");
    } else if (pressure_Pa_ > kIdealVapourUpTo_Pa) {
      add(Severity::no_call, Reason::outside_data, {}, pressure_Pa_, kIdealVapourUpTo_Pa,
          bar + " is above 10 bar, beyond an ideal vapour");
    } else if (pressure_Pa_ > kPlainVapourUpTo_Pa) {
      add(Severity::stretched, Reason::outside_data, {}, pressure_Pa_, kPlainVapourUpTo_Pa,
          bar + " is above 3 bar, where an ideal vapour is a stretch");
    }
  }

  void critical_point(int i) {
    const MixtureComponent& component = mixture_.component(i);
    if (component.critical_pressure_Pa && pressure_Pa_ > kShareOfCriticalPressure * *component.critical_pressure_Pa) {
      const double limit = kShareOfCriticalPressure * *component.critical_pressure_Pa;
      add(Severity::no_call, Reason::above_critical, i, pressure_Pa_, limit,
          number(pressure_Pa_ / 1e5) + " bar is above 0.8 of its critical pressure, " + number(limit / 1e5) + " bar");
    }
  }

  void association(int i) {
    if (mixture_.component(i).vapour_dimerizes) {
      const bool matters = feed_[i] > kHarmlessDimerShare;
      add(matters ? Severity::no_call : Severity::caution, Reason::acid_vapour, i, 100.0 * feed_[i],
          100.0 * kHarmlessDimerShare,
          "its vapour dimerizes, which this model does not describe; " + number(100.0 * feed_[i]) +
              " mol% of the feed");
    }
  }

  void melting(int i, double feed_boils_K) {
    const std::optional<double> melts_K = mixture_.component(i).melting_point_K;
    if (!melts_K) {
      return;
    }
    const double boils_K = mixture_.boiling_point_K(i, pressure_Pa_);
    if (*melts_K > boils_K) {
      add(Severity::caution, Reason::freezes, i, boils_K, *melts_K,
          "at this pressure it would boil at " + number(boils_K) + " K, below its melting point " + number(*melts_K) +
              " K");
    } else if (*melts_K > feed_boils_K) {
      add(Severity::caution, Reason::freezes, i, feed_boils_K, *melts_K,
          "the feed boils at " + number(feed_boils_K) + " K, below its melting point " + number(*melts_K) + " K");
    }
  }

  void pressure_set(int i, const std::optional<TemperatureRange>& used) {
    const PressureSet& set = mixture_.component(i).pressure.set();
    const double boils_K = mixture_.boiling_point_K(i, pressure_Pa_);
    const double lower_K = used ? std::min(used->lower_K, boils_K) : boils_K;
    const double upper_K = used ? std::max(used->upper_K, boils_K) : boils_K;
    if (set.t_min_K && lower_K < *set.t_min_K) {
      add(Severity::stretched, Reason::outside_data, i, lower_K, *set.t_min_K,
          "vapour pressure used at " + number(lower_K) + " K, published from " + number(*set.t_min_K) + " K");
    }
    if (set.t_max_K && upper_K > *set.t_max_K) {
      add(Severity::stretched, Reason::outside_data, i, upper_K, *set.t_max_K,
          "vapour pressure used at " + number(upper_K) + " K, published up to " + number(*set.t_max_K) + " K");
    }
  }

  [[nodiscard]] bool judged(int i) const { return feed_[i] > 0.0; }
  [[nodiscard]] double feed_boils_K() const { return bubble_point(mixture_, feed_, pressure_Pa_).temperature_K; }
  [[nodiscard]] std::vector<LimitNote> take() { return std::move(notes_); }

 private:
  void add(Severity severity, Reason reason, std::optional<int> component, double value, double limit,
           std::string text) {
    const std::string who = component ? mixture_.component(*component).id + ": " : std::string();
    notes_.push_back({severity, reason, component, value, limit, who + std::move(text)});
  }

  const Mixture& mixture_;
  double pressure_Pa_ = 0.0;
  Composition feed_;
  std::vector<LimitNote> notes_;
};

}  // namespace

const char* to_string(Severity severity) {
  switch (severity) {
    case Severity::caution: return "caution";
    case Severity::stretched: return "stretched";
    case Severity::no_call: return "no-call";
  }
  return "unknown";
}

std::vector<LimitNote> check_limits(const Mixture& mixture, double pressure_Pa, const Composition& feed,
                                    const std::optional<TemperatureRange>& used) {
  expects(feed.size() == mixture.size(), "limits: feed and mixture differ in size");
  expects(pressure_Pa > 0.0, "limits: pressure must be positive");
  LimitCheck check(mixture, pressure_Pa, feed);
  check.pressure();
  const double feed_boils_K = check.feed_boils_K();
  for (int i = 0; i < mixture.size(); ++i) {
    if (check.judged(i)) {
      check.critical_point(i);
    }
  }
  for (int i = 0; i < mixture.size(); ++i) {
    if (check.judged(i)) {
      check.association(i);
    }
  }
  for (int i = 0; i < mixture.size(); ++i) {
    if (check.judged(i)) {
      check.melting(i, feed_boils_K);
      check.pressure_set(i, used);
    }
  }
  return check.take();
}

std::optional<Severity> gravest(const std::vector<LimitNote>& notes) {
  std::optional<Severity> worst;
  for (const LimitNote& note : notes) {
    worst = worst ? std::max(*worst, note.severity) : note.severity;
  }
  return worst;
}

}  // namespace stillshed
