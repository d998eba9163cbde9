/// Everything one run knows, before it is written down: the single input of all writers.
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "engine/reach.hpp"
#include "params/records.hpp"
#include "reports/case_file.hpp"

namespace stillshed {

enum class Evidence { fitted, stretched, predicted, user, none };
[[nodiscard]] const char* to_string(Evidence evidence);  ///< "F", "X", "P", "U", "0"

struct PairUse {
  int i = 0;
  int j = 0;
  std::string record;  ///< "unifac-dortmund groups 1-7, 5-7" or "user"
  Evidence evidence = Evidence::predicted;
};

/// Computed azeotrope beside what is on file for it.
struct MeasuredMatch {
  std::string source;
  char tier = 'A';
  double pressure_Pa = 0.0;
  Members members;  ///< components of the record, indices into the mixture
  std::optional<double> temperature_K;
  Composition x;               ///< whole-mixture order; empty: composition not given
  std::optional<double> dT_K;  ///< computed - measured, when the pressures agree within 5 %
  std::optional<double> dx;    ///< largest |difference| of a mole fraction
  bool heterogeneous = false;
  bool says_none = false;  ///< the source states that there is no azeotrope
};

struct Caution {
  std::string code;  ///< "C1".. of params/cautions.json
  std::string text;
  std::vector<std::string> substances;
  bool above_verdict = false;
};

struct Incomplete {
  std::string what;
  std::string where;
  std::string why;  ///< reason code
};

/// Which blocks a task computes.
enum class Task { report, survey, chart, reach, vouch, name, check };

struct Answer {
  Task task = Task::report;
  std::string program_version;  ///< "0.1.0"
  std::string params_sha256;    ///< of the parameter files read (Facts::sha256)
  std::uint64_t seed = 1;       ///< of every random choice in the run
  Case input;
  Mixture mixture;         ///< without zero-amount components
  std::string model_kind;  ///< "unifac-dortmund", "nrtl", ...
  std::string model_note;  ///< why auto chose it
  std::vector<PairUse> pairs;
  std::vector<std::string> pressure_set_ids;  ///< per component
  std::vector<Evidence> pressure_evidence;
  Composition feed;  ///< mole fractions, volatile part
  std::optional<Survey> survey;
  std::vector<std::vector<MeasuredMatch>> measured;  ///< per azeotrope of the survey
  std::vector<MeasuredMatch> measured_only;          ///< on file for these components, not computed
  std::optional<Chart> chart;
  std::optional<Position> position;               ///< of the feed
  std::optional<StabilityResult> feed_stability;  ///< of the feed at its bubble point
  std::optional<Reach> reach;
  std::vector<Evidence> product_evidence;  ///< per product of `reach`
  std::vector<Caution> cautions;
  std::vector<std::string> notes;
  std::vector<Incomplete> incomplete;
  std::vector<std::string> provenance;  ///< lines: what, record, source
  double elapsed_s = 0.0;
  int exit_code = 0;  ///< 0 or 3
};

}  // namespace stillshed
