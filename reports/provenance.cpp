#include "reports/provenance.hpp"

#include <algorithm>

#include "reports/format.hpp"

namespace stillshed {

std::string range_text(const PressureSet& set) {
  if (!set.t_min_K.has_value() || !set.t_max_K.has_value()) {
    return "valid everywhere";
  }
  return "from " + fixed(*set.t_min_K, 2) + " to " + fixed(*set.t_max_K, 2) + " K";
}

namespace {

void pressure_lines(const Answer& answer, const Catalog& catalog, std::vector<std::string>& lines) {
  for (const MixtureComponent& component : answer.mixture.components()) {
    const PressureSet& set = component.pressure.set();
    std::string line = "vapour pressure of " + component.id + ": ";
    if (set.source == "user") {
      line += "the user's own " + std::string(to_string(set.form));
    } else {
      line += set.id + ", " + range_text(set) + "; " + catalog.citation(set.source);
      line += set.where.empty() ? "" : ", " + set.where;
      line += set.estimated ? " (estimated)" : "";
    }
    lines.push_back(line);
  }
}

void model_lines(const Answer& answer, const Catalog& catalog, std::vector<std::string>& lines) {
  const GroupTable* table = answer.model_kind == to_string(GroupModel::unifac)     ? &catalog.facts().unifac
                            : answer.model_kind == to_string(GroupModel::dortmund) ? &catalog.facts().dortmund
                                                                                   : nullptr;
  if (table == nullptr) {
    lines.push_back("activity coefficients: " + answer.model_kind + ", " + answer.model_note);
    return;
  }
  for (const std::string& source : table->sources) {
    lines.push_back("activity coefficients: " + table->title + "; " + catalog.citation(source));
  }
}

void component_lines(const std::vector<const ComponentRecord*>& records, const Catalog& catalog,
                     std::vector<std::string>& lines) {
  for (const ComponentRecord* record : records) {
    if (record == nullptr) {
      continue;
    }
    for (const auto& [what, value] :
         {std::pair("critical pressure", &record->critical_pressure_Pa),
          std::pair("melting point", &record->melting_point_K), std::pair("flash point", &record->flash_point_K)}) {
      if (value->has_value()) {
        lines.push_back(std::string(what) + " of " + record->id + ": " + catalog.citation((*value)->source));
      }
    }
  }
}

void measured_lines(const Answer& answer, std::vector<std::string>& lines) {
  const auto add = [&](const MeasuredMatch& match) {
    const std::string line = "measured azeotrope, tier " + std::string(1, match.tier) + ": " + match.source;
    if (std::find(lines.begin(), lines.end(), line) == lines.end()) {
      lines.push_back(line);
    }
  };
  for (const std::vector<MeasuredMatch>& matches : answer.measured) {
    std::for_each(matches.begin(), matches.end(), add);
  }
  std::for_each(answer.measured_only.begin(), answer.measured_only.end(), add);
}

void caution_lines(const Answer& answer, const Catalog& catalog, std::vector<std::string>& lines) {
  for (const Caution& caution : answer.cautions) {
    for (const CautionRecord& record : catalog.facts().cautions) {
      if (record.code != caution.code || record.text != caution.text) {
        continue;
      }
      std::string sources;
      for (const std::string& key : record.sources) {
        sources += (sources.empty() ? "" : "; ") + catalog.citation(key);
      }
      lines.push_back("caution " + record.code + ": " + sources);
    }
  }
}

}  // namespace

std::vector<std::string> provenance_lines(const Answer& answer, const std::vector<const ComponentRecord*>& records,
                                          const Catalog& catalog) {
  std::vector<std::string> lines;
  pressure_lines(answer, catalog, lines);
  model_lines(answer, catalog, lines);
  component_lines(records, catalog, lines);
  measured_lines(answer, lines);
  caution_lines(answer, catalog, lines);
  return lines;
}

}  // namespace stillshed
