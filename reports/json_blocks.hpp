/// Inside of the JSON report: the writer of one answer, shared by json_report.cpp and json_reach.cpp.
#pragma once

#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "reports/findings.hpp"
#include "reports/json_write.hpp"

namespace stillshed {

/// Collects why members of one object are null; written as its last member.
class WhyNull {
 public:
  void add(std::string key, std::string reason) { reasons_.emplace_back(std::move(key), std::move(reason)); }
  void write(JsonWriter& json) const;

 private:
  std::vector<std::pair<std::string, std::string>> reasons_;
};

/// Writes one answer block by block; json_report.cpp has the survey's blocks, json_reach.cpp the later ones.
class ResultWriter {
 public:
  explicit ResultWriter(const Answer& answer) : answer_(answer), points_(fixed_points(answer)) {}

  [[nodiscard]] std::string text();

 private:
  using Layout = JsonWriter::Layout;
  const std::string& id(int component) const { return answer_.mixture.component(component).id; }
  const std::string& point_id(int k) const { return points_.at(static_cast<std::size_t>(k)).id; }

  void composition(const Composition& x);
  void composition(const char* key, const Composition& x);
  void mass_composition(const char* key, const Composition& x);
  void compositions(const char* key, const std::vector<Composition>& points);
  void numbers(const char* key, const std::vector<double>& values);
  void pair_of_numbers(const char* key, double low, double high) { numbers(key, {low, high}); }
  void texts(const char* key, const std::vector<std::string>& values, Layout layout = Layout::inline_);
  void member_ids(const char* key, const Members& members);
  void box_members(const Box& box);
  void amount(const char* key, const Composition& x, double share);

  void head();
  void model();
  void pressure_record(int component);
  void components();
  void azeotropes();
  void azeotrope(std::size_t k);
  void measured(const std::vector<MeasuredMatch>& matches, const char* key);
  void rejected_roots();
  void fixed_point_list();
  void proof();
  void face(const FaceProof& proof);
  void chart();
  void curve(const ResidueCurve& residue_curve);
  void feed(const Position& position);
  void nearest(const char* key, const std::optional<Nearest>& nearest, WhyNull& why);
  void batch();
  void cut(const Cut& cut);
  void sequences();
  void sequence(const Sequence& sequence, std::size_t k);
  void stages();
  void products();
  void product(const ProductOutcome& outcome, std::size_t k);
  void tail();

  const Answer& answer_;
  std::vector<FixedPoint> points_;
  JsonWriter json_;
};

}  // namespace stillshed
