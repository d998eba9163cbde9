#include "engine/batch.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "engine/cuts.hpp"
#include "engine/flow_map.hpp"

namespace stillshed {

namespace {

constexpr int kMaxPieces = 400;       ///< pieces of one batch; a finite chart needs far fewer
constexpr double kOnBoundary = 1e-9;  ///< a pot this close to a wall stands on it
constexpr double kClearly = 1e-6;     ///< sine of the angle from which a pot clearly leaves a wall; less is rounding
constexpr double kSameHit = 1e-10;    ///< the wall just left is not met again within this part of the ray

std::size_t at(int i) {
  return static_cast<std::size_t>(i);
}

/// Where a line through `p` along `tangent` meets the limiting curve left source - saddle - right source.
std::optional<Composition> on_joining_curve(const FlowMap::Sides& sides, const Composition& p,
                                            const Composition& tangent) {
  std::optional<Composition> best;
  double best_steps = std::numeric_limits<double>::infinity();  // nearest to the saddle, counted along the curve
  for (const std::vector<Composition>* path : {&sides.left, &sides.right}) {
    for (std::size_t k = 0; k + 1 < path->size(); ++k) {
      const double a = cross(tangent, minus((*path)[k], p));
      const double b = cross(tangent, minus((*path)[k + 1], p));
      if ((a > 0.0) == (b > 0.0) && a != 0.0) {
        continue;
      }
      const double s = a == b ? 0.0 : a / (a - b);
      if (static_cast<double>(k) + s < best_steps) {
        best_steps = static_cast<double>(k) + s;
        best = between((*path)[k], (*path)[k + 1], s);
      }
    }
  }
  return best;
}

class Walk {
 public:
  Walk(const Chart& chart, const Composition& x, Batch::Mode mode,
       const std::function<double(const Composition&)>& boiling_temperature_K, std::optional<int> region)
      : map_(chart, mode == Batch::Mode::rectifier ? Direction::heating : Direction::cooling),
        boiling_temperature_K_(boiling_temperature_K),
        pot_(x) {
    batch_.mode = mode;
    if (!region.has_value()) {
      region = region_at(chart, x);
    }
    if (region.has_value()) {
      source_ = map_.source(chart.regions[at(*region)]);
    }
  }

  Batch run() {
    batch_.status = Status::complete;
    stand_on_wall();
    for (int piece = 0; amount_ > 0.0 && batch_.status == Status::complete; ++piece) {
      if (piece >= kMaxPieces) {
        give_up("the pot does not settle");
      } else if (const std::optional<int> node = map_.node_at(pot_); node.has_value()) {
        last_cut(*node);
      } else if (present(pot_).size() <= 2) {
        along_edge();
      } else if (sliding_on_ >= 0) {
        slide();
      } else {
        straight();
      }
    }
    batch_.cuts = join_cuts(batch_.cuts, map_.chart().boundaries);
    return batch_;
  }

 private:
  struct Hit {
    int arc = 0;
    int segment = 0;
    double t = 0.0;
    Composition point;
    double turn = 0.0;  ///< > 0: the pot goes from the right of the wall to its left
  };

  void give_up(const char* message) {
    batch_.status = Status::undecided;
    batch_.message = message;
    batch_.heel = pot_;
    batch_.heel_share = amount_;
  }

  void last_cut(int node) {
    Cut cut;
    cut.start = cut.end = cut.average = cut.pot_start = cut.pot_end = pot_;
    cut.fixed_point = node;
    cut.share = amount_;
    cut.t_start_K = cut.t_end_K = map_.nodes()[at(node)].temperature_K;
    cut.on = present(pot_).size() < pot_.size() ? "face" : "interior";
    batch_.cuts.push_back(cut);
    amount_ = 0.0;
  }

  /// The pot moves straight away from `node` to `end`, of which `left` moles remain.
  void straight_cut(int node, const Composition& end, double left, const char* on) {
    const double share = amount_ - left;
    Cut cut;
    cut.start = cut.end = cut.average = map_.position(node);
    cut.fixed_point = node;
    cut.share = share;
    cut.t_start_K = cut.t_end_K = map_.nodes()[at(node)].temperature_K;
    cut.pot_start = pot_;
    cut.pot_end = end;
    cut.on = on;
    batch_.cuts.push_back(cut);
    pot_ = end;
    amount_ = left;
  }

