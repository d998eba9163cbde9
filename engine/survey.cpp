#include "engine/survey.hpp"

#include <algorithm>
#include <cmath>
#include <map>

#include "engine/face_proof.hpp"
#include "engine/index_rule.hpp"
#include "engine/node_type.hpp"
#include "engine/stability.hpp"

namespace stillshed {
namespace {

using Mask = unsigned;

Mask mask_of(const Members& members) {
  Mask mask = 0;
  for (const int i : members) {
    mask |= 1U << i;
  }
  return mask;
}

/// Every face with two or more members, by size, then members.
std::vector<Members> faces_of(int n) {
  std::vector<Members> faces;
  for (Mask mask = 1; mask < (1U << n); ++mask) {
    Members members;
    for (int i = 0; i < n; ++i) {
      if ((mask >> i & 1U) != 0) {
        members.push_back(i);
      }
    }
    if (members.size() >= 2) {
      faces.push_back(members);
    }
  }
  std::sort(faces.begin(), faces.end(), [](const Members& a, const Members& b) {
    return a.size() != b.size() ? a.size() < b.size()
                                : std::lexicographical_compare(a.begin(), a.end(), b.begin(), b.end());
  });
  return faces;
}

Composition to_full(const Composition& part, const Members& members, int n) {
  Composition full(n, 0.0);
  for (int k = 0; k < members.size(); ++k) {
    full[members[k]] = part[k];
  }
  return full;
}

Box to_full(const Box& part, const Members& members, int n) {
  return {to_full(part.lower, members, n), to_full(part.upper, members, n), part.t_lower_K, part.t_upper_K};
}

/// Proof effort grows steeply with the members of a face, and a large mixture has many faces.
int default_proof_size(int components) {
  return components <= 6 ? 5 : components <= 8 ? 4 : 3;
}

/// What one face contributes, in the order of `faces`.
struct FaceWork {
  ProofResult proof;
  std::vector<Azeotrope> azeotropes;
  std::vector<RejectedRoot> rejected;
  std::optional<int> index;  ///< sum of the index rule
  std::string index_note;    ///< why there is no sum
};

class Surveyor {
 public:
  Surveyor(const Mixture& mixture, double pressure_Pa, const SurveyOptions& options)
      : mixture_(mixture),
        pressure_Pa_(pressure_Pa),
        options_(options),
        prove_up_to_(options.prove_up_to > 0 ? options.prove_up_to : default_proof_size(mixture.size())),
        faces_(faces_of(mixture.size())),
        work_(faces_.size()) {
    for (std::size_t k = 0; k < faces_.size(); ++k) {
      index_[mask_of(faces_[k])] = k;
    }
  }

  Survey run() {
    result_.pressure_Pa = pressure_Pa_;
    pure_points();
    // Face by size: the roots of smaller faces are starting points for the larger ones.
    std::size_t first = 0;
    while (first < faces_.size()) {
      std::size_t last = first;
      while (last < faces_.size() && faces_[last].size() == faces_[first].size()) {
        ++last;
      }
      const Executor& execute = options_.executor ? options_.executor : Executor(run_serially);
      execute(last - first, [&](std::size_t k) { work_on(first + k); });
      first = last;
      if (options_.progress) {
        options_.progress({"faces", static_cast<std::int64_t>(first), static_cast<std::int64_t>(faces_.size())});
      }
    }
    collect();
    conclude();
    return result_;
  }

 private:
  void pure_points() {
    for (int i = 0; i < mixture_.size(); ++i) {
      FixedPoint point;
      point.id = mixture_.component(i).id;
      point.members = Members{i};
      point.x = Composition(mixture_.size(), 0.0);
      point.x[i] = 1.0;
      point.temperature_K = mixture_.boiling_point_K(i, pressure_Pa_);
      const NodeAnalysis node = analyse_node(mixture_, pressure_Pa_, point.members, point.x, point.temperature_K);
      point.node = node.node;
      point.eigenvalues = node.eigenvalues;
      result_.pure.push_back(point);
    }
  }

  /// Roots of the faces with one member less, nudged inward by a little of the missing member.
  [[nodiscard]] std::vector<Composition> nearby_starts(const Members& members) const {
    std::vector<Composition> starts;
    const Mask mask = mask_of(members);
    for (int gone = 0; gone < members.size() && members.size() > 2; ++gone) {
      const auto smaller = index_.find(mask & ~(1U << members[gone]));
      for (const CertifiedRoot& root : work_[smaller->second].proof.roots) {
        for (const double share : {0.02, 0.3}) {
          Composition x(members.size());
          int from = 0;
          for (int k = 0; k < members.size(); ++k) {
            x[k] = k == gone ? share : (1.0 - share) * root.x[from++];
          }
          starts.push_back(x);
        }
      }
    }
    return starts;
  }

