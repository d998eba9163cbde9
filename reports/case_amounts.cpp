/// Amounts of a stream: one basis for all of them, sums judged, zero amounts dropped.
#include <algorithm>
#include <cmath>
#include <cstdio>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

/// A sum may miss the whole by this much; it is rescaled then, with a note.
constexpr double kSumTolerance = 0.005;
constexpr double kSumRounding = 1e-9;

std::string shortest(double value) {
  char text[32];
  std::snprintf(text, sizeof text, "%.6g", value);
  return text;
}

bool is_fraction(Dimension dimension) {
  return dimension == Dimension::mass_fraction || dimension == Dimension::mole_fraction ||
         dimension == Dimension::volume_fraction;
}

const char* percent_word(Dimension basis) {
  switch (basis) {
    case Dimension::mole_fraction: return "mol%";
    case Dimension::volume_fraction: return "vol%";
    default: return "wt%";
  }
}

/// Works through one stream: readings first, then the sum, then fractions.
class Settlement {
 public:
  Settlement(CaseContext& context, const CaseStream& stream) : context_(context), stream_(stream) {}

  /// False when the amounts do not make a mixture.
  bool settle();
  std::vector<int> fill(Case& result);

 private:
  struct Item {
    std::string pointer;
    std::string name;
    bool boils = true;
    AmountReading reading;
  };
  void read_all();
  bool choose_basis();
  bool fill_rest_and_judge_sum();
  bool judge_sum(double sum, double low, double high);
  bool to_masses();
  void note_density(const CaseComponent& component, double density);

  CaseContext& context_;
  const CaseStream& stream_;
  std::vector<Item> items_;  ///< components in order, then what does not boil
  Dimension basis_ = Dimension::mass_fraction;
  std::vector<double> mass_;  ///< of each item: kg, or relative
};

void Settlement::read_all() {
  for (const CaseComponent& component : stream_.components) {
    Item item{component.pointer, component.entry.given_name, true, {}};
    if (component.pointer.empty()) {
      context_.notes.push_back(component.entry.given_name + " is declared but not in the stream: left out");
    } else if (!component.entry.given_amount.empty()) {
      item.reading = read_amount(component.entry.given_amount, context_.at(component.pointer), context_.problems)
                         .value_or(AmountReading{});
    }
    items_.push_back(item);
  }
  for (const Nonvolatile& part : stream_.nonvolatile) {
    Item item{part.pointer, part.given_name, false, {}};
    if (!part.given_amount.empty()) {
      item.reading =
          read_amount(part.given_amount, context_.at(part.pointer), context_.problems).value_or(AmountReading{});
    }
    items_.push_back(item);
  }
}

/// Percentages of one kind for everything that boils, or absolute amounts for everything.
bool Settlement::choose_basis() {
  const Item* first = nullptr;
  const Item* rest = nullptr;
  const std::size_t before = context_.problems.size();
  for (const Item& item : items_) {
    if (item.pointer.empty()) {
      continue;
    }
    if (item.reading.rest) {
      if (rest != nullptr) {
        context_.refuse(item.pointer, "a second \"rest\"", "one \"rest\" in a stream");
      }
      rest = &item;
      continue;
    }
    if (first == nullptr && item.boils) {
      first = &item;
      basis_ = item.reading.dimension;
    }
  }
  if (first == nullptr) {
    context_.refuse("/stream", "no amount of anything that boils", "amounts of at least two components");
    return false;
  }
  for (const Item& item : items_) {
    if (item.pointer.empty() || item.reading.rest) {
      continue;
    }
    const Dimension dimension = item.reading.dimension;
    if (!item.boils) {
      if (dimension != Dimension::mass_fraction && (dimension != Dimension::mass || is_fraction(basis_))) {
        context_.refuse(item.pointer, std::string("an amount by ") + to_string(dimension),
                        is_fraction(basis_) ? "wt% of the whole stream" : "kg, or wt% of the whole stream");
      }
    } else if (is_fraction(basis_) ? dimension != basis_ : is_fraction(dimension)) {
      context_.refuse(
          item.pointer, std::string("a ") + to_string(dimension),
          std::string("the same basis for all: \"") + first->name + "\" is given as a " + to_string(basis_));
    }
  }
  if (rest != nullptr && (!is_fraction(basis_) || (!rest->boils && basis_ != Dimension::mass_fraction))) {
    context_.refuse(rest->pointer, "\"rest\"", "\"rest\" where the other amounts are percentages of the same whole");
  }
  return context_.problems.size() == before;
}

