#include "params/records.hpp"

namespace stillshed {

const char* to_string(PressureForm form) {
  switch (form) {
    case PressureForm::antoine_log10: return "antoine-log10";
    case PressureForm::wagner_25: return "wagner-25";
    case PressureForm::wagner_36: return "wagner-36";
    case PressureForm::wagner_water: return "wagner-water";
    case PressureForm::perry_101: return "perry-101";
    case PressureForm::clausius_clapeyron: return "clausius-clapeyron";
  }
  return "unknown";
}

const char* to_string(GroupModel model) {
  return model == GroupModel::unifac ? "unifac" : "unifac-dortmund";
}

const char* to_string(AzeotropeKind kind) {
  switch (kind) {
    case AzeotropeKind::none: return "none";
    case AzeotropeKind::minimum: return "minimum";
    case AzeotropeKind::maximum: return "maximum";
    case AzeotropeKind::saddle: return "saddle";
    case AzeotropeKind::heterogeneous_minimum: return "heterogeneous-minimum";
  }
  return "unknown";
}

const char* to_string(CautionTrigger trigger) {
  switch (trigger) {
    case CautionTrigger::always: return "always";
    case CautionTrigger::substance: return "substance";
    case CautionTrigger::hazard: return "hazard";
    case CautionTrigger::pair: return "pair";
    case CautionTrigger::declared: return "declared";
    case CautionTrigger::near_dry: return "near-dry";
    case CautionTrigger::unknowns: return "unknowns";
    case CautionTrigger::low_ignition: return "low-ignition";
    case CautionTrigger::flash_point: return "flash-point";
    case CautionTrigger::region: return "region";
    case CautionTrigger::use: return "use";
    case CautionTrigger::pressure: return "pressure";
    case CautionTrigger::vacuum: return "vacuum";
    case CautionTrigger::two_liquids: return "two-liquids";
    case CautionTrigger::extrapolated: return "extrapolated";
  }
  return "unknown";
}

const char* to_string(CheckKind kind) {
  switch (kind) {
    case CheckKind::activity: return "activity";
    case CheckKind::boiling_point: return "boiling-point";
    case CheckKind::fenske: return "fenske";
    case CheckKind::azeotropes: return "azeotropes";
  }
  return "unknown";
}

}  // namespace stillshed
