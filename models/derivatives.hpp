/// Value and gradient of a function of temperature and composition through Jets, four directions at a time.
///
///   gradient_by_jets(T, x, f)    f: (const J& T, const Vec<J>& x) -> Vec<J>,  J = ceres::Jet<S, 4>
///
/// Run-time n needs no Jet of run-time width: the n + 1 variables are taken in chunks of kJetWidth. Exact, and slower
/// than the analytic gradients of the models (models/gradient.hpp), which it checks in the tests.
/// Numbers   S = double or Interval.
#pragma once

#include <ceres/jet.h>

#include "models/gradient.hpp"
#include "models/jet_interval.hpp"

namespace stillshed {

inline constexpr int kJetWidth = 4;

template <class S, class Function>
[[nodiscard]] LnGammaGradient<S> gradient_by_jets(const S& temperature_K, const Vec<S>& x, const Function& f) {
  using Jet = ceres::Jet<S, kJetWidth>;
  const int n = x.size();
  LnGammaGradient<S> result;
  result.value = Vec<S>(n);
  result.d_dx = Matrix<S>(n);
  result.d_dT = Vec<S>(n);
  for (int first = 0; first <= n; first += kJetWidth) {  // variable n is the temperature
    Vec<Jet> jets(n);
    for (int i = 0; i < n; ++i) {
      jets[i] = Jet(x[i]);
      if (first <= i && i < first + kJetWidth) {
        jets[i].v[i - first] = S(1.0);
      }
    }
    Jet T(temperature_K);
    if (first <= n && n < first + kJetWidth) {
      T.v[n - first] = S(1.0);
    }
    const Vec<Jet> values = f(T, jets);
    for (int i = 0; i < n; ++i) {
      result.value[i] = values[i].a;
      for (int k = 0; k < kJetWidth && first + k <= n; ++k) {
        (first + k < n ? result.d_dx(i, first + k) : result.d_dT[i]) = values[i].v[k];
      }
    }
  }
  return result;
}

}  // namespace stillshed
