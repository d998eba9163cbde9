#include "engine/face_proof.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <optional>

#include "engine/interval_newton.hpp"

namespace stillshed {
namespace {

/// A box whose volume shrank below this share is reduced again before it is halved.
constexpr double kMuchSmaller = 0.3;
constexpr double kWidthGrowth = 4.0;
/// Half-widths tried for the neighbourhood of a root.
constexpr double kFirstRadius = 0.02;
constexpr double kLargestRadius = 0.7;
constexpr double kSmallestRadius = 1e-11;
/// A side this much shorter than the widest one is not halved. Group-contribution models are the reason for so large a
/// share: over the whole temperature bracket their gradients are so wide that composition seems to be all that matters,
/// and without it boxes are sliced in composition with the bracket left whole.
constexpr double kSliver = 0.1;

struct KnownRoot {
  LocatedRoot root;
  SearchBox box;            ///< holds exactly this root
  SearchBox neighbourhood;  ///< holds no other
};

bool holds(const SearchBox& box, const LocatedRoot& root) {
  for (int i = 0; i < box.x.size(); ++i) {
    if (!box.x[i].contains(root.x[i])) {
      return false;
    }
  }
  return box.T.contains(root.temperature_K);
}

double volume(const SearchBox& box) {
  double product = box.T.width();
  for (const Interval& side : box.x) {
    product *= side.width();
  }
  return product;
}

/// Width of a column, T (column n) in units of kKelvinPerFraction.
double scaled_width(const SearchBox& box, int column) {
  return column == box.x.size() ? box.T.width() / kKelvinPerFraction : box.x[column].width();
}

int widest_column(const SearchBox& box) {
  int widest = 0;
  for (int j = 1; j <= box.x.size(); ++j) {
    widest = scaled_width(box, j) > scaled_width(box, widest) ? j : widest;
  }
  return widest;
}

/// All that lies within `radius` of a root, on the closed simplex.
SearchBox box_around(const LocatedRoot& root, double radius) {
  const double heat_K = kKelvinPerFraction * radius;
  SearchBox box{Vec<Interval>(root.x.size()), Interval(root.temperature_K - heat_K, root.temperature_K + heat_K)};
  for (int i = 0; i < root.x.size(); ++i) {
    box.x[i] = Interval(std::max(0.0, root.x[i] - radius), std::min(1.0, root.x[i] + radius));
  }
  return box;
}

Box to_box(const SearchBox& box) {
  Box result;
  for (const Interval& side : box.x) {
    result.lower.push_back(side.lower());
    result.upper.push_back(side.upper());
  }
  result.t_lower_K = box.T.lower();
  result.t_upper_K = box.T.upper();
  return result;
}

/// The rules for one face, as engine/box_search.hpp wants them.
class FaceProver {
 public:
  FaceProver(const FaceSystem& system, const ProofOptions& options)
      : system_(system), newton_(system, options.mutation), leaf_width_(options.cluster_width) {}

  /// Verifies a root unless it is known already.
  void add_root(const LocatedRoot& root) {
    const bool is_known =
        std::any_of(known_.begin(), known_.end(), [&](const KnownRoot& k) { return holds(k.neighbourhood, root); });
    if (is_known) {
      return;
    }
    if (const std::optional<KnownRoot> verified = verify(root)) {
      known_.push_back(*verified);
    }
  }

  BoxOutcome reduce(SearchBox& box) {
    if (!IntervalNewton::cut_to_simplex(box) || settled(box)) {
      return BoxOutcome::dismissed;
    }
    const double before = volume(box);
    const double before_K = box.T.width();
    system_.enclose(box, enclosure_);
    if (newton_.narrow_by_value(enclosure_, box) == Narrowing::empty) {
      return BoxOutcome::dismissed;
    }
    if (system_.depends_on_temperature() && box.T.width() < kMuchSmaller * before_K) {
      return BoxOutcome::reduced;
    }
    newton_.set_centre(box);
    newton_.set_gradient(enclosure_);
    if (newton_.narrow_by_mean_value(box) == Narrowing::empty) {
      return BoxOutcome::dismissed;
    }
    halved_ = column_to_halve(box);
    if (newton_.precondition()) {
      if (newton_.narrow_by_newton(box) == Narrowing::empty || settled(box)) {
        return BoxOutcome::dismissed;
      }
      if (newton_.regular() && finds_root_near(newton_.centre()) && settled(box)) {
        return BoxOutcome::dismissed;
      }
    }
    return volume(box) < kMuchSmaller * before ? BoxOutcome::reduced : BoxOutcome::kept;
  }

