#include "reports/cautions_rules.hpp"

#include <algorithm>

namespace stillshed {
namespace {

constexpr double kLargeUnknown = 0.01;     ///< mass fraction of the stream
constexpr double kNearDry = 0.05;          ///< of the charge
constexpr double kRegulatedShare = 0.003;  ///< mass fraction, REACH Annex XVII entries
constexpr double kAbove_Pa = 1.05 * 101325.0;
constexpr double kVacuum_Pa = 0.95 * 101325.0;

bool contains(const std::vector<std::string>& list, const std::string& word) {
  return std::find(list.begin(), list.end(), word) != list.end();
}

/// What the declared words mean for a record that waits for them.
bool declared_for(const CautionRecord& caution, const std::vector<std::string>& declared) {
  const auto any = [&](std::initializer_list<const char*> words) {
    return std::any_of(words.begin(), words.end(), [&](const char* word) { return contains(declared, word); });
  };
  if (caution.code == "C6") {
    return any({"azides"});
  }
  if (caution.code == "C9") {
    return any({"strong-base", "aluminium", "magnesium"});
  }
  if (caution.code == "C10") {
    return any({"hydrogen-peroxide"});
  }
  if (caution.code == "C17") {
    return any({"US"});
  }
  if (caution.code == "C18") {
    return any({"pharmaceutical"});
  }
  return false;
}

class CautionRules {
 public:
  CautionRules(const Answer& answer, const std::vector<const ComponentRecord*>& records, bool extrapolated)
      : answer_(answer), records_(records), extrapolated_(extrapolated) {}

  /// The caution with its substances, when something brings it up.
  [[nodiscard]] std::optional<Caution> apply(const CautionRecord& record) const {
    Caution caution{record.code, record.text, {}, record.above_verdict};
    return applies(record, caution.substances) ? std::optional<Caution>(caution) : std::nullopt;
  }

 private:
  [[nodiscard]] bool applies(const CautionRecord& record, std::vector<std::string>& substances) const;
  [[nodiscard]] std::vector<std::string> present(const std::vector<std::string>& ids) const;
  [[nodiscard]] std::vector<std::string> with_hazard(const CautionRecord& record) const;
  [[nodiscard]] std::vector<std::string> flammable() const;
  [[nodiscard]] bool near_dry() const;
  [[nodiscard]] bool two_liquids() const;
  [[nodiscard]] bool regulated(const CautionRecord& record, std::vector<std::string>& substances) const;
  [[nodiscard]] double hottest_K() const;

