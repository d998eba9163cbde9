#include "reports/model_choice.hpp"

#include <algorithm>
#include <set>
#include <variant>

namespace stillshed {
namespace {

std::string name_of(const ActivityModel& model) {
  struct Namer {
    std::string operator()(const Ideal&) const { return "ideal"; }
    std::string operator()(const Margules&) const { return "margules"; }
    std::string operator()(const RedlichKister&) const { return "redlich-kister"; }
    std::string operator()(const Nrtl&) const { return "nrtl"; }
    std::string operator()(const Wilson&) const { return "wilson"; }
    std::string operator()(const Uniquac&) const { return "uniquac"; }
    std::string operator()(const Unifac& unifac) const { return to_string(unifac.model()); }
  };
  return std::visit(Namer{}, model);
}

ModelChoice given_model(const ActivityModel& model, int n, const std::string& note) {
  ModelChoice choice;
  choice.kind = name_of(model);
  choice.note = note;
  choice.activity = model;
  for (int i = 0; i < n; ++i) {
    for (int j = i + 1; j < n; ++j) {
      choice.pairs.push_back({i, j, "user", Evidence::user});
    }
  }
  return choice;
}

std::string group_name(const GroupTable& table, int main_group) {
  const auto found = table.main_groups.find(main_group);
  return std::to_string(main_group) + (found == table.main_groups.end() ? "" : " (" + found->second + ")");
}

/// What one table knows about these components.
class Coverage {
 public:
  Coverage(const GroupTable& table, const std::vector<const ComponentRecord*>& records) : table_(table) {
    for (const ComponentRecord* record : records) {
      const GroupAssignment& groups = table.model == GroupModel::dortmund ? record->dortmund : record->unifac;
      assignments_.push_back(groups);
      names_.push_back(record->name);
      if (groups.groups.empty()) {
        without_groups_.push_back(record->name);
      }
    }
    if (usable()) {
      find_missing();
    }
  }

  [[nodiscard]] bool usable() const { return without_groups_.empty(); }
  [[nodiscard]] bool complete() const { return usable() && missing_.empty(); }
  [[nodiscard]] std::size_t missing() const { return missing_.size(); }
  [[nodiscard]] std::string title() const {
    return table_.model == GroupModel::dortmund ? "modified UNIFAC (Dortmund)" : "original UNIFAC";
  }
  [[nodiscard]] std::string without_groups() const {
    std::string list;
    for (const std::string& name : without_groups_) {
      list += (list.empty() ? "" : ", ") + name;
    }
    return list;
  }
  [[nodiscard]] ModelChoice choice(const std::string& note) const;

 private:
  void find_missing();
  [[nodiscard]] std::set<int> main_groups(int i) const;
  [[nodiscard]] std::string record_of_pair(int i, int j) const;

