/// Where the physics of this program ends: ideal vapour, critical points, association, melting, ranges of data.
///
/// | condition                                                     | severity  | reason           |
/// |---------------------------------------------------------------|-----------|------------------|
/// | P below 0.1 kPa                                               | no_call   | outside-data     |
/// | P above 3 bar, ideal vapour off by 5-15 % in K                | stretched | outside-data     |
/// | P above 10 bar                                                | no_call   | outside-data     |
/// | P above 0.8 Pc of a component whose Pc is known               | no_call   | above-critical   |
/// | vapour of a component dimerizes, above 0.5 mol% of the feed   | no_call   | acid-vapour      |
/// | the same in smaller amounts                                   | caution   | acid-vapour      |
/// | a component melts above its boiling point at P                | caution   | freezes          |
/// | a component melts above the boiling point of the feed         | caution   | freezes          |
/// | a vapour-pressure set is used outside its published range     | stretched | outside-data     |
///
/// The limits judge verdicts, not arithmetic: a survey at 12 bar has numbers, its products are NO CALL. A component
/// without critical data (a user's own) is not judged by them. Source     the 5-15 % is our estimate from second virial
/// coefficients of common solvents, not a measurement. Errors     none.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "engine/status.hpp"
#include "models/mixture.hpp"

namespace stillshed {

inline constexpr double kLowestPressure_Pa = 100.0;
inline constexpr double kPlainVapourUpTo_Pa = 3e5;
inline constexpr double kIdealVapourUpTo_Pa = 1e6;
inline constexpr double kShareOfCriticalPressure = 0.8;
inline constexpr double kHarmlessDimerShare = 0.005;

enum class Severity {
  caution,    ///< say it beside the result
  stretched,  ///< evidence at most X
  no_call,    ///< no verdict
};
[[nodiscard]] const char* to_string(Severity severity);  ///< "caution", "stretched", "no-call"

struct LimitNote {
  Severity severity = Severity::caution;
  Reason reason = Reason::outside_data;
  std::optional<int> component;  ///< empty: the pressure itself
  double value = 0.0;            ///< what was compared, in the unit named in `text`
  double limit = 0.0;            ///< with what
  std::string text;              ///< one plain phrase with the numbers
};

/// Temperatures at which pure-component data are used, e.g. the coldest and hottest fixed point.
struct TemperatureRange {
  double lower_K = 0.0;
  double upper_K = 0.0;
};

/// Notes in the order of the table. `feed` in mole fractions (any scale); components of zero amount are not judged.
/// Without `used` each vapour-pressure set is checked at its component's boiling point only.
[[nodiscard]] std::vector<LimitNote> check_limits(const Mixture& mixture, double pressure_Pa, const Composition& feed,
                                                  const std::optional<TemperatureRange>& used = {});

/// The gravest of them; empty when there is none.
[[nodiscard]] std::optional<Severity> gravest(const std::vector<LimitNote>& notes);

}  // namespace stillshed
