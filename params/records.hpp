/// Plain records of the facts the program carries: one struct per kind, units in field names.
///
/// Numbers stand as published; the only conversions (to K and Pa) happen once, in params/load.cpp.
/// Nothing here knows about JSON. See params/README.md for the file formats.
#pragma once

#include <array>
#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace stillshed {

/// A number with the place it came from.
struct Sourced {
  double value = 0.0;
  std::string source;  ///< key in sources.json
  std::string note;
  friend bool operator==(const Sourced&, const Sourced&) = default;
};

/// Vapour-pressure equations, T in K, P in Pa (formulas in models/vapour_pressure.hpp).
enum class PressureForm {
  antoine_log10,       ///< coefficients A, B, C
  wagner_25,           ///< a, b, c, d, Tc_K, Pc_Pa
  wagner_36,           ///< a, b, c, d, Tc_K, Pc_Pa
  wagner_water,        ///< a1..a6, Tc_K, Pc_Pa
  perry_101,           ///< C1..C5
  clausius_clapeyron,  ///< boiling_point_K (at 101325 Pa), H_K: ln(P/101325) = H (1/Tb - 1/T)
};
[[nodiscard]] const char* to_string(PressureForm form);

/// One published vapour-pressure correlation.
struct PressureSet {
  std::string id;  ///< e.g. "water/wagner-water/wagner-pruss-1993"; "user" for a user's own
  PressureForm form = PressureForm::antoine_log10;
  std::array<double, 8> coefficients{};  ///< in the order listed at PressureForm
  std::optional<double> t_min_K;         ///< empty: valid everywhere (a user's own formula)
  std::optional<double> t_max_K;
  std::string source;  ///< key in sources.json
  std::string where;   ///< table or equation in the source
  bool estimated = false;
  std::string note;
  friend bool operator==(const PressureSet&, const PressureSet&) = default;
};

/// How a component falls apart into groups of one group-contribution table.
struct GroupCount {
  int subgroup = 0;
  int count = 0;
  friend bool operator==(const GroupCount&, const GroupCount&) = default;
};
struct GroupAssignment {
  std::vector<GroupCount> groups;  ///< empty: no assignment, the model cannot treat this component
  bool approximate = false;
  std::string note;
  std::vector<std::vector<GroupCount>> alternatives;  ///< other assignments with the same atoms; not used by default
  friend bool operator==(const GroupAssignment&, const GroupAssignment&) = default;
};

/// One pure liquid.
struct ComponentRecord {
  std::string id;
  std::string name;
  std::vector<std::string> synonyms;
  std::string cas;
  std::string formula;
  std::string smiles;
  double molar_mass_g_mol = 0.0;
  std::optional<Sourced> normal_boiling_point_K;
  std::optional<Sourced> melting_point_K;
  std::optional<Sourced> critical_temperature_K;
  std::optional<Sourced> critical_pressure_Pa;
  std::optional<Sourced> acentric_factor;
  std::optional<Sourced> flash_point_K;
  std::optional<Sourced> autoignition_K;
  std::optional<Sourced> liquid_density_kg_m3;  ///< at liquid_density_T_K
  std::optional<double> liquid_density_T_K;
  std::optional<Sourced> heat_of_vaporization_J_mol;  ///< at heat_of_vaporization_T_K
  std::optional<double> heat_of_vaporization_T_K;
  std::vector<PressureSet> pressure_sets;  ///< best first
  char pressure_grade = '-';               ///< 'A'..'E', '-' when there is no set
  bool vapour_dimerizes = false;
  std::string association_remark;
  std::vector<std::string> hazard_flags;
  std::string remarks;
  GroupAssignment unifac;    ///< original UNIFAC
  GroupAssignment dortmund;  ///< modified UNIFAC (Dortmund)
  friend bool operator==(const ComponentRecord&, const ComponentRecord&) = default;
};

enum class GroupModel { unifac, dortmund };
[[nodiscard]] const char* to_string(GroupModel model);  ///< "unifac", "unifac-dortmund"

struct Subgroup {
  int id = 0;
  int main_group = 0;
  std::string name;
  double R = 0.0;
  double Q = 0.0;
  friend bool operator==(const Subgroup&, const Subgroup&) = default;
};

