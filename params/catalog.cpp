#include "params/catalog.hpp"

#include <algorithm>
#include <set>
#include <utility>

#include "params/cas.hpp"
#include "params/errors.hpp"
#include "params/names.hpp"

namespace stillshed {
namespace {

/// Length of [low, high] outside the range of the set.
double uncovered_K(const PressureSet& set, double low_K, double high_K) {
  const double below = set.t_min_K ? std::max(0.0, std::min(high_K, *set.t_min_K) - low_K) : 0.0;
  const double above = set.t_max_K ? std::max(0.0, high_K - std::max(low_K, *set.t_max_K)) : 0.0;
  return below + above;
}

std::set<int> main_groups_of(const GroupAssignment& assignment, const GroupTable& table) {
  std::set<int> groups;
  for (const GroupCount& count : assignment.groups) {
    groups.insert(table.subgroups.at(count.subgroup).main_group);
  }
  return groups;
}

}  // namespace

PressureChoice choose_pressure_set(const ComponentRecord& component, double low_K, double high_K) {
  PressureChoice best;
  for (const PressureSet& set : component.pressure_sets) {
    const double uncovered = uncovered_K(set, low_K, high_K);
    const bool first = best.set == nullptr;
    const bool nearer = !first && uncovered < best.uncovered_K;
    const bool measured_instead = !first && uncovered == best.uncovered_K && best.set->estimated && !set.estimated;
    if (first || nearer || measured_instead) {
      best = {&set, uncovered == 0.0, uncovered};
    }
  }
  return best;
}

const GroupAssignment& groups_of(const ComponentRecord& component, GroupModel model) {
  return model == GroupModel::unifac ? component.unifac : component.dortmund;
}

Catalog::Catalog(Facts facts) : facts_(std::move(facts)) {
  by_name_.reserve(4 * facts_.components.size());
  by_id_.reserve(facts_.components.size());
  for (std::size_t k = 0; k < facts_.components.size(); ++k) {
    const ComponentRecord& component = facts_.components[k];
    by_id_.emplace(component.id, k);
    by_name_.emplace(normalised_name(component.id), k);
    by_name_.emplace(normalised_name(component.name), k);
    for (const std::string& synonym : component.synonyms) {
      by_name_.emplace(normalised_name(synonym), k);
    }
  }
}

const GroupTable& Catalog::table(GroupModel model) const {
  return model == GroupModel::unifac ? facts_.unifac : facts_.dortmund;
}

Lookup Catalog::find(std::string_view name) const {
  Lookup result;
  if (looks_like_cas(name)) {
    if (!is_valid_cas(name)) {
      result.remark = "the check digit of this CAS number is wrong";
      return result;
    }
    const auto found = std::find_if(facts_.components.begin(), facts_.components.end(),
                                    [&](const ComponentRecord& component) { return component.cas == name; });
    if (found == facts_.components.end()) {
      result.remark = "no component with this CAS number is on file";
      return result;
    }
    result.status = LookupStatus::found;
    result.component = &*found;
    return result;
  }
  const std::string plain = normalised_name(name);
  if (const auto ambiguous = facts_.ambiguous_names.find(plain); ambiguous != facts_.ambiguous_names.end()) {
    result.status = LookupStatus::ambiguous;
    result.remark = ambiguous->second.why;
    result.choices.reserve(ambiguous->second.choices.size());
    for (const std::string& id : ambiguous->second.choices) {
      result.choices.push_back(by_id(id));
    }
    return result;
  }
  if (const auto found = by_name_.find(plain); found != by_name_.end()) {
    result.status = LookupStatus::found;
    result.component = &facts_.components[found->second];
    return result;
  }
  result.remark = "no component of this name is on file";
  result.choices = nearest(plain);
  return result;
}

std::vector<const ComponentRecord*> Catalog::nearest(const std::string& plain) const {
  constexpr std::size_t kMostSuggestions = 5;
  // A third of the letters may differ: beyond that a suggestion is noise.
  const int furthest = std::max<int>(1, static_cast<int>(plain.size()) / 3);
  std::vector<std::pair<int, std::size_t>> ranked;
  std::unordered_map<std::size_t, int> best;
  for (const auto& [name, index] : by_name_) {
    const int gap = static_cast<int>(std::max(name.size(), plain.size()) - std::min(name.size(), plain.size()));
    const int distance = gap > furthest ? gap : edit_distance(plain, name);
    if (distance <= furthest) {
      const auto [entry, fresh] = best.emplace(index, distance);
      entry->second = std::min(entry->second, distance);
    }
  }
  ranked.reserve(best.size());
  for (const auto& [index, distance] : best) {
    ranked.emplace_back(distance, index);
  }
  std::sort(ranked.begin(), ranked.end());
  std::vector<const ComponentRecord*> result;
  for (const auto& entry : ranked) {
    if (result.size() == kMostSuggestions) {
      break;
    }
    result.push_back(&facts_.components[entry.second]);
  }
  return result;
}

const ComponentRecord* Catalog::by_id(std::string_view id) const {
  const auto found = by_id_.find(std::string(id));
  return found == by_id_.end() ? nullptr : &facts_.components[found->second];
}

std::string Catalog::citation(const std::string& key) const {
  const auto found = facts_.sources.find(key);
  return found == facts_.sources.end() ? key : found->second.citation;
}

std::vector<const MeasuredAzeotrope*> Catalog::measured(const std::vector<std::string>& ids) const {
  std::vector<const MeasuredAzeotrope*> result;
  for (const MeasuredAzeotrope& azeotrope : facts_.measured_azeotropes) {
    const bool inside = std::all_of(azeotrope.components.begin(), azeotrope.components.end(),
                                    [&](const auto& id) { return std::find(ids.begin(), ids.end(), id) != ids.end(); });
    if (inside) {
      result.push_back(&azeotrope);
    }
  }
  return result;
}

bool Catalog::has_groups(GroupModel model, const std::string& id) const {
  const ComponentRecord* component = by_id(id);
  return component != nullptr && !groups_of(*component, model).groups.empty();
}

std::vector<GroupGap> Catalog::group_gaps(GroupModel model, const std::vector<std::string>& ids) const {
  const GroupTable& groups = table(model);
  std::vector<std::set<int>> needed;
  for (const std::string& id : ids) {
    const ComponentRecord* component = by_id(id);
    if (component == nullptr) {
      throw InputError(Problem{"components", id, "an id on file", "resolve the name first"});
    }
    needed.push_back(main_groups_of(groups_of(*component, model), groups));
  }
  std::vector<GroupGap> gaps;
  for (std::size_t i = 0; i < needed.size(); ++i) {
    for (std::size_t j = i; j < needed.size(); ++j) {
      for (const int m : needed[i]) {
        for (const int n : needed[j]) {
          const bool twice = i == j && n < m;  // inside one substance each pair counts once
          if (m != n && !twice && !groups.interactions.contains({m, n})) {
            gaps.push_back(
                {m, n, static_cast<int>(i), static_cast<int>(j), groups.main_groups.at(m), groups.main_groups.at(n)});
          }
        }
      }
    }
  }
  return gaps;
}

const ResidualLimit* Catalog::residual_limit(std::string_view id) const {
  const auto found = std::find_if(facts_.residual_limits.begin(), facts_.residual_limits.end(),
                                  [&](const ResidualLimit& limit) { return !id.empty() && limit.component == id; });
  return found == facts_.residual_limits.end() ? nullptr : &*found;
}

}  // namespace stillshed