  void along_edge() {
    const std::optional<int> found = map_.edge_arc_at(pot_);
    if (!found.has_value()) {
      give_up("no fixed points on the edge of the triangle");
      return;
    }
    const Arc& arc = map_.arcs()[at(*found)];
    const Composition& from = arc.points.front();
    const Composition& to = arc.points.back();
    straight_cut(arc.tail, to, amount_ * separation(pot_, from) / separation(to, from), "face");
  }

  /// First wall the ray from the pot, away from the source, meets beyond `t_least`.
  [[nodiscard]] std::optional<Hit> first_wall(const Composition& ray, double t_most) const {
    std::optional<Hit> best;
    for (int k = 0; k < static_cast<int>(map_.arcs().size()); ++k) {
      const Arc& arc = map_.arcs()[at(k)];
      if (!arc.wall) {
        continue;
      }
      for (int s = 0; s + 1 < static_cast<int>(arc.points.size()); ++s) {
        const Composition& a = arc.points[at(s)];
        const Composition& b = arc.points[at(s + 1)];
        const double side_a = cross(ray, minus(a, pot_));
        const double side_b = cross(ray, minus(b, pot_));
        if ((side_a > 0.0) == (side_b > 0.0)) {
          continue;
        }
        const Composition point = between(a, b, side_a / (side_a - side_b));
        const Composition away = minus(point, pot_);
        const double t = (away[0] * ray[0] + away[1] * ray[1]) / (ray[0] * ray[0] + ray[1] * ray[1]);
        if (t > kSameHit && t < t_most && (!best.has_value() || t < best->t)) {
          best = Hit{k, s, t, point, cross(minus(b, a), ray)};
        }
      }
    }
    return best;
  }

  void straight() {
    if (source_ < 0) {
      give_up("the charge lies in no region of the chart");
      return;
    }
    const Composition ray = minus(pot_, map_.position(source_));
    double t = std::numeric_limits<double>::infinity();
    int vanishing = -1;
    for (int i = 0; i < pot_.size(); ++i) {
      if (ray[i] < 0.0 && pot_[i] / -ray[i] < t) {
        t = pot_[i] / -ray[i];
        vanishing = i;
      }
    }
    const std::optional<Hit> hit = first_wall(ray, t);
    if (hit.has_value()) {
      straight_cut(source_, hit->point, amount_ / (1.0 + hit->t), "interior");
      meet(hit->arc, hit->segment, hit->turn);
      return;
    }
    Composition end(pot_.size());
    for (int i = 0; i < pot_.size(); ++i) {
      end[i] = i == vanishing ? 0.0 : std::max(0.0, pot_[i] + t * ray[i]);
      if (end[i] < kSameHit * 1e-5) {  // rounding of a component that leaves at the same moment
        end[i] = 0.0;
      }
    }
    straight_cut(source_, end, amount_ / (1.0 + t), "interior");
  }

  /// The pot stands on a wall and its source pushes it across: cross, slide, or (already on the far side) nothing.
  void meet(int arc, int segment, double turn) {
    const std::optional<FlowMap::Sides> sides = map_.sides(map_.arcs()[at(arc)]);
    if (!sides.has_value()) {
      give_up("the curves into the saddle of a boundary are missing");
      return;
    }
    const int far = turn > 0.0 ? sides->left_source : sides->right_source;
    if (far == source_) {
      return;
    }
    const std::vector<Composition>& points = map_.arcs()[at(arc)].points;
    const Composition tangent = minus(points[at(segment + 1)], points[at(segment)]);
    const double far_angle = angle_off(tangent, far);
    if (turn > 0.0 ? far_angle > kClearly : far_angle < -kClearly) {
      source_ = far;
      return;
    }
    sliding_on_ = arc;
    sliding_segment_ = segment;
  }

  /// A charge on a wall: no ray is needed to meet it.
  void stand_on_wall() {
    if (present(pot_).size() < 3 || source_ < 0) {
      return;
    }
    for (int k = 0; k < static_cast<int>(map_.arcs().size()); ++k) {
      const Arc& arc = map_.arcs()[at(k)];
      if (!arc.wall) {
        continue;
      }
      const NearestOnCurve foot = nearest_on_curve(arc.points, pot_);
      const std::optional<FlowMap::Sides> sides = map_.sides(arc);
      if (foot.distance > kOnBoundary || !sides.has_value()) {
        continue;
      }
      const Composition tangent = minus(arc.points[foot.segment + 1], arc.points[foot.segment]);
      const double turn = cross(tangent, minus(pot_, map_.position(source_)));
      const bool outward = (turn > 0.0) == (source_ == sides->right_source);
      if (outward) {
        meet(k, static_cast<int>(foot.segment), turn);
      }
      return;
    }
  }

