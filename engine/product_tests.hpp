/// The tests of a product, evaluated on one receiver.
///
///   purity     fraction of the product in the receiver        mole or mass basis, of the volatile part
///   impurity   fraction of another component in it
///   recovery   moles of the product in the receiver / moles in the charge (the same number in mass)
///
/// margin     value - spec for "at least", spec - value for "at most"
/// allowance  what the test lets pass: 1 - spec for "at least", spec for "at most"
#pragma once

#include "engine/reach.hpp"

namespace stillshed {

/// A margin this small counts as zero: met, but without room. Mole or mass fraction.
inline constexpr double kNoMargin = 1e-9;

[[nodiscard]] TestOutcome evaluate(const ProductTest& test, const Mixture& mixture, const Composition& x,
                                   double recovery);
/// `room`: share of the allowance that must remain. Recovery tests need none.
[[nodiscard]] bool has_room(const TestOutcome& outcome, double room);

}  // namespace stillshed
