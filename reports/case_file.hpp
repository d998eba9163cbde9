/// What the user asked, in the program's own terms: case file (JSON) or quick form, checked.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "engine/reach.hpp"
#include "models/mixture.hpp"

namespace stillshed {

/// One line of the stream as written and as understood.
struct StreamEntry {
  std::string given_name;
  std::string id;              ///< component id (catalog or user's own)
  std::string given_amount;    ///< "41 wt%"
  double mole_fraction = 0.0;  ///< of the volatile part (midpoint of a range)
  double mass_fraction = 0.0;  ///< of the whole stream, residue included
  std::optional<double> low;   ///< of a range or "<" form, mass fraction of the whole stream
  std::optional<double> high;
};

struct Plant {
  std::optional<int> stages;
  std::optional<double> pressure_low_Pa;
  std::optional<double> pressure_high_Pa;
  std::optional<double> coolant_K;
  std::optional<double> heating_K;
  std::optional<double> decanter_K;
};

struct ProductWish {
  std::string id;
  std::vector<std::string> given_tests;  ///< as written
  std::vector<ProductTest> tests;        ///< component = index into `stream`
  bool default_tests = false;            ///< nothing was asked: ">= 99.5 wt%"
};

struct Case {
  std::string title;
  std::vector<StreamEntry> stream;     ///< order of the input; fixes the order of every matrix
  double residue_mass_fraction = 0.0;  ///< everything that does not boil: residue, salts, unknowns
  double salt_mass_fraction = 0.0;     ///< part of the residue
  double unknown_mass_fraction = 0.0;  ///< part of the residue: "unknown", "others"
  std::vector<std::string> salts;      ///< names as given
  std::optional<double> amount_kg;
  double pressure_Pa = 101325.0;
  std::string given_pressure;
  std::string model = "auto";  ///< "auto", "unifac", ..., or "user" when given in full
  std::optional<ActivityModel> user_model;
  std::vector<std::optional<MixtureComponent>> user_components;  ///< per stream entry
  std::vector<ProductWish> products;
  Plant plant;
  std::vector<std::string> declared;  ///< history, region and use that bring up cautions
  std::vector<std::string> notes;     ///< rescaled sums, densities used, unit readings
  std::string echo_json;              ///< the input as read, for the result's echo
};

}  // namespace stillshed
