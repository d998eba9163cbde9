#include "reports/ternary_map.hpp"

#include <gtest/gtest.h>

#include "params/errors.hpp"
#include "tests/reports/sample_answer.hpp"
#include "tests/reports/validate.hpp"

namespace stillshed {
namespace {

TEST(TernaryMap, PictureHoldsWhatAReaderNeeds) {
  const std::string svg = ternary_map_svg(sample::ternary());
  EXPECT_TRUE(testing_support::is_valid(svg, "xml"));
  for (const char* words :
       {"56.1 °C", "64.6 °C", "100.0 °C", "mole fractions · 1.013 bar · unifac-dortmund", "acetone, mol%",
        "az1  55.2 °C", "boundary, confines bottoms", "stable node: curves end here", ">feed<", ">b1<", ">r1<",
        "way of the pot", "measured azeotrope", "residue curve, to higher temperature"}) {
    EXPECT_NE(svg.find(words), std::string::npos) << words;
  }
  EXPECT_EQ(svg.find("confines overheads"), std::string::npos);  // none in this map
}

TEST(TernaryMap, WordsTellTheSame) {
  const std::string words = ternary_map_words(sample::ternary());
  EXPECT_NE(words.find("Boundary b1 runs from az1(acetone,methanol) to water and confines bottoms."), std::string::npos)
      << words;
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
  answer.mixture = Mixture(
      {sample::component("a<b", "", 20.0), sample::component("c&d", "", 60.0), sample::component("e\"f", "", 60.0)},
      Ideal(3));
  EXPECT_TRUE(testing_support::is_valid(ternary_map_svg(answer), "xml"));
}

}  // namespace
}  // namespace stillshed
