#include "reports/run_case.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>

#include "engine/limits.hpp"
#include "engine/split_scan.hpp"
#include "engine/stability.hpp"
#include "reports/build_mixture.hpp"
#include "reports/cautions_rules.hpp"
#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/measured_match.hpp"
#include "reports/missing_pairs.hpp"
#include "reports/provenance.hpp"

#ifndef STILLSHED_VERSION
#define STILLSHED_VERSION "0.0.0"
#endif

namespace stillshed {
namespace {

bool wants_chart(Task task) {
  return task == Task::report || task == Task::chart || task == Task::reach;
}
bool wants_reach(Task task) {
  return task == Task::report || task == Task::reach;
}

std::string range_words(const GroupTable& table) {
  const auto bound = [](const std::optional<double>& value) { return value.has_value() ? fixed(*value, 0) : "any"; };
  return bound(table.recommended_low_K) + " to " + bound(table.recommended_high_K) + " K";
}

/// One case on its way through the engine.
class CaseRun {
 public:
  CaseRun(const Case& input, const Catalog& catalog, Task task, const RunOptions& options)
      : catalog_(catalog), options_(options), built_(build_mixture(input, catalog)) {
    answer_.task = task;
    answer_.input = input;
  }
  Answer run();

 private:
  void describe();
  void compute();
  void compute_survey();
  void report_splits();
  void compute_chart_and_reach();
  void bound_missing_pairs();
  void judge_limits();
  void judge_group_table(const TemperatureRange& used);
  void finish();

  [[nodiscard]] SurveyOptions survey_options() const;
  [[nodiscard]] std::vector<ProductSpec> product_specs() const;
  [[nodiscard]] Reach reach_of(const Mixture& mixture, const Survey& survey) const;
  void no_call(Reason reason, const std::string& sentence);
  void start_empty_reach(const std::string& message);
  void incomplete(const std::string& what, const std::string& where, const std::string& why) {
    answer_.incomplete.push_back({what, where, why});
  }
  [[nodiscard]] std::string names(const Members& members) const { return member_names(answer_.mixture, members); }
  [[nodiscard]] TemperatureRange temperatures_used() const;

