#include "reports/check_task.hpp"

#include <algorithm>
#include <cmath>

#include "reports/case_reader.hpp"
#include "reports/format.hpp"
#include "reports/json_write.hpp"
#include "reports/run_case.hpp"

namespace stillshed {
namespace {

constexpr int kDigits = 6;

bool within(double computed, double expected, const CheckValue& check) {
  const double allowed = std::max(check.tolerance, check.relative_tolerance * std::abs(expected));
  return std::abs(computed - expected) <= allowed;  // NaN fails
}

CheckLine line_for(const CheckValue& check, const std::string& what, double computed, double expected) {
  CheckLine line;
  line.id = check.id;
  line.what = what;
  line.computed = significant(computed, kDigits);
  line.published = significant(expected, kDigits);
  line.source = check.source;
  line.agrees = within(computed, expected, check);
  return line;
}

/// The table as the source had it: pairs that were revised since take their former values.
GroupTable table_of_the_time(const GroupTable& table, const std::vector<std::pair<int, int>>& superseded_pairs) {
  GroupTable result = table;
  for (const SupersededInteraction& old : table.superseded) {
    for (const auto& pair : superseded_pairs) {
      if (std::minmax(old.m, old.n) == std::minmax(pair.first, pair.second)) {
        result.interactions[{old.m, old.n}] = old.mn;
        result.interactions[{old.n, old.m}] = old.nm;
      }
    }
  }
  return result;
}

Composition composition_of(const std::vector<double>& numbers) {
  Composition x;
  for (const double number : numbers) {
    x.push_back(number);
  }
  return x;
}

Composition nrtl_ln_gamma(const CheckValue& check) {
  const int n = static_cast<int>(check.mole_fractions.size());
  NrtlParameters parameters(n);
  for (int i = 0; i < n; ++i) {
    for (int j = 0; j < n; ++j) {
      parameters.tau.a(i, j) = check.tau[static_cast<std::size_t>(i)][static_cast<std::size_t>(j)];
      parameters.alpha(i, j) = check.alpha[static_cast<std::size_t>(i)][static_cast<std::size_t>(j)];
    }
  }
  return Nrtl(parameters).ln_gamma(check.temperature_K, composition_of(check.mole_fractions));
}

Composition group_ln_gamma(const CheckValue& check, const Catalog& catalog) {
  const GroupModel model = check.model == to_string(GroupModel::dortmund) ? GroupModel::dortmund : GroupModel::unifac;
  std::vector<GroupAssignment> assignments;
  for (const std::vector<GroupCount>& groups : check.groups) {
    assignments.emplace_back().groups = groups;
  }
  const Unifac unifac(table_of_the_time(catalog.table(model), check.superseded_pairs), assignments, check.names);
  return unifac.ln_gamma(check.temperature_K, composition_of(check.mole_fractions));
}

void activity_lines(const CheckValue& check, const Catalog& catalog, std::vector<CheckLine>& lines) {
  const Composition ln_gamma = check.model == "nrtl" ? nrtl_ln_gamma(check) : group_ln_gamma(check, catalog);
  for (int i = 0; i < ln_gamma.size(); ++i) {
    const auto at = static_cast<std::size_t>(i);
    const std::string name = at < check.names.size() ? check.names[at] : "component " + std::to_string(i + 1);
    lines.push_back(line_for(check, "gamma " + name + ", " + check.model + ", " + fixed(check.temperature_K, 2) + " K",
                             std::exp(ln_gamma[i]), check.expected[at]));
  }
}

void boiling_point_line(const CheckValue& check, const Catalog& catalog, std::vector<CheckLine>& lines) {
  const ComponentRecord* record = catalog.by_id(check.component);
  expects(record != nullptr && !record->pressure_sets.empty(), "check value for a component without vapour pressure");
  const double computed = PressureCurve(record->pressure_sets.front()).boiling_point_K(check.pressure_Pa);
  lines.push_back(line_for(check, "boiling point " + check.component + ", K", computed, check.expected.front()));
}

void fenske_line(const CheckValue& check, std::vector<CheckLine>& lines) {
  const double ratio = check.purity / (1.0 - check.purity);
  const double stages = 2.0 * std::log(ratio) / std::log(check.relative_volatility);
  lines.push_back(line_for(
      check, "stages, alpha " + significant(check.relative_volatility, 4) + ", purity " + significant(check.purity, 4),
      stages, check.expected.front()));
}

/// The survey of a case must find exactly the azeotropes listed, in any order.
void azeotrope_line(const CheckValue& check, const Catalog& catalog, std::vector<CheckLine>& lines) {
  const Case input = read_case(check.case_json, check.id, catalog);
  const Answer answer = run_case(input, catalog, Task::survey);
  int matched = 0;
  for (const CheckAzeotrope& expected : check.azeotropes) {
    for (const Azeotrope& found : answer.survey->azeotropes) {
      bool same = found.point.members.size() == static_cast<int>(expected.components.size()) &&
                  std::abs(found.point.temperature_K - expected.temperature_K) <= check.tolerance;
      for (std::size_t k = 0; k < expected.components.size() && same; ++k) {
        for (int i = 0; i < answer.mixture.size(); ++i) {
          if (answer.mixture.component(i).id == expected.components[k]) {
            same = std::abs(found.point.x[i] - expected.mole_fractions[k]) <= check.tolerance;
          }
        }
      }
      if (same) {
        ++matched;
        break;
      }
    }
  }
  CheckLine line;
  line.id = check.id;
  line.what = "azeotropes of " + check.id;
  line.computed = std::to_string(answer.survey->azeotropes.size()) + ", " + std::to_string(matched) + " agree";
  line.published = std::to_string(check.azeotropes.size());
  line.source = check.source;
  line.agrees = answer.survey->azeotropes.size() == check.azeotropes.size() &&
                matched == static_cast<int>(check.azeotropes.size());
  lines.push_back(line);
}

void add_lines(const CheckValue& check, const Catalog& catalog, std::vector<CheckLine>& lines) {
  switch (check.kind) {
    case CheckKind::activity: activity_lines(check, catalog, lines); return;
    case CheckKind::boiling_point: boiling_point_line(check, catalog, lines); return;
    case CheckKind::fenske: fenske_line(check, lines); return;
    case CheckKind::azeotropes: azeotrope_line(check, catalog, lines); return;
  }
}

}  // namespace

int CheckAnswer::mismatches() const {
  return static_cast<int>(
      std::count_if(lines.begin(), lines.end(), [](const CheckLine& line) { return !line.agrees; }));
}

CheckAnswer run_checks(const Catalog& catalog) {
  CheckAnswer answer;
  for (const CheckValue& check : catalog.facts().check_values) {
    try {
      add_lines(check, catalog, answer.lines);
    } catch (const InputError& error) {
      answer.lines.push_back(
          {check.id, "could not be computed: " + std::string(error.what()), "-", "-", check.source, false});
    }
  }
  for (CheckLine& line : answer.lines) {
    line.source = catalog.citation(line.source);
  }
  return answer;
}

std::string check_json(const CheckAnswer& answer) {
  JsonWriter json;
  json.open_object();
  json.member("stillshed_check", 1);
  json.member("mismatches", answer.mismatches());
  json.open_array("values");
  for (const CheckLine& line : answer.lines) {
    json.open_object(JsonWriter::Layout::inline_);
    json.member("id", line.id);
    json.member("what", line.what);
    json.member("computed", line.computed);
    json.member("published", line.published);
    json.member("source", line.source);
    json.member("agrees", line.agrees);
    json.close();
  }
  json.close();
  json.close();
  return json.finish();
}

std::string check_text(const CheckAnswer& answer, int width) {
  std::vector<std::string> sources;
  TextTable table;
  table.column("");
  table.column("what");
  table.column("computed", TextTable::Align::right);
  table.column("published", TextTable::Align::right);
  table.column("source");
  for (const CheckLine& line : answer.lines) {
    auto at = std::find(sources.begin(), sources.end(), line.source);
    if (at == sources.end()) {
      at = sources.insert(sources.end(), line.source);
    }
    const std::string number = "[" + std::to_string(at - sources.begin() + 1) + "]";
    table.row({line.agrees ? "ok" : "MISMATCH", line.what, line.computed, line.published, number});
  }
  std::string text;
  for (const std::string& line : table.lines(width)) {
    text += line + "\n";
  }
  text += "\n";
  for (std::size_t k = 0; k < sources.size(); ++k) {
    const std::string first = "[" + std::to_string(k + 1) + "] ";
    for (const std::string& line : wrap(sources[k], width, first, std::string(first.size(), ' '))) {
      text += line + "\n";
    }
  }
  const int mismatches = answer.mismatches();
  text +=
      "\n" + std::to_string(answer.lines.size()) + " values, " +
      (mismatches == 0 ? "all agree" : std::to_string(mismatches) + (mismatches == 1 ? " mismatch" : " mismatches")) +
      "\n";
  return text;
}

}  // namespace stillshed
