#include "reports/findings.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

namespace stillshed {
namespace {

/// Streams closer than this are equally pure.
constexpr double kSamePurity = 1e-7;

/// The smaller, the better founded.
int rank(Evidence evidence) {
  switch (evidence) {
    case Evidence::fitted: return 0;
    case Evidence::user: return 1;
    case Evidence::stretched: return 2;
    case Evidence::predicted: return 3;
    case Evidence::none: return 4;
  }
  return 4;
}

bool contains(const Members& members, int i) {
  return std::find(members.begin(), members.end(), i) != members.end();
}

}  // namespace

double molar_mass_g_mol(const Mixture& mixture, const Composition& x) {
  double sum = 0.0;
  for (int i = 0; i < x.size(); ++i) {
    sum += x[i] * mixture.component(i).molar_mass_g_mol;
  }
  return sum;
}

std::vector<double> mass_fractions(const Mixture& mixture, const Composition& x) {
  const double total = molar_mass_g_mol(mixture, x);
  std::vector<double> fractions;
  for (int i = 0; i < x.size(); ++i) {
    fractions.push_back(x[i] * mixture.component(i).molar_mass_g_mol / total);
  }
  return fractions;
}

std::optional<double> kilograms(const Answer& answer, const Composition& x, double share) {
  if (!answer.input.amount_kg.has_value() || answer.feed.empty()) {
    return std::nullopt;
  }
  const double volatile_kg = *answer.input.amount_kg * (1.0 - answer.input.residue_mass_fraction);
  return volatile_kg * share * molar_mass_g_mol(answer.mixture, x) / molar_mass_g_mol(answer.mixture, answer.feed);
}

std::vector<FixedPoint> fixed_points(const Answer& answer) {
  if (answer.chart.has_value() && !answer.chart->fixed_points.empty()) {
    return answer.chart->fixed_points;
  }
  return answer.survey.has_value() ? answer.survey->fixed_points() : std::vector<FixedPoint>{};
}

std::string short_id(const std::string& id) {
  if (id.size() > 2 && id.compare(0, 2, "az") == 0 && id.back() == ')') {
    return id.substr(0, id.find('('));
  }
  return id;
}

std::string member_names(const Mixture& mixture, const Members& members, const char* separator) {
  std::string names;
  for (const int i : members) {
    if (!names.empty()) {
      names += separator;
    }
    names += mixture.component(i).id;
  }
  return names;
}

std::string reading_words(const Answer& answer, const std::string& reading) {
  std::size_t first = 0;
  std::size_t second = 0;
  const int from_batch = std::sscanf(reading.c_str(), "batch[%zu].cuts[%zu]", &first, &second);
  if (from_batch >= 1 && answer.reach.has_value() && first < answer.reach->batch.size()) {
    const bool rectifier = answer.reach->batch[first].mode == Batch::Mode::rectifier;
    return std::string("batch ") + (rectifier ? "rectifier" : "stripper") +
           (from_batch == 2 ? ", cut " + std::to_string(second + 1) : std::string(", heel"));
  }
  if (std::sscanf(reading.c_str(), "sequences[%zu].streams[%zu]", &first, &second) == 2 && answer.reach.has_value() &&
      first < answer.reach->sequences.size() && second < answer.reach->sequences[first].streams.size()) {
    const Sequence::Stream& stream = answer.reach->sequences[first].streams[second];
    return "sequence " + std::to_string(first + 1) + ", " + (stream.distillate ? "distillate" : "bottoms") +
           " of column " + std::to_string(stream.column + 1);
  }
  return reading;
}

Evidence weakest_evidence(const Answer& answer, const Members& members) {
  Evidence weakest = Evidence::fitted;
  const auto take = [&weakest](Evidence evidence) {
    if (rank(evidence) > rank(weakest)) {
      weakest = evidence;
    }
  };
  for (const PairUse& pair : answer.pairs) {
    if (contains(members, pair.i) && contains(members, pair.j)) {
      take(pair.evidence);
    }
  }
  for (const int i : members) {
    const auto index = static_cast<std::size_t>(i);
    if (index < answer.pressure_evidence.size()) {
      take(answer.pressure_evidence[index]);
    }
  }
  return weakest;
}

std::string azeotrope_evidence(const Answer& answer, std::size_t k) {
  if (k < answer.measured.size()) {
    for (const MeasuredMatch& match : answer.measured[k]) {
      if (!match.says_none && match.dT_K.has_value() && match.dx.has_value() && std::abs(*match.dT_K) <= 0.5 &&
          *match.dx <= 0.01) {
        return "M";
      }
    }
  }
  return to_string(weakest_evidence(answer, answer.survey->azeotropes[k].point.members));
}

std::optional<BestStream> best_stream(const Sequence& sequence, const Composition& feed, int component) {
  std::optional<BestStream> best;
  if (component >= feed.size() || !(feed[component] > 0.0)) {
    return best;
  }
  double purest = -1.0;
  for (std::size_t k = 0; k < sequence.streams.size(); ++k) {
    const Sequence::Stream& stream = sequence.streams[k];
    const double recovery = stream.share * stream.x[component] / feed[component];
    const double purity = stream.x[component];
    if (purity > purest + kSamePurity ||
        (best.has_value() && purity > purest - kSamePurity && recovery > best->recovery)) {
      purest = purity;
      best = BestStream{k, recovery};
    }
  }
  return best;
}

}  // namespace stillshed
