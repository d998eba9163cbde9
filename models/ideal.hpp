/// The ideal liquid: ln gamma_i = 0.
#pragma once

#include "models/gradient.hpp"
#include "models/scalar.hpp"

namespace stillshed {

class Ideal {
 public:
  Ideal() = default;
  explicit Ideal(int size) : size_(size) {}
  [[nodiscard]] int size() const { return size_; }
  [[nodiscard]] bool depends_on_temperature() const { return false; }
  [[nodiscard]] Ideal face(const Members& members) const { return Ideal(members.size()); }

  template <class S>
  [[nodiscard]] Vec<S> ln_gamma(const S& /*temperature_K*/, const Vec<S>& x) const {
    return Vec<S>(x.size(), S(0.0));
  }
  template <class S>
  void ln_gamma_with_gradient(const S& /*temperature_K*/, const Vec<S>& x, LnGammaGradient<S>& out) const {
    out.value = Vec<S>(x.size(), S(0.0));
    out.d_dx = Matrix<S>(x.size(), S(0.0));
    out.d_dT = Vec<S>(x.size(), S(0.0));
  }

 private:
  int size_ = 0;
};

}  // namespace stillshed
