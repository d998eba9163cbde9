/// Residue curves, distillation boundaries and regions of a binary or ternary mixture.
///
///   dx/dxi = x - y(x)     toward higher boiling temperature as xi grows
///
/// A boundary is the residue-curve separatrix of a saddle. Two kinds:
///   unstable node -> saddle   parts stable nodes: confines bottoms
///   saddle -> stable node     parts unstable nodes: confines overheads
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "engine/survey.hpp"

namespace stillshed {

/// A polyline in composition space with its boiling temperatures.
struct Curve {
  std::vector<Composition> points;
  std::vector<double> temperature_K;
};

/// One residue curve through a point.
struct ResidueCurve {
  Status status = Status::not_run;
  Curve curve;              ///< by increasing xi; temperature never falls along it in a stable liquid
  int through = 0;          ///< index of the given point in `curve`
  std::optional<int> from;  ///< index into Chart::fixed_points where it starts (towards lower T)
  std::optional<int> to;    ///< ... and where it ends
};

enum class Confines { overheads, bottoms };
[[nodiscard]] const char* to_string(Confines confines);

struct Boundary {
  std::string id;  ///< "b1", ...
  int from = 0;    ///< index into Chart::fixed_points, the colder end
  int to = 0;      ///< the hotter end
  Confines confines = Confines::bottoms;
  Curve curve;         ///< from `from` to `to`, first and last point are the fixed points
  double error = 0.0;  ///< stated bound of the position error, mole fraction
};

/// Maximal set of compositions whose residue curves share their two ends.
struct Region {
  std::string id;         ///< "r1", ...
  int unstable_node = 0;  ///< index into Chart::fixed_points
  int stable_node = 0;
  std::vector<std::string> boundaries;
  std::vector<Composition> polygon;  ///< closed, first point not repeated; empty for a binary
  double area = 0.0;                 ///< share of the triangle (of the edge for a binary)
};

struct Nearest {
  double distance = 0.0;  ///< Euclidean, mole fractions, all coordinates
  std::string boundary;
  Composition point;
};

struct ChartOptions {
  double boundary_error = 1e-4;  ///< mole fraction
  int curves = 14;               ///< residue curves drawn besides the boundaries (0: none)
};

struct Chart {
  Status status = Status::not_run;
  std::string message;
  double pressure_Pa = 0.0;
  std::vector<FixedPoint> fixed_points;  ///< as Survey::fixed_points()
  std::vector<Boundary> boundaries;
  std::vector<Region> regions;
  std::vector<ResidueCurve> curves;  ///< for drawing
};

/// Where a composition sits in a chart.
struct Position {
  double bubble_temperature_K = 0.0;
  Composition vapour;
  std::optional<int> region;       ///< index into Chart::regions; empty on a boundary
  bool on_boundary = false;        ///< closer than 1e-4 + the stated error
  std::optional<Nearest> nearest;  ///< any boundary
  std::optional<Nearest> nearest_overheads;
  std::optional<Nearest> nearest_bottoms;
  ResidueCurve residue_curve;         ///< through this composition
  std::optional<int> flip_component;  ///< smallest addition or removal of one component that changes region
  double flip_kg_per_100kg = 0.0;     ///< of feed; positive = added
};

/// Needs a survey of the same mixture and pressure. Mixtures of four and more: status not_applicable.
[[nodiscard]] Chart chart(const Mixture& mixture, const Survey& survey, const ChartOptions& options = {});

[[nodiscard]] Position locate(const Mixture& mixture, const Chart& chart, const Composition& x);

/// One residue curve through x, both directions, ended at fixed points.
[[nodiscard]] ResidueCurve residue_curve(const Mixture& mixture, double pressure_Pa,
                                         const std::vector<FixedPoint>& fixed_points, const Composition& x);

}  // namespace stillshed
