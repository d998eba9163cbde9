/// Writer and reader of the compact parameter file: one description of each record (fields) serves both directions.
/// Internal to params/: not installed.
#pragma once

#include <array>
#include <bit>
#include <cstdint>
#include <map>
#include <optional>
#include <stdexcept>
#include <string>
#include <string_view>
#include <type_traits>
#include <utility>
#include <vector>

#include "params/records.hpp"

namespace stillshed {

/// Thrown by the reader inside from_compact when the bytes end early or make no sense.
struct CompactDamage : std::runtime_error {
  using std::runtime_error::runtime_error;
};

class CompactWriter {
 public:
  static constexpr bool kReading = false;
  [[nodiscard]] std::string take() { return std::move(bytes_); }

  void raw(std::uint64_t value, int bytes) {
    for (int k = 0; k < bytes; ++k) {
      bytes_ += static_cast<char>(value >> (8 * k) & 0xff);
    }
  }
  void text(const std::string& value) {
    raw(value.size(), 4);
    bytes_ += value;
  }

 private:
  std::string bytes_;
};

class CompactReader {
 public:
  static constexpr bool kReading = true;
  explicit CompactReader(std::string_view bytes) : bytes_(bytes) {}

  [[nodiscard]] std::uint64_t raw(int bytes) {
    const std::string_view part = next(static_cast<std::size_t>(bytes));
    std::uint64_t value = 0;
    for (int k = 0; k < bytes; ++k) {
      value |= std::uint64_t{static_cast<unsigned char>(part[static_cast<std::size_t>(k)])} << (8 * k);
    }
    return value;
  }
  [[nodiscard]] std::string text() { return std::string(next(size())); }
  /// A length; each element takes at least one byte, so no length exceeds what is left.
  [[nodiscard]] std::size_t size() {
    const auto length = static_cast<std::size_t>(raw(4));
    if (length > bytes_.size()) {
      throw CompactDamage("a length beyond the end");
    }
    return length;
  }
  [[nodiscard]] bool at_end() const { return bytes_.empty(); }

