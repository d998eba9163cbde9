// Whole surveys (every face located, proved, tested for stability and typed) per family of mixtures: median and 95th
// percentile of one survey, median boxes, and the median as a multiple of one ln gamma call in doubles.
#include <benchmark/benchmark.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <ctime>
#include <filesystem>
#include <string>
#include <vector>

#include "engine/survey.hpp"
#include "params/catalog.hpp"
#include "params/load.hpp"
#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

/// Processor time, so that a busy machine does not blur the percentiles.
double milliseconds_since(std::clock_t start) {
  return 1e3 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC;
}

double percentile(std::vector<double> values, double share) {
  std::sort(values.begin(), values.end());
  return values[static_cast<std::size_t>(share * static_cast<double>(values.size() - 1))];
}

/// One ln gamma call at a new temperature [ms].
double ln_gamma_ms(const Mixture& mixture) {
  const Composition x(mixture.size(), 1.0 / mixture.size());
  constexpr int kCalls = 2000;
  const std::clock_t start = std::clock();
  for (int k = 0; k < kCalls; ++k) {
    benchmark::DoNotOptimize(mixture.ln_gamma(340.0 + 0.01 * k, x));
  }
  return milliseconds_since(start) / kCalls;
}

/// Surveys every mixture once per iteration; timings of all of them make the percentiles.
void survey_all(benchmark::State& state, const std::vector<Mixture>& mixtures) {
  std::vector<double> times_ms;
  std::vector<double> boxes;
  std::vector<double> ratios;
  int incomplete = 0;
  int azeotropes = 0;
  for (auto _ : state) {
    for (const Mixture& mixture : mixtures) {
      const std::clock_t start = std::clock();
      const Survey result = survey(mixture, kAtmosphere_Pa);
      times_ms.push_back(milliseconds_since(start));
      boxes.push_back(static_cast<double>(result.boxes));
      ratios.push_back(times_ms.back() / ln_gamma_ms(mixture));
      azeotropes += static_cast<int>(result.azeotropes.size());
      incomplete += std::any_of(result.faces.begin(), result.faces.end(),
                                [](const FaceProof& face) { return face.status != Status::complete; })
                        ? 1
                        : 0;
    }
  }
  state.counters["median_ms"] = percentile(times_ms, 0.5);
  state.counters["p95_ms"] = percentile(times_ms, 0.95);
  state.counters["max_ms"] = percentile(times_ms, 1.0);
  state.counters["boxes"] = percentile(boxes, 0.5);
  state.counters["boxes_p95"] = percentile(boxes, 0.95);
  state.counters["x_ln_gamma"] = percentile(ratios, 0.5);
  state.counters["not_complete"] = incomplete;
  state.counters["azeotropes"] = azeotropes;
}

void nrtl(benchmark::State& state, int size, int count) {
  std::vector<Mixture> mixtures;
  for (int k = 0; k < count; ++k) {
    testing::Random random(static_cast<std::uint64_t>(1000 + k));
    mixtures.push_back(testing::random_nrtl(random, size));
  }
  survey_all(state, mixtures);
}
BENCHMARK_CAPTURE(nrtl, n3, 3, 200)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(nrtl, n4, 4, 200)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(nrtl, n5, 5, 200)->Iterations(1)->Unit(benchmark::kMillisecond);

void margules(benchmark::State& state, int size, int count) {
  std::vector<Mixture> mixtures;
  for (int k = 0; k < count; ++k) {
    testing::Random random(static_cast<std::uint64_t>(1000 + k));
    mixtures.push_back(testing::random_margules(random, size).mixture);
  }
  survey_all(state, mixtures);
}
BENCHMARK_CAPTURE(margules, n3, 3, 200)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(margules, n5, 5, 200)->Iterations(1)->Unit(benchmark::kMillisecond);

const Catalog& catalog() {
  static const Catalog all(load_parameter_folder(std::filesystem::path(STILLSHED_TEST_DATA).parent_path() / "params"));
  return all;
}

/// Solvents of every laboratory and plant that both group tables cover well.
constexpr std::array<const char*, 18> kEveryday = {
    "acetone",    "methanol",        "ethanol",      "2-propanol",      "water",       "ethyl-acetate",
    "benzene",    "toluene",         "n-hexane",     "n-heptane",       "cyclohexane", "chloroform",
    "2-butanone", "tetrahydrofuran", "acetonitrile", "dichloromethane", "1-butanol",   "methyl-acetate"};

/// Random sets of everyday solvents without gaps in the group table.
std::vector<Mixture> everyday(GroupModel kind, int size, int count) {
  testing::Random random(static_cast<std::uint64_t>(size));
  std::vector<Mixture> mixtures;
  for (int attempt = 0; attempt < 50 * count && static_cast<int>(mixtures.size()) < count; ++attempt) {
    std::vector<std::string> ids;
    while (static_cast<int>(ids.size()) < size) {
      const std::string id = kEveryday[static_cast<std::size_t>(random.below(static_cast<int>(kEveryday.size())))];
      if (std::find(ids.begin(), ids.end(), id) == ids.end()) {
        ids.push_back(id);
      }
    }
    std::vector<MixtureComponent> components;
    std::vector<GroupAssignment> groups;
    bool usable = true;
    for (const std::string& id : ids) {
      const ComponentRecord* record = catalog().by_id(id);
      usable = usable && record != nullptr && catalog().has_groups(kind, id) && !record->pressure_sets.empty();
      if (usable) {
        MixtureComponent component;
        component.id = id;
        component.molar_mass_g_mol = record->molar_mass_g_mol;
        component.pressure = PressureCurve(*choose_pressure_set(*record, 320.0, 390.0).set);
        components.push_back(component);
        groups.push_back(groups_of(*record, kind));
      }
    }
    if (usable && catalog().group_gaps(kind, ids).empty()) {
      mixtures.emplace_back(components, Unifac(catalog().table(kind), groups, ids));
    }
  }
  return mixtures;
}

void group_model(benchmark::State& state, GroupModel kind, int size, int count) {
  survey_all(state, everyday(kind, size, count));
}
BENCHMARK_CAPTURE(group_model, unifac_n3, GroupModel::unifac, 3, 200)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(group_model, unifac_n4, GroupModel::unifac, 4, 100)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(group_model, dortmund_n3, GroupModel::dortmund, 3, 200)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(group_model, dortmund_n4, GroupModel::dortmund, 4, 100)->Iterations(1)->Unit(benchmark::kMillisecond);

/// Twelve components, 4,083 faces, an azeotrope in each; faces of up to three members are proved.
void symmetric(benchmark::State& state, int size) {
  const Mixture mixture = testing::symmetric_mixture(size, 1.2);
  for (auto _ : state) {
    state.counters["azeotropes"] = static_cast<double>(survey(mixture, kAtmosphere_Pa).azeotropes.size());
  }
}
BENCHMARK_CAPTURE(symmetric, n8, 8)->Iterations(1)->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(symmetric, n12, 12)->Iterations(1)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace stillshed

BENCHMARK_MAIN();
