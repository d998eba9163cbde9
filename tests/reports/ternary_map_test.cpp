#include "reports/ternary_map.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "params/errors.hpp"
#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(TernaryMap, CornersAndCentreAreExact) {
  const Triangle triangle({0.0, 0.0}, 2.0, {0, 1, 2});
  EXPECT_DOUBLE_EQ(triangle.at({1.0, 0.0, 0.0}).x, 1.0);
  EXPECT_DOUBLE_EQ(triangle.at({1.0, 0.0, 0.0}).y, -std::sqrt(3.0));
  EXPECT_DOUBLE_EQ(triangle.at({0.0, 1.0, 0.0}).x, 0.0);
  EXPECT_DOUBLE_EQ(triangle.at({0.0, 0.0, 1.0}).x, 2.0);
  const Point centre = triangle.at({1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0});
  EXPECT_NEAR(centre.x, 1.0, 1e-15);
  EXPECT_NEAR(centre.y, -std::sqrt(3.0) / 3.0, 1e-15);
}

TEST(TernaryMap, TransformAndItsInverseAgree) {
  const Triangle triangle({110.0, 590.0}, 540.0, {2, 0, 1});
  std::mt19937_64 random(3);
  std::exponential_distribution<double> share;
  for (int k = 0; k < 200; ++k) {
    Composition x{share(random), share(random), share(random)};
    const double sum = x[0] + x[1] + x[2];
    for (int i = 0; i < 3; ++i) {
      x[i] /= sum;
    }
    const Composition back = triangle.composition(triangle.at(x));
    for (int i = 0; i < 3; ++i) {
      EXPECT_NEAR(back[i], x[i], 1e-13);
    }
  }
}

TEST(TernaryMap, LowestBoilingComponentOnTop) {
  Survey survey = sample::ternary_survey();
  EXPECT_EQ(corners_by_boiling_point(survey), (std::array<int, 3>{0, 1, 2}));
  survey.pure[0].temperature_K = 400.0;
  EXPECT_EQ(corners_by_boiling_point(survey), (std::array<int, 3>{1, 2, 0}));
}

TEST(TernaryMap, PictureHoldsWhatAReaderNeeds) {
  const std::string svg = ternary_map_svg(sample::ternary());
  EXPECT_TRUE(testing_support::is_valid(svg, "xml"));
  for (const char* words : {"56.1 °C", "64.6 °C", "100.0 °C", "mole fractions · 1.013 bar · unifac-dortmund", "acetone, mol%",
                            "az1  55.2 °C", "boundary, confines bottoms", "stable node: curves end here", ">feed<", ">b1<", ">r1<",
                            "way of the pot", "measured azeotrope", "residue curve, to higher temperature"}) {
    EXPECT_NE(svg.find(words), std::string::npos) << words;
  }
  EXPECT_EQ(svg.find("confines overheads"), std::string::npos);  // none in this map
}

TEST(TernaryMap, WordsTellTheSame) {
  const std::string words = ternary_map_words(sample::ternary());
  EXPECT_NE(words.find("Boundary b1 runs from az1(acetone,methanol) to water and confines bottoms."), std::string::npos) << words;
  EXPECT_NE(words.find("The feed lies in region r1."), std::string::npos);
}

TEST(TernaryMap, DrawsWithoutChartAndRefusesOtherSizes) {
  Answer answer = sample::ternary();
  answer.chart.reset();
  answer.position.reset();
  answer.reach.reset();
  EXPECT_TRUE(testing_support::is_valid(ternary_map_svg(answer), "xml"));
  EXPECT_THROW((void)ternary_map_svg(sample::binary()), LogicError);
}

TEST(TernaryMap, NamesAreEscaped) {
  Answer answer = sample::ternary();
  answer.mixture = Mixture({sample::component("a<b", "", 20.0), sample::component("c&d", "", 60.0), sample::component("e\"f", "", 60.0)},
                           Ideal(3));
  EXPECT_TRUE(testing_support::is_valid(ternary_map_svg(answer), "xml"));
}

}  // namespace
}  // namespace stillshed
