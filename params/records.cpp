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

}  // namespace stillshed
