#include "params/pressure_check.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

PressureSet antoine(double A, double B, double C, double low_K, double high_K) {
  PressureSet set;
  set.form = PressureForm::antoine_log10;
  set.coefficients = {A, B, C};
  set.t_min_K = low_K;
  set.t_max_K = high_K;
  return set;
}

// W. Wagner, A. Pruss (1993): the boiling point of water at 101325 Pa is 373.124 K, the triple point 611.657 Pa.
TEST(PressureCheck, WaterAgainstPublishedPoints) {
  const PressureSet& set = test::loaded_facts().components.front().pressure_sets.front();
  ASSERT_EQ(set.form, PressureForm::wagner_water);
  EXPECT_NEAR(boiling_point_in_range_K(set, 101325.0).value(), 373.124, 1e-3);
  EXPECT_NEAR(std::exp(plain_ln_pressure(set, 273.16)), 611.657, 0.01);
}

TEST(PressureCheck, ClausiusClapeyronAtItsBoilingPoint) {
  PressureSet set;
  set.form = PressureForm::clausius_clapeyron;
  set.coefficients = {350.0, 4000.0};
  EXPECT_NEAR(std::exp(plain_ln_pressure(set, 350.0)), 101325.0, 1e-6);
  EXPECT_FALSE(boiling_point_in_range_K(set, 101325.0));  // a formula without a range has none to look in
}

TEST(PressureCheck, FindsTheFall) {
  EXPECT_FALSE(falls_at_K(antoine(10.1, 1680.0, -43.9, 280.0, 450.0)));
  EXPECT_TRUE(falls_at_K(antoine(10.1, -1680.0, -43.9, 280.0, 450.0)));
  const auto pole = falls_at_K(antoine(10.1, 1680.0, -300.0, 280.0, 450.0));  // pole at 300 K
  ASSERT_TRUE(pole);
  EXPECT_NEAR(*pole, 300.0, 1.0);
}

TEST(PressureCheck, EverySetOnFileRises) {
  int sets = 0;
  for (const ComponentRecord& component : test::loaded_facts().components) {
    for (const PressureSet& set : component.pressure_sets) {
      EXPECT_FALSE(falls_at_K(set)) << set.id;
      ++sets;
    }
  }
  EXPECT_EQ(sets, 1007);
}

}  // namespace
}  // namespace stillshed