 private:
  std::string_view next(std::size_t count) {
    if (count > bytes_.size()) {
      throw CompactDamage("the end too early");
    }
    const std::string_view part = bytes_.substr(0, count);
    bytes_.remove_prefix(count);
    return part;
  }
  std::string_view bytes_;
};

/// Both directions of one value: reads into it or writes it.
template <class Archive, class T>
void transfer(Archive& archive, T& value);

template <class Archive, class... Ts>
void transfer_all(Archive& archive, Ts&... values) {
  (transfer(archive, values), ...);
}

template <class T>
struct IsOptional : std::false_type {};
template <class T>
struct IsOptional<std::optional<T>> : std::true_type {};
template <class T>
struct IsVector : std::false_type {};
template <class T>
struct IsVector<std::vector<T>> : std::true_type {};
template <class T>
struct IsMap : std::false_type {};
template <class K, class V>
struct IsMap<std::map<K, V>> : std::true_type {};
template <class T>
struct IsArray : std::false_type {};
template <class T, std::size_t N>
struct IsArray<std::array<T, N>> : std::true_type {};
template <class T>
struct IsPair : std::false_type {};
template <class A, class B>
struct IsPair<std::pair<A, B>> : std::true_type {};

/// The fields of each record in declaration order.
template <class A>
void fields(A& a, Sourced& r) {
  transfer_all(a, r.value, r.source, r.note);
}
template <class A>
void fields(A& a, PressureSet& r) {
  transfer_all(a, r.id, r.form, r.coefficients, r.t_min_K, r.t_max_K, r.source, r.where, r.estimated, r.note);
}
template <class A>
void fields(A& a, GroupCount& r) {
  transfer_all(a, r.subgroup, r.count);
}
template <class A>
void fields(A& a, GroupAssignment& r) {
  transfer_all(a, r.groups, r.approximate, r.note, r.alternatives);
}
template <class A>
void fields(A& a, ComponentRecord& r) {
  transfer_all(a, r.id, r.name, r.synonyms, r.cas, r.formula, r.smiles, r.molar_mass_g_mol, r.normal_boiling_point_K,
               r.melting_point_K, r.critical_temperature_K, r.critical_pressure_Pa, r.acentric_factor, r.flash_point_K,
               r.autoignition_K, r.liquid_density_kg_m3, r.liquid_density_T_K, r.heat_of_vaporization_J_mol,
               r.heat_of_vaporization_T_K, r.pressure_sets, r.pressure_grade, r.vapour_dimerizes, r.association_remark,
               r.hazard_flags, r.remarks, r.unifac, r.dortmund);
}
template <class A>
void fields(A& a, Subgroup& r) {
  transfer_all(a, r.id, r.main_group, r.name, r.R, r.Q);
}
template <class A>
void fields(A& a, GroupInteraction& r) {
  transfer_all(a, r.a_K, r.b, r.c_per_K);
}
template <class A>
void fields(A& a, SupersededInteraction& r) {
  transfer_all(a, r.m, r.n, r.mn, r.nm, r.edition);
}
template <class A>
void fields(A& a, TableNote& r) {
  transfer_all(a, r.where, r.note);
}
template <class A>
void fields(A& a, GroupTable& r) {
  transfer_all(a, r.model, r.title, r.combinatorial_exponent, r.main_groups, r.subgroups, r.interactions, r.sources,
               r.recommended_low_K, r.recommended_high_K, r.classes, r.class_texts, r.superseded, r.notes);
}
template <class A>
void fields(A& a, MeasuredAzeotrope& r) {
  transfer_all(a, r.id, r.tier, r.components, r.kind, r.pressure_Pa, r.temperature_K, r.mole_fractions, r.heterogeneous,
               r.source, r.record, r.note, r.source_key, r.printed, r.confidence);
}
template <class A>
void fields(A& a, OtherSubstance& r) {
  transfer_all(a, r.id, r.name, r.cas, r.molar_mass_g_mol);
}
template <class A>
void fields(A& a, AmbiguousName& r) {
  transfer_all(a, r.name, r.choices, r.why);
}
template <class A>
void fields(A& a, CautionRecord& r) {
  transfer_all(a, r.code, r.trigger, r.above_verdict, r.text, r.substances, r.with, r.hazards, r.sources, r.note);
}
template <class A>
void fields(A& a, ResidualLimit& r) {
  transfer_all(a, r.name, r.component, r.cas, r.solvent_class, r.pde_mg_per_day, r.limit_ppm, r.status, r.note,
               r.source);
}
template <class A>
void fields(A& a, CheckAzeotrope& r) {
  transfer_all(a, r.components, r.mole_fractions, r.temperature_K);
}
template <class A>
void fields(A& a, CheckValue& r) {
  transfer_all(a, r.id, r.kind, r.source, r.note, r.expected, r.tolerance, r.relative_tolerance, r.model, r.names,
               r.groups, r.tau, r.alpha, r.superseded_pairs, r.temperature_K, r.mole_fractions, r.component,
               r.pressure_Pa, r.relative_volatility, r.purity, r.case_json, r.azeotropes);
}
template <class A>
void fields(A& a, Source& r) {
  transfer_all(a, r.key, r.citation, r.note);
}
template <class A>
void fields(A& a, Facts& r) {
  transfer_all(a, r.sha256, r.components, r.unifac, r.dortmund, r.measured_azeotropes, r.sources, r.other_substances,
               r.ambiguous_names, r.cautions, r.caution_closing, r.residual_limits, r.check_values);
}

template <class Archive, class Map>
void transfer_map(Archive& archive, Map& map) {
  if constexpr (Archive::kReading) {
    const std::size_t size = archive.size();
    for (std::size_t k = 0; k < size; ++k) {
      typename Map::key_type key{};
      typename Map::mapped_type value{};
      transfer_all(archive, key, value);
      map.emplace_hint(map.end(), std::move(key), std::move(value));
    }
  } else {
    archive.raw(map.size(), 4);
    for (auto& [key, value] : map) {
      auto key_copy = key;
      transfer_all(archive, key_copy, value);
    }
  }
}

template <class Archive, class T>
void transfer_number(Archive& archive, T& value) {
  if constexpr (std::is_same_v<T, double>) {
    if constexpr (Archive::kReading) {
      value = std::bit_cast<double>(archive.raw(8));
    } else {
      archive.raw(std::bit_cast<std::uint64_t>(value), 8);
    }
  } else {
    constexpr int kBytes = std::is_same_v<T, bool> || std::is_same_v<T, char> || std::is_enum_v<T> ? 1 : 4;
    if constexpr (Archive::kReading) {
      value = static_cast<T>(archive.raw(kBytes));
    } else {
      archive.raw(static_cast<std::uint64_t>(value), kBytes);
    }
  }
}

template <class Archive, class T>
void transfer(Archive& archive, T& value) {
  if constexpr (std::is_arithmetic_v<T> || std::is_enum_v<T>) {
    transfer_number(archive, value);
  } else if constexpr (std::is_same_v<T, std::string>) {
    if constexpr (Archive::kReading) {
      value = archive.text();
    } else {
      archive.text(value);
    }
  } else if constexpr (IsOptional<T>::value) {
    bool present = value.has_value();
    transfer(archive, present);
    if constexpr (Archive::kReading) {
      if (present) {
        value.emplace();
      }
    }
    if (present) {
      transfer(archive, *value);
    }
  } else if constexpr (IsVector<T>::value) {
    if constexpr (Archive::kReading) {
      value.resize(archive.size());
    } else {
      archive.raw(value.size(), 4);
    }
    for (auto& element : value) {
      transfer(archive, element);
    }
  } else if constexpr (IsArray<T>::value) {
    for (auto& element : value) {
      transfer(archive, element);
    }
  } else if constexpr (IsPair<T>::value) {
    transfer_all(archive, value.first, value.second);
  } else if constexpr (IsMap<T>::value) {
    transfer_map(archive, value);
  } else {
    fields(archive, value);
  }
}

}  // namespace stillshed