bool Settlement::judge_sum(double sum, double low, double high) {
  const bool ranges = low < high;
  if (low > 1.0 + kSumTolerance + kSumRounding || high < 1.0 - kSumTolerance - kSumRounding) {
    const std::string found = ranges ? shortest(100.0 * low) + " to " + shortest(100.0 * high) : shortest(100.0 * sum);
    context_.refuse("/stream", "amounts that add up to " + found + " " + percent_word(basis_),
                    "a sum within 0.5 of 100 " + std::string(percent_word(basis_)),
                    "correct an amount, or write \"rest\" for one of them");
    return false;
  }
  if (std::abs(sum - 1.0) > kSumRounding) {
    context_.notes.push_back(std::string(ranges ? "middles of the ranges" : "amounts") + " add up to " +
                             shortest(100.0 * sum) + " " + percent_word(basis_) + ": rescaled to 100");
  }
  return true;
}

bool Settlement::fill_rest_and_judge_sum() {
  if (!is_fraction(basis_)) {
    return true;
  }
  double sum = 0.0;
  double low = 0.0;
  double high = 0.0;
  Item* rest = nullptr;
  for (Item& item : items_) {
    const bool counts = item.boils || basis_ == Dimension::mass_fraction;
    if (item.pointer.empty() || !counts) {
      continue;
    }
    if (item.reading.rest) {
      rest = &item;
      continue;
    }
    sum += item.reading.value;
    low += item.reading.low.value_or(item.reading.value);
    high += item.reading.high.value_or(item.reading.value);
  }
  if (rest == nullptr) {
    return judge_sum(sum, low, high);
  }
  if (!(sum < 1.0)) {
    context_.refuse(rest->pointer,
                    "nothing left: the others add up to " + shortest(100.0 * sum) + " " + percent_word(basis_),
                    "less than 100 besides the rest");
    return false;
  }
  rest->reading.rest = false;
  rest->reading.dimension = basis_;
  rest->reading.value = 1.0 - sum;
  context_.notes.push_back(rest->name + " is the rest: " + shortest(100.0 * rest->reading.value) + " " +
                           percent_word(basis_));
  return true;
}

void Settlement::note_density(const CaseComponent& component, double density) {
  std::string note =
      "volumes before mixing; density of " + component.entry.given_name + " " + shortest(density) + " kg/m3";
  if (component.record != nullptr) {
    if (component.record->liquid_density_T_K.has_value()) {
      note += " at " + shortest(*component.record->liquid_density_T_K - 273.15) + " degC";
    }
    note += " (" + context_.catalog->citation(component.record->liquid_density_kg_m3->source) + ")";
  } else {
    note += " (" + component.density_note + ")";
  }
  context_.notes.push_back(note);
}

bool Settlement::to_masses() {
  const std::size_t before = context_.problems.size();
  mass_.assign(items_.size(), 0.0);
  for (std::size_t k = 0; k < stream_.components.size(); ++k) {
    const CaseComponent& component = stream_.components[k];
    const AmountReading& reading = items_[k].reading;
    if (reading.value == 0.0 || component.pointer.empty()) {
      continue;
    }
    if (reading.dimension == Dimension::mole_fraction || reading.dimension == Dimension::amount) {
      mass_[k] = reading.value * component.molar_mass_g_mol * 1e-3;
    } else if (reading.dimension == Dimension::volume_fraction || reading.dimension == Dimension::volume) {
      std::optional<double> density = component.density_kg_m3;
      if (!density.has_value() && component.record != nullptr && component.record->liquid_density_kg_m3.has_value()) {
        density = component.record->liquid_density_kg_m3->value;
      }
      if (!density.has_value()) {
        context_.refuse(component.pointer, "a volume of " + component.entry.given_name,
                        "wt%, mol%, kg or mol: no liquid density is on file for it");
        continue;
      }
      note_density(component, *density);
      mass_[k] = reading.value * *density;
    } else {
      mass_[k] = reading.value;
    }
  }
  double volatile_mass = 0.0;
  for (const double mass : mass_) {
    volatile_mass += mass;
  }
  // What does not boil: kilograms as they are; otherwise its share of the whole fixes the whole.
  double share = 0.0;
  double kilograms = 0.0;
  for (std::size_t k = stream_.components.size(); k < items_.size(); ++k) {
    (items_[k].reading.dimension == Dimension::mass ? kilograms : share) += items_[k].reading.value;
  }
  if (basis_ == Dimension::mass_fraction) {
    for (std::size_t k = stream_.components.size(); k < items_.size(); ++k) {
      mass_[k] = items_[k].reading.value;
    }
  } else {
    if (!(share < 1.0)) {
      context_.refuse("/stream", "nothing that boils", "a residue below 100 wt%");
      return false;
    }
    const double whole = (volatile_mass + kilograms) / (1.0 - share);
    for (std::size_t k = stream_.components.size(); k < items_.size(); ++k) {
      const AmountReading& reading = items_[k].reading;
      mass_[k] = reading.dimension == Dimension::mass ? reading.value : reading.value * whole;
    }
  }
  if (context_.problems.size() == before && !(volatile_mass > 0.0)) {
    context_.refuse("/stream", "no amount of anything that boils", "amounts above zero");
  }
  return context_.problems.size() == before;
}