  const GroupTable& table_;
  std::vector<GroupAssignment> assignments_;
  std::vector<std::string> names_;
  std::vector<std::string> without_groups_;
  std::vector<MissingPair> missing_;
};

void Coverage::find_missing() {
  const int n = static_cast<int>(assignments_.size());
  const auto add = [this](int i, int j, const std::string& groups) {
    for (MissingPair& known : missing_) {
      if (known.i == i && known.j == j) {
        if (known.groups.find(groups) == std::string::npos) {
          known.groups += ", " + groups;
        }
        return;
      }
    }
    missing_.push_back({i, j, groups});
  };
  for (const MissingGroupPair& pair : missing_group_pairs(table_, assignments_)) {
    const std::string groups = group_name(table_, pair.main_i) + " and " + group_name(table_, pair.main_j);
    if (pair.component_i != pair.component_j) {
      add(std::min(pair.component_i, pair.component_j), std::max(pair.component_i, pair.component_j), groups);
      continue;
    }
    for (int other = 0; other < n; ++other) {  // a gap inside one molecule spoils all its pairs
      if (other != pair.component_i) {
        add(std::min(other, pair.component_i), std::max(other, pair.component_i), groups);
      }
    }
  }
  std::sort(missing_.begin(), missing_.end(),
            [](const MissingPair& a, const MissingPair& b) { return std::pair(a.i, a.j) < std::pair(b.i, b.j); });
}

std::set<int> Coverage::main_groups(int i) const {
  std::set<int> groups;
  for (const GroupCount& group : assignments_[static_cast<std::size_t>(i)].groups) {
    groups.insert(table_.subgroups.at(group.subgroup).main_group);
  }
  return groups;
}

/// "unifac-dortmund groups 1-7, 5-7".
std::string Coverage::record_of_pair(int i, int j) const {
  std::set<std::pair<int, int>> used;
  for (const int m : main_groups(i)) {
    for (const int k : main_groups(j)) {
      if (m != k) {
        used.insert(std::minmax(m, k));
      }
    }
  }
  std::string text = std::string(to_string(table_.model)) + " groups";
  const char* separator = " ";
  for (const auto& [m, k] : used) {
    text += separator + std::to_string(m) + "-" + std::to_string(k);
    separator = ", ";
  }
  return used.empty() ? std::string(to_string(table_.model)) + " sizes of the same group" : text;
}

ModelChoice Coverage::choice(const std::string& note) const {
  ModelChoice choice;
  choice.kind = to_string(table_.model);
  choice.note = note;
  const int n = static_cast<int>(assignments_.size());
  if (!usable()) {
    choice.refusal = "no group assignment in " + title() + " for " + without_groups();
    choice.activity = Ideal(n);
  } else {
    UnifacOptions options;
    options.fill_missing = !missing_.empty();
    choice.activity = Unifac(table_, assignments_, names_, options);
  }
  choice.missing = missing_;
  for (int i = 0; i < n; ++i) {
    for (int j = i + 1; j < n; ++j) {
      const auto gap = std::find_if(missing_.begin(), missing_.end(),
                                    [&](const MissingPair& pair) { return pair.i == i && pair.j == j; });
      if (gap != missing_.end()) {
        choice.pairs.push_back({i, j, "none: groups " + gap->groups, Evidence::none});
      } else if (usable()) {
        choice.pairs.push_back({i, j, record_of_pair(i, j), Evidence::predicted});
      } else {
        choice.pairs.push_back({i, j, "none", Evidence::none});
      }
    }
  }
  return choice;
}

ModelChoice choose_table(const std::vector<const ComponentRecord*>& records, const Facts& facts) {
  const Coverage dortmund(facts.dortmund, records);
  if (dortmund.complete()) {
    return dortmund.choice("auto: " + dortmund.title() + " covers every pair");
  }
  const Coverage original(facts.unifac, records);
  if (original.complete()) {
    return original.choice("auto: " + original.title() + " covers every pair, " + dortmund.title() +
                           (dortmund.usable() ? " does not" : " has no groups for " + dortmund.without_groups()));
  }
  const bool second = original.usable() && (!dortmund.usable() || original.missing() < dortmund.missing());
  const Coverage& best = second ? original : dortmund;
  return best.choice("auto: no table covers every pair; " + best.title() +
                     (best.usable()
                          ? " lacks " + std::to_string(best.missing()) + (best.missing() == 1 ? " pair" : " pairs")
                          : " has no groups for " + best.without_groups()));
}

}  // namespace

ModelChoice choose_model(const Case& input, const std::vector<const ComponentRecord*>& records, const Facts& facts) {
  const int n = static_cast<int>(records.size());
  if (input.user_model.has_value()) {
    return given_model(*input.user_model, n, "the user's own parameters");
  }
  if (input.model == "ideal") {
    return given_model(Ideal(n), n, "asked for: every activity coefficient is 1");
  }
  for (const ComponentRecord* record : records) {
    expects(record != nullptr, "choose_model: a component defined outright needs a model of its own");
  }
  if (input.model == "unifac") {
    return Coverage(facts.unifac, records).choice("asked for");
  }
  if (input.model == "unifac-dortmund") {
    return Coverage(facts.dortmund, records).choice("asked for");
  }
  return choose_table(records, facts);
}

}  // namespace stillshed
