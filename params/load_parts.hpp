/// The readers of the single parameter files, called by load_parameter_folder in the order of kParameterFiles:
/// each may rely on what the files before it gave. Internal to params/: not installed.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>

#include "params/json_reader.hpp"
#include "params/records.hpp"

namespace stillshed {

/// What has been read so far, with the look-ups that links need.
struct Loading {
  Facts facts;
  Problems problems;
  std::map<std::string, std::size_t> component_of_id;
  std::map<std::string, std::string> owner_of_name;  ///< normalised name -> component id
};

void read_sources(const JsonNode& root, Loading& loading);
void read_group_table(const JsonNode& root, GroupModel model, Loading& loading);
void read_components(const JsonNode& root, Loading& loading);
void read_pressure_sets(const JsonNode& root, Loading& loading);
void read_names(const JsonNode& root, Loading& loading);
void read_cautions(const JsonNode& root, Loading& loading);
void read_residual_limits(const JsonNode& root, Loading& loading);
void read_check_values(const JsonNode& root, Loading& loading);
void read_measured_azeotropes(const JsonNode& root, Loading& loading);

/// Reports a format number other than 1.
void read_format(const JsonNode& root, const char* key);
/// A required key of sources.json.
[[nodiscard]] std::string read_source(const JsonNode& node, const Loading& loading);
/// Reports ids that are not in components.json.
void expect_components(const JsonNode& node, const char* key, const std::vector<std::string>& ids,
                       const Loading& loading);
/// Reports hazard flags outside the vocabulary of params/README.md.
void expect_hazards(const JsonNode& node, const char* key, const std::vector<std::string>& flags);
/// The value of a closed set whose to_string spells the key's text; reports anything else.
template <class Enum>
[[nodiscard]] Enum read_word(const JsonNode& node, const char* key, std::initializer_list<Enum> values) {
  const std::string word = node.text(key);
  std::string allowed;
  for (const Enum value : values) {
    if (word == to_string(value)) {
      return value;
    }
    allowed += allowed.empty() ? "" : ", ";
    allowed += to_string(value);
  }
  if (!word.empty()) {
    node.report(key, '"' + word + '"', "one of " + allowed);
  }
  return *values.begin();
}
/// Rows [subgroup, count]; subgroups must be in the table unless it is null.
[[nodiscard]] std::vector<GroupCount> read_group_counts(const JsonNode& rows, const GroupTable* table);

}  // namespace stillshed
