/// Models with every kind of parameter switched on, shared by the tests of this folder.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "models/activity.hpp"
#include "params/records.hpp"

namespace stillshed::samples {

[[nodiscard]] Matrix<double> matrix(const std::vector<std::vector<double>>& rows);

/// Ternary with a, b, e, f and alpha c, d.
[[nodiscard]] NrtlParameters nrtl_full();
/// Quaternary, nothing depends on temperature.
[[nodiscard]] NrtlParameters nrtl_constant();
[[nodiscard]] PairParameters wilson_full();
[[nodiscard]] UniquacParameters uniquac_full();

/// The group tables and assignments carried with the reference vectors (tests/reference/activity_vectors.json).
[[nodiscard]] const GroupTable& group_table(GroupModel model);
[[nodiscard]] GroupAssignment groups(const std::vector<GroupCount>& counts);
struct GroupMixture {
  std::vector<std::string> names;
  std::vector<GroupAssignment> groups;
};
[[nodiscard]] GroupMixture ethanol_benzene_water();  ///< the same group numbers in both tables
[[nodiscard]] Unifac unifac(GroupModel model, const GroupMixture& mixture);

}  // namespace stillshed::samples
