/// Names of a case: substances on file, and words for what does not boil.
///
/// A name is looked up in the catalog; an ambiguous one is refused with the choices, an unknown one with the nearest
/// names, never corrected. "residue", "solids", "NV" and the like stand for what does not boil; a short list of salts
/// is recognised, so that they can be flagged as outside the model; "unknown" and "others" stand for what was not
/// identified.
#pragma once

#include <optional>
#include <string>

#include "params/catalog.hpp"
#include "params/errors.hpp"

namespace stillshed {

/// What does not boil, by what its name says.
enum class NonvolatileKind { residue, salt, unknown };
[[nodiscard]] std::optional<NonvolatileKind> nonvolatile_kind(const std::string& name);

/// "dichloromethane (75-09-2), chloroform (67-66-3)" of the choices or suggestions of a look-up.
[[nodiscard]] std::string substance_choices(const Lookup& lookup);

/// What to tell about a name that was not found, or is ambiguous.
[[nodiscard]] Problem substance_problem(const std::string& where, const std::string& name, const Lookup& lookup);

}  // namespace stillshed