  [[nodiscard]] bool narrow(const SearchBox& box) const { return widest(box) <= leaf_width_; }

  void leaf(SearchBox box) {
    for (std::size_t k = 0; k < clusters_.size();) {
      if (touching(clusters_[k], box, 2.0 * leaf_width_)) {
        box = hull(box, clusters_[k]);
        clusters_.erase(clusters_.begin() + static_cast<std::ptrdiff_t>(k));
        k = 0;
      } else {
        ++k;
      }
    }
    clusters_.push_back(box);
    if (++leaves_ % kLeavesPerWidth == 0) {
      leaf_width_ *= kWidthGrowth;
    }
  }

  void halve(const SearchBox& box, SearchBox& first, SearchBox& second) const {
    first = box;
    second = box;
    const Interval whole = halved_ == system_.size() ? box.T : box.x[halved_];
    (halved_ == system_.size() ? first.T : first.x[halved_]) = Interval(whole.lower(), whole.mid());
    (halved_ == system_.size() ? second.T : second.x[halved_]) = Interval(whole.mid(), whole.upper());
  }

  [[nodiscard]] const std::vector<KnownRoot>& known() const { return known_; }
  [[nodiscard]] const std::vector<SearchBox>& clusters() const { return clusters_; }

 private:
  /// Where the f differ most over the box, unless that side is a sliver.
  [[nodiscard]] int column_to_halve(const SearchBox& box) const {
    int column = system_.size();
    double largest = 0.0;
    for (int j = 0; j <= system_.size(); ++j) {
      const double smear = newton_.smear(box, j);
      if (smear > largest) {
        largest = smear;
        column = j;
      }
    }
    const bool usable = largest > 0.0 && std::isfinite(largest) && scaled_width(box, column) >= kSliver * widest(box);
    return usable ? column : widest_column(box);
  }

  [[nodiscard]] bool settled(const SearchBox& box) const {
    return std::any_of(known_.begin(), known_.end(), [&](const KnownRoot& k) { return inside(box, k.neighbourhood); });
  }

  /// Newton from a centre; true when that verified a new root.
  bool finds_root_near(const BoxCentre& centre) {
    LocatedRoot start{Composition(system_.size()), centre.T};
    for (int i = 0; i < system_.size(); ++i) {
      start.x[i] = centre.x[i].mid();
      if (!(start.x[i] > 0.0)) {
        return false;
      }
    }
    const std::size_t before = known_.size();
    if (const std::optional<LocatedRoot> root = newton_from(system_, start)) {
      add_root(*root);
    }
    return known_.size() > before;
  }

  /// Gradient and Newton form over a box around a root; true when at most one root is in it.
  [[nodiscard]] bool is_regular(SearchBox& box, const LocatedRoot& root) {
    newton_.set_centre(box, root.x, root.temperature_K);
    system_.enclose(box, enclosure_);
    newton_.set_gradient(enclosure_);
    return newton_.precondition() && newton_.regular();
  }

  /// A box in the open face that holds exactly this root.
  [[nodiscard]] std::optional<SearchBox> box_of_existence(const LocatedRoot& root) {
    const int n = system_.size();
    const int pivot = static_cast<int>(std::max_element(root.x.begin(), root.x.end()) - root.x.begin());
    for (double radius = 1e-12; radius < 1e-3; radius *= 8.0) {
      SearchBox box = box_around(root, radius);
      Interval rest(1.0);
      for (int i = 0; i < n; ++i) {
        if (i != pivot) {
          const double reach = std::min(radius, 0.5 * root.x[i]);
          box.x[i] = Interval(root.x[i] - reach, root.x[i] + reach);
          rest -= box.x[i];
        }
      }
      box.x[pivot] = rest;  // free to follow the others, as the Krawczyk step needs
      if (rest.is_positive() && is_regular(box, root) && newton_.maps_into_itself(box)) {
        return box;
      }
    }
    return std::nullopt;
  }

