#include "params/catalog.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "parameter_folder.hpp"
#include "params/errors.hpp"

namespace stillshed {
namespace {

using ::testing::Contains;
using ::testing::HasSubstr;
using ::testing::IsEmpty;
using ::testing::UnorderedElementsAre;

const Catalog& catalog() {
  static const Catalog the_catalog(test::loaded_facts());
  return the_catalog;
}

std::string found(const char* name) {
  const Lookup lookup = catalog().find(name);
  return lookup.status == LookupStatus::found ? lookup.component->id : "-";
}

std::vector<std::string> choices(const char* name) {
  std::vector<std::string> ids;
  for (const ComponentRecord* component : catalog().find(name).choices) {
    ids.push_back(component->id);
  }
  return ids;
}

TEST(Catalog, NamesPeopleWrite) {
  const std::vector<std::pair<const char*, const char*>> names = {
      {"IPA", "2-propanol"},
      {"2-propanol", "2-propanol"},
      {"isopropanol", "2-propanol"},
      {"67-63-0", "2-propanol"},
      {"MEK", "2-butanone"},
      {"butanone", "2-butanone"},
      {"MIBK", "methyl-isobutyl-ketone"},
      {"ACN", "acetonitrile"},
      {"MeCN", "acetonitrile"},
      {"EtOAc", "ethyl-acetate"},
      {"EA", "ethyl-acetate"},
      {"DCM", "dichloromethane"},
      {"Methylene  chloride", "dichloromethane"},
      {"DMF", "n-n-dimethylformamide"},
      {"NMP", "n-methyl-2-pyrrolidone"},
      {"THF", "tetrahydrofuran"},
      {"2-MeTHF", "2-methyltetrahydrofuran"},
      {"2-Me-THF", "2-methyltetrahydrofuran"},
      {"MTBE", "mtbe"},
      {"TBME", "mtbe"},
      {"DIPE", "diisopropyl-ether"},
      {"IPAc", "isopropyl-acetate"},
      {"CPME", "cyclopentyl-methyl-ether"},
      {"TEA", "triethylamine"},
      {"Et3N", "triethylamine"},
      {"spirit", "ethanol"},
      {"Hexane", "n-hexane"},
  };
  for (const auto& [name, id] : names) {
    EXPECT_EQ(found(name), id) << name;
  }
}

TEST(Catalog, EveryNameOfEveryComponentLeadsBack) {
  for (const ComponentRecord& component : catalog().facts().components) {
    EXPECT_EQ(found(component.id.c_str()), component.id);
    EXPECT_EQ(found(component.name.c_str()), component.id);
    EXPECT_EQ(found(component.cas.c_str()), component.id);
    for (const std::string& synonym : component.synonyms) {
      EXPECT_EQ(found(synonym.c_str()), component.id) << synonym;
    }
  }
}

TEST(Catalog, AmbiguousNamesAreRefusedWithChoices) {
  for (const char* name : {"DMA", "dme", "TCE", "EDC", "ether", "glycol ether", "xylene", "Xylenes", "hexanes",
                           "petroleum ether", "white spirit", "IMS", "methylated spirit", "TBA", "DEA"}) {
    const Lookup lookup = catalog().find(name);
    EXPECT_EQ(lookup.status, LookupStatus::ambiguous) << name;
    EXPECT_FALSE(lookup.choices.empty()) << name;
    EXPECT_FALSE(lookup.remark.empty()) << name;
    EXPECT_EQ(lookup.component, nullptr);
  }
  EXPECT_THAT(choices("xylenes"), UnorderedElementsAre("o-xylene", "m-xylene", "p-xylene"));
  EXPECT_THAT(choices("TBA"), UnorderedElementsAre("tert-butanol", "tert-butylamine", "tributylamine"));
}

TEST(Catalog, UnknownNamesGetSuggestionsAndNoPick) {
  const Lookup lookup = catalog().find("tolueen");
  EXPECT_EQ(lookup.status, LookupStatus::unknown);
  EXPECT_EQ(lookup.component, nullptr);
  EXPECT_THAT(choices("tolueen"), Contains("toluene"));
  EXPECT_THAT(choices("metanol"), Contains("methanol"));
  EXPECT_THAT(choices("qqqqqqqq"), IsEmpty());
  EXPECT_EQ(catalog().find("").status, LookupStatus::unknown);
}

TEST(Catalog, CasNumbersAreChecked) {
  EXPECT_THAT(catalog().find("67-63-1").remark, HasSubstr("check digit"));
  EXPECT_THAT(catalog().find("50-00-0").remark, HasSubstr("no component with this CAS number"));
  EXPECT_EQ(catalog().find("50-00-0").status, LookupStatus::unknown);
}

TEST(Catalog, MeasuredAzeotropesOfAnySubset) {
  const auto records = catalog().measured({"ethanol", "water", "benzene"});
  int ternary = 0;
  for (const MeasuredAzeotrope* record : records) {
    ternary += record->components.size() == 3 ? 1 : 0;
    for (const std::string& id : record->components) {
      EXPECT_TRUE(id == "ethanol" || id == "water" || id == "benzene") << record->id;
    }
  }
  EXPECT_GE(ternary, 1);
  EXPECT_GE(records.size(), 4U);
  EXPECT_THAT(catalog().measured({"water"}), IsEmpty());
}

PressureSet set_of(const char* id, double low_K, double high_K, bool estimated = false) {
  PressureSet set;
  set.id = id;
  set.t_min_K = low_K;
  set.t_max_K = high_K;
  set.estimated = estimated;
  return set;
}

TEST(Catalog, PressureSetCoversTheWholeBracketFirst) {
  ComponentRecord component;
  EXPECT_EQ(choose_pressure_set(component, 300.0, 350.0).set, nullptr);
  component.pressure_sets = {set_of("narrow", 310.0, 340.0), set_of("guess", 200.0, 500.0, true),
                             set_of("wide", 250.0, 400.0), set_of("wider", 200.0, 500.0)};
  const PressureChoice inner = choose_pressure_set(component, 320.0, 330.0);
  EXPECT_EQ(inner.set->id, "narrow");  // file order, best first
  EXPECT_TRUE(inner.covers);
  EXPECT_EQ(choose_pressure_set(component, 300.0, 350.0).set->id, "wide");  // measured before estimated
  EXPECT_EQ(choose_pressure_set(component, 300.0, 450.0).set->id, "wider");
  const PressureChoice outside = choose_pressure_set(component, 190.0, 520.0);
  EXPECT_EQ(outside.set->id, "wider");
  EXPECT_FALSE(outside.covers);
  EXPECT_DOUBLE_EQ(outside.uncovered_K, 30.0);
  // A bracket wholly beyond every range is uncovered over its whole length, no more.
  EXPECT_DOUBLE_EQ(choose_pressure_set(component, 600.0, 610.0).uncovered_K, 10.0);
}

TEST(Catalog, AFormulaWithoutARangeCoversEverything) {
  ComponentRecord component;
  component.pressure_sets.emplace_back();
  EXPECT_TRUE(choose_pressure_set(component, 1.0, 1000.0).covers);
}

TEST(Catalog, WaterUsesItsReferenceEquation) {
  EXPECT_EQ(choose_pressure_set(*catalog().by_id("water"), 300.0, 400.0).set->id, "water/wagner-water/wagner-1993");
}

TEST(Catalog, GroupGaps) {
  EXPECT_THAT(catalog().group_gaps(GroupModel::unifac, {"acetone", "methanol", "water"}), IsEmpty());
  EXPECT_THAT(catalog().group_gaps(GroupModel::dortmund, {"ethanol", "benzene", "water"}), IsEmpty());
  // The published Dortmund list has no parameters between sulfoxides and cyclic ethers.
  const auto gaps = catalog().group_gaps(GroupModel::dortmund, {"dimethyl-sulfoxide", "tetrahydrofuran"});
  ASSERT_FALSE(gaps.empty());
  for (const GroupGap& gap : gaps) {
    EXPECT_FALSE(catalog().facts().dortmund.interactions.contains({gap.main_i, gap.main_j}));
    EXPECT_FALSE(gap.name_i.empty());
    EXPECT_EQ(gap.component_i, 0);
    EXPECT_EQ(gap.component_j, 1);
  }
  EXPECT_THROW((void)catalog().group_gaps(GroupModel::unifac, {"nothing"}), InputError);
}

TEST(Catalog, GroupsMayBeAbsent) {
  EXPECT_TRUE(catalog().has_groups(GroupModel::unifac, "water"));
  int without = 0;
  for (const ComponentRecord& component : catalog().facts().components) {
    without += catalog().has_groups(GroupModel::unifac, component.id) ? 0 : 1;
  }
  EXPECT_EQ(without, 14);
  EXPECT_FALSE(catalog().has_groups(GroupModel::unifac, "nothing"));
}

TEST(Catalog, SourcesAndLimits) {
  EXPECT_THAT(catalog().citation("mcgarry-1983"), HasSubstr("McGarry"));
  EXPECT_EQ(catalog().citation("user"), "user");
  EXPECT_EQ(catalog().residual_limit("methanol")->limit_ppm, 3000.0);
  EXPECT_EQ(catalog().residual_limit("water"), nullptr);
}

TEST(Catalog, SurvivesAMove) {
  Catalog first(test::loaded_facts());
  const Catalog second(std::move(first));
  EXPECT_EQ(second.find("THF").component, &second.facts().components[static_cast<std::size_t>(
                                              second.find("THF").component - second.facts().components.data())]);
  EXPECT_EQ(second.by_id("water"), &second.facts().components.front());
}

}  // namespace
}  // namespace stillshed
