#include "engine/limits.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "tests/support/simple_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;

/// Two components that boil at 350 K; the test decides what is known of the second.
Mixture with_second(const MixtureComponent& changes) {
  const Mixture plain = testing::symmetric_mixture(2, 0.5);
  std::vector<MixtureComponent> components = plain.components();
  MixtureComponent second = changes;
  second.id = "B";
  second.pressure = changes.pressure.set().id.empty() ? components[1].pressure : changes.pressure;
  components[1] = second;
  return {components, plain.activity()};
}

bool has(const std::vector<LimitNote>& notes, Severity severity, Reason reason, std::optional<int> component) {
  return std::any_of(notes.begin(), notes.end(), [&](const LimitNote& note) {
    return note.severity == severity && note.reason == reason && note.component == component && !note.text.empty();
  });
}

TEST(Limits, nothing_to_say_at_one_atmosphere) {
  EXPECT_TRUE(check_limits(testing::symmetric_mixture(2, 0.5), kAtmosphere_Pa, {0.5, 0.5}).empty());
  EXPECT_FALSE(gravest({}).has_value());
}

TEST(Limits, pressure_steps) {
  const Mixture mixture = testing::symmetric_mixture(2, 0.5);
  const auto worst = [&](double pressure_Pa) { return gravest(check_limits(mixture, pressure_Pa, {0.5, 0.5})); };
  EXPECT_EQ(worst(99.0), Severity::no_call);
  EXPECT_EQ(worst(101.0), std::nullopt);
  EXPECT_EQ(worst(3e5), std::nullopt);
  EXPECT_EQ(worst(3.01e5), Severity::stretched);
  EXPECT_EQ(worst(1e6), Severity::stretched);
  EXPECT_EQ(worst(10.0 * kAtmosphere_Pa), Severity::no_call);  // 10 atm is 10.1 bar
}

TEST(Limits, critical_pressure_only_where_it_is_known) {
  MixtureComponent heavy;
  heavy.critical_pressure_Pa = 27.4e5;  // n-heptane
  const Mixture mixture = with_second(heavy);
  EXPECT_TRUE(has(check_limits(mixture, 30e5, {0.5, 0.5}), Severity::no_call, Reason::above_critical, 1));
  EXPECT_TRUE(has(check_limits(mixture, 22e5, {0.5, 0.5}), Severity::no_call, Reason::above_critical, 1));
  EXPECT_FALSE(has(check_limits(mixture, 21.9e5, {0.5, 0.5}), Severity::no_call, Reason::above_critical, 1));
  EXPECT_FALSE(has(check_limits(mixture, 30e5, {1.0, 0.0}), Severity::no_call, Reason::above_critical, 1));
  EXPECT_FALSE(has(check_limits(mixture, 30e5, {0.5, 0.5}), Severity::no_call, Reason::above_critical, 0));
}

TEST(Limits, dimerizing_vapour) {
  MixtureComponent acid;
  acid.vapour_dimerizes = true;
  const Mixture mixture = with_second(acid);
  EXPECT_TRUE(has(check_limits(mixture, kAtmosphere_Pa, {0.5, 0.5}), Severity::no_call, Reason::acid_vapour, 1));
  EXPECT_TRUE(has(check_limits(mixture, kAtmosphere_Pa, {0.994, 0.006}), Severity::no_call, Reason::acid_vapour, 1));
  EXPECT_TRUE(has(check_limits(mixture, kAtmosphere_Pa, {0.996, 0.004}), Severity::caution, Reason::acid_vapour, 1));
  EXPECT_TRUE(check_limits(mixture, kAtmosphere_Pa, {1.0, 0.0}).empty());
  // Any scale of amounts.
  EXPECT_TRUE(has(check_limits(mixture, kAtmosphere_Pa, {994.0, 6.0}), Severity::no_call, Reason::acid_vapour, 1));
}

TEST(Limits, melting_points) {
  MixtureComponent solid;
  solid.melting_point_K = 345.0;
  const Mixture mixture = with_second(solid);
  EXPECT_TRUE(has(check_limits(mixture, 5e4, {0.5, 0.5}), Severity::caution, Reason::freezes, 1));
  EXPECT_FALSE(has(check_limits(mixture, 2e5, {0.5, 0.5}), Severity::caution, Reason::freezes, 1));
  // gE = 0.5 x1 x2 lowers the boiling point of the feed to 346.2 K: a melting point between that and 350 K is named
  // too.
  solid.melting_point_K = 348.0;
  EXPECT_TRUE(has(check_limits(with_second(solid), kAtmosphere_Pa, {0.5, 0.5}), Severity::caution, Reason::freezes, 1));
}

TEST(Limits, vapour_pressure_sets_outside_their_range) {
  PressureSet narrow;
  narrow.id = "narrow";
  narrow.form = PressureForm::clausius_clapeyron;
  narrow.coefficients = {350.0, 4000.0};
  narrow.t_min_K = 300.0;
  narrow.t_max_K = 360.0;
  MixtureComponent component;
  component.pressure = PressureCurve(narrow);
  const Mixture mixture = with_second(component);
  EXPECT_TRUE(check_limits(mixture, kAtmosphere_Pa, {0.5, 0.5}).empty());
  EXPECT_TRUE(has(check_limits(mixture, 2e5, {0.5, 0.5}), Severity::stretched, Reason::outside_data, 1));
  EXPECT_TRUE(has(check_limits(mixture, 1e4, {0.5, 0.5}), Severity::stretched, Reason::outside_data, 1));
  EXPECT_TRUE(check_limits(mixture, kAtmosphere_Pa, {0.5, 0.5}, TemperatureRange{301.0, 359.0}).empty());
  EXPECT_TRUE(has(check_limits(mixture, kAtmosphere_Pa, {0.5, 0.5}, TemperatureRange{340.0, 380.0}),
                  Severity::stretched, Reason::outside_data, 1));
}

}  // namespace
}  // namespace stillshed
