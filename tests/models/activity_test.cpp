// Published and independently computed activity coefficients (tests/reference/activity_vectors.json), every model.
#include "models/activity.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <fstream>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

#include "tests/models/sample_models.hpp"

namespace stillshed {
namespace {

using Json = nlohmann::json;

const Json& vectors() {
  static const Json json = [] {
    std::ifstream file(STILLSHED_TEST_DATA "/reference/activity_vectors.json");
    return Json::parse(file);
  }();
  return json;
}

Matrix<double> matrix_of(const Json& item, const char* key, int n) {
  return item.contains(key) ? samples::matrix(item.at(key).get<std::vector<std::vector<double>>>()) : Matrix<double>(n);
}

Composition composition_of(const Json& item) {
  Composition x;
  for (const auto& value : item) {
    x.push_back(value.get<double>());
  }
  return x;
}

Matrix<double> logarithms(Matrix<double> m) {
  for (int i = 0; i < m.size(); ++i) {
    for (int j = 0; j < m.size(); ++j) {
      m(i, j) = std::log(m(i, j));
    }
  }
  return m;
}

Unifac unifac_of(const Json& item, GroupModel kind) {
  samples::GroupMixture mixture;
  for (const auto& component : item.at("components")) {
    GroupAssignment assignment;
    for (const auto& group : component.at("groups")) {
      assignment.groups.push_back({group[0], group[1]});
    }
    mixture.names.push_back(component.at("name"));
    mixture.groups.push_back(assignment);
  }
  GroupTable table = samples::group_table(kind);
  if (item.contains("interactions_replaced")) {
    for (const auto& p : item.at("interactions_replaced")) {
      table.interactions[{p[0], p[1]}] = {p[2], p[3], p[4]};
      table.interactions[{p[1], p[0]}] = {p[5], p[6], p[7]};
    }
  }
  return {table, mixture.groups, mixture.names};
}

ActivityModel model_of(const Json& item) {
  const std::string kind = item.at("model");
  if (kind == "unifac" || kind == "unifac-dortmund") {
    return unifac_of(item, kind == "unifac" ? GroupModel::unifac : GroupModel::dortmund);
  }
  const int n = static_cast<int>(item.at("x").size());
  if (kind == "nrtl") {
    NrtlParameters p(n);
    p.tau.a = matrix_of(item, "a", n);
    p.tau.b_K = matrix_of(item, "b_K", n);
    p.tau.e = matrix_of(item, "e", n);
    p.tau.f_per_K = matrix_of(item, "f_per_K", n);
    p.alpha = matrix_of(item, "alpha", n);
    p.alpha_per_K = matrix_of(item, "alpha_per_K", n);
    if (item.contains("energies_cal_mol")) {  // tau_ij = energy / (R T)
      const auto energy = matrix_of(item, "energies_cal_mol", n);
      for (int i = 0; i < n; ++i) {
        for (int j = 0; j < n; ++j) {
          p.tau.b_K(i, j) = energy(i, j) / item.at("R_cal_mol_K").get<double>();
        }
      }
    }
    return Nrtl(p);
  }
  if (kind == "wilson") {
    PairParameters p(n);
    if (item.contains("lambda")) {
      p.a = logarithms(matrix_of(item, "lambda", n));
    } else {  // Lambda_ij = (V_j / V_i) exp(-energy_ij / (R T))
      const auto energy = matrix_of(item, "energies_cal_mol", n);
      const auto volumes = item.at("molar_volumes_cm3_mol").get<std::vector<double>>();
      for (int i = 0; i < n; ++i) {
        for (int j = 0; j < n; ++j) {
          p.a(i, j) = std::log(volumes[static_cast<std::size_t>(j)] / volumes[static_cast<std::size_t>(i)]);
          p.b_K(i, j) = -energy(i, j) / item.at("R_cal_mol_K").get<double>();
        }
      }
    }
    return Wilson(p);
  }
  EXPECT_EQ(kind, "uniquac");
  UniquacParameters p;
  p.r = composition_of(item.at("r"));
  p.q = composition_of(item.at("q"));
  p.ln_tau = PairParameters(n);
  p.ln_tau.a = logarithms(matrix_of(item, "tau", n));
  return Uniquac(p);
}

LnGammaGradient<double> evaluate(const ActivityModel& model, double T, const Composition& x) {
  LnGammaGradient<double> out;
  std::visit([&](const auto& m) { m.ln_gamma_with_gradient(T, x, out); }, model);
  return out;
}

double tolerance(const Json& item, int i, double value) {
  return item.contains("tolerance") ? item.at("tolerance")[static_cast<std::size_t>(i)].get<double>()
                                    : item.at("relative_tolerance").get<double>() * std::abs(value);
}

void check_gradient(const Json& item, const LnGammaGradient<double>& result, int n) {
  const double relative = item.at("relative_tolerance");
  const auto slopes = item.at("d_ln_gamma_dT").get<std::vector<double>>();
  const auto rows = item.at("d_ln_gamma_dn").get<std::vector<std::vector<double>>>();
  for (int i = 0; i < n; ++i) {
    const auto at = static_cast<std::size_t>(i);
    EXPECT_NEAR(result.d_dT[i], slopes[at], relative * (1e-3 + std::abs(slopes[at])));
    for (int j = 0; j < n; ++j) {  // only differences within a row are defined (models/gradient.hpp)
      const double expected = rows[at][static_cast<std::size_t>(j)] - rows[at][0];
      EXPECT_NEAR(result.d_dx(i, j) - result.d_dx(i, 0), expected,
                  relative * (1.0 + std::abs(rows[at][0]) + std::abs(expected)));
    }
  }
}

void check_parts(const Json& item, const Unifac& model, double T, const Composition& x) {
  const auto size = model.combinatorial(x);
  const auto rest = model.residual(T, x);
  for (int i = 0; i < x.size(); ++i) {
    const auto at = static_cast<std::size_t>(i);
    EXPECT_NEAR(size[i], item.at("ln_gamma_combinatorial")[at].get<double>(), 1e-12);
    EXPECT_NEAR(rest[i], item.at("ln_gamma_residual")[at].get<double>(), 1e-11);
  }
}

TEST(Activity, ReproducesReferenceVectors) {
  int reproductions = 0;
  for (const auto& item : vectors().at("cases")) {
    SCOPED_TRACE(item.at("id").get<std::string>());
    ASSERT_FALSE(item.at("source").get<std::string>().empty());
    const double T = item.at("T_K");
    if (item.contains("gamma_infinite_dilution")) {
      continue;
    }
    const ActivityModel model = model_of(item);
    const Composition x = composition_of(item.at("x"));
    const auto result = evaluate(model, T, x);
    for (int i = 0; i < x.size(); ++i) {
      const double expected = item.at("gamma")[static_cast<std::size_t>(i)];
      EXPECT_NEAR(std::exp(result.value[i]), expected, tolerance(item, i, expected)) << "gamma of component " << i;
    }
    if (item.contains("d_ln_gamma_dn")) {
      check_gradient(item, result, x.size());
    }
    if (item.contains("ln_gamma_combinatorial")) {
      check_parts(item, std::get<Unifac>(model), T, x);
    }
    reproductions += item.at("kind") == "reproduction" ? 1 : 0;
  }
  EXPECT_GE(reproductions, 19);
}

TEST(Activity, InfiniteDilutionComesOutDirectly) {
  int seen = 0;
  for (const auto& item : vectors().at("cases")) {
    if (!item.contains("gamma_infinite_dilution")) {
      continue;
    }
    SCOPED_TRACE(item.at("id").get<std::string>());
    const ActivityModel model = model_of(item);
    for (int i = 0; i < 2; ++i) {
      const Composition x = composition_of(i == 0 ? Json{0.0, 1.0} : Json{1.0, 0.0});
      const double expected = item.at("gamma_infinite_dilution")[static_cast<std::size_t>(i)];
      EXPECT_NEAR(std::exp(evaluate(model, item.at("T_K"), x).value[i]), expected, tolerance(item, i, expected));
    }
    ++seen;
  }
  EXPECT_GE(seen, 4);
}

TEST(Activity, WalasExampleIsStillOffInPrint) {
  // Recorded with a wider tolerance because the printed value is not met. Should it ever be met, say so in the file.
  for (const auto& item : vectors().at("cases")) {
    if (item.at("id") == "walas-4-14") {
      const auto result = evaluate(model_of(item), item.at("T_K"), composition_of(item.at("x")));
      EXPECT_GT(std::abs(std::exp(result.value[1]) - item.at("gamma")[1].get<double>()), 1e-3);
      EXPECT_FALSE(item.at("within_printed_digits").get<bool>());
      return;
    }
  }
  FAIL() << "walas-4-14 is missing";
}

}  // namespace
}  // namespace stillshed