  void slide() {
    const Arc& arc = map_.arcs()[at(sliding_on_)];
    const FlowMap::Sides sides = *map_.sides(arc);
    const Composition pot_start = pot_;
    const double amount_start = amount_;
    Cut cut;
    bool moving = true;
    for (std::size_t steps = 0; moving; ++steps) {
      if (steps > 2 * arc.points.size()) {
        give_up("the pot moves to and fro on a boundary");
        break;
      }
      const Composition& a = arc.points[at(sliding_segment_)];
      const Composition& b = arc.points[at(sliding_segment_ + 1)];
      const Composition tangent = minus(b, a);
      const double left_angle = angle_off(tangent, sides.left_source);
      const double right_angle = angle_off(tangent, sides.right_source);
      if (left_angle > kClearly) {
        leave(sides.left_source);
        break;
      }
      if (right_angle < -kClearly) {
        leave(sides.right_source);
        break;
      }
      std::optional<Composition> drawn = on_joining_curve(sides, pot_, tangent);
      if (!drawn.has_value()) {  // the tangent passes a node by rounding
        drawn = map_.position(left_angle > -right_angle ? sides.left_source : sides.right_source);
      }
      const Composition away = minus(pot_, *drawn);
      const bool forward = away[0] * tangent[0] + away[1] * tangent[1] > 0.0;
      const Composition& end = forward ? b : a;
      if (cut.start.empty()) {
        cut.start = *drawn;
      }
      cut.end = *drawn;
      const double left = amount_ * length(away) / length(minus(end, *drawn));
      cut.drift.push_back({*drawn, amount_ - left});
      amount_ = left;
      pot_ = end;
      sliding_segment_ += forward ? 1 : -1;
      moving = sliding_segment_ >= 0 && sliding_segment_ + 1 < static_cast<int>(arc.points.size());
    }
    if (!moving) {
      sliding_on_ = -1;  // at a fixed point
    }
    finish_slide(cut, arc, pot_start, amount_start);
  }

  void finish_slide(Cut& cut, const Arc& arc, const Composition& pot_start, double amount_start) {
    cut.share = amount_start - amount_;
    if (cut.start.empty() || cut.share <= 0.0) {
      return;
    }
    cut.average = Composition(pot_.size());
    for (int i = 0; i < pot_.size(); ++i) {
      cut.average[i] = std::max(0.0, (amount_start * pot_start[i] - amount_ * pot_[i]) / cut.share);
    }
    if (separation(cut.start, cut.end) < kOnBoundary) {
      cut.fixed_point = map_.node_at(cut.start, kOnBoundary);
      cut.drift.clear();
    }
    cut.t_start_K = boiling_temperature_K_(cut.start);
    cut.t_end_K = boiling_temperature_K_(cut.end);
    cut.pot_start = pot_start;
    cut.pot_end = pot_;
    cut.on = map_.chart().boundaries[at(*arc.boundary)].id;
    batch_.cuts.push_back(cut);
  }

  /// Sine of the angle between a wall and the motion away from `source`: > 0 to the left of the wall.
  [[nodiscard]] double angle_off(const Composition& tangent, int source) const {
    const Composition motion = minus(pot_, map_.position(source));
    return cross(tangent, motion) / (length(tangent) * length(motion));
  }

  void leave(int source) {
    source_ = source;
    sliding_on_ = -1;
  }

  static double length(const Composition& v) { return std::hypot(v[0], v[1]); }

  FlowMap map_;
  const std::function<double(const Composition&)>& boiling_temperature_K_;
  Batch batch_;
  Composition pot_;
  double amount_ = 1.0;
  int source_ = -1;
  int sliding_on_ = -1;  ///< wall the pot slides along; -1: none
  int sliding_segment_ = 0;
};

}  // namespace

Batch run_batch(const Chart& chart, const Composition& x, Batch::Mode mode,
                const std::function<double(const Composition&)>& boiling_temperature_K, std::optional<int> region) {
  Batch refused;
  refused.mode = mode;
  if (x.size() > 3) {
    refused.status = Status::not_applicable;
    refused.message = "cuts are drawn for two and three components";
    return refused;
  }
  if (chart.status != Status::complete) {
    refused.status = chart.status;
    refused.message = chart.message;
    return refused;
  }
  return Walk(chart, x, mode, boiling_temperature_K, region).run();
}

}  // namespace stillshed
