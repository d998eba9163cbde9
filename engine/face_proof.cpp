#include "engine/face_proof.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "engine/interval_newton.hpp"

namespace stillshed {
namespace {

constexpr double kWindowLow = 0.5;
constexpr double kWindowHigh = 1.6;
constexpr double kSlice = 1.04;
constexpr double kNothing = 1e-11;  ///< |f| below this on a whole box: indistinguishable from zero

Box to_box(const SearchBox& box) {
  Box result;
  for (const Interval& x : box.x) {
    result.lower.push_back(x.lower());
    result.upper.push_back(x.upper());
  }
  result.t_lower_K = box.T.lower();
  result.t_upper_K = box.T.upper();
  return result;
}

bool touches(const SearchBox& a, const SearchBox& b, double gap) {
  for (int i = 0; i < a.x.size(); ++i) {
    if (a.x[i].lower() > b.x[i].upper() + gap || b.x[i].lower() > a.x[i].upper() + gap) {
      return false;
    }
  }
  return true;
}

SearchBox hull_of(const SearchBox& a, const SearchBox& b) {
  SearchBox result = a;
  for (int i = 0; i < a.x.size(); ++i) {
    result.x[i] = hull(a.x[i], b.x[i]);
  }
  result.T = hull(a.T, b.T);
  return result;
}

bool inside(const SearchBox& small, const SearchBox& large) {
  for (int i = 0; i < small.x.size(); ++i) {
    if (!large.x[i].contains(small.x[i])) {
      return false;
    }
  }
  return large.T.contains(small.T);
}

/// Branch and prune over one face.
class Prover {
 public:
  Prover(const FaceSystem& system, const ProofOptions& options)
      : system_(system), options_(options), newton_(system, options.mutation) {}

  ProofResult run(const std::vector<LocatedRoot>& located) {
    for (const LocatedRoot& root : located) {
      add_root(root);
    }
    if (bracket_temperature()) {
      search();
    } else {
      result_.status = Status::complete;
    }
    collect();
    return result_;
  }

 private:
  struct KnownRoot {
    LocatedRoot root;
    SearchBox enclosure;
    SearchBox region;  ///< holds no other root
  };

  bool add_root(const LocatedRoot& root) {
    KnownRoot known{root, {}, {}};
    if (!newton_.verify(root, known.enclosure)) {
      return false;
    }
    known.region = newton_.largest_regular(root, known.enclosure);
    known_.push_back(known);
    return true;
  }

  /// Derives the temperature bracket; false when no temperature in the window is possible.
  bool bracket_temperature() {
    const int n = system_.size();
    double coldest = std::numeric_limits<double>::infinity();
    double hottest = 0.0;
    for (int i = 0; i < n; ++i) {
      const double T = system_.face().boiling_point_K(i, std::exp(system_.ln_pressure()));
      coldest = std::min(coldest, T);
      hottest = std::max(hottest, T);
    }
    const Vec<Interval> whole(n, Interval(0.0, 1.0));
    bool any = false;
    double lower = 0.0;
    double upper = 0.0;
    for (double T = kWindowLow * coldest; T < kWindowHigh * hottest; T *= kSlice) {
      const double end = std::min(T * kSlice, kWindowHigh * hottest);
      const Vec<Interval> f = system_.face().ln_k(Interval(T, end), whole, system_.ln_pressure());
      bool possible = simplex_sum(whole.begin(), f.begin(), n).contains_zero();
      for (int i = 0; i < n && possible; ++i) {
        possible = f[i].contains_zero();
      }
      if (possible) {
        lower = any ? lower : T;
        upper = end;
        any = true;
      }
    }
    result_.t_lower_K = any ? lower : kWindowLow * coldest;
    result_.t_upper_K = any ? upper : kWindowHigh * hottest;
    return any;
  }

