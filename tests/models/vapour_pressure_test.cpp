#include "models/vapour_pressure.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>
#include <random>
#include <vector>

#include "params/errors.hpp"
#include "params/load.hpp"
#include "params/pressure_check.hpp"

namespace stillshed {
namespace {

PressureSet water_wagner() {
  // Wagner, Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783-787, Eq. 1.
  return {"water/wagner",
          PressureForm::wagner_water,
          {-7.85951783, 1.84408259, -11.7866497, 22.6807411, -15.9618719, 1.80122502, 647.096, 22064000.0},
          273.16,
          647.096,
          "",
          "",
          false,
          ""};
}
PressureSet water_wagner_25() {
  // VDI Heat Atlas, 2nd ed., Springer 2010, Part D3.
  return {"water/wagner-25",
          PressureForm::wagner_25,
          {-7.86975, 1.90561, -2.30891, -2.06472, 647.1, 22064000.0},
          273.15,
          647.1,
          "",
          "",
          false,
          ""};
}
PressureSet water_wagner_36() {
  // McGarry, Ind. Eng. Chem. Process Des. Dev. 22 (1983) 313-322.
  return {"water/wagner-36",
          PressureForm::wagner_36,
          {-7.76451, 1.45838, -2.7758, -1.23303, 647.35, 22122300.0},
          275.0,
          647.35,
          "",
          "",
          false,
          ""};
}
PressureSet water_perry() {
  // Perry's Chemical Engineers' Handbook, 8th ed. (2008), Table 2-8.
  return {"water/perry",
          PressureForm::perry_101,
          {73.649, -7258.2, -7.3037, 4.1653e-06, 2.0},
          273.16,
          647.096,
          "",
          "",
          false,
          ""};
}
PressureSet water_antoine() {
  // Poling, Prausnitz, O'Connell, The Properties of Gases and Liquids, 5th ed. (2001), App. A.
  return {"water/antoine", PressureForm::antoine_log10, {10.11564, 1687.537, -42.98}, 273.2, 473.2, "", "", false, ""};
}
PressureSet simple() {
  return {"user", PressureForm::clausius_clapeyron, {350.0, 4000.0}, {}, {}, "", "", false, ""};
}
std::vector<PressureSet> every_form() {
  return {water_wagner(), water_wagner_25(), water_wagner_36(), water_perry(), water_antoine(), simple()};
}

TEST(PressureCurve, ReproducesPrintedPressuresOfWater) {
  const PressureCurve curve(water_wagner());
  // Same paper: 611.657 Pa at the triple point, 0.101325 MPa at 373.124 K, 22.064 MPa at the critical point.
  EXPECT_NEAR(std::exp(curve.ln_psat(273.16)), 611.657, 5e-4);
  EXPECT_NEAR(std::exp(curve.ln_psat(647.096)), 22.064e6, 1.0);
  EXPECT_NEAR(curve.boiling_point_K(101325.0), 373.124, 5e-4);
  for (const PressureSet& set : every_form()) {
    if (set.form != PressureForm::clausius_clapeyron) {
      EXPECT_NEAR(PressureCurve(set).boiling_point_K(101325.0), 373.15, 0.1) << set.id;
    }
  }
}

TEST(PressureCurve, ReproducesSmithVanNessAbbottExample10_3) {
  // J. M. Smith, H. C. Van Ness, M. M. Abbott, Introduction to Chemical Engineering Thermodynamics, Example 10.3 (from
  // memory): ln P/kPa = A - B/(T + C); at 318.15 K methanol 44.51 kPa, methyl acetate 65.64 kPa.
  const auto curve = [](double A, double B, double C) {
    const double ln10 = std::log(10.0);
    return PressureCurve(
        {"x", PressureForm::antoine_log10, {A / ln10 + 3.0, B / ln10, C}, 280.0, 350.0, "", "", false, ""});
  };
  EXPECT_NEAR(std::exp(curve(16.59158, 3643.31, -33.424).ln_psat(318.15)), 44510.0, 5.0);
  EXPECT_NEAR(std::exp(curve(14.25326, 2665.54, -53.424).ln_psat(318.15)), 65640.0, 5.0);
}

TEST(PressureCurve, ClausiusClapeyronIsExactEverywhere) {
  const PressureCurve curve(simple());
  for (const double T : {0.5, 200.0, 350.0, 2000.0, 2e4}) {
    EXPECT_NEAR(curve.ln_psat(T), std::log(101325.0) + 4000.0 * (1.0 / 350.0 - 1.0 / T), 1e-11);
    EXPECT_TRUE(curve.covers(T));
  }
  EXPECT_NEAR(curve.boiling_point_K(101325.0), 350.0, 1e-10);
}

TEST(PressureCurve, SlopeIsTheDerivative) {
  for (const PressureSet& set : every_form()) {
    const PressureCurve curve(set);
    for (const double T : {220.0, 290.0, 330.0, 400.0, 470.0, 600.0, 800.0}) {
      const double step = 1e-4 * T;
      const double difference = (curve.ln_psat(T + step) - curve.ln_psat(T - step)) / (2.0 * step);
      EXPECT_NEAR(curve.d_ln_psat_dT(T), difference, 1e-6 * difference) << set.id << " at " << T;
      const auto jet = curve.ln_psat(ceres::Jet<double, 2>(T, 1));
      EXPECT_EQ(jet.v[1], curve.d_ln_psat_dT(T));
    }
  }
}

TEST(PressureCurve, RisesEverywhereWithoutAJump) {
  for (const PressureSet& set : every_form()) {
    const PressureCurve curve(set);
    double before = curve.ln_psat(20.0);
    for (double T = 20.5; T < 1500.0; T += 0.5) {
      const double now = curve.ln_psat(T);
      ASSERT_GT(now, before) << set.id << " at " << T;
      before = now;
    }
    for (const double end : {set.t_min_K.value_or(300.0), set.t_max_K.value_or(400.0)}) {
      const double step = 1e-9 * end;
      EXPECT_NEAR(curve.ln_psat(end - step), curve.ln_psat(end + step), 1e-7);
      // Wagner slopes meet Tc like a square root: 3e-5 over a step of 1e-9.
      EXPECT_NEAR(curve.d_ln_psat_dT(end - step), curve.d_ln_psat_dT(end + step), 1e-4 * curve.d_ln_psat_dT(end));
    }
  }
}

TEST(PressureCurve, NoAntoinePole) {
  // T + C <= 0 below 42.98 K: the plain formula would have P rise without limit as the pole is passed.
  const PressureCurve curve(water_antoine());
  EXPECT_LT(curve.ln_psat(40.0), curve.ln_psat(45.0));
  EXPECT_FALSE(curve.covers(45.0));
  const Interval across = curve.ln_psat(Interval(30.0, 60.0));
  EXPECT_TRUE(across.is_bounded());
  for (double T = 30.0; T <= 60.0; T += 0.37) {
    EXPECT_TRUE(across.contains(curve.ln_psat(T)));
  }
  PressureSet no_range = water_antoine();
  no_range.t_min_K.reset();
  no_range.t_max_K.reset();
  const PressureCurve open(no_range);
  EXPECT_LT(open.ln_psat(40.0), open.ln_psat(45.0));
  EXPECT_EQ(open.ln_psat(350.0), curve.ln_psat(350.0));
}

TEST(PressureCurve, IntervalsEncloseValueAndSlope) {
  std::mt19937_64 random(11);
  const auto uniform = [&random](double a, double b) { return std::uniform_real_distribution<double>(a, b)(random); };
  for (const PressureSet& set : every_form()) {
    const PressureCurve curve(set);
    for (int trial = 0; trial < 400; ++trial) {
      const double low = uniform(150.0, 750.0);
      const Interval T(low, low + std::pow(10.0, uniform(-10.0, 2.3)));
      const Interval value = curve.ln_psat(T);
      const Interval slope = curve.d_ln_psat_dT(T);
      const auto jet = curve.ln_psat(ceres::Jet<Interval, 1>(T, 0));
      ASSERT_TRUE(slope.is_positive()) << set.id;
      ASSERT_TRUE(jet.v[0].contains(slope));
      for (int draw = 0; draw < 10; ++draw) {
        const double at = draw == 0 ? T.lower() : draw == 1 ? T.upper() : uniform(T.lower(), T.upper());
        ASSERT_TRUE(value.contains(curve.ln_psat(at))) << set.id << " at " << at;
        ASSERT_TRUE(slope.contains(curve.d_ln_psat_dT(at))) << set.id << " at " << at;
      }
    }
  }
}

TEST(PressureCurve, IntervalsAreTight) {
  for (const PressureSet& set : every_form()) {
    const PressureCurve curve(set);
    const Interval T(320.0, 400.0);
    // End points enclose: only rounding is added to the true range.
    EXPECT_NEAR(curve.ln_psat(T).lower(), curve.ln_psat(320.0), 1e-11) << set.id;
    EXPECT_NEAR(curve.ln_psat(T).upper(), curve.ln_psat(400.0), 1e-11) << set.id;
    EXPECT_NEAR(curve.d_ln_psat_dT(T).upper(), curve.d_ln_psat_dT(320.0), 1e-11) << set.id;
    EXPECT_NEAR(curve.d_ln_psat_dT(T).lower(), curve.d_ln_psat_dT(400.0), 1e-11) << set.id;
  }
}

TEST(PressureCurve, UselessTemperaturesExcludeNothing) {
  const PressureCurve curve(water_antoine());
  for (const Interval& T : {Interval(std::nan("")), Interval::whole(), Interval(-5.0, 300.0), Interval(0.0, 1.0)}) {
    EXPECT_FALSE(curve.ln_psat(T).is_bounded());
    EXPECT_FALSE(curve.d_ln_psat_dT(T).is_bounded());
  }
}

TEST(PressureCurve, BoilingPointInverts) {
  for (const PressureSet& set : every_form()) {
    const PressureCurve curve(set);
    for (const double P : {1e-3, 10.0, 2e3, 101325.0, 3e6}) {
      const double T = curve.boiling_point_K(P);
      EXPECT_NEAR(curve.ln_psat(T), std::log(P), 1e-12 * 1e3) << set.id << " at " << P;
      const Interval range = curve.temperature_at(Interval(std::log(P)));
      EXPECT_TRUE(range.contains(T));
      EXPECT_LT(range.width(), 1e-8 * T) << set.id << " at " << P;
    }
    const Interval wide = curve.temperature_at(Interval(std::log(5e4), std::log(2e5)));
    EXPECT_TRUE(wide.contains(curve.boiling_point_K(101325.0)));
    EXPECT_FALSE(wide.contains(curve.boiling_point_K(4.9e4)));
  }
  EXPECT_TRUE(std::isinf(PressureCurve(simple()).boiling_point_K(1e30)));
  EXPECT_EQ(PressureCurve(simple()).boiling_point_K(0.0), 0.0);
  EXPECT_TRUE(std::isnan(PressureCurve(simple()).boiling_point_K(-1.0)));
}

TEST(PressureCurve, EverySetOnFileIsCertifiedAndAgreesWithPlainEvaluation) {
  const Facts facts = load_parameter_folder(STILLSHED_TEST_DATA "/../params");
  int sets = 0;
  for (const ComponentRecord& component : facts.components) {
    for (const PressureSet& set : component.pressure_sets) {
      SCOPED_TRACE(set.id);
      const PressureCurve curve(set);
      ASSERT_TRUE(set.t_min_K && set.t_max_K);
      for (int k = 0; k <= 10; ++k) {
        const double T = *set.t_min_K + 0.1 * k * (*set.t_max_K - *set.t_min_K);
        const double plain = plain_ln_pressure(set, T);
        ASSERT_NEAR(curve.ln_psat(T), plain, 1e-11 * (1.0 + std::abs(plain)));
        const Interval value = curve.ln_psat(Interval(T));
        ASSERT_TRUE(value.contains(curve.ln_psat(T)));
        ASSERT_LT(value.width(), 2e-10);
        const Interval slope = curve.d_ln_psat_dT(Interval(T));
        ASSERT_TRUE(slope.contains(curve.d_ln_psat_dT(T)));
      }
      const double Tb = curve.boiling_point_K(101325.0);
      ASSERT_TRUE(curve.temperature_at(Interval(std::log(101325.0))).contains(Tb));
      const Interval around(Tb - 5.0, Tb + 5.0);
      ASSERT_TRUE(curve.d_ln_psat_dT(around).is_positive());
      ++sets;
    }
  }
  EXPECT_GT(sets, 900);
}

TEST(PressureCurve, RefusesWhatDoesNotRise) {
  PressureSet falling = water_antoine();
  falling.coefficients[1] = -1687.0;
  EXPECT_THROW(PressureCurve{falling}, InputError);
  PressureSet turning = water_perry();  // C4 large and negative: falls at the warm end
  turning.coefficients[3] = -1e-4;
  try {
    const PressureCurve curve(turning);
    FAIL() << "accepted";
  } catch (const InputError& error) {
    EXPECT_THAT(error.what(), testing::HasSubstr("does not rise"));
    EXPECT_THAT(error.what(), testing::HasSubstr("water/perry"));
  }
  PressureSet across_the_pole = water_antoine();
  across_the_pole.t_min_K = 30.0;
  EXPECT_THROW(PressureCurve{across_the_pole}, InputError);
}

TEST(PressureCurve, RefusesBadRecords) {
  PressureSet set = water_antoine();
  set.coefficients[0] = std::nan("");
  EXPECT_THROW(PressureCurve{set}, InputError);
  set = water_antoine();
  std::swap(set.t_min_K, set.t_max_K);
  EXPECT_THROW(PressureCurve{set}, InputError);
  set = water_perry();
  set.t_max_K.reset();
  EXPECT_THROW(PressureCurve{set}, InputError);
  set = simple();
  set.coefficients[1] = 0.0;
  EXPECT_THROW(PressureCurve{set}, InputError);
}

}  // namespace
}  // namespace stillshed
