#include "reports/missing_pairs.hpp"

#include <algorithm>
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
RedlichKisterPair correction(const Mixture& filled, const MissingPair& pair, double temperature_K,
                             const Point& target) {
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

bool holds_missing_pair(const Members& members, const std::vector<MissingPair>& missing) {
  const auto has = [&](int i) { return std::find(members.begin(), members.end(), i) != members.end(); };
  return std::any_of(missing.begin(), missing.end(),
                     [&](const MissingPair& pair) { return has(pair.i) && has(pair.j); });
}

void forget_missing_pairs(Survey& survey, const std::vector<MissingPair>& missing) {
  const auto erase_spoiled = [&](auto& list, auto&& members_of) {
    list.erase(std::remove_if(list.begin(), list.end(),
                              [&](const auto& item) { return holds_missing_pair(members_of(item), missing); }),
               list.end());
  };
  erase_spoiled(survey.azeotropes, [](const Azeotrope& item) { return item.point.members; });
  erase_spoiled(survey.rejected, [](const RejectedRoot& item) { return item.members; });
  for (FaceProof& face : survey.faces) {
    if (holds_missing_pair(face.members, missing)) {
      const Members members = face.members;
      face = FaceProof{};
      face.members = members;
      face.note = to_string(Reason::missing_pair);
    }
  }
  // An absent component's K at a point hangs on its pairs with the components that are there.
  const auto forget_node = [&](FixedPoint& point) {
    const auto has = [&](int i) {
      return std::find(point.members.begin(), point.members.end(), i) != point.members.end();
    };
    for (const MissingPair& pair : missing) {
      if (has(pair.i) != has(pair.j)) {
        point.node = NodeType::degenerate;
        point.eigenvalues.clear();
      }
    }
  };
  std::for_each(survey.pure.begin(), survey.pure.end(), forget_node);
  for (Azeotrope& azeotrope : survey.azeotropes) {
    forget_node(azeotrope.point);
  }
  survey.index_rule_holds.reset();
  survey.status = survey.status == Status::complete ? Status::undecided : survey.status;
}

std::vector<std::optional<Verdict>> common_verdicts(const std::vector<Mixture>& mixtures, std::size_t products,
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
