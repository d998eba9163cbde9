#include "reports/measured_match.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillshed {
namespace {

constexpr double kSamePressure = 0.05;

bool same_pressure(double a_Pa, double b_Pa) {
  return std::abs(a_Pa / b_Pa - 1.0) <= kSamePressure;
}

/// The record in the order of the mixture; nothing when it has other components.
std::optional<MeasuredMatch> in_mixture(const MeasuredAzeotrope& record, const Mixture& mixture) {
  std::vector<std::pair<int, std::size_t>> places;  // component of the mixture, place in the record
  for (std::size_t k = 0; k < record.components.size(); ++k) {
    for (int i = 0; i < mixture.size(); ++i) {
      if (mixture.component(i).id == record.components[k] && !mixture.component(i).cas.empty()) {
        places.emplace_back(i, k);
      }
    }
  }
  if (places.size() != record.components.size()) {
    return std::nullopt;
  }
  std::sort(places.begin(), places.end());
  MeasuredMatch match;
  match.source = record.source;
  match.tier = record.tier;
  match.pressure_Pa = record.pressure_Pa;
  match.temperature_K = record.temperature_K;
  match.heterogeneous = record.heterogeneous;
  match.says_none = record.kind == AzeotropeKind::none;
  const bool has_composition = record.mole_fractions.size() == record.components.size();
  if (has_composition) {
    match.x = Composition(mixture.size());
  }
  for (const auto& place : places) {
    match.members.push_back(place.first);
    if (has_composition) {
      match.x[place.first] = record.mole_fractions[place.second];
    }
  }
  return match;
}

double distance(const MeasuredMatch& match, const Azeotrope& azeotrope) {
  if (!match.x.empty()) {
    double worst = 0.0;
    for (int i = 0; i < match.x.size(); ++i) {
      worst = std::max(worst, std::abs(match.x[i] - azeotrope.point.x[i]));
    }
    return worst;
  }
  return match.temperature_K.has_value() ? std::abs(*match.temperature_K - azeotrope.point.temperature_K) : 0.0;
}

/// Records at the pressure of the run, or those at the nearest one.
std::vector<MeasuredMatch> nearest_pressure(std::vector<MeasuredMatch> matches, double pressure_Pa) {
  double nearest = std::numeric_limits<double>::infinity();
  for (const MeasuredMatch& match : matches) {
    nearest = std::min(nearest, std::abs(std::log(match.pressure_Pa / pressure_Pa)));
  }
  const auto too_far = [&](const MeasuredMatch& match) {
    return !same_pressure(match.pressure_Pa, pressure_Pa) &&
           std::abs(std::log(match.pressure_Pa / pressure_Pa)) > nearest * (1.0 + 1e-9);
  };
  matches.erase(std::remove_if(matches.begin(), matches.end(), too_far), matches.end());
  return matches;
}

void add_differences(MeasuredMatch& match, const Azeotrope& azeotrope, double pressure_Pa) {
  if (match.says_none || !same_pressure(match.pressure_Pa, pressure_Pa)) {
    return;
  }
  if (match.temperature_K.has_value()) {
    match.dT_K = azeotrope.point.temperature_K - *match.temperature_K;
  }
  if (!match.x.empty()) {
    match.dx = distance(match, azeotrope);
  }
}

}  // namespace

void match_measurements(const Facts& facts, Answer& answer) {
  const std::vector<Azeotrope>& azeotropes = answer.survey->azeotropes;
  const double pressure_Pa = answer.input.pressure_Pa;
  std::vector<std::vector<MeasuredMatch>> found(azeotropes.size());
  std::vector<MeasuredMatch> alone;
  for (const MeasuredAzeotrope& record : facts.measured_azeotropes) {
    if ((record.tier != 'A' && record.tier != 'B') || !(record.pressure_Pa > 0.0)) {
      continue;
    }
    const std::optional<MeasuredMatch> match = in_mixture(record, answer.mixture);
    if (!match.has_value()) {
      continue;
    }
    std::optional<std::size_t> best;
    for (std::size_t k = 0; k < azeotropes.size(); ++k) {
      if (azeotropes[k].point.members == match->members &&
          (!best.has_value() || distance(*match, azeotropes[k]) < distance(*match, azeotropes[*best]))) {
        best = k;
      }
    }
    (best.has_value() ? found[*best] : alone).push_back(*match);
  }
  answer.measured.clear();
  for (std::size_t k = 0; k < azeotropes.size(); ++k) {
    answer.measured.push_back(nearest_pressure(std::move(found[k]), pressure_Pa));
    for (MeasuredMatch& match : answer.measured.back()) {
      add_differences(match, azeotropes[k], pressure_Pa);
    }
  }
  // Sorted by face, each face at its nearest pressure.
  std::stable_sort(alone.begin(), alone.end(), [](const MeasuredMatch& a, const MeasuredMatch& b) {
    return std::lexicographical_compare(a.members.begin(), a.members.end(), b.members.begin(), b.members.end());
  });
  answer.measured_only.clear();
  for (std::size_t first = 0; first < alone.size();) {
    std::size_t last = first;
    while (last < alone.size() && alone[last].members == alone[first].members) {
      ++last;
    }
    for (MeasuredMatch& match : nearest_pressure(
             {alone.begin() + static_cast<std::ptrdiff_t>(first), alone.begin() + static_cast<std::ptrdiff_t>(last)},
             pressure_Pa)) {
      answer.measured_only.push_back(std::move(match));
    }
    first = last;
  }
}

}  // namespace stillshed