  const Catalog& catalog_;
  const RunOptions& options_;
  BuiltMixture built_;
  Answer answer_;
  bool extrapolated_ = false;
  bool splits_ = false;  ///< the boiling liquid, somewhere
};

void CaseRun::describe() {
  answer_.program_version = STILLSHED_VERSION;
  answer_.params_sha256 = catalog_.facts().sha256;
  answer_.seed = options_.seed;
  answer_.mixture = built_.mixture;
  answer_.model_kind = built_.choice.kind;
  answer_.model_note = built_.choice.note;
  answer_.pairs = built_.choice.pairs;
  for (const MixtureComponent& component : answer_.mixture.components()) {
    answer_.pressure_set_ids.push_back(component.pressure.set().id);
  }
  for (const StreamEntry& entry : answer_.input.stream) {
    answer_.feed.push_back(entry.mole_fraction);
  }
  const std::vector<ProductWish>& wishes = answer_.input.products;
  if (wants_reach(answer_.task) &&
      std::any_of(wishes.begin(), wishes.end(), [](const ProductWish& wish) { return wish.default_tests; })) {
    answer_.notes.push_back("where no purity is asked for, >= 99.5 wt% is taken");
  }
  for (const MissingPair& pair : built_.choice.missing) {
    incomplete(
        "activity model",
        answer_.mixture.component(pair.i).id + " + " + answer_.mixture.component(pair.j).id + ", groups " + pair.groups,
        to_string(Reason::missing_pair));
  }
  if (!built_.choice.refusal.empty()) {
    incomplete("activity model", built_.choice.refusal, to_string(Reason::missing_pair));
  }
}

SurveyOptions CaseRun::survey_options() const {
  SurveyOptions survey;
  survey.seed = options_.seed;
  survey.stop = options_.stop;
  survey.progress = options_.progress;
  survey.executor = options_.executor;
  return survey;
}

std::vector<ProductSpec> CaseRun::product_specs() const {
  std::vector<ProductSpec> specs;
  for (const ProductWish& wish : answer_.input.products) {
    ProductSpec spec;
    spec.tests = wish.tests;
    for (int i = 0; i < answer_.mixture.size(); ++i) {
      if (answer_.input.stream[static_cast<std::size_t>(i)].id == wish.id) {
        spec.component = i;
      }
    }
    specs.push_back(std::move(spec));
  }
  return specs;
}

Reach CaseRun::reach_of(const Mixture& mixture, const Survey& survey) const {
  ReachOptions options;
  options.stages = answer_.input.plant.stages;
  const Chart map = chart(mixture, survey);
  return reach(mixture, survey, map, answer_.feed, product_specs(), options);
}

/// A reach block that says for every product what could not be judged.
void CaseRun::start_empty_reach(const std::string& message) {
  Reach reach;
  reach.status = Status::not_applicable;
  reach.message = message;
  for (const ProductSpec& spec : product_specs()) {
    ProductOutcome outcome;
    outcome.component = spec.component;
    outcome.sentence = message;
    for (const ProductTest& test : spec.tests) {
      outcome.tests.push_back({test, 0.0, 0.0, false});
    }
    reach.products.push_back(std::move(outcome));
  }
  answer_.reach = std::move(reach);
}

void CaseRun::no_call(Reason reason, const std::string& sentence) {
  if (!wants_reach(answer_.task)) {
    return;
  }
  if (!answer_.reach.has_value()) {
    start_empty_reach(sentence);
  }
  for (ProductOutcome& product : answer_.reach->products) {
    if (product.verdict != Verdict::no_call) {
      product.verdict = Verdict::no_call;
      product.sentence = sentence;
    }
    if (std::find(product.reasons.begin(), product.reasons.end(), reason) == product.reasons.end()) {
      product.reasons.push_back(reason);
    }
  }
}

void CaseRun::compute_survey() {
  answer_.survey = survey(answer_.mixture, answer_.input.pressure_Pa, survey_options());
  if (!built_.choice.missing.empty()) {
    forget_missing_pairs(*answer_.survey, built_.choice.missing);
    answer_.notes.push_back("nodes that depend on a missing pair are printed as degenerate: their type is not known");
  }
  for (const FaceProof& face : answer_.survey->faces) {
    if (holds_missing_pair(face.members, built_.choice.missing)) {
      incomplete("azeotropes", names(face.members), to_string(Reason::missing_pair));
    } else if (face.status != Status::complete && face.status != Status::not_run) {
      incomplete("proof", names(face.members), to_string(face.status));
    } else if (face.index_holds == false) {
      incomplete("index rule", names(face.members), to_string(Reason::not_converged));
    }
  }
  report_splits();
  if (answer_.survey->status == Status::stopped) {
    incomplete("survey", "", to_string(Status::stopped));
  }
  for (const std::string& note : answer_.survey->notes) {
    answer_.notes.push_back(note);
  }
}

/// Faces where a boiling liquid splits: their azeotropes of two liquids are not searched. A root whose liquid splits
/// shows it; where there is none, the scan does.
void CaseRun::report_splits() {
  std::vector<Members> faces;
  const auto add = [&](const Members& members) {
    if (!holds_missing_pair(members, built_.choice.missing) &&
        std::find(faces.begin(), faces.end(), members) == faces.end()) {
      faces.push_back(members);
      incomplete("azeotropes", names(members), to_string(Reason::phase_split_needed));
    }
  };
  for (const RejectedRoot& root : answer_.survey->rejected) {
    add(root.members);
  }
  for (const SplitWitness& witness : scan_for_splits(answer_.mixture, answer_.input.pressure_Pa)) {
    add(witness.members);
  }
  splits_ = !faces.empty();
}

void CaseRun::compute_chart_and_reach() {
  answer_.chart = chart(answer_.mixture, *answer_.survey);
  if (answer_.chart->status != Status::complete) {
    incomplete("chart", answer_.chart->message, to_string(answer_.chart->status));
  }
  answer_.position = locate(answer_.mixture, *answer_.chart, answer_.feed);
  if (answer_.position->bubble_temperature_K > 0.0) {
    answer_.feed_stability = test_stability(answer_.mixture, answer_.position->bubble_temperature_K, answer_.feed);
    if (answer_.feed_stability->outcome != Stability::stable) {
      incomplete("feed", to_string(answer_.feed_stability->outcome), to_string(Reason::phase_split_needed));
    }
  }
  if (!wants_reach(answer_.task) || options_.stop.stop_requested()) {
    return;
  }
  ReachOptions options;
  options.stages = answer_.input.plant.stages;
  answer_.reach = reach(answer_.mixture, *answer_.survey, *answer_.chart, answer_.feed, product_specs(), options);
  if (splits_) {
    no_call(Reason::phase_split_needed, "the boiling liquid splits in two, and that is not computed yet");
  }
  if (answer_.reach->status != Status::complete) {
    incomplete("reach", answer_.reach->message, to_string(answer_.reach->status));
  }
}

/// Verdicts that hold whatever the missing pairs are; the rest NO CALL.
void CaseRun::bound_missing_pairs() {
  std::string list;
  for (const MissingPair& pair : built_.choice.missing) {
    list += (list.empty() ? "" : "; ") + answer_.mixture.component(pair.i).id + " + " +
            answer_.mixture.component(pair.j).id + " (groups " + pair.groups + ")";
  }
  const std::string missing = "no parameters for " + list;
  start_empty_reach(missing);
  const std::vector<Mixture> mixtures =
      bounding_mixtures(answer_.mixture, built_.choice.missing, answer_.input.pressure_Pa);
  const std::vector<std::optional<Verdict>> common =
      common_verdicts(mixtures, answer_.reach->products.size(), [&](const Mixture& mixture) {
        std::vector<Verdict> verdicts(answer_.reach->products.size(), Verdict::no_call);
        if (!options_.stop.stop_requested() && scan_for_splits(mixture, answer_.input.pressure_Pa).empty()) {
          const Reach bounded = reach_of(mixture, survey(mixture, answer_.input.pressure_Pa, survey_options()));
          for (std::size_t p = 0; p < verdicts.size() && p < bounded.products.size(); ++p) {
            verdicts[p] = bounded.products[p].verdict;
          }
        }
        return verdicts;
      });
  for (std::size_t p = 0; p < common.size(); ++p) {
    ProductOutcome& product = answer_.reach->products[p];
    product.reasons.push_back(Reason::missing_pair);
    if (common[p].has_value()) {
      product.verdict = *common[p];
      product.sentence = missing + "; the verdict is the same for every ln gamma at infinite dilution from -1 to 3";
    } else {
      product.sentence = missing + "; the verdict depends on them";
    }
  }
}

TemperatureRange CaseRun::temperatures_used() const {
  TemperatureRange range{1e9, 0.0};
  for (int i = 0; i < answer_.mixture.size(); ++i) {
    const double boiling_K = answer_.mixture.boiling_point_K(i, answer_.input.pressure_Pa);
    range.lower_K = std::min(range.lower_K, boiling_K);
    range.upper_K = std::max(range.upper_K, boiling_K);
  }
  if (answer_.survey.has_value()) {
    for (const FixedPoint& point : answer_.survey->fixed_points()) {
      range.lower_K = std::min(range.lower_K, point.temperature_K);
      range.upper_K = std::max(range.upper_K, point.temperature_K);
    }
  }
  return range;
}

void CaseRun::compute() {
  for (const LimitNote& note : check_limits(answer_.mixture, answer_.input.pressure_Pa, answer_.feed)) {
    if (note.reason == Reason::above_critical) {
      return;  // judge_limits says it
    }
  }
  if (!built_.choice.refusal.empty()) {
    no_call(Reason::missing_pair, built_.choice.refusal);
    return;
  }
  compute_survey();
  if (!wants_chart(answer_.task) || options_.stop.stop_requested()) {
    return;
  }
  const std::string too_many = "maps and reach for four and more components are not drawn by this version";
  if (answer_.mixture.size() > kMapUpTo) {
    incomplete("chart and reach", std::to_string(answer_.mixture.size()) + " components",
               to_string(Status::not_applicable));
    answer_.notes.push_back(too_many);
    if (wants_reach(answer_.task)) {
      start_empty_reach(too_many);
    }
  } else if (!built_.choice.missing.empty()) {
    if (wants_reach(answer_.task)) {
      bound_missing_pairs();
    }
  } else {
    compute_chart_and_reach();
  }
}

/// Group tables are recommended for a range of temperatures; beyond it the prediction is stretched, and said so.
void CaseRun::judge_group_table(const TemperatureRange& used) {
  const Facts& facts = catalog_.facts();
  for (const GroupTable* table : {&facts.unifac, &facts.dortmund}) {
    const bool in_use = answer_.model_kind == to_string(table->model);
    if (in_use && (used.lower_K < table->recommended_low_K.value_or(0.0) ||
                   used.upper_K > table->recommended_high_K.value_or(used.upper_K))) {
      extrapolated_ = true;
      answer_.notes.push_back(table->title + " is recommended for " + range_words(*table) + "; this run uses " +
                              fixed(used.lower_K, 0) + " to " + fixed(used.upper_K, 0) + " K");
    }
  }
}

void CaseRun::judge_limits() {
  const TemperatureRange used = temperatures_used();
  judge_group_table(used);
  answer_.pressure_evidence = pressure_evidence(answer_.mixture, answer_.input.pressure_Pa, used.lower_K, used.upper_K);
  for (const LimitNote& note : check_limits(answer_.mixture, answer_.input.pressure_Pa, answer_.feed, used)) {
    answer_.notes.push_back(note.text);
    extrapolated_ = extrapolated_ || note.severity == Severity::stretched;
    if (note.severity == Severity::no_call) {
      incomplete("limits of validity",
                 note.component.has_value() ? answer_.mixture.component(*note.component).id : "pressure",
                 to_string(note.reason));
      no_call(note.reason, note.text);
    }
  }
  if (answer_.input.salt_mass_fraction > kLargeSaltShare) {
    incomplete("stream", "salts", to_string(Reason::salt_present));
    no_call(Reason::salt_present, "salts change volatilities and phase splits, which is not modelled");
  }
  if (answer_.input.unknown_mass_fraction > kLargeUnknownShare) {
    incomplete("stream", "not identified", to_string(Reason::unknowns_too_large));
    no_call(Reason::unknowns_too_large, "too much of the stream is not identified");
  }
}

void CaseRun::finish() {
  if (answer_.survey.has_value()) {
    match_measurements(catalog_.facts(), answer_);
  }
  if (answer_.reach.has_value()) {
    Members all;
    for (int i = 0; i < answer_.mixture.size(); ++i) {
      all.push_back(i);
    }
    const Evidence weakest = weakest_evidence(answer_, all);
    for (const ProductOutcome& product : answer_.reach->products) {
      answer_.product_evidence.push_back(weakest);
      if (product.verdict == Verdict::no_call) {
        const std::string why =
            product.reasons.empty() ? to_string(answer_.reach->status) : to_string(product.reasons.front());
        incomplete("verdict", answer_.mixture.component(product.component).id, why);
      }
    }
  }
  answer_.cautions = cautions_for(answer_, built_.records, catalog_.facts(), extrapolated_);
  answer_.provenance = provenance_lines(answer_, built_.records, catalog_);
  answer_.exit_code = answer_.incomplete.empty() ? 0 : 3;
  if (options_.stop.stop_requested()) {
    answer_.exit_code = kInterruptedExit;
    if (std::none_of(answer_.incomplete.begin(), answer_.incomplete.end(),
                     [](const Incomplete& item) { return item.why == to_string(Status::stopped); })) {
      incomplete("run", "", to_string(Status::stopped));
    }
  }
}

Answer CaseRun::run() {
  const auto start = std::chrono::steady_clock::now();
  describe();
  if (answer_.task != Task::vouch) {
    compute();
  }
  judge_limits();
  finish();
  answer_.elapsed_s = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  return std::move(answer_);
}

}  // namespace

Answer run_case(const Case& input, const Catalog& catalog, Task task, const RunOptions& options) {
  return CaseRun(input, catalog, task, options).run();
}

}  // namespace stillshed
