// Bubble point and tangent-plane test: what one call costs.
#include <benchmark/benchmark.h>

#include "engine/bubble_point.hpp"
#include "engine/stability.hpp"
#include "engine/stability_proof.hpp"
#include "tests/models/sample_models.hpp"
#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

const std::vector<double> kTernary_K = {351.4, 353.2, 373.1};
const Composition kX3{0.8, 0.1, 0.1};

Mixture margules3() {
  return testing::symmetric_mixture(3, 2.6);
}
Mixture nrtl3() {
  return testing::simple_mixture(kTernary_K, Nrtl(samples::nrtl_full()));
}
Mixture nrtl4() {
  return testing::simple_mixture({351.4, 353.2, 373.1, 340.0}, Nrtl(samples::nrtl_constant()));
}
Mixture dortmund3() {
  return testing::simple_mixture(kTernary_K, samples::unifac(GroupModel::dortmund, samples::ethanol_benzene_water()));
}

void bubble(benchmark::State& state, const Mixture& mixture) {
  const double exact_K = bubble_point(mixture, kX3, testing::kAtmosphere_Pa).temperature_K;
  for (auto _ : state) {
    benchmark::DoNotOptimize(bubble_point(mixture, kX3, testing::kAtmosphere_Pa, exact_K + 0.05));
  }
}

void search(benchmark::State& state, const Mixture& mixture, const Composition& x) {
  StabilityOptions options;
  options.proof_up_to = 0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(test_stability(mixture, 340.0, x, options));
  }
}

void proof(benchmark::State& state, const Mixture& mixture, const Composition& x) {
  std::int64_t boxes = 0;
  for (auto _ : state) {
    boxes = prove_stable(mixture, 340.0, x, 100'000).boxes;
  }
  state.counters["boxes"] = static_cast<double>(boxes);
}

const Composition kMiddle{1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0};
const Composition kX4{0.3, 0.3, 0.2, 0.2};

BENCHMARK_CAPTURE(bubble, nrtl3, nrtl3());
BENCHMARK_CAPTURE(bubble, dortmund3, dortmund3());
BENCHMARK_CAPTURE(search, margules3, margules3(), kMiddle);
BENCHMARK_CAPTURE(search, nrtl3, nrtl3(), kX3);
BENCHMARK_CAPTURE(search, dortmund3, dortmund3(), kX3);
BENCHMARK_CAPTURE(search, nrtl4, nrtl4(), kX4);
BENCHMARK_CAPTURE(proof, margules3, margules3(), kMiddle)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(proof, nrtl3, nrtl3(), kX3)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(proof, dortmund3, dortmund3(), kX3)->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(proof, nrtl4, nrtl4(), kX4)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace stillshed

BENCHMARK_MAIN();
