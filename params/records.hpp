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
};

/// How a component falls apart into groups of one group-contribution table.
struct GroupCount {
  int subgroup = 0;
  int count = 0;
};
struct GroupAssignment {
  std::vector<GroupCount> groups;  ///< empty: no assignment, the model cannot treat this component
  bool approximate = false;
  std::string note;
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
};

enum class GroupModel { unifac, dortmund };
[[nodiscard]] const char* to_string(GroupModel model);  ///< "unifac", "unifac-dortmund"

struct Subgroup {
  int id = 0;
  int main_group = 0;
  std::string name;
  double R = 0.0;
  double Q = 0.0;
};

/// psi_mn = exp(-(a + b T + c T^2)/T), T in K, for the ordered pair of main groups m -> n.
struct GroupInteraction {
  double a_K = 0.0;
  double b = 0.0;
  double c_per_K = 0.0;
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
};

enum class AzeotropeKind { none, minimum, maximum, saddle, heterogeneous_minimum };
[[nodiscard]] const char* to_string(AzeotropeKind kind);

/// One measured azeotrope, or a measured statement that there is none (kind none).
struct MeasuredAzeotrope {
  std::string id;
  char tier = 'C';                      ///< A read in print, B/C from memory, D doubtful
  std::vector<std::string> components;  ///< component ids
  AzeotropeKind kind = AzeotropeKind::none;
  double pressure_Pa = 101325.0;
  std::optional<double> temperature_K;
  std::vector<double> mole_fractions;  ///< same order as components; empty when not given
  bool heterogeneous = false;
  std::string source;  ///< citation text
  std::string record;  ///< "read in print (...)" or "from memory"
  std::string note;
};

struct Source {
  std::string key;
  std::string citation;
  std::string note;
};

/// Everything on file.
struct Facts {
  std::vector<ComponentRecord> components;
  GroupTable unifac;
  GroupTable dortmund;
  std::vector<MeasuredAzeotrope> measured_azeotropes;
  std::map<std::string, Source> sources;
  /// Names that mean several substances: lower-case name -> component ids to choose from.
  std::map<std::string, std::vector<std::string>> ambiguous_names;
  std::string sha256;  ///< of the parameter files these facts were read from
};

}  // namespace stillshed
