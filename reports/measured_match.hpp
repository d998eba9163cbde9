/// Measurements on file beside what was computed.
///
/// Shown are records of tier A (read in print) and B (from memory, high confidence); C and D are not facts.
/// A record belongs to the computed azeotrope of the same components that lies nearest in composition (in temperature
/// when the record has no composition). For one azeotrope only the records at the pressure of the run (within 5 %) are
/// kept, or, when there are none, those at the nearest pressure. Differences are given at the pressure of the run only.
#pragma once

#include "params/records.hpp"
#include "reports/answer.hpp"

namespace stillshed {

/// Fills `measured` and `measured_only` of an answer that has its mixture, pressure and survey.
void match_measurements(const Facts& facts, Answer& answer);

}  // namespace stillshed
