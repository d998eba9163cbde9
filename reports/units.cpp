#include "reports/units.hpp"

#include <array>
#include <cctype>

namespace stillshed {
namespace {

constexpr double kBarometer_Pa = 101325.0;
constexpr double kTorr_Pa = 101325.0 / 760.0;
constexpr double kMercury_mm_Pa = 133.322387415;
constexpr double kMercury_inch_Pa = 25.4 * kMercury_mm_Pa;
constexpr double kPound_kg = 0.45359237;
constexpr double kPsi_Pa = kPound_kg * 9.80665 / (0.0254 * 0.0254);
constexpr double kGallon_m3 = 231.0 * 0.0254 * 0.0254 * 0.0254;
constexpr double kZeroCelsius_K = 273.15;
constexpr double kZeroFahrenheit_K = 273.15 - 32.0 * 5.0 / 9.0;

using D = Dimension;

constexpr std::array kTable = {
    // pressure; the first of the group is named first in messages
    UnitWord{"bar", D::pressure, 1e5},
    UnitWord{"mbar", D::pressure, 100.0},
    UnitWord{"Pa", D::pressure, 1.0},
    UnitWord{"hPa", D::pressure, 100.0},
    UnitWord{"kPa", D::pressure, 1e3},
    UnitWord{"MPa", D::pressure, 1e6},
    UnitWord{"atm", D::pressure, 101325.0},
    UnitWord{"torr", D::pressure, kTorr_Pa},
    UnitWord{"mmHg", D::pressure, kMercury_mm_Pa},
    UnitWord{"inHg", D::pressure, kMercury_inch_Pa},
    UnitWord{"psi", D::pressure, kPsi_Pa},
    UnitWord{"psia", D::pressure, kPsi_Pa},
    UnitWord{"bara", D::pressure, 1e5},
    UnitWord{"bar(a)", D::pressure, 1e5},
    UnitWord{"mbara", D::pressure, 100.0},
    UnitWord{"mbar(a)", D::pressure, 100.0},
    UnitWord{"millibar", D::pressure, 100.0},
    UnitWord{"kPa(a)", D::pressure, 1e3},
    UnitWord{"psi(a)", D::pressure, kPsi_Pa},
    UnitWord{"barg", D::pressure, 1e5, kBarometer_Pa},
    UnitWord{"bar(g)", D::pressure, 1e5, kBarometer_Pa},
    UnitWord{"mbarg", D::pressure, 100.0, kBarometer_Pa},
    UnitWord{"mbar(g)", D::pressure, 100.0, kBarometer_Pa},
    UnitWord{"kPag", D::pressure, 1e3, kBarometer_Pa},
    UnitWord{"kPa(g)", D::pressure, 1e3, kBarometer_Pa},
    UnitWord{"psig", D::pressure, kPsi_Pa, kBarometer_Pa},
    UnitWord{"psi(g)", D::pressure, kPsi_Pa, kBarometer_Pa},
    UnitWord{"inHgvac", D::pressure, -kMercury_inch_Pa, kBarometer_Pa},
    UnitWord{"inHgvacuum", D::pressure, -kMercury_inch_Pa, kBarometer_Pa},
    // temperature
    UnitWord{"degC", D::temperature, 1.0, kZeroCelsius_K},
    UnitWord{"\u00b0C", D::temperature, 1.0, kZeroCelsius_K},
    UnitWord{"C", D::temperature, 1.0, kZeroCelsius_K},
    UnitWord{"Celsius", D::temperature, 1.0, kZeroCelsius_K},
    UnitWord{"K", D::temperature, 1.0},
    UnitWord{"kelvin", D::temperature, 1.0},
    UnitWord{"degF", D::temperature, 5.0 / 9.0, kZeroFahrenheit_K},
    UnitWord{"\u00b0F", D::temperature, 5.0 / 9.0, kZeroFahrenheit_K},
    UnitWord{"F", D::temperature, 5.0 / 9.0, kZeroFahrenheit_K},
    UnitWord{"Fahrenheit", D::temperature, 5.0 / 9.0, kZeroFahrenheit_K},
    // mass
    UnitWord{"kg", D::mass, 1.0},
    UnitWord{"g", D::mass, 1e-3},
    UnitWord{"mg", D::mass, 1e-6},
    UnitWord{"t", D::mass, 1e3},
    UnitWord{"tonne", D::mass, 1e3},
    UnitWord{"tonnes", D::mass, 1e3},
    UnitWord{"lb", D::mass, kPound_kg},
    UnitWord{"lbs", D::mass, kPound_kg},
    // amount of substance
    UnitWord{"mol", D::amount, 1.0},
    UnitWord{"mmol", D::amount, 1e-3},
    UnitWord{"kmol", D::amount, 1e3},
    UnitWord{"moles", D::amount, 1.0},
    // volume
    UnitWord{"L", D::volume, 1e-3},
    UnitWord{"l", D::volume, 1e-3},
    UnitWord{"litre", D::volume, 1e-3},
    UnitWord{"litres", D::volume, 1e-3},
    UnitWord{"liter", D::volume, 1e-3},
    UnitWord{"liters", D::volume, 1e-3},
    UnitWord{"mL", D::volume, 1e-6},
    UnitWord{"ml", D::volume, 1e-6},
    UnitWord{"m3", D::volume, 1.0},
    UnitWord{"m\u00b3", D::volume, 1.0},
    UnitWord{"gal", D::volume, kGallon_m3},
    UnitWord{"USgal", D::volume, kGallon_m3},
    // mass fraction
    UnitWord{"wt%", D::mass_fraction, 0.01},
    UnitWord{"%wt", D::mass_fraction, 0.01},
    UnitWord{"mass%", D::mass_fraction, 0.01},
    UnitWord{"w%", D::mass_fraction, 0.01},
    UnitWord{"m%", D::mass_fraction, 0.01},
    UnitWord{"%w/w", D::mass_fraction, 0.01},
    UnitWord{"%(w/w)", D::mass_fraction, 0.01},
    UnitWord{"%m/m", D::mass_fraction, 0.01},
    UnitWord{"w/w", D::mass_fraction, 1.0},
    UnitWord{"wt/wt", D::mass_fraction, 1.0},
    UnitWord{"kg/kg", D::mass_fraction, 1.0},
    UnitWord{"massfraction", D::mass_fraction, 1.0},
    UnitWord{"weightfraction", D::mass_fraction, 1.0},
    UnitWord{"g/kg", D::mass_fraction, 1e-3},
    UnitWord{"ppm", D::mass_fraction, 1e-6},
    UnitWord{"ppmw", D::mass_fraction, 1e-6},
    UnitWord{"mg/kg", D::mass_fraction, 1e-6},
    // mole fraction
    UnitWord{"mol%", D::mole_fraction, 0.01},
    UnitWord{"%mol", D::mole_fraction, 0.01},
    UnitWord{"mole%", D::mole_fraction, 0.01},
    UnitWord{"mol/mol", D::mole_fraction, 1.0},
    UnitWord{"molefraction", D::mole_fraction, 1.0},
    UnitWord{"molfraction", D::mole_fraction, 1.0},
    // volume fraction, before mixing
    UnitWord{"vol%", D::volume_fraction, 0.01},
    UnitWord{"%vol", D::volume_fraction, 0.01},
    UnitWord{"%v/v", D::volume_fraction, 0.01},
    UnitWord{"%(v/v)", D::volume_fraction, 0.01},
    UnitWord{"v/v", D::volume_fraction, 1.0},
    UnitWord{"volumefraction", D::volume_fraction, 1.0},
};

std::string without_blanks(std::string_view word) {
  std::string result;
  for (const char c : word) {
    if (c != ' ') {
      result += c;
    }
  }
  return result;
}

std::string lower(std::string_view word) {
  std::string result;
  for (const char c : word) {
    result += static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  }
  return result;
}

/// Prefixes whose other case means something else: mega or milli, gram or giga, tonne or tesla.
bool case_matters(std::string_view word) {
  return word.size() <= 1 || lower(word) == "mpa" || lower(word) == "mg" || lower(word) == "mmol" ||
         (lower(word) == "pa" && word != "pa");
}

bool same_meaning(const UnitWord& a, const UnitWord& b) {
  return a.dimension == b.dimension && a.factor == b.factor && a.offset == b.offset;
}

}  // namespace

const char* to_string(Dimension dimension) {
  switch (dimension) {
    case Dimension::pressure: return "pressure";
    case Dimension::temperature: return "temperature";
    case Dimension::mass: return "mass";
    case Dimension::amount: return "amount of substance";
    case Dimension::volume: return "volume";
    case Dimension::mass_fraction: return "mass fraction";
    case Dimension::mole_fraction: return "mole fraction";
    case Dimension::volume_fraction: return "volume fraction";
  }
  return "";
}

std::span<const UnitWord> unit_table() {
  return kTable;
}

const UnitWord* find_unit(std::string_view word) {
  const std::string exact = without_blanks(word);
  for (const UnitWord& unit : kTable) {
    if (unit.word == exact) {
      return &unit;
    }
  }
  if (case_matters(exact)) {
    return nullptr;
  }
  const std::string folded = lower(exact);
  const UnitWord* found = nullptr;
  for (const UnitWord& unit : kTable) {
    if (lower(unit.word) == folded) {
      if (found != nullptr && !same_meaning(*found, unit)) {
        return nullptr;
      }
      found = &unit;
    }
  }
  return found;
}

std::string allowed_units(Dimension dimension) {
  switch (dimension) {
    case Dimension::pressure: return "bar, mbar, Pa, kPa, MPa, atm, torr, mmHg, psi, barg, psig, inHg vac";
    case Dimension::temperature: return "degC, K, degF";
    case Dimension::mass: return "kg, g, t, lb";
    case Dimension::amount: return "mol, kmol";
    case Dimension::volume: return "L, mL, m3, gal (US)";
    case Dimension::mass_fraction: return "wt%, w/w, ppm (mg/kg)";
    case Dimension::mole_fraction: return "mol%, mole fraction";
    case Dimension::volume_fraction: return "vol%";
  }
  return "";
}

std::string why_refused(std::string_view word) {
  const std::string folded = lower(without_blanks(word));
  if (folded == "%" || folded == "percent") {
    return "a percentage needs its basis";
  }
  if (folded == "area%" || folded == "%area" || folded == "a%") {
    return "area percent of a chromatogram is not a composition: apply response factors first";
  }
  if (folded == "ppmv" || folded == "ppb" || folded == "mg/l" || folded == "g/l") {
    return "a concentration by volume of mixture needs the density of the mixture";
  }
  if (folded == "mpa") {
    return "MPa (mega) and mPa (milli) differ by 1e9: write MPa or Pa";
  }
  return "";
}

}  // namespace stillshed
