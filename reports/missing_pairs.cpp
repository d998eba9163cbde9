#include "reports/missing_pairs.hpp"

#include <array>
#include <utility>

namespace stillshed {
namespace {

using Point = std::pair<double, double>;

/// The corner most likely to disagree (two liquids) comes first.
const std::array<Point, 5>& box_points() {
  constexpr double low = kLowestLnGamma;
  constexpr double high = kHighestLnGamma;
  constexpr double middle = 0.5 * (low + high);
  static constexpr std::array<Point, 5> points = {
      {{high, high}, {low, low}, {low, high}, {high, low}, {middle, middle}}};
  return points;
}

double mean_boiling_point_K(const Mixture& mixture, double pressure_Pa) {
  double sum = 0.0;
  for (int i = 0; i < mixture.size(); ++i) {
    sum += mixture.boiling_point_K(i, pressure_Pa);
  }
  return sum / mixture.size();
}

/// Correction that brings the pair to this point.
RedlichKisterPair correction(const Mixture& filled, const MissingPair& pair, double temperature_K, const Point& target) {
  Members members;
  members.push_back(pair.i);
  members.push_back(pair.j);
  const Mixture binary = filled.face(members);
  const double filled_i = binary.ln_gamma(temperature_K, Composition{0.0, 1.0})[0];
  const double filled_j = binary.ln_gamma(temperature_K, Composition{1.0, 0.0})[1];
  const double difference = target.first - filled_i;  // c0 - c1
  const double sum = target.second - filled_j;        // c0 + c1
  return {pair.i, pair.j, {0.5 * (sum + difference), 0.5 * (sum - difference)}};
}

}  // namespace

std::vector<Mixture> bounding_mixtures(const Mixture& filled, const std::vector<MissingPair>& missing,
                                       double pressure_Pa) {
  std::size_t count = 1;
  for (std::size_t k = 0; k < missing.size(); ++k) {
    count *= box_points().size();
    if (count > kMostCombinations) {
      return {};
    }
  }
  const double temperature_K = mean_boiling_point_K(filled, pressure_Pa);
  std::vector<Mixture> mixtures;
  for (std::size_t combination = 0; combination < count; ++combination) {
    std::vector<RedlichKisterPair> pairs;
    std::size_t digits = combination;
    for (const MissingPair& pair : missing) {
      pairs.push_back(correction(filled, pair, temperature_K, box_points()[digits % box_points().size()]));
      digits /= box_points().size();
    }
    mixtures.emplace_back(filled.components(), filled.activity(), RedlichKister(filled.size(), pairs));
  }
  return mixtures;
}

std::vector<std::optional<Verdict>> common_verdicts(
    const std::vector<Mixture>& mixtures, std::size_t products,
    const std::function<std::vector<Verdict>(const Mixture&)>& judge) {
  std::vector<std::optional<Verdict>> common(products);
  for (std::size_t m = 0; m < mixtures.size(); ++m) {
    const std::vector<Verdict> verdicts = judge(mixtures[m]);
    bool any_left = false;
    for (std::size_t p = 0; p < products; ++p) {
      if (m == 0) {
        common[p] = verdicts[p];
      }
      if (common[p] != verdicts[p] || verdicts[p] == Verdict::no_call) {
        common[p].reset();
      }
      any_left = any_left || common[p].has_value();
    }
    if (!any_left) {
      break;  // nothing can be kept any more
    }
  }
  return common;
}

}  // namespace stillshed