  void search() {
    std::vector<SearchBox> stack;
    stack.push_back(
        {Vec<Interval>(system_.size(), Interval(0.0, 1.0)), Interval(result_.t_lower_K, result_.t_upper_K)});
    while (!stack.empty()) {
      if (result_.boxes >= options_.max_boxes || options_.stop.stop_requested() || clusters_.size() > kMaxClusters) {
        for (const SearchBox& box : stack) {
          result_.undecided.push_back(to_box(box));
        }
        result_.status = options_.stop.stop_requested() ? Status::stopped : Status::undecided;
        return;
      }
      SearchBox box = stack.back();
      stack.pop_back();
      ++result_.boxes;
      process(box, stack);
    }
    result_.status = clusters_.empty() ? Status::complete : Status::degenerate;
  }

  void process(SearchBox& box, std::vector<SearchBox>& stack) {
    BoxState state = BoxState::unsettled;
    for (int pass = 0; pass < 3; ++pass) {
      if (!newton_.cut_to_simplex(box)) {
        return;
      }
      if (std::any_of(known_.begin(), known_.end(),
                      [&](const KnownRoot& known) { return inside(box, known.region); })) {
        return;
      }
      const double before = newton_.size_of(box);
      state = newton_.contract(box);
      if (state == BoxState::excluded) {
        return;
      }
      if (state == BoxState::vanishing) {
        clusters_.push_back(box);
        return;
      }
      if (state == BoxState::regular && settle_regular(box)) {
        return;
      }
      if (newton_.size_of(box) > 0.5 * before) {
        break;
      }
    }
    if (newton_.widest(box) < options_.cluster_width) {
      clusters_.push_back(box);
      return;
    }
    SearchBox other = box;
    newton_.bisect(box, other);
    stack.push_back(other);
    stack.push_back(box);
  }

  /// A box with at most one root: done when that root is known (or can be found and verified now).
  bool settle_regular(const SearchBox& box) {
    for (const KnownRoot& known : known_) {
      if (inside(known.enclosure, box)) {
        return true;
      }
      if (touches(known.enclosure, box, 0.0) && newton_.is_regular(hull_of(known.enclosure, box))) {
        return true;
      }
    }
    if (newton_.widest(box) > 0.05) {
      return false;
    }
    LocatedRoot root;
    root.x = newton_.centre(box);
    root.temperature_K = box.T.mid();
    if (!polish_root(system_, root.x, root.temperature_K, root.regularity)) {
      return false;
    }
    for (const KnownRoot& known : known_) {
      bool same = true;
      for (int i = 0; i < root.x.size(); ++i) {
        same = same && known.region.x[i].contains(root.x[i]);
      }
      if (same) {
        return false;  // Newton left the box for a root that is known already
      }
    }
    if (!add_root(root)) {
      return false;
    }
    return inside(known_.back().enclosure, box);
  }

  void collect() {
    for (const KnownRoot& known : known_) {
      result_.roots.push_back({known.root.x, known.root.temperature_K, to_box(known.enclosure), false});
    }
    // Boxes of one cluster touch: merge until nothing changes.
    std::vector<SearchBox> merged;
    for (SearchBox box : clusters_) {
      for (std::size_t k = 0; k < merged.size();) {
        if (touches(merged[k], box, 1e-5)) {
          box = hull_of(merged[k], box);
          merged.erase(merged.begin() + static_cast<std::ptrdiff_t>(k));
          k = 0;
        } else {
          ++k;
        }
      }
      merged.push_back(box);
    }
    for (const SearchBox& box : merged) {
      CertifiedRoot root;
      root.x = newton_.centre(box);
      root.temperature_K = box.T.mid();
      root.box = to_box(box);
      root.cluster = true;
      result_.roots.push_back(root);
    }
  }

  static constexpr std::size_t kMaxClusters = 20000;
  const FaceSystem& system_;
  const ProofOptions& options_;
  IntervalNewton newton_;
  std::vector<KnownRoot> known_;
  std::vector<SearchBox> clusters_;
  ProofResult result_;
};

}  // namespace

ProofResult prove_face(const FaceSystem& system, const std::vector<LocatedRoot>& located, const ProofOptions& options) {
  return Prover(system, options).run(located);
}

}  // namespace stillshed