  const Answer& answer_;
  const std::vector<const ComponentRecord*>& records_;
  bool extrapolated_;
};

std::vector<std::string> CautionRules::present(const std::vector<std::string>& ids) const {
  std::vector<std::string> found;
  for (const ComponentRecord* record : records_) {
    if (record != nullptr && contains(ids, record->id)) {
      found.push_back(record->id);
    }
  }
  return found;
}

std::vector<std::string> CautionRules::with_hazard(const CautionRecord& record) const {
  const bool water = !present({"water"}).empty();
  std::vector<std::string> found;
  for (const ComponentRecord* component : records_) {
    if (component == nullptr) {
      continue;
    }
    for (const std::string& hazard : record.hazards) {
      const bool needs_water = hazard == "hcl-release";
      if (contains(component->hazard_flags, hazard) && (water || !needs_water) && !contains(found, component->id)) {
        found.push_back(component->id);
      }
    }
  }
  return found;
}

double CautionRules::hottest_K() const {
  double hottest = 0.0;
  for (int i = 0; i < answer_.mixture.size(); ++i) {
    hottest = std::max(hottest, answer_.mixture.boiling_point_K(i, answer_.input.pressure_Pa));
  }
  return hottest;
}

std::vector<std::string> CautionRules::flammable() const {
  std::vector<std::string> found;
  for (const ComponentRecord* record : records_) {
    if (record != nullptr && record->flash_point_K.has_value() && record->flash_point_K->value < hottest_K()) {
      found.push_back(record->id);
    }
  }
  return found;
}

bool CautionRules::near_dry() const {
  if (!answer_.reach.has_value() || answer_.input.residue_mass_fraction >= kNearDry) {
    return false;
  }
  const std::vector<Batch>& batches = answer_.reach->batch;
  return std::any_of(batches.begin(), batches.end(),
                     [](const Batch& batch) { return !batch.cuts.empty() && batch.heel_share < kNearDry; });
}

bool CautionRules::two_liquids() const {
  return (answer_.survey.has_value() && answer_.survey->splits()) ||
         (answer_.feed_stability.has_value() && answer_.feed_stability->outcome == Stability::unstable);
}

/// A listed substance in a share that the rule names.
bool CautionRules::regulated(const CautionRecord& record, std::vector<std::string>& substances) const {
  if (record.substances.empty()) {
    return declared_for(record, answer_.input.declared);
  }
  for (const StreamEntry& entry : answer_.input.stream) {
    if (contains(record.substances, entry.id) && entry.mass_fraction >= kRegulatedShare) {
      substances.push_back(entry.id);
    }
  }
  return !substances.empty();
}

bool CautionRules::applies(const CautionRecord& record, std::vector<std::string>& substances) const {
  switch (record.trigger) {
    case CautionTrigger::always: return true;
    case CautionTrigger::substance:
    case CautionTrigger::hazard:
    case CautionTrigger::low_ignition:
      substances = present(record.substances);
      for (const std::string& id : with_hazard(record)) {
        if (!contains(substances, id)) {
          substances.push_back(id);
        }
      }
      return !substances.empty() || (record.code == "C7" && contains(answer_.input.declared, "nitration"));
    case CautionTrigger::pair: {
      substances = present(record.substances);
      const std::vector<std::string> partners = present(record.with);
      const bool both = !substances.empty() && !partners.empty();
      substances.insert(substances.end(), partners.begin(), partners.end());
      return both;
    }
    case CautionTrigger::declared:
      substances = present(record.substances);
      return !substances.empty() && declared_for(record, answer_.input.declared);
    case CautionTrigger::near_dry: return near_dry();
    case CautionTrigger::unknowns:
      return answer_.input.unknown_mass_fraction > kLargeUnknown || contains(answer_.input.declared, "unknown-history");
    case CautionTrigger::flash_point: substances = flammable(); return !substances.empty();
    case CautionTrigger::region: return regulated(record, substances);
    case CautionTrigger::use: return declared_for(record, answer_.input.declared);
    case CautionTrigger::pressure: return answer_.input.pressure_Pa > kAbove_Pa;
    case CautionTrigger::vacuum: return answer_.input.pressure_Pa < kVacuum_Pa;
    case CautionTrigger::two_liquids: return two_liquids();
    case CautionTrigger::extrapolated: return extrapolated_;
  }
  return false;
}

}  // namespace

std::vector<Caution> cautions_for(const Answer& answer, const std::vector<const ComponentRecord*>& records,
                                  const Facts& facts, bool extrapolated) {
  const CautionRules rules(answer, records, extrapolated);
  std::vector<Caution> cautions;
  for (const CautionRecord& record : facts.cautions) {
    std::optional<Caution> caution = rules.apply(record);
    if (caution.has_value()) {
      cautions.push_back(std::move(*caution));
    }
  }
  std::stable_partition(cautions.begin(), cautions.end(), [](const Caution& caution) { return caution.above_verdict; });
  return cautions;
}

const std::vector<std::string>& declarable_words() {
  static const std::vector<std::string> words = {"azides",    "hydrogen-peroxide", "strong-base",     "aluminium",
                                                 "magnesium", "nitration",         "unknown-history", "EU",
                                                 "US",        "pharmaceutical"};
  return words;
}

}  // namespace stillshed
