#include "engine/reach.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "engine/batch.hpp"
#include "engine/bubble_point.hpp"
#include "engine/flow_map.hpp"
#include "engine/sequences.hpp"
#include "engine/stages.hpp"
#include "engine/verdict.hpp"

namespace stillshed {

namespace {

constexpr double kExactlyOn = 1e-9;    ///< distance from a boundary below which the charge is taken to lie on it
constexpr double kSameProduct = 1e-6;  ///< receivers this close share the bound of the stages

std::size_t at(int i) {
  return static_cast<std::size_t>(i);
}

/// What is missing, when the map cannot carry a verdict.
std::optional<NoCall> obstacle(const Mixture& mixture, const Survey& survey, const Chart& chart) {
  if (mixture.size() > 3) {
    return NoCall{std::nullopt, "cuts and boundaries are drawn for two and three components so far"};
  }
  if (survey.splits()) {
    return NoCall{Reason::phase_split_needed, "the liquid splits in two, and that is not computed yet"};
  }
  if (survey.status != Status::complete) {
    return NoCall{Reason::not_converged, std::string("the list of azeotropes is ") + to_string(survey.status)};
  }
  if (chart.status != Status::complete) {
    return NoCall{Reason::not_converged,
                  chart.message.empty() ? std::string("the map is ") + to_string(chart.status) : chart.message};
  }
  return std::nullopt;
}

/// A charge to start from, and the region it counts to.
struct Start {
  Composition x;
  std::optional<int> region;
  std::string message;
};

/// x mirrored at the nearest point of its boundary: as close to it, on the other side.
Composition mirrored(const Composition& x, const Composition& foot) {
  Composition result = between(x, foot, 2.0);
  double sum = 0.0;
  for (double& value : result) {
    value = std::max(0.0, value);
    sum += value;
  }
  for (double& value : result) {
    value /= sum;
  }
  return result;
}

/// One start, or one on each side of the boundary the charge lies on.
std::vector<Start> starts(const Chart& chart, const Position& feed, const Composition& x) {
  if (!feed.on_boundary || !feed.nearest.has_value() || chart.boundaries.empty()) {
    return {{x, feed.region, ""}};
  }
  std::vector<Start> result;
  if (feed.nearest->distance > kExactlyOn) {
    result.push_back({x, region_at(chart, x), ""});
    const Composition other = mirrored(x, feed.nearest->point);
    result.push_back({other, region_at(chart, other),
                      "from the other side of " + feed.nearest->boundary +
                          ": the charge is moved across it by twice its " +
                          "distance, less than 0.001 in mole fractions"});
    return result;
  }
  for (int k = 0; k < static_cast<int>(chart.regions.size()); ++k) {
    const std::vector<std::string>& ids = chart.regions[at(k)].boundaries;
    if (std::find(ids.begin(), ids.end(), feed.nearest->boundary) != ids.end()) {
      result.push_back({x, k, ""});
    }
  }
  return result;
}

bool same_cuts(const Batch& a, const Batch& b) {
  return a.cuts.size() == b.cuts.size() &&
         std::equal(a.cuts.begin(), a.cuts.end(), b.cuts.begin(), [](const Cut& p, const Cut& q) {
           return std::abs(p.share - q.share) < 1e-12 && separation(p.average, q.average) < 1e-12;
         });
}

/// Adds the batch unless the same is there already; returns its index.
int keep(std::vector<Batch>& batches, Batch batch) {
  for (int k = 0; k < static_cast<int>(batches.size()); ++k) {
    if (batches[at(k)].mode == batch.mode && same_cuts(batches[at(k)], batch)) {
      return k;
    }
  }
  batches.push_back(std::move(batch));
  return static_cast<int>(batches.size()) - 1;
}

/// The head of the given stages for what the rectifier draws, and for every receiver of that composition.
void bound_by_stages(const Mixture& mixture, double pressure_Pa, const Batch& rectifier, int stages,
                     std::vector<Receiver>& list) {
  for (std::size_t k = 0; k + 1 < rectifier.cuts.size(); ++k) {
    const Cut& cut = rectifier.cuts[k];
    const StageProfile profile = stage_profile(mixture, pressure_Pa, cut.pot_start, stages);
    if (profile.status != Status::complete) {
      continue;
    }
    for (Receiver& receiver : list) {
      if (!receiver.head.has_value() && separation(receiver.x, cut.average) < kSameProduct) {
        receiver.head = profile.x.back();
      }
    }
  }
}

}  // namespace

Reach reach(const Mixture& mixture, const Survey& survey, const Chart& chart, const Composition& x,
            const std::vector<ProductSpec>& products, const ReachOptions& options) {
  Reach result;
  result.feed = locate(mixture, chart, x);
  if (options.stages.has_value()) {
    result.stage_profile = stage_profile(mixture, chart.pressure_Pa, x, *options.stages).x;
  }
  if (const std::optional<NoCall> missing = obstacle(mixture, survey, chart); missing.has_value()) {
    result.status = mixture.size() > 3 ? Status::not_applicable : Status::undecided;
    result.message = missing->message;
    for (const ProductSpec& spec : products) {
      result.products.push_back(no_call(mixture, spec, *missing));
    }
    return result;
  }
  result.status = Status::complete;
  const auto boiling_K = [&](const Composition& liquid) {
    return bubble_point(mixture, liquid, chart.pressure_Pa, result.feed.bubble_temperature_K).temperature_K;
  };
  const int depth = std::min(options.max_depth, static_cast<int>(chart.fixed_points.size()) - 1);
  result.sequences = column_sequences(chart, x, depth);
  for (const Start& start : starts(chart, result.feed, x)) {
    std::vector<int> batches;
    for (const Batch::Mode mode : {Batch::Mode::rectifier, Batch::Mode::stripper}) {
      Batch drawn = run_batch(chart, start.x, mode, boiling_K, start.region);
      if (drawn.status == Status::complete) {
        drawn.message = start.message;
      }
      batches.push_back(keep(result.batch, std::move(drawn)));
      const Batch& batch = result.batch[at(batches.back())];
      if (batch.status != Status::complete) {
        result.status = batch.status;
        result.message = batch.message;
      }
    }
    std::vector<Receiver> list = receivers(chart, result, batches);
    if (options.stages.has_value()) {
      bound_by_stages(mixture, chart.pressure_Pa, result.batch[at(batches.front())], *options.stages, list);
    }
    const bool first_side = result.products.empty();
    for (std::size_t k = 0; k < products.size(); ++k) {
      ProductOutcome outcome = judge({mixture, chart, x, list, options}, products[k]);
      if (result.status != Status::complete && outcome.verdict != Verdict::open) {
        outcome = no_call(mixture, products[k], {Reason::not_converged, result.message});  // more receivers might help
      }
      if (first_side) {
        result.products.push_back(std::move(outcome));
      } else if (worse(outcome, result.products[k])) {
        result.products[k] = std::move(outcome);
      }
    }
  }
  return result;
}

}  // namespace stillshed
