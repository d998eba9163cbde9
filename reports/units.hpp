/// The closed table of unit words that people write, and what each means in SI.
///
///   SI value = factor * number + offset
///
/// Gauge pressures count from a barometer of 101325 Pa; a bare "bar" is absolute. ppm means mg/kg.
/// "C" and "F" are degrees Celsius and Fahrenheit, "K" is the kelvin. Vol% is by volumes before mixing.
/// Words that are written in several ways (degC, °C, C) are several rows; a word that means two things
/// ("%" without a basis, "area%") is not in the table and is refused with a reason.
/// The factors are checked against an independent unit library in tests/reports/units_test.cpp.
#pragma once

#include <optional>
#include <span>
#include <string>
#include <string_view>

namespace stillshed {

enum class Dimension {
  pressure,         ///< Pa
  temperature,      ///< K
  mass,             ///< kg
  amount,           ///< mol
  volume,           ///< m3
  mass_fraction,    ///< kg/kg
  mole_fraction,    ///< mol/mol
  volume_fraction,  ///< m3/m3, before mixing
};
[[nodiscard]] const char* to_string(Dimension dimension);  ///< "pressure", ...

struct UnitWord {
  std::string_view word;
  Dimension dimension = Dimension::mass;
  double factor = 1.0;
  double offset = 0.0;
  [[nodiscard]] double to_si(double number) const { return factor * number + offset; }
};

/// Every word of the table, grouped by dimension; the first of each group is the usual one.
[[nodiscard]] std::span<const UnitWord> unit_table();

/// The unit a word stands for; blanks inside are ignored ("in Hg vac"). Exact spelling first, then any
/// letter case where that leaves exactly one meaning. Null when unknown.
[[nodiscard]] const UnitWord* find_unit(std::string_view word);

/// "bar, mbar, Pa, ..." for messages.
[[nodiscard]] std::string allowed_units(Dimension dimension);

/// Why a word that looks like a unit is refused ("area%", "%", "ppb", "Nm3"); empty when there is nothing to tell.
[[nodiscard]] std::string why_refused(std::string_view word);

}  // namespace stillshed
