#include "engine/verdict.hpp"

#include <algorithm>
#include <cmath>

#include "engine/flow_map.hpp"
#include "engine/product_tests.hpp"
#include "engine/verdict_words.hpp"

namespace stillshed {

namespace {

constexpr double kRicher = 1e-6;         ///< mole fraction by which a receiver must be richer than the charge
constexpr double kSmallestShare = 1e-9;  ///< receivers below are rounding
constexpr double kStraight = 1e-6;       ///< pockets narrower than this are none

std::size_t at(int i) {
  return static_cast<std::size_t>(i);
}

/// One receiver judged against the tests.
struct Candidate {
  const Receiver* receiver = nullptr;
  double recovery = 0.0;
  bool meets = false;   ///< every purity and impurity test
  bool room = false;    ///< ... with room
  bool enough = false;  ///< required recovery reached
  bool within_stages = true;
  bool open() const { return meets && room && enough && within_stages; }
};

Candidate weigh(const Question& question, const ProductSpec& spec, const Receiver& receiver) {
  Candidate candidate;
  candidate.receiver = &receiver;
  const double charged = question.feed[spec.component];
  candidate.recovery = charged > 0.0 ? std::min(1.0, receiver.share * receiver.x[spec.component] / charged) : 0.0;
  candidate.meets = true;
  candidate.room = true;
  bool recoveries_met = true;
  for (const ProductTest& test : spec.tests) {
    const TestOutcome outcome = evaluate(test, question.mixture, receiver.x, candidate.recovery);
    if (test.what == ProductTest::What::recovery) {
      recoveries_met = recoveries_met && outcome.pass;
      continue;
    }
    candidate.meets = candidate.meets && outcome.pass;
    candidate.room = candidate.room && has_room(outcome, question.options.room);
    if (receiver.head.has_value()) {
      candidate.within_stages =
          candidate.within_stages && evaluate(test, question.mixture, *receiver.head, candidate.recovery).pass;
    }
  }
  candidate.enough = recoveries_met && candidate.recovery >= required_recovery(spec, question.options) - kNoMargin;
  return candidate;
}

/// Better reading first; on a tie the earlier one stays.
bool better(const Candidate& a, const Candidate& b, int component) {
  if (a.meets != b.meets) {
    return a.meets;
  }
  if (a.open() != b.open()) {
    return a.open();
  }
  if (!a.meets && std::abs(a.receiver->x[component] - b.receiver->x[component]) > kNoMargin) {
    return a.receiver->x[component] > b.receiver->x[component];
  }
  return a.recovery > b.recovery + kNoMargin;
}

Verdict verdict_of(const Candidate& best, double feed_fraction, int component) {
  if (best.meets) {
    return best.open() ? Verdict::open : Verdict::tight;
  }
  return best.receiver->x[component] > feed_fraction + kRicher ? Verdict::capped : Verdict::shut;
}

/// The receiver of the same train that keeps most of the product away from the chosen one.
const Receiver* keeper(const Question& question, const Receiver& chosen, int component) {
  const Receiver* most = nullptr;
  for (const Receiver& other : question.receivers) {
    if (other.train == chosen.train && !other.part && &other != &chosen &&
        other.share * other.x[component] > kSmallestShare &&
        (most == nullptr || other.share * other.x[component] > most->share * most->x[component])) {
      most = &other;
    }
  }
  return most;
}

void name_limit(const Question& question, const Receiver& at_limit, ProductOutcome& outcome) {
  if (at_limit.fixed_point.has_value()) {
    const FixedPoint& point = question.chart.fixed_points[at(*at_limit.fixed_point)];
    outcome.limited_by = point.id;
    if (!point.pure()) {
      outcome.reasons.push_back(Reason::azeotrope_ceiling);
    }
  } else if (!at_limit.boundary.empty()) {
    outcome.limited_by = at_limit.boundary;
    outcome.reasons.push_back(Reason::boundary_between);
  }
  for (const Boundary& boundary : question.chart.boundaries) {
    if (boundary.id == outcome.limited_by && pocket_width(boundary) > kStraight) {
      outcome.pocket_width = pocket_width(boundary);
    }
  }
}

/// What stops a product that is not OPEN: fills limited_by, reasons and pocket_width.
void explain(const Question& question, const Candidate& best, ProductOutcome& outcome) {
  switch (outcome.verdict) {
    case Verdict::open:
    case Verdict::no_call: return;
    case Verdict::capped:
    case Verdict::shut: name_limit(question, *best.receiver, outcome); return;
    case Verdict::tight: break;
  }
  if (!best.within_stages) {
    outcome.reasons.push_back(Reason::pinch);
  }
  if (!best.enough) {
    if (const Receiver* rest = keeper(question, *best.receiver, outcome.component); rest != nullptr) {
      name_limit(question, *rest, outcome);
    }
  } else if (!best.room) {
    name_limit(question, *best.receiver, outcome);
  }
}

std::string boundary_under(const Chart& chart, const Composition& x) {
  for (const Boundary& boundary : chart.boundaries) {
    if (nearest_on_curve(boundary.curve.points, x).distance < 1e-7) {
      return boundary.id;
    }
  }
  return "";
}

const char* ordinal(std::size_t k) {
  static constexpr const char* kWords[] = {"first", "second", "third", "fourth", "fifth", "sixth", "seventh", "eighth"};
  return k < std::size(kWords) ? kWords[k] : "later";
}

/// Receivers that take a drifting cut from its start up to each of its pieces, or from each piece to its end.
void add_parts(std::vector<Receiver>& result, const Receiver& whole, const Cut& cut) {
  const std::size_t pieces = cut.drift.size();
  for (const bool from_start : {true, false}) {
    Receiver part = whole;
    part.part = true;
    part.share = 0.0;
    Composition moles(whole.x.size());
    for (std::size_t k = 0; k + 1 < pieces; ++k) {
      const Cut::Piece& piece = cut.drift[from_start ? k : pieces - 1 - k];
      part.share += piece.share;
      for (int i = 0; i < moles.size(); ++i) {
        moles[i] += piece.share * piece.x[i];
        part.x[i] = moles[i] / part.share;
      }
      const std::string permille = std::to_string(std::lround(1000.0 * part.share / whole.share));
      part.reading = whole.reading + (from_start ? " first " : " last ") + permille + "/1000";
      part.words = std::string(from_start ? "the start of " : "the end of ") + whole.words;
      result.push_back(part);
    }
  }
}

void add_batch(std::vector<Receiver>& result, const Batch& batch, int index, int train) {
  const std::string mode = batch.mode == Batch::Mode::rectifier ? "rectifier" : "stripper";
  const std::string prefix = "batch[" + std::to_string(index) + "].";
  for (std::size_t k = 0; k < batch.cuts.size(); ++k) {
    const Cut& cut = batch.cuts[k];
    Receiver receiver;
    receiver.reading = prefix + "cuts[" + std::to_string(k) + "]";
    receiver.train = train;
    receiver.x = cut.average;
    receiver.share = cut.share;
    receiver.fixed_point = cut.fixed_point;
    receiver.boundary = cut.fixed_point.has_value() ? "" : cut.on;
    const bool last = k + 1 == batch.cuts.size() && k > 0;
    receiver.words = std::string("the ") + (last ? "last" : ordinal(k)) + " cut of a batch " + mode;
    result.push_back(receiver);
    add_parts(result, receiver, cut);
  }
  if (!batch.heel.empty()) {
    Receiver heel;
    heel.reading = prefix + "heel";
    heel.train = train;
    heel.x = batch.heel;
    heel.share = batch.heel_share;
    heel.words = "the heel of a batch " + mode;
    result.push_back(std::move(heel));
  }
}

void add_sequence(std::vector<Receiver>& result, const Chart& chart, const FlowMap& map, const Sequence& sequence,
                  std::size_t index, int train) {
  for (std::size_t k = 0; k < sequence.streams.size(); ++k) {
    const Sequence::Stream& stream = sequence.streams[k];
    Receiver receiver;
    receiver.reading = "sequences[" + std::to_string(index) + "].streams[" + std::to_string(k) + "]";
    receiver.train = train;
    receiver.x = stream.x;
    receiver.share = stream.share;
    receiver.fixed_point = map.node_at(stream.x, 1e-9);
    receiver.boundary = receiver.fixed_point.has_value() ? "" : boundary_under(chart, stream.x);
    receiver.words = std::string("the ") + (stream.distillate ? "distillate" : "bottoms") + " of the " +
                     ordinal(static_cast<std::size_t>(stream.column)) + " column of a sequence";
    result.push_back(std::move(receiver));
  }
}

}  // namespace

std::vector<Receiver> receivers(const Chart& chart, const Reach& reach, const std::vector<int>& batches) {
  std::vector<Receiver> result;
  int train = 0;
  for (const int index : batches) {
    add_batch(result, reach.batch[at(index)], index, train++);
  }
  const FlowMap map(chart, Direction::heating);
  for (std::size_t k = 0; k < reach.sequences.size(); ++k) {
    add_sequence(result, chart, map, reach.sequences[k], k, train++);
  }
  result.erase(std::remove_if(result.begin(), result.end(),
                              [](const Receiver& receiver) { return receiver.share < kSmallestShare; }),
               result.end());
  return result;
}

double required_recovery(const ProductSpec& spec, const ReachOptions& options) {
  const bool asked = std::any_of(spec.tests.begin(), spec.tests.end(), [](const ProductTest& test) {
    return test.what == ProductTest::What::recovery && test.at_least;
  });
  return asked ? spec.required_recovery() : options.required_recovery;
}

ProductOutcome judge(const Question& question, const ProductSpec& spec) {
  expects(!question.receivers.empty(), "judge: no receivers");
  ProductOutcome outcome;
  outcome.component = spec.component;
  Candidate best;
  for (const Receiver& receiver : question.receivers) {
    const Candidate candidate = weigh(question, spec, receiver);
    outcome.purity_limit_mole = std::max(outcome.purity_limit_mole, receiver.x[spec.component]);
    outcome.purity_limit_mass =
        std::max(outcome.purity_limit_mass, to_mass_fractions(question.mixture, receiver.x)[spec.component]);
    if (best.receiver == nullptr || better(candidate, best, spec.component)) {
      best = candidate;
    }
  }
  outcome.verdict = verdict_of(best, question.feed[spec.component], spec.component);
  outcome.reading = best.receiver->reading;
  outcome.recovery = best.recovery;
  for (const ProductTest& test : spec.tests) {
    outcome.tests.push_back(evaluate(test, question.mixture, best.receiver->x, best.recovery));
  }
  if (best.receiver->head.has_value()) {
    outcome.purity_at_stages = (*best.receiver->head)[spec.component];
  }
  explain(question, best, outcome);
  outcome.sentence =
      sentence({question.mixture, question.chart, question.options}, outcome, *best.receiver, !best.enough);
  return outcome;
}

ProductOutcome no_call(const Mixture& mixture, const ProductSpec& spec, const NoCall& why) {
  ProductOutcome outcome;
  outcome.component = spec.component;
  outcome.verdict = Verdict::no_call;
  if (why.reason.has_value()) {
    outcome.reasons.push_back(*why.reason);
  }
  outcome.sentence = "No call for " + mixture.component(spec.component).id + ": " + why.message + ".";
  return outcome;
}

bool worse(const ProductOutcome& a, const ProductOutcome& b) {
  if (a.verdict != b.verdict) {
    return static_cast<int>(a.verdict) > static_cast<int>(b.verdict);
  }
  return a.recovery < b.recovery - kNoMargin;
}

double pocket_width(const Boundary& boundary) {
  const std::vector<Composition>& points = boundary.curve.points;
  double widest = 0.0;
  for (const Composition& point : points) {
    widest = std::max(widest, nearest_on_curve({points.front(), points.back()}, point).distance);
  }
  return widest;
}

const char* to_string(Verdict verdict) {
  switch (verdict) {
    case Verdict::open: return "open";
    case Verdict::tight: return "tight";
    case Verdict::capped: return "capped";
    case Verdict::shut: return "shut";
    case Verdict::no_call: return "no-call";
  }
  return "no-call";
}

}  // namespace stillshed
