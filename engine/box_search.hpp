/// Branch and prune over boxes, without knowledge of models: the frame of the completeness proof.
///
/// Depth first from a stack. `Problem` gives
///     BoxOutcome reduce(SearchBox& box)   dismiss the box, or make it smaller without losing a solution
///     bool narrow(const SearchBox& box)   too narrow to be worth halving: handed to `leaf`
///     void leaf(const SearchBox& box)
///     void halve(const SearchBox& box, SearchBox& first, SearchBox& second)   halves that cover the box
/// A box that `reduce` made much smaller is reduced again before it is halved.
///
/// Claims    `finished`: every box was dismissed or handed to `leaf`. Otherwise `open` holds what is left.
#pragma once

#include <algorithm>
#include <cstdint>
#include <stop_token>
#include <utility>
#include <vector>

#include "models/interval.hpp"
#include "models/scalar.hpp"

namespace stillshed {

/// Mole fractions and temperature [K] of one face.
struct SearchBox {
  Vec<Interval> x;
  Interval T;
};

/// Temperature that goes with a mole fraction of one when a width of T is compared with a width of x.
inline constexpr double kKelvinPerFraction = 60.0;

[[nodiscard]] inline bool inside(const SearchBox& box, const SearchBox& outer) {
  for (int i = 0; i < box.x.size(); ++i) {
    if (!outer.x[i].contains(box.x[i])) {
      return false;
    }
  }
  return outer.T.contains(box.T);
}

/// True when the compositions of the boxes come closer than `gap` in every coordinate.
[[nodiscard]] inline bool touching(const SearchBox& a, const SearchBox& b, double gap) {
  for (int i = 0; i < a.x.size(); ++i) {
    if (a.x[i].lower() > b.x[i].upper() + gap || b.x[i].lower() > a.x[i].upper() + gap) {
      return false;
    }
  }
  return true;
}

[[nodiscard]] inline SearchBox hull(const SearchBox& a, const SearchBox& b) {
  SearchBox result = a;
  for (int i = 0; i < a.x.size(); ++i) {
    result.x[i] = hull(a.x[i], b.x[i]);
  }
  result.T = hull(a.T, b.T);
  return result;
}

/// Largest side, T in units of kKelvinPerFraction.
[[nodiscard]] inline double widest(const SearchBox& box) {
  double width = box.T.width() / kKelvinPerFraction;
  for (const Interval& side : box.x) {
    width = std::max(width, side.width());
  }
  return width;
}

enum class BoxOutcome {
  dismissed,  ///< holds no solution that is not known already
  reduced,    ///< much smaller now
  kept,
};

struct BoxSearchLimits {
  std::int64_t max_boxes = 2'000'000;
  std::stop_token stop;
};

struct BoxSearchResult {
  bool finished = false;
  bool stopped = false;
  std::int64_t boxes = 0;  ///< calls of reduce
  std::vector<SearchBox> open;
};

template <class Problem>
[[nodiscard]] BoxSearchResult search_boxes(Problem& problem, const SearchBox& whole, const BoxSearchLimits& limits) {
  constexpr std::int64_t kStopCheck = 64;
  BoxSearchResult result;
  std::vector<SearchBox>& open = result.open;
  open.push_back(whole);
  while (!open.empty()) {
    if (result.boxes >= limits.max_boxes) {
      return result;
    }
    if (result.boxes % kStopCheck == 0 && limits.stop.stop_requested()) {
      result.stopped = true;
      return result;
    }
    SearchBox box = open.back();
    open.pop_back();
    ++result.boxes;
    switch (problem.reduce(box)) {
      case BoxOutcome::dismissed: break;
      case BoxOutcome::reduced: open.push_back(box); break;
      case BoxOutcome::kept:
        if (problem.narrow(box)) {
          problem.leaf(box);
        } else {
          SearchBox first;
          SearchBox second;
          problem.halve(box, first, second);
          open.push_back(first);
          open.push_back(second);
        }
        break;
    }
  }
  result.finished = true;
  return result;
}

}  // namespace stillshed
