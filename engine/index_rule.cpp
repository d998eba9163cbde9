#include "engine/index_rule.hpp"

#include <algorithm>
#include <cmath>

#include "engine/node_type.hpp"

namespace stillshed {

int index_expected(int members) {
  return members % 2 == 1 ? 2 : 0;
}

std::optional<int> index_sum(const std::vector<IndexTerm>& terms) {
  int sum = 0;
  for (const IndexTerm& term : terms) {
    int sign = 1;
    for (const double eigenvalue : term.eigenvalues) {
      if (!(std::abs(eigenvalue) >= kZeroEigenvalue)) {
        return std::nullopt;
      }
      sign = eigenvalue < 0.0 ? -sign : sign;
    }
    sum += sign * (1 << term.components);
  }
  return sum;
}

std::vector<double> eigenvalues_inside(const FixedPoint& point, const Members& members) {
  // First the k - 1 of the point's own face, then one per absent component in ascending order.
  const auto own = static_cast<std::size_t>(point.members.size() - 1);
  std::vector<double> inside(point.eigenvalues.begin(), point.eigenvalues.begin() + static_cast<std::ptrdiff_t>(own));
  std::size_t at = own;
  for (int k = 0; k < point.x.size(); ++k) {
    if (std::find(point.members.begin(), point.members.end(), k) != point.members.end()) {
      continue;
    }
    if (std::find(members.begin(), members.end(), k) != members.end()) {
      inside.push_back(point.eigenvalues[at]);
    }
    ++at;
  }
  return inside;
}

}  // namespace stillshed