  void work_on(std::size_t k) {
    const Members& members = faces_[k];
    FaceWork& work = work_[k];
    if (options_.stop.stop_requested()) {
      work.proof.status = Status::stopped;
      return;
    }
    const FaceSystem system(mixture_.face(members), pressure_Pa_);
    const bool prove = members.size() <= prove_up_to_;
    LocateOptions locate;
    locate.nearby = nearby_starts(members);
    locate.seed = options_.seed;
    locate.spread = (prove ? kSpreadBeforeProof : kSpread) * members.size();
    std::vector<LocatedRoot> located = locate_roots(system, locate);
    if (prove) {
      ProofOptions proof;
      proof.max_boxes = options_.max_boxes;
      proof.cluster_width = options_.cluster_width;
      proof.stop = options_.stop;
      work.proof = prove_face(system, located, proof);
    } else {
      take_located(located, work);
    }
    describe_all(k);
    if (!prove && work.index && *work.index != index_expected(members.size())) {
      // The rule says that something is missing, and no proof will find it.
      locate.spread *= kMoreSpread;
      located = locate_roots(system, locate);
      take_located(located, work);
      describe_all(k);
    }
  }

  static void take_located(const std::vector<LocatedRoot>& located, FaceWork& work) {
    work.proof.roots.clear();
    for (const LocatedRoot& root : located) {
      work.proof.roots.push_back({root.x, root.temperature_K, {}, false});
    }
  }

  /// Roots of a face to azeotropes and rejected roots; then its index rule.
  void describe_all(std::size_t k) {
    FaceWork& work = work_[k];
    work.azeotropes.clear();
    work.rejected.clear();
    for (const CertifiedRoot& root : work.proof.roots) {
      describe(faces_[k], root, work);
    }
    evaluate_index(faces_[k], work);
  }

  /// Stability, node type and shape of one root.
  void describe(const Members& members, const CertifiedRoot& root, FaceWork& work) const {
    const int n = mixture_.size();
    Azeotrope azeotrope;
    azeotrope.point.members = members;
    azeotrope.point.x = to_full(root.x, members, n);
    azeotrope.point.temperature_K = root.temperature_K;
    StabilityOptions stability;
    stability.proof_up_to = options_.stability_proof_up_to;
    stability.seed = options_.seed;
    azeotrope.stability = test_stability(mixture_, root.temperature_K, azeotrope.point.x, stability);
    if (azeotrope.stability.outcome == Stability::unstable) {
      work.rejected.push_back({members, azeotrope.point.x, root.temperature_K, azeotrope.stability});
      return;
    }
    const NodeAnalysis node = analyse_node(mixture_, pressure_Pa_, members, azeotrope.point.x, root.temperature_K);
    azeotrope.point.eigenvalues = node.eigenvalues;
    azeotrope.point.node = root.cluster ? NodeType::degenerate : node.node;
    azeotrope.boiling = root.cluster ? Boiling::inflection : node.boiling;
    azeotrope.cluster = root.cluster;
    const bool proved = work.proof.status != Status::not_run;
    azeotrope.proved = proved && !root.cluster;
    if (proved) {
      azeotrope.box = to_full(root.box, members, n);
    }
    work.azeotropes.push_back(azeotrope);
  }

  /// Index rule of a face: over the fixed points of the face and all its sub-faces, which are done before.
  void evaluate_index(const Members& members, FaceWork& work) const {
    work.index.reset();
    work.index_note.clear();
    std::vector<IndexTerm> terms;
    for (const int i : members) {
      terms.push_back({1, eigenvalues_inside(result_.pure[static_cast<std::size_t>(i)], members)});
    }
    bool splits = false;
    bool degenerate = false;
    const Mask mask = mask_of(members);
    for (Mask part = mask; part != 0; part = (part - 1) & mask) {
      const auto face = index_.find(part);
      if (face == index_.end()) {
        continue;  // one component
      }
      const FaceWork& inside = work_[face->second];
      splits = splits || !inside.rejected.empty();
      for (const Azeotrope& azeotrope : inside.azeotropes) {
        terms.push_back({azeotrope.point.members.size(), eigenvalues_inside(azeotrope.point, members)});
        degenerate = degenerate || azeotrope.cluster;
        splits = splits || azeotrope.stability.outcome == Stability::not_concluded;
      }
    }
    const std::optional<int> sum = degenerate ? std::nullopt : index_sum(terms);
    if (splits) {
      work.index_note = "phase-split";
    } else if (!sum) {
      work.index_note = "degenerate-point";
    } else {
      work.index = sum;
    }
  }

