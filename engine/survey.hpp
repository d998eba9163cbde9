/// Every azeotrope of a mixture and its sub-mixtures at one pressure, with proof, stability and node type.
///
/// For each face S (2..n members): all solutions of
///     f_i(T, x) = ln gamma_i + ln(Psat_i / P) = 0,  i in S,  x in the open face,
/// located (Newton from many starts) and, for faces up to `prove_up_to` members, proved complete by
/// interval branch and prune. Index rule inside each face:
///     sum over fixed points with k components of 2^k (-1)^(negative eigenvalues inside the face) = 1 + (-1)^(n-1).
#pragma once

#include <cstdint>
#include <optional>
#include <stop_token>
#include <string>
#include <vector>

#include "engine/status.hpp"
#include "models/mixture.hpp"

namespace stillshed {

enum class NodeType { unstable_node, stable_node, saddle, degenerate };
[[nodiscard]] const char* to_string(NodeType type);

/// Shape of the boiling temperature at an azeotrope within its own face.
enum class Boiling { minimum, maximum, saddle, inflection };
[[nodiscard]] const char* to_string(Boiling boiling);

enum class Stability { stable, unstable, not_concluded };
[[nodiscard]] const char* to_string(Stability stability);

/// Result of the tangent-plane test of one liquid (engine/stability.hpp).
struct StabilityResult {
  Stability outcome = Stability::not_concluded;
  bool proved = false;    ///< true: interval search covered the simplex; false: multi-start search only
  double tpd_min = 0.0;   ///< smallest tangent-plane distance found, in RT; the trivial solution counts as 0
  Composition incipient;  ///< composition of that minimum
};

/// An axis-parallel box in mole fractions and temperature.
struct Box {
  Composition lower;
  Composition upper;
  double t_lower_K = 0.0;
  double t_upper_K = 0.0;
};

/// A point where the residue-curve field vanishes: a pure component or an azeotrope.
struct FixedPoint {
  std::string id;   ///< "acetone" or "az1(acetone,methanol)"
  Members members;  ///< indices of the present components
  Composition x;    ///< all components of the mixture; zero for absent ones
  double temperature_K = 0.0;
  NodeType node = NodeType::degenerate;  ///< in the whole mixture
  std::vector<double>
      eigenvalues;  ///< of d(x - y)/dx on the simplex: members.size()-1 inside the face, then 1 - K_k for each absent k
  bool pure() const { return members.size() == 1; }
};

struct Azeotrope {
  FixedPoint point;
  Boiling boiling = Boiling::minimum;
  StabilityResult stability;
  Box box;               ///< interval box that holds exactly this root (or, if degenerate, the cluster)
  bool proved = false;   ///< existence and uniqueness in `box` verified
  bool cluster = false;  ///< roots that no test can separate, reported as one record
};

/// Root of the single-liquid equations whose liquid is not stable: not an azeotrope.
struct RejectedRoot {
  Members members;
  Composition x;
  double temperature_K = 0.0;
  StabilityResult stability;
};

struct FaceProof {
  Members members;
  Status status = Status::not_run;  ///< complete | degenerate | undecided | not_run | stopped
  double t_lower_K = 0.0;           ///< derived temperature bracket
  double t_upper_K = 0.0;
  std::int64_t boxes = 0;
  std::vector<Box> undecided;
  std::optional<int> index_sum;  ///< empty where the rule cannot be evaluated
  int index_expected = 0;
  std::optional<bool> index_holds;  ///< empty: not evaluated
  std::string note;                 ///< why not evaluated, e.g. "phase-split"
};

struct SurveyOptions {
  /// Faces with at most this many members are proved. 0: 5 in mixtures of up to 6 components, 4 up to 8, 3 beyond.
  int prove_up_to = 0;
  std::int64_t max_boxes = 2'000'000;  ///< budget of one face
  double cluster_width = 3e-8;  ///< a box narrower than this that no test settles is a cluster. Allowed: 1e-12 to 1e-3
  int stability_proof_up_to = 4;  ///< members; larger ones are searched only
  std::uint64_t seed = 1;
  std::stop_token stop;
  ProgressFn progress;
  Executor executor;                                        ///< empty: serial
  [[nodiscard]] std::vector<std::string> problems() const;  ///< empty when usable
};

struct Survey {
  Status status = Status::not_run;
  double pressure_Pa = 0.0;
  std::vector<FixedPoint> pure;       ///< one per component, component order
  std::vector<Azeotrope> azeotropes;  ///< by temperature, then composition
  std::vector<RejectedRoot> rejected;
  std::vector<FaceProof> faces;          ///< by size, then members
  std::optional<bool> index_rule_holds;  ///< of the whole mixture; empty when undefined
  std::vector<std::string> notes;
  std::int64_t boxes = 0;

  /// Pure components and azeotropes by temperature: the fixed points of the residue-curve map.
  [[nodiscard]] std::vector<FixedPoint> fixed_points() const;
  [[nodiscard]] bool proved() const { return status == Status::complete; }
  /// True when some root was rejected for a liquid that splits (or whose stability is not concluded).
  [[nodiscard]] bool splits() const { return !rejected.empty(); }
};

/// Pressure in Pa; every component must boil at it (the caller checks the limits of ideal vapour).
[[nodiscard]] Survey survey(const Mixture& mixture, double pressure_Pa, const SurveyOptions& options = {});

}  // namespace stillshed
