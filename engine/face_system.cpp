#include "engine/face_system.hpp"

#include <cmath>

namespace stillshed {

FaceSystem::FaceSystem(const Mixture& face, double pressure_Pa) : face_(face), ln_pressure_(std::log(pressure_Pa)) {}

void FaceSystem::evaluate(const Composition& x, double temperature_K, int dependent, SmallVector& f,
                          SmallMatrix& jacobian) const {
  const int n = size();
  LnGammaGradient<double> gradient;
  face_.ln_k_with_gradient(temperature_K, x, ln_pressure_, gradient);
  f.resize(n);
  jacobian.resize(n, n);
  for (int i = 0; i < n; ++i) {
    f[i] = gradient.value[i];
    for (int c = 0; c + 1 < n; ++c) {
      jacobian(i, c) = gradient.d_dx(i, member_of_unknown(c, dependent)) - gradient.d_dx(i, dependent);
    }
    jacobian(i, n - 1) = gradient.d_dT[i];
  }
}

}  // namespace stillshed
