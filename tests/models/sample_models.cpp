#include "tests/models/sample_models.hpp"

#include <array>
#include <fstream>
#include <nlohmann/json.hpp>

namespace stillshed::samples {

Matrix<double> matrix(const std::vector<std::vector<double>>& rows) {
  Matrix<double> result(static_cast<int>(rows.size()));
  for (int i = 0; i < result.size(); ++i) {
    for (int j = 0; j < result.size(); ++j) {
      result(i, j) = rows[static_cast<std::size_t>(i)][static_cast<std::size_t>(j)];
    }
  }
  return result;
}

NrtlParameters nrtl_full() {
  NrtlParameters p(3);
  p.tau.a = matrix({{0, 0.31, -0.42}, {-0.55, 0, 1.1}, {0.77, -0.2, 0}});
  p.tau.b_K = matrix({{0, 310.0, 650.0}, {420.0, 0, -120.0}, {-240.0, 880.0, 0}});
  p.tau.e = matrix({{0, 0.02, -0.05}, {0.03, 0, 0.01}, {-0.04, 0.06, 0}});
  p.tau.f_per_K = matrix({{0, 1e-4, -2e-4}, {3e-4, 0, 0}, {0, 5e-4, 0}});
  p.alpha = matrix({{0, 0.3, 0.47}, {0.3, 0, 0.25}, {0.47, 0.25, 0}});
  p.alpha_per_K = matrix({{0, 1e-4, 0}, {1e-4, 0, -2e-4}, {0, -2e-4, 0}});
  return p;
}

NrtlParameters nrtl_constant() {
  NrtlParameters p(4);
  p.tau.a = matrix({{0, 1.2, 0.4, 2.1}, {0.3, 0, -0.6, 1.7}, {0.9, 1.1, 0, 0.2}, {2.8, 0.1, 0.5, 0}});
  p.alpha = matrix({{0, 0.3, 0.2, 0.4}, {0.3, 0, 0.3, 0.47}, {0.2, 0.3, 0, 0.3}, {0.4, 0.47, 0.3, 0}});
  return p;
}

PairParameters wilson_full() {
  PairParameters p(3);
  p.a = matrix({{0, -0.4, 0.2}, {0.35, 0, -0.8}, {0.1, 0.6, 0}});
  p.b_K = matrix({{0, -150.0, 90.0}, {-420.0, 0, -310.0}, {60.0, -260.0, 0}});
  p.e = matrix({{0, 0.03, -0.02}, {0.01, 0, 0.05}, {-0.03, 0.02, 0}});
  p.f_per_K = matrix({{0, 2e-4, -1e-4}, {1e-4, 0, 3e-4}, {0, -2e-4, 0}});
  return p;
}

UniquacParameters uniquac_full() {
  UniquacParameters p;
  p.r = {2.1055, 0.92, 3.1878};
  p.q = {1.972, 1.4, 2.4};
  p.q_residual = {0.92, 1.0, 2.4};
  p.ln_tau = wilson_full();
  return p;
}

const GroupTable& group_table(GroupModel model) {
  static const std::array<GroupTable, 2> tables = [] {
    std::array<GroupTable, 2> result;
    std::ifstream file(STILLSHED_TEST_DATA "/reference/activity_vectors.json");
    const auto json = nlohmann::json::parse(file);
    for (const GroupModel kind : {GroupModel::unifac, GroupModel::dortmund}) {
      const auto& source = json.at("tables").at(to_string(kind));
      GroupTable& table = result[static_cast<std::size_t>(kind)];
      table.model = kind;
      table.combinatorial_exponent = source.at("combinatorial_exponent");
      for (const auto& main : source.at("main_groups")) {
        table.main_groups[main[0]] = main[1];
      }
      for (const auto& s : source.at("subgroups")) {
        table.subgroups[s[0]] = {s[0], s[1], s[2], s[3], s[4]};
      }
      for (const auto& p : source.at("interactions")) {
        table.interactions[{p[0], p[1]}] = {p[2], p[3], p[4]};
        table.interactions[{p[1], p[0]}] = {p[5], p[6], p[7]};
      }
    }
    return result;
  }();
  return tables[static_cast<std::size_t>(model)];
}

GroupAssignment groups(const std::vector<GroupCount>& counts) {
  GroupAssignment result;
  result.groups = counts;
  return result;
}

GroupMixture ethanol_benzene_water() {
  return {{"ethanol", "benzene", "water"}, {groups({{1, 1}, {2, 1}, {14, 1}}), groups({{9, 6}}), groups({{16, 1}})}};
}

Unifac unifac(GroupModel model, const GroupMixture& mixture) {
  return {group_table(model), mixture.groups, mixture.names};
}

}  // namespace stillshed::samples
