#include "models/unifac.hpp"

#include <algorithm>
#include <set>

namespace stillshed {
namespace {

std::set<int> main_groups_of(const GroupTable& table, const GroupAssignment& assignment) {
  std::set<int> mains;
  for (const GroupCount& group : assignment.groups) {
    mains.insert(table.subgroups.at(group.subgroup).main_group);
  }
  return mains;
}

std::string describe(const GroupTable& table, int main_group) {
  return std::to_string(main_group) + " (" + table.main_groups.at(main_group) + ")";
}

}  // namespace

std::vector<MissingGroupPair> missing_group_pairs(const GroupTable& table,
                                                  const std::vector<GroupAssignment>& components) {
  std::vector<MissingGroupPair> missing;
  const int n = static_cast<int>(components.size());
  for (int i = 0; i < n; ++i) {
    const std::set<int> mains_i = main_groups_of(table, components[static_cast<std::size_t>(i)]);
    for (int j = i; j < n; ++j) {
      const std::set<int> mains_j = main_groups_of(table, components[static_cast<std::size_t>(j)]);
      for (const int m : mains_i) {
        for (const int k : mains_j) {
          const bool counted_once = i != j || m < k;
          if (m != k && counted_once && table.interactions.count({m, k}) == 0) {
            missing.push_back({m, k, i, j});
          }
        }
      }
    }
  }
  return missing;
}

Unifac::Unifac(const GroupTable& table, const std::vector<GroupAssignment>& components,
               const std::vector<std::string>& names, UnifacOptions options)
    : model_(table.model) {
  const int n = static_cast<int>(components.size());
  expects(names.size() == components.size() && n <= kMaxComponents, "Unifac: one name per component");
  std::vector<Problem> problems;
  std::set<int> mains;
  for (int i = 0; i < n; ++i) {
    const auto at = static_cast<std::size_t>(i);
    if (components[at].groups.empty()) {
      problems.push_back({std::string(to_string(table.model)), "no group assignment for " + names[at],
                          "components that the table can build from its groups", "choose another model"});
      continue;
    }
    mains.merge(main_groups_of(table, components[at]));
  }
  if (problems.empty() && !options.fill_missing) {
    for (const MissingGroupPair& pair : missing_group_pairs(table, components)) {
      problems.push_back({std::string(to_string(table.model)),
                          "no published parameters for main groups " + describe(table, pair.main_i) + " and " +
                              describe(table, pair.main_j) + ", needed by " +
                              names[static_cast<std::size_t>(pair.component_i)] + " and " +
                              names[static_cast<std::size_t>(pair.component_j)],
                          "pairs of groups in the table", "choose another model or give your own parameters"});
    }
  }
  if (problems.empty() && static_cast<int>(mains.size()) > kMaxSites) {
    problems.push_back({std::string(to_string(table.model)), std::to_string(mains.size()) + " main groups",
                        "at most " + std::to_string(kMaxSites), "split the mixture"});
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
  main_groups_.assign(mains.begin(), mains.end());
  const int sites = static_cast<int>(main_groups_.size());
  Vec<double> r(n, 0.0);
  Vec<double> q(n, 0.0);
  std::array<Vec<double>, kMaxSites> a{};
  for (int k = 0; k < sites; ++k) {
    a[static_cast<std::size_t>(k)] = Vec<double>(n, 0.0);
  }
  for (int i = 0; i < n; ++i) {
    for (const GroupCount& group : components[static_cast<std::size_t>(i)].groups) {
      const Subgroup& subgroup = table.subgroups.at(group.subgroup);
      const auto site =
          std::lower_bound(main_groups_.begin(), main_groups_.end(), subgroup.main_group) - main_groups_.begin();
      r[i] += group.count * subgroup.R;
      q[i] += group.count * subgroup.Q;
      a[static_cast<std::size_t>(site)][i] += group.count * subgroup.Q;
    }
  }
  core_ = GroupCore(r, q, table.combinatorial_exponent, sites, a);
  for (int m = 0; m < sites; ++m) {
    for (int k = 0; k < sites; ++k) {
      const auto found = table.interactions.find(
          {main_groups_[static_cast<std::size_t>(m)], main_groups_[static_cast<std::size_t>(k)]});
      if (found != table.interactions.end()) {
        interaction_[static_cast<std::size_t>(m)][static_cast<std::size_t>(k)] = found->second;
      }
    }
  }
}

Unifac Unifac::face(const Members& members) const {
  Unifac part;
  part.model_ = model_;
  Vec<double> r;
  Vec<double> q;
  for (const int i : members) {
    r.push_back(core_.r()[i]);
    q.push_back(core_.q()[i]);
  }
  // Sites that no remaining component has drop out: they cannot contribute.
  std::vector<int> kept;
  std::array<Vec<double>, kMaxSites> a{};
  for (int k = 0; k < core_.sites(); ++k) {
    Vec<double> row;
    bool used = false;
    for (const int i : members) {
      row.push_back(core_.surfaces()[static_cast<std::size_t>(k)][i]);
      used = used || row[row.size() - 1] != 0.0;
    }
    if (used) {
      a[kept.size()] = row;
      kept.push_back(k);
    }
  }
  for (std::size_t m = 0; m < kept.size(); ++m) {
    part.main_groups_.push_back(main_groups_[static_cast<std::size_t>(kept[m])]);
    for (std::size_t k = 0; k < kept.size(); ++k) {
      part.interaction_[m][k] = interaction_[static_cast<std::size_t>(kept[m])][static_cast<std::size_t>(kept[k])];
    }
  }
  part.core_ = GroupCore(r, q, core_.exponent(), static_cast<int>(kept.size()), a);
  return part;
}

}  // namespace stillshed