  [[nodiscard]] std::optional<KnownRoot> verify(const LocatedRoot& root) {
    const std::optional<SearchBox> box = box_of_existence(root);
    if (!box) {
      return std::nullopt;
    }
    KnownRoot known{root, *box, *box};
    const auto alone_within = [&](double radius) {
      SearchBox around = box_around(root, radius);
      if (!inside(*box, around) || !IntervalNewton::cut_to_simplex(around) || !is_regular(around, root)) {
        return false;
      }
      known.neighbourhood = around;
      return true;
    };
    // The larger the neighbourhood, the fewer boxes end beside the root.
    double radius = kFirstRadius;
    if (alone_within(radius)) {
      while (radius < kLargestRadius && alone_within(1.5 * radius)) {
        radius *= 1.5;
      }
    } else {
      do {
        radius *= 0.5;
      } while (radius > kSmallestRadius && !alone_within(radius));
    }
    return known;
  }

  const FaceSystem& system_;
  IntervalNewton newton_;
  FaceEnclosure enclosure_;
  std::vector<KnownRoot> known_;
  std::vector<SearchBox> clusters_;
  double leaf_width_;
  std::int64_t leaves_ = 0;
  int halved_ = 0;  ///< column to halve of the box reduced last; n stands for T
};

/// A point that stands for a cluster: a numerical root in it or beside it, else its middle.
LocatedRoot representative(const FaceSystem& system, const SearchBox& cluster,
                           const std::vector<LocatedRoot>& located) {
  constexpr double kBeside = 1e-6;
  LocatedRoot middle{Composition(system.size()), cluster.T.mid()};
  SearchBox reach = cluster;
  double total = 0.0;
  for (int i = 0; i < system.size(); ++i) {
    middle.x[i] = std::max(cluster.x[i].mid(), 0.0);
    total += middle.x[i];
    reach.x[i] = Interval(cluster.x[i].lower() - kBeside, cluster.x[i].upper() + kBeside);
  }
  for (double& x : middle.x) {
    x /= total;
  }
  reach.T =
      Interval(cluster.T.lower() - kKelvinPerFraction * kBeside, cluster.T.upper() + kKelvinPerFraction * kBeside);
  const std::optional<LocatedRoot> root = newton_from(system, middle);
  if (root && holds(reach, *root)) {
    return *root;
  }
  const auto beside =
      std::find_if(located.begin(), located.end(), [&](const LocatedRoot& known) { return holds(reach, known); });
  return beside != located.end() ? *beside : middle;
}

bool colder(const CertifiedRoot& a, const CertifiedRoot& b) {
  return a.temperature_K != b.temperature_K
             ? a.temperature_K < b.temperature_K
             : std::lexicographical_compare(a.x.begin(), a.x.end(), b.x.begin(), b.x.end());
}

}  // namespace

ProofResult prove_face(const FaceSystem& system, const std::vector<LocatedRoot>& located, const ProofOptions& options) {
  FaceProver prover(system, options);
  for (const LocatedRoot& root : located) {
    prover.add_root(root);
  }
  const SearchBox whole{Vec<Interval>(system.size(), Interval(0.0, 1.0)), temperature_bracket(system)};
  const BoxSearchResult search = search_boxes(prover, whole, {options.max_boxes, options.stop});
  ProofResult result;
  result.t_lower_K = whole.T.lower();
  result.t_upper_K = whole.T.upper();
  result.boxes = search.boxes;
  for (const KnownRoot& known : prover.known()) {
    result.roots.push_back({known.root.x, known.root.temperature_K, to_box(known.box), false});
  }
  for (const SearchBox& cluster : prover.clusters()) {
    const LocatedRoot point = representative(system, cluster, located);
    result.roots.push_back({point.x, point.temperature_K, to_box(cluster), true});
  }
  std::sort(result.roots.begin(), result.roots.end(), colder);
  if (search.finished) {
    result.status = prover.clusters().empty() ? Status::complete : Status::degenerate;
    return result;
  }
  result.status = search.stopped ? Status::stopped : Status::undecided;
  for (const SearchBox& box : search.open) {
    result.undecided.push_back(to_box(box));
  }
  return result;
}

}  // namespace stillshed
