/// What each product can reach by "distillation and nothing else" at the given pressure, without recycle.
///
///   (a) batch rectifier and stripper at unlimited stages and reflux
///   (b) column sequences at total reflux, sharp direct and indirect splits
///   (c) N stages at total reflux, x_{j+1} = y(x_j), the pot is stage 1: a bound on purity only
///
/// Verdict per product: OPEN, TIGHT, CAPPED, SHUT, NO CALL (rules at `judge`).
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "engine/chart.hpp"

namespace stillshed {

enum class Basis { mole, mass };

/// One test of a product: purity of the product itself, an impurity, or recovery.
struct ProductTest {
  enum class What { purity, impurity, recovery };
  What what = What::purity;
  int component = 0;     ///< for an impurity: which one; otherwise the product
  bool at_least = true;  ///< >= (true) or <= (false)
  double value = 0.995;  ///< fraction
  Basis basis = Basis::mass;
};

struct ProductSpec {
  int component = 0;
  std::vector<ProductTest> tests;
  double required_recovery() const;  ///< 0.5 unless a recovery test says otherwise
};

/// One receiver of a batch: from `start` to `end` (equal unless the cut drifts along a curved boundary).
struct Cut {
  Composition start;
  Composition end;
  Composition average;             ///< what the receiver holds
  std::optional<int> fixed_point;  ///< index into Chart::fixed_points
  double share = 0.0;              ///< moles per mole of charge
  double t_start_K = 0.0;
  double t_end_K = 0.0;
  Composition pot_start;
  Composition pot_end;
  std::string on;  ///< "interior", "face" or the id of a boundary
  /// What leaves, piece by piece, while the cut drifts; the shares add up to `share`. Empty for a fixed composition.
  struct Piece {
    Composition x;
    double share = 0.0;
  };
  std::vector<Piece> drift;
};

struct Batch {
  enum class Mode { rectifier, stripper };
  Mode mode = Mode::rectifier;
  Status status = Status::not_run;
  std::string message;
  std::vector<Cut> cuts;    ///< in the order they leave; the heel is the last piece when the pot cannot change any more
  double heel_share = 0.0;  ///< what stays (zero when the last cut empties the pot)
  Composition heel;
};

/// One column of a sequence, per mole of its own feed.
struct Column {
  Composition feed;
  Composition distillate;
  Composition bottoms;
  double distillate_to_feed = 0.0;
  double feed_to_charge = 1.0;       ///< moles of this column's feed per mole of the original feed
  bool direct = true;                ///< direct: the distillate is the sharp end; indirect: the bottoms
  std::vector<Composition> witness;  ///< one residue curve from distillate to bottoms
  std::optional<int> parent;         ///< index of the column whose stream feeds this one
  bool parent_distillate = false;    ///< which of its streams
};

struct Sequence {
  std::vector<Column> columns;
  /// Final streams: composition, moles per mole of charge.
  struct Stream {
    Composition x;
    double share = 0.0;
    int column = 0;
    bool distillate = true;
  };
  std::vector<Stream> streams;
};

enum class Verdict { open, tight, capped, shut, no_call };
[[nodiscard]] const char* to_string(Verdict verdict);  ///< "open", "tight", "capped", "shut", "no-call"

struct TestOutcome {
  ProductTest test;
  double limit = 0.0;   ///< best value reached in the chosen reading
  double margin = 0.0;  ///< in the sense of the test: positive = inside
  bool pass = false;
};

struct ProductOutcome {
  int component = 0;
  Verdict verdict = Verdict::no_call;
  std::vector<TestOutcome> tests;
  std::string reading;             ///< "batch[0].cuts[1]" or "sequences[2].streams[0]"; empty: none
  double purity_limit_mole = 0.0;  ///< supremum over (a) and (b)
  double purity_limit_mass = 0.0;
  double recovery = 0.0;   ///< largest recovery in one receiver that meets the tests (at the limit when capped)
  std::string limited_by;  ///< fixed point or boundary id
  std::vector<Reason> reasons;
  std::string sentence;                    ///< what stops it, in one sentence, built from the numbers above
  std::optional<double> pocket_width;      ///< width of the pocket finite reflux may gain, mole fraction
  std::optional<double> purity_at_stages;  ///< (c), mole fraction, when a number of stages was given
};

struct ReachOptions {
  std::optional<int> stages;  ///< theoretical stages, pot included
  double room = 0.2;          ///< of the impurity allowance
  double required_recovery = 0.5;
  int max_depth = 5;
};

struct Reach {
  Status status = Status::not_run;
  std::string message;
  Position feed;
  std::vector<Batch> batch;  ///< rectifier, stripper
  std::vector<Sequence> sequences;
  std::vector<Composition> stage_profile;  ///< (c) from the pot upward, when stages were given
  std::vector<ProductOutcome> products;
};

/// `x` overall composition of the charge, mole fractions.
[[nodiscard]] Reach reach(const Mixture& mixture, const Survey& survey, const Chart& chart, const Composition& x,
                          const std::vector<ProductSpec>& products, const ReachOptions& options = {});

}  // namespace stillshed