bool Settlement::settle() {
  const std::size_t before = context_.problems.size();
  read_all();
  if (context_.problems.size() > before || !choose_basis() || !fill_rest_and_judge_sum()) {
    return false;
  }
  return to_masses();
}

std::vector<int> Settlement::fill(Case& result) {
  double whole = 0.0;
  double moles = 0.0;
  for (std::size_t k = 0; k < items_.size(); ++k) {
    whole += mass_[k];
    if (items_[k].boils) {
      moles += mass_[k] / stream_.components[k].molar_mass_g_mol;
    }
  }
  std::vector<int> kept;
  for (std::size_t k = 0; k < items_.size(); ++k) {
    const double fraction = mass_[k] / whole;
    if (!items_[k].boils) {
      const Nonvolatile& part = stream_.nonvolatile[k - stream_.components.size()];
      result.residue_mass_fraction += fraction;
      if (part.kind == NonvolatileKind::salt) {
        result.salt_mass_fraction += fraction;
        result.salts.push_back(part.given_name);
        context_.notes.push_back(part.given_name +
                                 " is a salt: kept in the balance, its effect on volatility is not modelled");
      } else if (part.kind == NonvolatileKind::unknown) {
        result.unknown_mass_fraction += fraction;
        context_.notes.push_back(part.given_name + ": not identified, kept in the balance as if it did not boil");
      }
      continue;
    }
    if (mass_[k] == 0.0) {
      if (!items_[k].pointer.empty()) {
        context_.notes.push_back(items_[k].name + " has amount zero: left out");
      }
      continue;
    }
    StreamEntry entry = stream_.components[k].entry;
    entry.mass_fraction = fraction;
    entry.mole_fraction = mass_[k] / stream_.components[k].molar_mass_g_mol / moles;
    const AmountReading& reading = items_[k].reading;
    if (reading.low.has_value()) {
      entry.low = fraction * *reading.low / reading.value;
      entry.high = fraction * *reading.high / reading.value;
      context_.notes.push_back(entry.given_name + " is given as a range: calculated with its middle");
    }
    result.stream.push_back(entry);
    kept.push_back(static_cast<int>(k));
  }
  if (!is_fraction(basis_)) {
    result.amount_kg = whole;
  }
  return kept;
}

}  // namespace

std::vector<int> settle_amounts(CaseContext& context, const CaseStream& stream, Case& result) {
  Settlement settlement(context, stream);
  if (!settlement.settle()) {
    return {};
  }
  const std::vector<int> kept = settlement.fill(result);
  if (kept.size() < 2) {
    context.refuse("/stream", kept.empty() ? "no component that boils" : "one component that boils",
                   "2 to " + std::to_string(kMaxComponents) + " components that boil");
  } else if (kept.size() > static_cast<std::size_t>(kMaxComponents)) {
    context.refuse("/stream", std::to_string(kept.size()) + " components",
                   "2 to " + std::to_string(kMaxComponents) + " components", "leave out the smallest traces");
  }
  return kept;
}

}  // namespace stillshed
