/// Verdict of one product from everything that can end up in a receiver.
///
///   receiver   one cut of a batch, what a batch leaves behind, or one final stream of a column sequence. Cuts are
///              not blended: a receiver is changed where the cut changes. A drifting cut may also be taken in part,
///              from its start or to its end.
///   R          largest recovery in one receiver that meets every purity and impurity test
///   u          purity limit: richest receiver
///
///   OPEN     tests met with room (`ReachOptions::room` of the allowance), R >= required, and met by the given stages
///   TIGHT    met, but without that room, or only with more stages than given (pinch), or below the required recovery
///   CAPPED   not met, but some receiver is richer in the product than the charge by more than 1e-6
///   SHUT     no receiver is
///   NO CALL  the map is not complete
///
/// Stages   the bound (c) is known for what a rectifier takes overhead (not for its last cut): the head over the pot of
///          that moment. It is applied to every receiver of the same composition, and to no other.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "engine/reach.hpp"

namespace stillshed {

struct Receiver {
  std::string reading;  ///< "batch[0].cuts[1]" or "sequences[2].streams[0]"
  int train = 0;        ///< receivers of one train, parts left out, together hold the charge
  bool part = false;    ///< part of a drifting cut
  Composition x;
  double share = 0.0;               ///< moles per mole of charge
  std::optional<int> fixed_point;   ///< index into Chart::fixed_points
  std::string boundary;             ///< id of the boundary it lies on, when it is no fixed point
  std::optional<Composition> head;  ///< top of the given stages when this is drawn (bound of purity)
  std::string words;                ///< "the first cut of a batch rectifier"
};

/// All receivers of the batches (indices into Reach::batch) and sequences of `reach`.
[[nodiscard]] std::vector<Receiver> receivers(const Chart& chart, const Reach& reach, const std::vector<int>& batches);

/// Why nothing can be called.
struct NoCall {
  std::optional<Reason> reason;
  std::string message;
};

struct Question {
  const Mixture& mixture;
  const Chart& chart;
  const Composition& feed;
  const std::vector<Receiver>& receivers;
  const ReachOptions& options;
};

[[nodiscard]] ProductOutcome judge(const Question& question, const ProductSpec& spec);
[[nodiscard]] ProductOutcome no_call(const Mixture& mixture, const ProductSpec& spec, const NoCall& why);

/// A recovery test of the product, else the default of the options.
[[nodiscard]] double required_recovery(const ProductSpec& spec, const ReachOptions& options);

/// True when a is the less favourable of two verdicts on the same product.
[[nodiscard]] bool worse(const ProductOutcome& a, const ProductOutcome& b);

/// Largest distance between a boundary and its chord: what finite reflux may gain at most. Mole fraction, Euclidean.
[[nodiscard]] double pocket_width(const Boundary& boundary);

}  // namespace stillshed
