#include "engine/sequences.hpp"

#include <algorithm>
#include <cmath>

#include "engine/flow_map.hpp"

namespace stillshed {

namespace {

constexpr double kSameStream = 1e-9;  ///< mole fractions
constexpr double kRealSplit = 1e-9;   ///< smallest share of a product worth a column
constexpr std::size_t kMaxSequences = 400;

std::size_t at(int i) {
  return static_cast<std::size_t>(i);
}

struct Split {
  Composition distillate;
  Composition bottoms;
  double distillate_to_feed = 0.0;
  bool direct = true;
  std::vector<Composition> witness;
};

/// theta of F = theta D + (1 - theta) B, from the component that differs most.
double lever(const Composition& feed, const Composition& distillate, const Composition& bottoms) {
  int widest = 0;
  for (int i = 1; i < feed.size(); ++i) {
    if (std::abs(distillate[i] - bottoms[i]) > std::abs(distillate[widest] - bottoms[widest])) {
      widest = i;
    }
  }
  return (feed[widest] - bottoms[widest]) / (distillate[widest] - bottoms[widest]);
}

class Splitter {
 public:
  Splitter(const Chart& chart, int max_depth)
      : heating_(chart, Direction::heating), cooling_(chart, Direction::cooling), max_depth_(max_depth) {}

  std::vector<Sequence> run(const Composition& feed) {
    grow({}, feed, 1.0, std::nullopt, false, 0);
    return std::move(sequences_);
  }

 private:
  struct Seen {
    Composition x;
    double share = 0.0;
    int depth = 0;
  };

  [[nodiscard]] std::vector<Split> splits(const Composition& feed) const {
    std::vector<Split> result;
    if (heating_.node_at(feed, kSameStream).has_value()) {
      return result;
    }
    if (const std::optional<int> edge = heating_.edge_arc_at(feed); edge.has_value()) {
      const Arc& arc = heating_.arcs()[at(*edge)];
      offer(result, feed, {arc.points.front(), arc.points.back(), 0.0, true, arc.points});
      return result;
    }
    for (const Region& region : heating_.chart().regions) {
      if (!region.polygon.empty()) {
        sharp_split(result, feed, region, heating_);
        sharp_split(result, feed, region, cooling_);
      }
    }
    return result;
  }

  /// The split whose sharp product is the source of `map` in this region.
  static void sharp_split(std::vector<Split>& result, const Composition& feed, const Region& region,
                          const FlowMap& map) {
    const Composition& sharp = map.position(map.source(region));
    const std::optional<RayEnd> end = farthest_on_ray(region.polygon, sharp, feed);
    if (!end.has_value() || end->t <= 1.0 + kRealSplit) {
      return;
    }
    std::optional<std::vector<Composition>> witness = map.curve_to(region, end->point);
    if (!witness.has_value()) {
      return;  // no residue curve to show for it
    }
    Split split;
    split.direct = &map.position(map.source(region)) == &map.position(region.unstable_node);
    split.distillate = split.direct ? sharp : end->point;
    split.bottoms = split.direct ? end->point : sharp;
    split.witness = std::move(*witness);
    if (!split.direct) {
      std::reverse(split.witness.begin(), split.witness.end());
    }
    offer(result, feed, std::move(split));
  }

  static void offer(std::vector<Split>& result, const Composition& feed, Split split) {
    split.distillate_to_feed = lever(feed, split.distillate, split.bottoms);
    if (split.distillate_to_feed < kRealSplit || split.distillate_to_feed > 1.0 - kRealSplit) {
      return;
    }
    const bool known = std::any_of(result.begin(), result.end(), [&](const Split& other) {
      return separation(other.distillate, split.distillate) < kSameStream &&
             separation(other.bottoms, split.bottoms) < kSameStream;
    });
    if (!known) {
      result.push_back(std::move(split));
    }
  }

  /// Adds every continuation of `columns`, whose last impure stream is `feed`.
  void grow(const std::vector<Column>& columns, const Composition& feed, double share, std::optional<int> parent,
            bool parent_distillate, int depth) {
    const bool again = std::any_of(seen_.begin(), seen_.end(), [&](const Seen& seen) {
      return separation(seen.x, feed) < kSameStream && seen.share >= share - kSameStream && seen.depth <= depth;
    });
    std::vector<Split> choices;
    if (!again && depth < max_depth_) {
      seen_.push_back({feed, share, depth});
      choices = splits(feed);
    }
    if (choices.empty()) {
      finish(columns);
      return;
    }
    for (const Split& split : choices) {
      if (sequences_.size() >= kMaxSequences) {
        return;
      }
      Column column;
      column.feed = feed;
      column.distillate = split.distillate;
      column.bottoms = split.bottoms;
      column.distillate_to_feed = split.distillate_to_feed;
      column.feed_to_charge = share;
      column.direct = split.direct;
      column.witness = split.witness;
      column.parent = parent;
      column.parent_distillate = parent_distillate;
      std::vector<Column> longer = columns;
      longer.push_back(std::move(column));
      const int index = static_cast<int>(columns.size());
      const double theta = split.distillate_to_feed;
      if (!heating_.node_at(split.distillate, kSameStream).has_value()) {
        grow(longer, split.distillate, share * theta, index, true, depth + 1);
      } else if (!heating_.node_at(split.bottoms, kSameStream).has_value()) {
        grow(longer, split.bottoms, share * (1.0 - theta), index, false, depth + 1);
      } else {
        finish(longer);
      }
    }
  }

  void finish(const std::vector<Column>& columns) {
    if (columns.empty()) {
      return;
    }
    Sequence sequence;
    sequence.columns = columns;
    for (int k = 0; k < static_cast<int>(columns.size()); ++k) {
      const Column& column = columns[at(k)];
      const Column* next = k + 1 < static_cast<int>(columns.size()) ? &columns[at(k + 1)] : nullptr;
      const double distillate = column.feed_to_charge * column.distillate_to_feed;
      if (next == nullptr || !next->parent_distillate) {
        sequence.streams.push_back({column.distillate, distillate, k, true});
      }
      if (next == nullptr || next->parent_distillate) {
        sequence.streams.push_back({column.bottoms, column.feed_to_charge - distillate, k, false});
      }
    }
    sequences_.push_back(std::move(sequence));
  }

  FlowMap heating_;
  FlowMap cooling_;
  int max_depth_;
  std::vector<Seen> seen_;
  std::vector<Sequence> sequences_;
};

}  // namespace

std::vector<Sequence> column_sequences(const Chart& chart, const Composition& feed, int max_depth) {
  if (chart.status != Status::complete || feed.size() > 3) {
    return {};
  }
  return Splitter(chart, max_depth).run(feed);
}

}  // namespace stillshed
