/// Wishes: purity, impurity, recovery.
#include "tests/reports/input_fixtures.hpp"

namespace stillshed::test {
namespace {

std::string with_products(const std::string& products) {
  return with_stream(R"({"acetone": "50 wt%", "IPA": "30 wt%", "water": "20 wt%"})", R"(, "products": )" + products);
}

TEST(CaseProducts, EveryKindOfTest) {
  const Case input = case_from(with_products(
      R"({"acetone": [">= 99.5 wt%", "water <= 1000 ppm", "2-propanol <= 0.1 mol%", "recovery >= 90 %"], "isopropanol": "\u2265 99 mol%"})"));
  ASSERT_EQ(input.products.size(), 2U);
  const std::vector<ProductTest>& tests = input.products[0].tests;
  ASSERT_EQ(tests.size(), 4U);
  EXPECT_EQ(tests[0].what, ProductTest::What::purity);
  EXPECT_NEAR(tests[0].value, 0.995, 1e-15);
  EXPECT_EQ(tests[1].what, ProductTest::What::impurity);
  EXPECT_EQ(tests[1].component, 2);
  EXPECT_FALSE(tests[1].at_least);
  EXPECT_NEAR(tests[1].value, 1e-3, 1e-18);
  EXPECT_EQ(tests[2].component, 1);
  EXPECT_EQ(tests[2].basis, Basis::mole);
  EXPECT_EQ(tests[3].what, ProductTest::What::recovery);
  EXPECT_NEAR(tests[3].value, 0.9, 1e-15);
  EXPECT_EQ(input.products[1].id, "2-propanol");
  EXPECT_EQ(input.products[1].tests[0].basis, Basis::mole);
  EXPECT_FALSE(input.products[0].default_tests);
}

TEST(CaseProducts, OnlyARecoveryGetsTheDefaultPurityBeside) {
  const Case input = case_from(with_products(R"({"acetone": ["recovery >= 0.9"]})"));
  ASSERT_EQ(input.products[0].tests.size(), 2U);
  EXPECT_EQ(input.products[0].tests[0].what, ProductTest::What::purity);
  EXPECT_TRUE(input.products[0].default_tests);
}

TEST(CaseProducts, RefusedTests) {
  for (const char* test : {"99.5 wt%", "= 99.5 wt%", "> 99.5 wt%", "<= 99.5 wt%", "water >= 0.1 wt%", ">= 101 wt%",
                           ">= 100 wt%", ">= 99.5 vol%", ">= 99.5", ">= 99.5 %", "ethanol <= 1 wt%", ">= -1 wt%",
                           ">= 95-99 wt%", "recovery >= 120 %", "recovery <= 50 %", "water <= 0 wt%"}) {
    EXPECT_EQ(problems_of(with_products(R"({"acetone": [")" + std::string(test) + "\"]}")).size(), 1U) << test;
  }
}

TEST(CaseProducts, OnlyWhatIsInTheStreamAndOnlyOnce) {
  EXPECT_TRUE(
      tells(problems_of(with_products(R"({"ethanol": [">= 99 wt%"]})")), "/products/ethanol", "not in the stream"));
  EXPECT_TRUE(tells(problems_of(with_products(R"({"IPA": [">= 99 wt%"], "2-propanol": [">= 98 wt%"]})")),
                    "/products/2-propanol", "twice"));
  EXPECT_FALSE(problems_of(with_products("{}")).empty());
  EXPECT_FALSE(problems_of(with_products(R"({"acetone": 99.5})")).empty());
}

}  // namespace
}  // namespace stillshed::test
