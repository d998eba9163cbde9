#include "engine/product_tests.hpp"

#include <algorithm>

namespace stillshed {

double ProductSpec::required_recovery() const {
  std::optional<double> required;
  for (const ProductTest& test : tests) {
    if (test.what == ProductTest::What::recovery && test.at_least) {
      required = std::max(required.value_or(0.0), test.value);
    }
  }
  return required.value_or(0.5);
}

TestOutcome evaluate(const ProductTest& test, const Mixture& mixture, const Composition& x, double recovery) {
  TestOutcome outcome;
  outcome.test = test;
  if (test.what == ProductTest::What::recovery) {
    outcome.limit = recovery;
  } else {
    outcome.limit = (test.basis == Basis::mass ? to_mass_fractions(mixture, x) : x)[test.component];
  }
  outcome.margin = test.at_least ? outcome.limit - test.value : test.value - outcome.limit;
  outcome.pass = outcome.margin >= -kNoMargin;
  return outcome;
}

bool has_room(const TestOutcome& outcome, double room) {
  if (outcome.test.what == ProductTest::What::recovery) {
    return outcome.pass;
  }
  const double allowance = outcome.test.at_least ? 1.0 - outcome.test.value : outcome.test.value;
  return outcome.margin > kNoMargin && outcome.margin >= room * allowance - kNoMargin;
}

}  // namespace stillshed
