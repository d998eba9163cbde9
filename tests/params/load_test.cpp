#include "params/load.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "parameter_folder.hpp"

namespace stillshed {
namespace {

using ::testing::AllOf;
using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::UnorderedElementsAre;

TEST(Load, EverythingOnFile) {
  const Facts& facts = test::loaded_facts();
  EXPECT_EQ(facts.components.size(), 341U);
  EXPECT_EQ(facts.unifac.classes.size(), 635U);
  EXPECT_EQ(facts.unifac.interactions.size(), 2U * 635U);
  EXPECT_EQ(facts.dortmund.classes.size(), 758U);
  EXPECT_EQ(facts.dortmund.interactions.size(), 2U * 758U);
  EXPECT_EQ(facts.measured_azeotropes.size(), 703U);
  EXPECT_EQ(facts.residual_limits.size(), 72U);
  EXPECT_EQ(facts.sha256.size(), 64U);
}

TEST(Load, TheHashFollowsTheText) {
  const test::ParameterFolder folder;
  EXPECT_EQ(load_parameter_folder(folder.path()).sha256, test::loaded_facts().sha256);
  folder.replace("sources.json", "\"Wikidata, value", "\"Wikidata,  value");
  EXPECT_NE(load_parameter_folder(folder.path()).sha256, test::loaded_facts().sha256);
}

TEST(Load, ProblemsOfAllFilesComeTogether) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"7732-18-5\"", "\"7732-18-4\"");
  folder.replace("vapour_pressure.json", "\"where\": \"Eq. 1\"", "\"wear\": \"Eq. 1\"");
  folder.replace("unifac.json", "\"R\": 0.9011", "\"R\": -0.9011");
  folder.replace("names.json", "\"n-n-dimethylaniline\"", "\"dimethylaniline\"");
  folder.replace("cautions.json", "\"sources\": [\"project\"]", "\"sources\": [\"nobody\"]");
  EXPECT_THAT(folder.problems(),
              ElementsAre(HasSubstr("unifac.json /subgroups/0/R: found -0.9011, allowed a number above 0"),
                          HasSubstr("components.json /components/0/cas: found \"7732-18-4\""),
                          HasSubstr("vapour_pressure.json /sets/0/wear: found an unknown key"),
                          HasSubstr("names.json /ambiguous/0/choices: found \"dimethylaniline\""),
                          HasSubstr("cautions.json /cautions/0/sources: found \"nobody\"")));
}

TEST(Load, MissingFileAndMalformedFile) {
  const test::ParameterFolder folder;
  folder.remove("ich_q3c.json");
  folder.write("cautions.json", "{\n  \"stillshed_cautions\": 1,\n  oops\n}");
  EXPECT_THAT(folder.problems(), ElementsAre(AllOf(HasSubstr("cautions.json line 3, column 3"), HasSubstr("malformed")),
                                             HasSubstr("ich_q3c.json: found no readable file")));
}

TEST(Load, RepeatedKeyRepeatedSourceMissingFormat) {
  const test::ParameterFolder folder;
  folder.replace("components.json", "\"name\": \"Water\"", "\"name\": \"Water\", \"name\": \"Wasser\"");
  folder.replace("sources.json", "\"stillshed_sources\": 1", "\"stillshed_sources\": 2");
  folder.replace("sources.json", "\"key\": \"zhang-2017\"", "\"key\": \"yaws-2014\"");
  EXPECT_THAT(
      folder.problems(),
      testing::IsSupersetOf({HasSubstr("components.json /components/0/name: found the key twice"),
                             HasSubstr("sources.json /stillshed_sources: found 2, allowed a whole number from 1 to 1"),
                             HasSubstr("found \"yaws-2014\" a second time")}));
}

}  // namespace
}  // namespace stillshed