  void collect() {
    for (std::size_t k = 0; k < faces_.size(); ++k) {
      FaceWork& work = work_[k];
      FaceProof face;
      face.members = faces_[k];
      face.status = work.proof.status;
      face.t_lower_K = work.proof.t_lower_K;
      face.t_upper_K = work.proof.t_upper_K;
      face.boxes = work.proof.boxes;
      for (const Box& box : work.proof.undecided) {
        if (face.undecided.size() < kListedBoxes) {
          face.undecided.push_back(to_full(box, faces_[k], mixture_.size()));
        }
      }
      if (work.proof.undecided.size() > kListedBoxes) {
        face.note = std::to_string(work.proof.undecided.size()) + " undecided boxes, the first " +
                    std::to_string(kListedBoxes) + " listed";
      }
      face.index_expected = index_expected(face.members.size());
      face.index_sum = work.index;
      if (work.index) {
        face.index_holds = *work.index == face.index_expected;
      } else if (!work.index_note.empty()) {
        face.note += (face.note.empty() ? "" : "; ") + work.index_note;
      }
      result_.boxes += face.boxes;
      result_.faces.push_back(face);
      std::move(work.azeotropes.begin(), work.azeotropes.end(), std::back_inserter(result_.azeotropes));
      std::move(work.rejected.begin(), work.rejected.end(), std::back_inserter(result_.rejected));
    }
    const auto colder = [](double t_a, const Composition& a, double t_b, const Composition& b) {
      return t_a != t_b ? t_a < t_b : std::lexicographical_compare(a.begin(), a.end(), b.begin(), b.end());
    };
    std::sort(result_.azeotropes.begin(), result_.azeotropes.end(), [&](const Azeotrope& a, const Azeotrope& b) {
      return colder(a.point.temperature_K, a.point.x, b.point.temperature_K, b.point.x);
    });
    std::sort(result_.rejected.begin(), result_.rejected.end(), [&](const RejectedRoot& a, const RejectedRoot& b) {
      return colder(a.temperature_K, a.x, b.temperature_K, b.x);
    });
    int number = 0;
    for (Azeotrope& azeotrope : result_.azeotropes) {
      azeotrope.point.id = "az" + std::to_string(++number) + "(";
      for (int k = 0; k < azeotrope.point.members.size(); ++k) {
        azeotrope.point.id += (k == 0 ? "" : ",") + mixture_.component(azeotrope.point.members[k]).id;
      }
      azeotrope.point.id += ")";
    }
  }

  void conclude() {
    bool degenerate = false;
    bool undecided = false;
    bool stopped = false;
    bool all_run = true;
    for (const FaceProof& face : result_.faces) {
      degenerate = degenerate || face.status == Status::degenerate;
      undecided = undecided || face.status == Status::undecided;
      stopped = stopped || face.status == Status::stopped;
      all_run = all_run && face.status != Status::not_run;
    }
    for (const Azeotrope& azeotrope : result_.azeotropes) {
      degenerate = degenerate || azeotrope.point.node == NodeType::degenerate;
    }
    result_.status = stopped      ? Status::stopped
                     : undecided  ? Status::undecided
                     : degenerate ? Status::degenerate
                     : all_run    ? Status::complete
                                  : Status::not_run;
    if (!result_.faces.empty()) {
      result_.index_rule_holds = result_.faces.back().index_holds;
    }
  }

  static constexpr std::size_t kListedBoxes = 100;
  /// Spread-out starts per member: few where the proof finds what is missed, more where nothing does.
  static constexpr int kSpreadBeforeProof = 2;
  static constexpr int kSpread = 8;
  static constexpr int kMoreSpread = 8;
  const Mixture& mixture_;
  double pressure_Pa_;
  const SurveyOptions& options_;
  int prove_up_to_;
  std::vector<Members> faces_;
  std::vector<FaceWork> work_;
  std::map<Mask, std::size_t> index_;
  Survey result_;
};

}  // namespace

const char* to_string(NodeType type) {
  switch (type) {
    case NodeType::unstable_node: return "unstable-node";
    case NodeType::stable_node: return "stable-node";
    case NodeType::saddle: return "saddle";
    case NodeType::degenerate: return "degenerate";
  }
  return "unknown";
}

const char* to_string(Boiling boiling) {
  switch (boiling) {
    case Boiling::minimum: return "minimum";
    case Boiling::maximum: return "maximum";
    case Boiling::saddle: return "saddle";
    case Boiling::inflection: return "inflection";
  }
  return "unknown";
}

const char* to_string(Stability stability) {
  switch (stability) {
    case Stability::stable: return "stable";
    case Stability::unstable: return "unstable";
    case Stability::not_concluded: return "not-concluded";
  }
  return "unknown";
}

std::vector<std::string> SurveyOptions::problems() const {
  std::vector<std::string> found;
  if (prove_up_to < 0 || prove_up_to > kMaxComponents) {
    found.push_back("prove_up_to must be from 0 to 12");
  }
  if (max_boxes < 1) {
    found.push_back("max_boxes must be at least 1");
  }
  if (!(cluster_width >= 1e-12 && cluster_width <= 1e-3)) {
    found.push_back("cluster_width must be from 1e-12 to 1e-3");
  }
  return found;
}

std::vector<FixedPoint> Survey::fixed_points() const {
  std::vector<FixedPoint> points = pure;
  for (const Azeotrope& azeotrope : azeotropes) {
    points.push_back(azeotrope.point);
  }
  std::stable_sort(points.begin(), points.end(),
                   [](const FixedPoint& a, const FixedPoint& b) { return a.temperature_K < b.temperature_K; });
  return points;
}

Survey survey(const Mixture& mixture, double pressure_Pa, const SurveyOptions& options) {
  expects(options.problems().empty(), "survey: options out of range");
  expects(pressure_Pa > 0.0 && std::isfinite(pressure_Pa), "survey: pressure");
  return Surveyor(mixture, pressure_Pa, options).run();
}

}  // namespace stillshed
