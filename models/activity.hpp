/// The activity models and the variant that holds one of them.
///
/// Every model is a class with
///     template <class S> Vec<S> ln_gamma(const S& temperature_K, const Vec<S>& x) const;
///     int size() const;
///     Model face(const Members& members) const;   // the same model for some of the components
/// and a parameter struct checked at construction (InputError lists every bad entry).
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
