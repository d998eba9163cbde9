#include "models/mixture.hpp"

#include <cmath>
#include <utility>

namespace stillshed {

Mixture::Mixture(std::vector<MixtureComponent> components, ActivityModel activity,
                 std::optional<RedlichKister> correction)
    : components_(std::move(components)), activity_(std::move(activity)), correction_(std::move(correction)) {
  expects(size() >= 1 && size() <= kMaxComponents, "Mixture: 1 to 12 components");
  const int modelled = std::visit([](const auto& model) { return model.size(); }, activity_);
  expects(modelled == size(), "Mixture: the activity model is for another number of components");
  expects(!correction_ || correction_->size() == size(), "Mixture: the correction is for another number of components");
}

namespace {

/// Enclosures hold for points of the simplex, so what sticks out of [0, 1] by rounding can be cut off.
template <class S>
Vec<S> on_simplex(const Vec<S>& x) {
  Vec<S> part = x;
  for (S& fraction : part) {
    fraction = fraction_part(fraction);
  }
  return part;
}
const Vec<double>& on_simplex(const Vec<double>& x) {
  return x;
}

}  // namespace

template <class S>
Vec<S> Mixture::ln_gamma(const S& temperature_K, const Vec<S>& given) const {
  const auto& x = on_simplex(given);
  Vec<S> result = std::visit([&](const auto& model) { return model.ln_gamma(temperature_K, x); }, activity_);
  if (correction_) {
    const Vec<S> extra = correction_->ln_gamma(temperature_K, x);
    for (int i = 0; i < size(); ++i) {
      result[i] += extra[i];
    }
  }
  return result;
}

template <class S>
Vec<S> Mixture::ln_k(const S& temperature_K, const Vec<S>& x, double ln_pressure_Pa) const {
  Vec<S> result = ln_gamma(temperature_K, x);
  for (int i = 0; i < size(); ++i) {
    result[i] += ln_psat(i, temperature_K) - S(ln_pressure_Pa);
  }
  return result;
}

template <class S>
void Mixture::ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& given, LnGammaGradient<S>& out) const {
  const auto& x = on_simplex(given);
  std::visit([&](const auto& model) { model.ln_gamma_with_gradient(temperature_K, x, out); }, activity_);
  if (correction_) {
    LnGammaGradient<S> extra;
    correction_->ln_gamma_with_gradient(temperature_K, x, extra);
    for (int i = 0; i < size(); ++i) {
      out.value[i] += extra.value[i];
      for (int j = 0; j < size(); ++j) {
        out.d_dx(i, j) += extra.d_dx(i, j);
      }
    }
  }
}

template <class S>
void Mixture::ln_k_with_gradient(const S& temperature_K, const Vec<S>& x, double ln_pressure_Pa,
                                 LnGammaGradient<S>& out) const {
  ln_gamma_with_gradient(temperature_K, x, out);
  for (int i = 0; i < size(); ++i) {
    out.value[i] += ln_psat(i, temperature_K) - S(ln_pressure_Pa);
    out.d_dT[i] += component(i).pressure.d_ln_psat_dT(temperature_K);
  }
}

bool Mixture::depends_on_temperature() const {
  return std::visit([](const auto& model) { return model.depends_on_temperature(); }, activity_);
}

Mixture Mixture::face(const Members& members) const {
  std::vector<MixtureComponent> kept;
  for (const int i : members) {
    kept.push_back(component(i));
  }
  ActivityModel part = std::visit([&](const auto& model) { return ActivityModel(model.face(members)); }, activity_);
  std::optional<RedlichKister> extra;
  if (correction_) {
    extra = correction_->face(members);
  }
  return {std::move(kept), std::move(part), std::move(extra)};
}

double Mixture::boiling_point_K(int i, double pressure_Pa) const {
  return component(i).pressure.boiling_point_K(pressure_Pa);
}

Composition to_mass_fractions(const Mixture& mixture, const Composition& mole_fractions) {
  Composition result(mixture.size());
  double total = 0.0;
  for (int i = 0; i < mixture.size(); ++i) {
    result[i] = mole_fractions[i] * mixture.component(i).molar_mass_g_mol;
    total += result[i];
  }
  for (double& w : result) {
    w /= total;
  }
  return result;
}

Composition to_mole_fractions(const Mixture& mixture, const Composition& mass_fractions) {
  Composition result(mixture.size());
  double total = 0.0;
  for (int i = 0; i < mixture.size(); ++i) {
    result[i] = mass_fractions[i] / mixture.component(i).molar_mass_g_mol;
    total += result[i];
  }
  for (double& x : result) {
    x /= total;
  }
  return result;
}

#define STILLSHED_INSTANTIATE(S)                                       \
  template Vec<S> Mixture::ln_gamma<S>(const S&, const Vec<S>&) const; \
  template Vec<S> Mixture::ln_k<S>(const S&, const Vec<S>&, double) const
using Jet4 = ceres::Jet<double, 4>;
using IntervalJet4 = ceres::Jet<Interval, 4>;
STILLSHED_INSTANTIATE(double);
STILLSHED_INSTANTIATE(Interval);
STILLSHED_INSTANTIATE(Jet4);
STILLSHED_INSTANTIATE(IntervalJet4);
#undef STILLSHED_INSTANTIATE
template void Mixture::ln_gamma_with_gradient<double>(const double&, const Vec<double>&,
                                                      LnGammaGradient<double>&) const;
template void Mixture::ln_gamma_with_gradient<Interval>(const Interval&, const Vec<Interval>&,
                                                        LnGammaGradient<Interval>&) const;
template void Mixture::ln_k_with_gradient<double>(const double&, const Vec<double>&, double,
                                                  LnGammaGradient<double>&) const;
template void Mixture::ln_k_with_gradient<Interval>(const Interval&, const Vec<Interval>&, double,
                                                    LnGammaGradient<Interval>&) const;

}  // namespace stillshed