/// psi_mn = exp(-(a + b T + c T^2)/T), T in K, for the ordered pair of main groups m -> n.
struct GroupInteraction {
  double a_K = 0.0;
  double b = 0.0;
  double c_per_K = 0.0;
  friend bool operator==(const GroupInteraction&, const GroupInteraction&) = default;
};

/// An earlier published value of a pair, kept to reproduce older worked examples.
struct SupersededInteraction {
  int m = 0;
  int n = 0;
  GroupInteraction mn;
  GroupInteraction nm;
  std::string edition;  ///< until when it stood
  friend bool operator==(const SupersededInteraction&, const SupersededInteraction&) = default;
};

/// A doubt about a published value, or how it is read.
struct TableNote {
  std::string where;
  std::string note;
  friend bool operator==(const TableNote&, const TableNote&) = default;
};

/// One published group-contribution table. A pair that is absent has no parameters: never zero.
struct GroupTable {
  GroupModel model = GroupModel::unifac;
  std::string title;
  double combinatorial_exponent = 1.0;  ///< 1 (original) or 3/4 (Dortmund)
  std::map<int, std::string> main_groups;
  std::map<int, Subgroup> subgroups;
  std::map<std::pair<int, int>, GroupInteraction> interactions;  ///< key (m, n), both orders stored, m != n
  std::vector<std::string> sources;
  std::optional<double> recommended_low_K;  ///< empty: no range recommended
  std::optional<double> recommended_high_K;
  std::map<std::pair<int, int>, int> classes;  ///< key (m, n), m < n: when the value was published, see class_texts
  std::map<int, std::string> class_texts;
  std::vector<SupersededInteraction> superseded;
  std::vector<TableNote> notes;
  friend bool operator==(const GroupTable&, const GroupTable&) = default;
};

enum class AzeotropeKind { none, minimum, maximum, saddle, heterogeneous_minimum };
[[nodiscard]] const char* to_string(AzeotropeKind kind);

/// One measured azeotrope, or a measured statement that there is none (kind none).
struct MeasuredAzeotrope {
  std::string id;
  char tier = 'C';                      ///< A read in print, B/C from memory, D doubtful
  std::vector<std::string> components;  ///< component ids, or ids of Facts::other_substances
  AzeotropeKind kind = AzeotropeKind::none;
  double pressure_Pa = 0.0;  ///< 0: not stated (isothermal measurement)
  std::optional<double> temperature_K;
  std::vector<double> mole_fractions;  ///< same order as components; empty when not given
  bool heterogeneous = false;
  std::string source;  ///< citation text
  std::string record;  ///< "read in print" or "from memory"
  std::string note;
  std::string source_key;  ///< key in sources.json
  std::string printed;     ///< the value as printed, e.g. "95.5 wt% ethanol"
  std::string confidence;  ///< of the memory: "high" or "medium"; empty when read in print
  friend bool operator==(const MeasuredAzeotrope&, const MeasuredAzeotrope&) = default;
};

/// A substance that measured azeotropes name and that has no component record.
struct OtherSubstance {
  std::string id;
  std::string name;
  std::string cas;
  double molar_mass_g_mol = 0.0;
  friend bool operator==(const OtherSubstance&, const OtherSubstance&) = default;
};

/// A name in use for several substances, or for none that is pure: refused, with the choices.
struct AmbiguousName {
  std::string name;                  ///< as people write it
  std::vector<std::string> choices;  ///< component ids
  std::string why;
  friend bool operator==(const AmbiguousName&, const AmbiguousName&) = default;
};

/// What brings a caution up. The caller knows the case; the record only names the condition.
enum class CautionTrigger {
  always,
  substance,     ///< one of `substances` or a component with one of `hazards` is in the feed or added
  hazard,        ///< the same, by hazard flag alone
  pair,          ///< one of `substances` together with one of `with`
  declared,      ///< the user declares the history named in `note` (and one of `substances` is present)
  near_dry,      ///< recovery above 95 % of the charge, or residue below 5 %
  unknowns,      ///< unknown components above 1 %, or history unknown
  low_ignition,  ///< as substance: autoignition to be compared with heated surfaces
  flash_point,   ///< a flash point below the working temperature
  region,        ///< the user's legal region, in `note`
  use,           ///< the intended use, in `note`
  pressure,      ///< pressure above 1 bar
  vacuum,        ///< pressure below 1 bar
  two_liquids,   ///< the feed or the pot splits
  extrapolated,  ///< the model is used outside its data
};
[[nodiscard]] const char* to_string(CautionTrigger trigger);

