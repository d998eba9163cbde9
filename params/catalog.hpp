/// Look-up over Facts: names, measured azeotropes, the vapour-pressure set of a run, missing group pairs.
///
/// A name is compared as in params/names.hpp against ids, names, synonyms and CAS numbers. An ambiguous name is never
/// resolved and a wrong one never corrected: the caller gets choices or suggestions.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "params/records.hpp"

namespace stillshed {

enum class LookupStatus { found, ambiguous, unknown };

struct Lookup {
  LookupStatus status = LookupStatus::unknown;
  const ComponentRecord* component = nullptr;   ///< when found
  std::vector<const ComponentRecord*> choices;  ///< ambiguous: what is meant; unknown: the nearest names, best first
  std::string remark;                           ///< why it is ambiguous or unknown
};

/// The set to use over a temperature bracket, for the whole run.
struct PressureChoice {
  const PressureSet* set = nullptr;  ///< nullptr: the component has none
  bool covers = false;               ///< its range holds the whole bracket
  double uncovered_K = 0.0;          ///< length of the bracket outside the range
};

/// Two main groups without published parameters, and the components (indices of the list asked) that need them;
/// component_i == component_j when one substance alone needs the pair.
struct GroupGap {
  int main_i = 0;
  int main_j = 0;
  int component_i = 0;
  int component_j = 0;
  std::string name_i;  ///< of the main groups
  std::string name_j;
  friend bool operator==(const GroupGap&, const GroupGap&) = default;
};

class Catalog {
 public:
  explicit Catalog(Facts facts);
  // The index points into facts_: moving keeps it valid, copying would not.
  Catalog(const Catalog&) = delete;
  Catalog& operator=(const Catalog&) = delete;
  Catalog(Catalog&&) = default;
  Catalog& operator=(Catalog&&) = default;

  [[nodiscard]] const Facts& facts() const { return facts_; }
  [[nodiscard]] const GroupTable& table(GroupModel model) const;

  /// By id, name, synonym or CAS number.
  [[nodiscard]] Lookup find(std::string_view name) const;
  /// By exact id; nullptr when there is none.
  [[nodiscard]] const ComponentRecord* by_id(std::string_view id) const;
  /// Citation of a source key; the key itself when unknown (a user's own number).
  [[nodiscard]] std::string citation(const std::string& key) const;

  /// Records whose components all belong to `ids` (any subset of two or more), in file order.
  [[nodiscard]] std::vector<const MeasuredAzeotrope*> measured(const std::vector<std::string>& ids) const;

  /// Main-group pairs that these components need and the table lacks. Components without groups are left out:
  /// ask has_groups first.
  [[nodiscard]] std::vector<GroupGap> group_gaps(GroupModel model, const std::vector<std::string>& ids) const;
  [[nodiscard]] bool has_groups(GroupModel model, const std::string& id) const;

  /// ICH Q3C row of a component; nullptr when not listed.
  [[nodiscard]] const ResidualLimit* residual_limit(std::string_view id) const;

 private:
  [[nodiscard]] std::vector<const ComponentRecord*> nearest(const std::string& plain) const;

  Facts facts_;
  std::unordered_map<std::string, std::size_t> by_name_;  ///< normalised name -> index into components
  std::unordered_map<std::string, std::size_t> by_id_;
};

/// One set per component and run: the first that covers the whole bracket; where none does, the one that leaves least
/// of it uncovered. Measured before estimated sets; within that the file order, which is best first.
[[nodiscard]] PressureChoice choose_pressure_set(const ComponentRecord& component, double low_K, double high_K);

/// Groups of a component in one of the tables.
[[nodiscard]] const GroupAssignment& groups_of(const ComponentRecord& component, GroupModel model);

}  // namespace stillshed
