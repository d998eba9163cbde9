#include "engine/split_scan.hpp"

#include <optional>

#include "engine/bubble_point.hpp"
#include "engine/stability.hpp"

namespace stillshed {
namespace {

constexpr int kFaceSteps = 9;  ///< 28 interior points of a ternary face

/// Keeps the softest point of one face.
class FaceScan {
 public:
  FaceScan(const Mixture& mixture, const Members& members, double pressure_Pa)
      : mixture_(mixture), members_(members), face_(mixture.face(members)), pressure_Pa_(pressure_Pa) {}

  void look_at(const Composition& x) {
    const BubblePoint point = bubble_point(face_, x, pressure_Pa_, guess_K_);
    if (point.status != Status::complete) {
      return;
    }
    guess_K_ = point.temperature_K;
    const double curvature = softest_direction(face_, point.temperature_K, x).curvature;
    if (curvature < 0.0 && (!softest_.has_value() || curvature < softest_->curvature)) {
      softest_ = SplitWitness{members_, Composition(mixture_.size()), point.temperature_K, curvature};
      for (int k = 0; k < members_.size(); ++k) {
        softest_->x[members_[k]] = x[k];
      }
    }
  }
  void keep(std::vector<SplitWitness>& witnesses) const {
    if (softest_.has_value()) {
      witnesses.push_back(*softest_);
    }
  }

 private:
  const Mixture& mixture_;
  Members members_;
  Mixture face_;
  double pressure_Pa_;
  double guess_K_ = 0.0;
  std::optional<SplitWitness> softest_;
};

}  // namespace

std::vector<SplitWitness> scan_for_splits(const Mixture& mixture, double pressure_Pa) {
  std::vector<SplitWitness> witnesses;
  const int n = mixture.size();
  for (int i = 0; i < n; ++i) {
    for (int j = i + 1; j < n; ++j) {
      FaceScan edge(mixture, {i, j}, pressure_Pa);
      for (int k = 1; k <= kEdgePoints; ++k) {
        const double x = static_cast<double>(k) / (kEdgePoints + 1);
        edge.look_at({x, 1.0 - x});
      }
      edge.keep(witnesses);
    }
  }
  for (int i = 0; i < n && n <= kFacesUpTo; ++i) {
    for (int j = i + 1; j < n; ++j) {
      for (int k = j + 1; k < n; ++k) {
        FaceScan face(mixture, {i, j, k}, pressure_Pa);
        for (int a = 1; a < kFaceSteps; ++a) {
          for (int b = 1; a + b < kFaceSteps; ++b) {
            face.look_at({static_cast<double>(a) / kFaceSteps, static_cast<double>(b) / kFaceSteps,
                          static_cast<double>(kFaceSteps - a - b) / kFaceSteps});
          }
        }
        face.keep(witnesses);
      }
    }
  }
  return witnesses;
}

}  // namespace stillshed
