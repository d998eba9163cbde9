/// The activity models and the variant that holds one of them.
///
/// Every model is a class with
///     template <class S> Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const;
///     template <class S> void ln_gamma_with_gradient(const S& temperature_K, const Vec<S>& x,
///                                                    LnGammaGradient<S>& out) const;   // analytic,
///                                                    models/gradient.hpp
///     int size() const;
///     bool depends_on_temperature() const;
///     Model face(const Members& members) const;   // the same model for some of the components, in the order given
/// and parameters checked at construction (InputError lists every bad entry). Sums over mole fractions go through
/// models/means.hpp: that is what makes the Interval results tight.
#pragma once

#include <variant>

#include "models/ideal.hpp"
#include "models/margules.hpp"
#include "models/nrtl.hpp"
#include "models/redlich_kister.hpp"
#include "models/unifac.hpp"
#include "models/uniquac.hpp"
#include "models/wilson.hpp"

namespace stillshed {

using ActivityModel = std::variant<Ideal, Margules, RedlichKister, Nrtl, Wilson, Uniquac, Unifac>;

}  // namespace stillshed
