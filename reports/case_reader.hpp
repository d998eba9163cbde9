/// Reads a case file: JSON, versioned, strict. reports/schema/case.schema.json describes every key.
///
///   { "stillshed_case": 1, "title": "...",
///     "stream":   {"acetone": "41 wt%", "water": "57 wt%", "residue": "2 wt%"}, "amount": "4200 kg",
///     "pressure": "1 atm", "model": "auto",
///     "components": [...],                     only with the user's own numbers: the order of every matrix
///     "products": {"acetone": [">= 99.5 wt%", "water <= 0.3 wt%", "recovery >= 90 %"]},
///     "plant":    {"stages": 25, ...},
///     "declared": ["azides"] }                 history, region and use that bring up cautions
///
/// Amounts have one basis: percentages by mass, mole or volume before mixing, or absolute amounts (kg, mol, L mixed
/// freely). A sum within 0.5 of 100 is rescaled with a note, beyond that refused; "rest" stands for what is missing.
/// What does not boil ("residue", "solids", salts by name, "unknown") is in the balance and not in the vapour-liquid
/// calculation; beside mole and volume percentages it is given in wt% of the whole stream. Components of amount zero
/// are dropped, with their rows of every matrix, and a note.
/// Without "pressure" 1 atm is taken, without "products" every component at >= 99.5 wt%; the first is noted here, the
/// second by the tasks that judge products.
#pragma once

#include <map>
#include <string>
#include <string_view>

#include "params/catalog.hpp"
#include "reports/case_file.hpp"
#include "reports/strict_json.hpp"

namespace stillshed {

/// `source` names the document in messages. `spoken`: JSON pointers and the words of a command line they came from.
/// InputError with every problem found.
[[nodiscard]] Case read_case(const OrderedJson& json, const std::string& source, const Catalog& catalog,
                             const std::map<std::string, std::string>& spoken = {});
/// The same from text.
[[nodiscard]] Case read_case(std::string_view text, const std::string& source, const Catalog& catalog);

}  // namespace stillshed
