// ln gamma and ln K per model and number type, next to a bare exp. A new temperature in every call.
#include <benchmark/benchmark.h>

#include <cmath>
#include <string>

#include "models/derivatives.hpp"
#include "models/mixture.hpp"
#include "tests/models/sample_models.hpp"

namespace stillshed {
namespace {

Nrtl nrtl_b_only() {
  NrtlParameters p(3);
  p.tau.b_K = samples::nrtl_full().tau.b_K;
  p.alpha = samples::nrtl_full().alpha;
  return Nrtl(p);
}
Nrtl nrtl_no_temperature() {
  NrtlParameters p(3);
  p.tau.a = samples::matrix({{0, 1.2, 0.4}, {0.3, 0, -0.6}, {0.9, 1.1, 0}});
  p.alpha = samples::nrtl_full().alpha;
  return Nrtl(p);
}
Margules margules() {
  return Margules(samples::matrix({{0, 1.2, -0.8}, {1.2, 0, 1.9}, {-0.8, 1.9, 0}}));
}
Unifac unifac(GroupModel kind) {
  return samples::unifac(kind, samples::ethanol_benzene_water());
}

template <class S>
Vec<S> composition(double half_width);
template <>
Vec<double> composition(double /*half_width*/) {
  return {0.3, 0.3, 0.4};
}
template <>
Vec<Interval> composition(double half_width) {
  return {Interval(0.3 - half_width, 0.3 + half_width), Interval(0.3 - half_width, 0.3 + half_width),
          Interval(0.4 - 2.0 * half_width, 0.4 + 2.0 * half_width)};
}

double next_temperature(double T) {
  return T < 360.0 ? T + 0.01 : 340.0;
}

void bare_exp(benchmark::State& state) {
  double x = 0.1;
  for (auto _ : state) {  // independent arguments: throughput, as in the models
    benchmark::DoNotOptimize(std::exp(x));
    x = x < 1.0 ? x + 1e-3 : 0.1;
  }
}
BENCHMARK(bare_exp);

template <class Model>
void value_double(benchmark::State& state, const Model& model) {
  const auto x = composition<double>(0.0);
  double T = 340.0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(model.ln_gamma(T, x));
    T = next_temperature(T);
  }
}
template <class Model>
void value_interval(benchmark::State& state, const Model& model) {
  const auto x = composition<Interval>(0.01);
  double T = 340.0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(model.ln_gamma(Interval(T, T + 1.0), x));
    T = next_temperature(T);
  }
}
template <class S, class Model>
void gradient(benchmark::State& state, const Model& model) {
  const auto x = composition<S>(0.01);
  double T = 340.0;
  LnGammaGradient<S> out;
  for (auto _ : state) {
    model.ln_gamma_with_gradient(S(T), x, out);
    benchmark::DoNotOptimize(out);
    T = next_temperature(T);
  }
}
template <class S, class Model>
void jets(benchmark::State& state, const Model& model) {
  const auto x = composition<S>(0.01);
  double T = 340.0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(
        gradient_by_jets(S(T), x, [&model](const auto& t, const auto& y) { return model.ln_gamma(t, y); }));
    T = next_temperature(T);
  }
}

template <class Model>
void enter(const std::string& name, const Model& model) {
  using benchmark::RegisterBenchmark;
  using benchmark::State;
  RegisterBenchmark((name + "/value/double").c_str(), [=](State& state) { value_double(state, model); });
  RegisterBenchmark((name + "/value/interval").c_str(), [=](State& state) { value_interval(state, model); });
  RegisterBenchmark((name + "/gradient/double").c_str(), [=](State& state) { gradient<double>(state, model); });
  RegisterBenchmark((name + "/gradient/interval").c_str(), [=](State& state) { gradient<Interval>(state, model); });
  RegisterBenchmark((name + "/jets/double").c_str(), [=](State& state) { jets<double>(state, model); });
  RegisterBenchmark((name + "/jets/interval").c_str(), [=](State& state) { jets<Interval>(state, model); });
}

PressureCurve water() {
  return PressureCurve({"water",
                        PressureForm::wagner_25,
                        {-7.86975, 1.90561, -2.30891, -2.06472, 647.1, 22064000.0},
                        273.15,
                        647.1,
                        "",
                        "",
                        false,
                        ""});
}

void pressure_double(benchmark::State& state) {
  const PressureCurve curve = water();
  double T = 340.0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(curve.ln_psat(T));
    T = next_temperature(T);
  }
}
BENCHMARK(pressure_double);
void pressure_interval_with_slope(benchmark::State& state) {
  const PressureCurve curve = water();
  double T = 340.0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(curve.ln_psat(Interval(T, T + 1.0)));
    benchmark::DoNotOptimize(curve.d_ln_psat_dT(Interval(T, T + 1.0)));
    T = next_temperature(T);
  }
}
BENCHMARK(pressure_interval_with_slope);

void enter_all() {
  enter("margules", margules());
  enter("nrtl_constant", nrtl_no_temperature());
  enter("nrtl", nrtl_b_only());
  enter("nrtl_full", Nrtl(samples::nrtl_full()));
  enter("wilson", Wilson(samples::wilson_full()));
  enter("uniquac", Uniquac(samples::uniquac_full()));
  enter("unifac", unifac(GroupModel::unifac));
  enter("dortmund", unifac(GroupModel::dortmund));
}

}  // namespace
}  // namespace stillshed

int main(int argc, char** argv) {
  stillshed::enter_all();
  benchmark::Initialize(&argc, argv);
  benchmark::RunSpecifiedBenchmarks();
}
