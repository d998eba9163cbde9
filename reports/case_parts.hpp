/// The parts of the case-file reader: each reads one block, adds every problem it finds, and goes on.
/// Used by case_reader.cpp only; what a case means is told in case_reader.hpp.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "params/catalog.hpp"
#include "reports/case_file.hpp"
#include "reports/strict_json.hpp"
#include "reports/substance.hpp"

namespace stillshed {

/// Where we are reading, and everything found wrong so far.
struct CaseContext {
  std::string source;  ///< file name or "command line"
  const Catalog* catalog = nullptr;
  std::map<std::string, std::string> spoken;  ///< JSON pointer -> the words of a command line that it came from
  Problems problems;
  std::vector<std::string> notes;

  /// "case.json: /stream/acetone", or the words on the command line.
  [[nodiscard]] std::string at(const std::string& pointer) const;
  void refuse(const std::string& pointer, const std::string& found, const std::string& allowed,
              const std::string& remedy = "");
};

// Readers of single values: nothing, and a problem, when the value is of another kind.
[[nodiscard]] std::optional<std::string> read_text(CaseContext& context, const std::string& pointer,
                                                   const OrderedJson& json, const std::string& allowed);
[[nodiscard]] std::optional<double> read_finite(CaseContext& context, const std::string& pointer,
                                                const OrderedJson& json);
[[nodiscard]] std::optional<double> read_positive(CaseContext& context, const std::string& pointer,
                                                  const OrderedJson& json);
/// A whole number from `low` to `high`.
[[nodiscard]] std::optional<int> read_whole(CaseContext& context, const std::string& pointer, const OrderedJson& json,
                                            int low, int high);
/// True when `json` is an object; every key not in `allowed` is a problem.
bool read_object(CaseContext& context, const std::string& pointer, const OrderedJson& json,
                 const std::vector<std::string>& allowed);

/// One component of the case while it is being read.
struct CaseComponent {
  StreamEntry entry;
  const ComponentRecord* record = nullptr;  ///< on file; null for the user's own
  std::optional<MixtureComponent> own;
  double molar_mass_g_mol = 0.0;
  std::optional<double> density_kg_m3;
  std::string density_note;  ///< where the density comes from
  std::string pointer;       ///< of its amount; empty when the stream does not hold it
};

/// Something that does not boil.
struct Nonvolatile {
  NonvolatileKind kind = NonvolatileKind::residue;
  std::string given_name;
  std::string given_amount;
  std::string pointer;
};

struct CaseStream {
  std::vector<CaseComponent> components;
  std::vector<Nonvolatile> nonvolatile;
};

/// "/components": the user's own and those on file, in the order of every matrix. Amounts are not yet known.
[[nodiscard]] std::vector<CaseComponent> read_components(CaseContext& context, const OrderedJson& json);

/// "/stream": names and amounts as given. `declared` holds what "/components" declared (may be empty).
[[nodiscard]] CaseStream read_stream(CaseContext& context, const OrderedJson& json,
                                     std::vector<CaseComponent> declared);

/// Mole and mass fractions from the amounts as given; sums judged; fills the stream of the case, its residue and,
/// when amounts are absolute, its total. Returns which components stay (those that are there at all).
std::vector<int> settle_amounts(CaseContext& context, const CaseStream& stream, Case& result);

/// "/model" as an object.
[[nodiscard]] std::optional<ActivityModel> read_model(CaseContext& context, const std::string& pointer,
                                                      const OrderedJson& json,
                                                      const std::vector<CaseComponent>& components);

/// "/products"; components as indices into `components`.
[[nodiscard]] std::vector<ProductWish> read_products(CaseContext& context, const OrderedJson& json,
                                                     const std::vector<CaseComponent>& components);

/// "/plant".
[[nodiscard]] Plant read_plant(CaseContext& context, const OrderedJson& json);

/// Which of these components a name means; nothing, and a problem, when none.
[[nodiscard]] std::optional<int> find_component(CaseContext& context, const std::string& pointer,
                                                const std::string& name, const std::vector<CaseComponent>& components);

/// The substance on file that a name means, or null and a problem that tells the choices or the nearest names.
[[nodiscard]] const ComponentRecord* find_substance(CaseContext& context, const std::string& pointer,
                                                    const std::string& name);

}  // namespace stillshed
