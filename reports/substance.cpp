#include "reports/substance.hpp"

#include <algorithm>
#include <array>

#include "params/names.hpp"
#include "reports/quantity.hpp"

namespace stillshed {
namespace {

constexpr std::array kResidueWords = {"residue", "residues", "solids", "nonvolatiles", "nonvolatile",
                                      "nv",      "heel",     "tars",   "resin"};
constexpr std::array kUnknownWords = {"unknown", "unknowns", "others", "other", "unidentified"};

/// Salts that turn up in work-ups; formulas and names in the form of params/names.hpp.
constexpr std::array kSalts = {"sodiumchloride",
                               "nacl",
                               "potassiumchloride",
                               "kcl",
                               "lithiumchloride",
                               "licl",
                               "calciumchloride",
                               "cacl2",
                               "magnesiumchloride",
                               "mgcl2",
                               "ammoniumchloride",
                               "nh4cl",
                               "sodiumbromide",
                               "nabr",
                               "potassiumbromide",
                               "kbr",
                               "lithiumbromide",
                               "libr",
                               "sodiumsulfate",
                               "sodiumsulphate",
                               "na2so4",
                               "magnesiumsulfate",
                               "mgso4",
                               "sodiumcarbonate",
                               "na2co3",
                               "potassiumcarbonate",
                               "k2co3",
                               "sodiumbicarbonate",
                               "nahco3",
                               "sodiumhydroxide",
                               "naoh",
                               "potassiumhydroxide",
                               "koh",
                               "sodiumacetate",
                               "naoac",
                               "potassiumacetate",
                               "koac",
                               "ammoniumacetate",
                               "nh4oac",
                               "ammoniumformate",
                               "sodiumformate",
                               "sodiumnitrate",
                               "nano3",
                               "calciumnitrate",
                               "potassiumiodide",
                               "ki",
                               "sodiumiodide",
                               "nai",
                               "salt",
                               "salts",
                               "lithiumsalts",
                               "lithiumsalt",
                               "inorganicsalts",
                               "triethylaminehydrochloride",
                               "tetrabutylammoniumbromide",
                               "tbab"};

template <std::size_t N>
bool holds(const std::array<const char*, N>& words, const std::string& word) {
  return std::find_if(words.begin(), words.end(), [&](const char* entry) { return word == entry; }) != words.end();
}

}  // namespace

std::optional<NonvolatileKind> nonvolatile_kind(const std::string& name) {
  const std::string word = normalised_name(name);
  if (holds(kResidueWords, word)) {
    return NonvolatileKind::residue;
  }
  if (holds(kUnknownWords, word)) {
    return NonvolatileKind::unknown;
  }
  if (holds(kSalts, word)) {
    return NonvolatileKind::salt;
  }
  return std::nullopt;
}

std::string substance_choices(const Lookup& lookup) {
  std::string list;
  for (const ComponentRecord* record : lookup.choices) {
    list += (list.empty() ? "" : ", ") + record->id + " (" + record->cas + ")";
  }
  return list;
}

Problem substance_problem(const std::string& where, const std::string& name, const Lookup& lookup) {
  const std::string choices = substance_choices(lookup);
  if (lookup.status == LookupStatus::ambiguous) {
    return {where, in_quotes(name) + ", an ambiguous name" + (lookup.remark.empty() ? "" : " (" + lookup.remark + ")"),
            choices.empty() ? "an unambiguous name or a CAS number" : choices, ""};
  }
  return {where, in_quotes(name) + ", not on file" + (lookup.remark.empty() ? "" : " (" + lookup.remark + ")"),
          "an id, name, synonym or CAS number on file", choices.empty() ? "" : "nearest: " + choices};
}

}  // namespace stillshed
