#include "engine/cuts.hpp"

#include <algorithm>

#include "engine/geometry.hpp"

namespace stillshed {

namespace {

std::vector<Cut::Piece> pieces(const Cut& cut) {
  return cut.drift.empty() ? std::vector<Cut::Piece>{{cut.average, cut.share}} : cut.drift;
}

/// `next` follows `cut` into the same receiver.
void append(Cut& cut, const Cut& next) {
  const bool same = cut.fixed_point.has_value() && cut.fixed_point == next.fixed_point;
  std::vector<Cut::Piece> drift = pieces(cut);
  const std::vector<Cut::Piece> more = pieces(next);
  drift.insert(drift.end(), more.begin(), more.end());
  const double share = cut.share + next.share;
  for (int i = 0; i < cut.average.size(); ++i) {
    cut.average[i] = (cut.share * cut.average[i] + next.share * next.average[i]) / share;
  }
  if (next.share > cut.share) {
    cut.on = next.on;
  }
  cut.share = share;
  cut.end = next.end;
  cut.t_end_K = next.t_end_K;
  cut.pot_end = next.pot_end;
  if (!same) {
    cut.fixed_point.reset();
    cut.drift = std::move(drift);
  }
}

bool same_product(const Cut& a, const Cut& b) {
  return a.fixed_point.has_value() && a.fixed_point == b.fixed_point;
}

const Boundary* boundary_of(const Cut& cut, const std::vector<Boundary>& boundaries) {
  const auto found = std::find_if(boundaries.begin(), boundaries.end(),
                                  [&](const Boundary& boundary) { return boundary.id == cut.on; });
  return found == boundaries.end() ? nullptr : &*found;
}

/// The pot of a straight cut stays within the error of the boundary: its middle is the farthest from where it met it.
bool grazes(const Cut& cut, const Boundary& boundary) {
  const Composition middle = between(cut.pot_start, cut.pot_end, 0.5);
  return nearest_on_curve(boundary.curve.points, middle).distance <= boundary.error;
}

}  // namespace

std::vector<Cut> join_cuts(const std::vector<Cut>& cuts, const std::vector<Boundary>& boundaries) {
  std::vector<Cut> joined;
  for (const Cut& cut : cuts) {
    joined.push_back(cut);
    while (joined.size() >= 2) {
      Cut& last = joined[joined.size() - 2];
      if (same_product(last, joined.back())) {
        append(last, joined.back());
        joined.pop_back();
        continue;
      }
      if (joined.size() < 3) {
        break;
      }
      Cut& first = joined[joined.size() - 3];
      const Boundary* boundary = boundary_of(joined.back(), boundaries);
      if (boundary == nullptr || first.on != joined.back().on || last.on != "interior" || !grazes(last, *boundary)) {
        break;
      }
      const std::string on = first.on;
      append(first, last);
      append(first, joined.back());
      first.on = on;
      joined.resize(joined.size() - 2);
    }
  }
  return joined;
}

}  // namespace stillshed