struct CautionRecord {
  std::string code;  ///< "C1".."C24"; several records may share a code
  CautionTrigger trigger = CautionTrigger::always;
  bool above_verdict = false;  ///< printed above the verdict, never collapsed
  std::string text;
  std::vector<std::string> substances;  ///< component ids
  std::vector<std::string> with;        ///< component ids, trigger `pair`
  std::vector<std::string> hazards;     ///< hazard flags
  std::vector<std::string> sources;     ///< keys in sources.json
  std::string note;
  friend bool operator==(const CautionRecord&, const CautionRecord&) = default;
};

/// Limit of a residual solvent in medicines (ICH Q3C).
struct ResidualLimit {
  std::string name;
  std::string component;  ///< component id; empty: not on file
  std::string cas;
  std::string solvent_class;  ///< "1", "2", "3" or "no adequate data"
  std::optional<double> pde_mg_per_day;
  std::optional<double> limit_ppm;  ///< option 1
  std::string status;               ///< how the row was checked
  std::string note;
  std::string source;  ///< key in sources.json
  friend bool operator==(const ResidualLimit&, const ResidualLimit&) = default;
};

/// A published or closed-form value that the program recomputes on the user's machine.
enum class CheckKind { activity, boiling_point, fenske, azeotropes };
[[nodiscard]] const char* to_string(CheckKind kind);

struct CheckAzeotrope {
  std::vector<std::string> components;
  std::vector<double> mole_fractions;
  double temperature_K = 0.0;
  friend bool operator==(const CheckAzeotrope&, const CheckAzeotrope&) = default;
};

struct CheckValue {
  std::string id;
  CheckKind kind = CheckKind::activity;
  std::string source;  ///< key in sources.json
  std::string note;
  std::vector<double> expected;  ///< gammas; boiling point [K]; stages
  double tolerance = 0.0;        ///< absolute, in the unit of `expected` (mole fraction and K for azeotropes)
  double relative_tolerance = 0.0;
  // activity
  std::string model;  ///< "unifac", "unifac-dortmund" or "nrtl"
  std::vector<std::string> names;
  std::vector<std::vector<GroupCount>> groups;
  std::vector<std::vector<double>> tau;               ///< NRTL, row i = component i
  std::vector<std::vector<double>> alpha;             ///< NRTL
  std::vector<std::pair<int, int>> superseded_pairs;  ///< of main groups: take the value from GroupTable::superseded
  double temperature_K = 0.0;
  std::vector<double> mole_fractions;
  // boiling_point
  std::string component;
  double pressure_Pa = 0.0;
  // fenske: stages at total reflux for a symmetrical split, N = ln[(p/(1-p))^2] / ln(relative volatility)
  double relative_volatility = 0.0;
  double purity = 0.0;
  // azeotropes
  std::string case_json;  ///< a case file; its survey must find exactly these
  std::vector<CheckAzeotrope> azeotropes;
  friend bool operator==(const CheckValue&, const CheckValue&) = default;
};

struct Source {
  std::string key;
  std::string citation;
  std::string note;
  friend bool operator==(const Source&, const Source&) = default;
};

/// Everything on file.
struct Facts {
  std::vector<ComponentRecord> components;
  GroupTable unifac;
  GroupTable dortmund;
  std::vector<MeasuredAzeotrope> measured_azeotropes;
  std::map<std::string, Source> sources;
  std::vector<OtherSubstance> other_substances;
  /// Normalised name (params/catalog.hpp) -> what it may mean.
  std::map<std::string, AmbiguousName> ambiguous_names;
  std::vector<CautionRecord> cautions;
  std::string caution_closing;  ///< the sentence that ends every list of cautions
  std::vector<ResidualLimit> residual_limits;
  std::vector<CheckValue> check_values;
  std::string sha256;  ///< of the parameter files these facts were read from
  friend bool operator==(const Facts&, const Facts&) = default;
};

}  // namespace stillshed
