#include "tests/reports/sample_answer.hpp"

#include <utility>

namespace stillshed::sample {
namespace {

FixedPoint fixed_point(const std::string& id, const Members& members, const Composition& x, double temperature_K,
                       NodeType node, std::vector<double> eigenvalues) {
  FixedPoint point;
  point.id = id;
  point.members = members;
  point.x = x;
  point.temperature_K = temperature_K;
  point.node = node;
  point.eigenvalues = std::move(eigenvalues);
  return point;
}

Curve straight(const Composition& from, const Composition& to, double t_from_K, double t_to_K, int pieces = 20) {
  Curve curve;
  for (int k = 0; k <= pieces; ++k) {
    const double s = static_cast<double>(k) / pieces;
    Composition x(from.size());
    for (int i = 0; i < from.size(); ++i) {
      x[i] = (1.0 - s) * from[i] + s * to[i];
    }
    curve.points.push_back(x);
    curve.temperature_K.push_back((1.0 - s) * t_from_K + s * t_to_K);
  }
  return curve;
}

Curve bent(const Composition& from, const Composition& to, double t_from_K, double t_to_K, double bend) {
  Curve curve = straight(from, to, t_from_K, t_to_K, 40);
  for (std::size_t k = 0; k < curve.points.size(); ++k) {
    const double s = static_cast<double>(k) / 40.0;
    const double shift = 4.0 * bend * s * (1.0 - s);
    curve.points[k][2] += shift;
    curve.points[k][0] -= 0.5 * shift;
    curve.points[k][1] -= 0.5 * shift;
  }
  return curve;
}

FaceProof face(const Members& members, Status status, int sum) {
  FaceProof proof;
  proof.members = members;
  proof.status = status;
  proof.t_lower_K = 310.0;
  proof.t_upper_K = 375.0;
  proof.boxes = 120;
  proof.index_sum = sum;
  proof.index_expected = sum;
  proof.index_holds = true;
  return proof;
}

Chart ternary_chart(const Survey& survey) {
  Chart chart;
  chart.status = Status::complete;
  chart.pressure_Pa = survey.pressure_Pa;
  chart.fixed_points = {survey.azeotropes[0].point, survey.pure[0], survey.pure[1], survey.pure[2]};
  Boundary boundary;
  boundary.id = "b1";
  boundary.from = 0;
  boundary.to = 3;
  boundary.confines = Confines::bottoms;
  boundary.curve = bent({0.78, 0.22, 0.0}, {0.0, 0.0, 1.0}, 328.4, 373.15, 0.08);
  boundary.error = 5e-5;
  chart.boundaries = {boundary};
  Region west{"r1", 0, 3, {"b1"}, {{0.0, 0.0, 1.0}, {0.78, 0.22, 0.0}, {0.0, 1.0, 0.0}}, 0.75};
  Region east{"r2", 0, 3, {"b1"}, {{0.0, 0.0, 1.0}, {1.0, 0.0, 0.0}, {0.78, 0.22, 0.0}}, 0.25};
  chart.regions = {west, east};
  ResidueCurve curve;
  curve.status = Status::complete;
  curve.curve = bent({0.5, 0.5, 0.0}, {0.0, 0.0, 1.0}, 329.0, 373.0, 0.05);
  curve.through = 10;
  curve.to = 3;
  chart.curves = {curve};
  return chart;
}

Position ternary_position() {
  Position position;
  position.bubble_temperature_K = 334.0;
  position.vapour = {0.6, 0.3, 0.1};
  position.region = 0;
  Nearest nearest;
  nearest.distance = 0.123;
  nearest.boundary = "b1";
  nearest.point = {0.3, 0.2, 0.5};
  position.nearest = nearest;
  position.nearest_bottoms = nearest;
  position.residue_curve.status = Status::complete;
  position.residue_curve.curve = bent({0.78, 0.22, 0.0}, {0.0, 0.0, 1.0}, 328.4, 373.15, 0.02);
  position.residue_curve.through = 7;
  position.residue_curve.from = 0;
  position.residue_curve.to = 3;
  position.flip_component = 0;
  position.flip_kg_per_100kg = 31.5;
  return position;
}

ProductOutcome capped_acetone() {
  ProductOutcome outcome;
  outcome.component = 0;
  outcome.verdict = Verdict::capped;
  outcome.tests = {{{ProductTest::What::purity, 0, true, 0.995, Basis::mass}, 0.8653, -0.1297, false},
                   {{ProductTest::What::impurity, 2, false, 0.003, Basis::mass}, 0.0, 0.003, true}};
  outcome.reading = "batch[0].cuts[0]";
  outcome.purity_limit_mole = 0.78;
  outcome.purity_limit_mass = 0.8653;
  outcome.recovery = 0.97;
  outcome.limited_by = "az1(acetone,methanol)";
  outcome.reasons = {Reason::azeotrope_ceiling};
  outcome.sentence = "acetone stops at 86.53 wt%: the mark is the acetone + methanol azeotrope at 55.25 degC.";
  return outcome;
}

Reach ternary_reach(const Composition& feed) {
  Reach reach;
  reach.status = Status::complete;
  reach.feed = ternary_position();
  Batch rectifier;
  rectifier.mode = Batch::Mode::rectifier;
  rectifier.status = Status::complete;
  Cut first;
  first.start = first.end = first.average = {0.78, 0.22, 0.0};
  first.fixed_point = 0;
  first.share = 0.35;
  first.t_start_K = first.t_end_K = 328.4;
  first.pot_start = feed;
  first.pot_end = {0.0, 0.45, 0.55};
  first.on = "interior";
  Cut second;
  second.start = {0.0, 1.0, 0.0};
  second.end = {0.0, 0.98, 0.02};
  second.average = {0.0, 0.99, 0.01};
  second.share = 0.25;
  second.t_start_K = 337.7;
  second.t_end_K = 338.4;
  second.pot_start = first.pot_end;
  second.pot_end = {0.0, 0.0, 1.0};
  second.on = "b1";
  rectifier.cuts = {first, second};
  rectifier.heel = {0.0, 0.0, 1.0};
  rectifier.heel_share = 0.4;
  reach.batch = {rectifier};
  Column column;
  column.feed = feed;
  column.distillate = {0.78, 0.22, 0.0};
  column.bottoms = {0.0, 0.45, 0.55};
  column.distillate_to_feed = 0.35;
  column.witness = straight(column.distillate, column.bottoms, 328.4, 345.0, 10).points;
  Sequence sequence;
  sequence.columns = {column};
  sequence.streams = {{column.distillate, 0.35, 0, true}, {column.bottoms, 0.65, 0, false}};
  reach.sequences = {sequence};
  reach.stage_profile = {feed, {0.6, 0.3, 0.1}, {0.72, 0.25, 0.03}};
  ProductOutcome methanol;
  methanol.component = 1;
  methanol.verdict = Verdict::tight;
  methanol.tests = {{{ProductTest::What::purity, 1, true, 0.995, Basis::mass}, 1.0, 0.005, true}};
  methanol.reading = "batch[0].cuts[1]";
  methanol.purity_limit_mole = 1.0;
  methanol.purity_limit_mass = 1.0;
  methanol.recovery = 0.41;
  methanol.sentence = "methanol leaves as the second cut, with less than half of what was charged.";
  methanol.purity_at_stages = 0.991;
  ProductOutcome water;
  water.component = 2;
  water.verdict = Verdict::no_call;
  water.reasons = {Reason::missing_pair};
  water.sentence = "No call for water: the pair methanol + water has no parameters.";
  reach.products = {capped_acetone(), methanol, water};
  return reach;
}

}  // namespace

MixtureComponent component(const std::string& id, const std::string& cas, double molar_mass_g_mol,
                           double boiling_point_K) {
  MixtureComponent item;
  item.id = id;
  item.cas = cas;
  item.molar_mass_g_mol = molar_mass_g_mol;
  PressureSet set;
  set.id = "user";
  set.form = PressureForm::clausius_clapeyron;
  set.coefficients = {boiling_point_K, 4000.0};
  item.pressure = PressureCurve(set);
  return item;
}

Survey ternary_survey() {
  Survey survey;
  survey.status = Status::complete;
  survey.pressure_Pa = 101325.0;
  survey.pure = {fixed_point("acetone", {0}, {1.0, 0.0, 0.0}, 329.2, NodeType::saddle, {-0.3, 0.4}),
                 fixed_point("methanol", {1}, {0.0, 1.0, 0.0}, 337.7, NodeType::saddle, {-0.8, 0.5}),
                 fixed_point("water", {2}, {0.0, 0.0, 1.0}, 373.15, NodeType::stable_node, {-20.0, -5.0})};
  Azeotrope azeotrope;
  azeotrope.point =
      fixed_point("az1(acetone,methanol)", {0, 1}, {0.78, 0.22, 0.0}, 328.4, NodeType::unstable_node, {0.3, 0.5});
  azeotrope.boiling = Boiling::minimum;
  azeotrope.stability = {Stability::stable, true, 0.0, {0.78, 0.22, 0.0}};
  azeotrope.box = {{0.7799, 0.2199, 0.0}, {0.7801, 0.2201, 0.0}, 328.39, 328.41};
  azeotrope.proved = true;
  survey.azeotropes = {azeotrope};
  survey.faces = {face({0, 1}, Status::complete, 0), face({0, 2}, Status::complete, 0),
                  face({1, 2}, Status::complete, 0), face({0, 1, 2}, Status::complete, 2)};
  survey.index_rule_holds = true;
  survey.boxes = 480;
  return survey;
}

Answer ternary() {
  Answer answer;
  answer.task = Task::report;
  answer.program_version = "0.1.0";
  answer.params_sha256 = "0123456789abcdef";
  answer.input.title = "Wash solvent <T-4> & \"rest\"";
  answer.input.stream = {{"acetone", "acetone", "41 wt%", 0.31, 0.41, {}, {}},
                         {"MeOH", "methanol", "33 wt%", 0.45, 0.33, {}, {}},
                         {"water", "water", "24 wt%", 0.24, 0.24, {}, {}}};
  answer.input.residue_mass_fraction = 0.02;
  answer.input.amount_kg = 4200.0;
  answer.input.given_pressure = "1 atm";
  answer.input.plant.stages = 3;
  answer.input.echo_json = R"({"stillshed_case": 1, "title": "Wash solvent <T-4> & \"rest\""})";
  answer.input.products = {{"acetone", {">= 99.5 wt%"}, {}, false}};
  answer.mixture =
      Mixture({component("acetone", "67-64-1", 58.08, 329.2), component("methanol", "67-56-1", 32.04, 337.7),
               component("water", "7732-18-5", 18.015, 373.15)},
              Ideal(3));
  answer.model_kind = "unifac-dortmund";
  answer.model_note = "every group pair is on file";
  answer.pairs = {{0, 1, "unifac-dortmund groups 9-15", Evidence::predicted},
                  {0, 2, "unifac-dortmund groups 7-9", Evidence::predicted},
                  {1, 2, "unifac-dortmund groups 7-15", Evidence::predicted}};
  answer.pressure_set_ids = {"acetone/wagner-25/a", "methanol/wagner-25/b", "water/wagner-water/c"};
  answer.pressure_evidence = {Evidence::fitted, Evidence::fitted, Evidence::stretched};
  answer.feed = {0.31, 0.45, 0.24};
  answer.survey = ternary_survey();
  MeasuredMatch match;
  match.source = "Somebody & Other, J. Data 1 (1960) 2";
  match.pressure_Pa = 101325.0;
  match.members = {0, 1};
  match.temperature_K = 328.65;
  match.x = {0.79, 0.21, 0.0};
  match.dT_K = -0.25;
  match.dx = 0.01;
  answer.measured = {{match}};
  MeasuredMatch none;
  none.source = "Nobody, J. Data 3 (1970) 4";
  none.pressure_Pa = 101325.0;
  none.members = {1, 2};
  none.says_none = true;
  answer.measured_only = {none};
  answer.chart = ternary_chart(*answer.survey);
  answer.position = ternary_position();
  answer.feed_stability = StabilityResult{Stability::stable, false, 0.0, answer.feed};
  answer.reach = ternary_reach(answer.feed);
  answer.product_evidence = {Evidence::predicted, Evidence::predicted, Evidence::none};
  answer.cautions = {{"C1", "A model result, not a measurement: try it before you set a cut point.", {}, false},
                     {"C9", "acetone <with chloroform> and a strong base can react violently.", {"acetone"}, true}};
  answer.notes = {"The stream was read as it is."};
  answer.incomplete = {{"product", "water", "missing-pair"}};
  answer.provenance = {"vapour pressure of acetone: acetone/wagner-25/a, Somebody 1980"};
  answer.elapsed_s = 0.012;
  answer.exit_code = 3;
  return answer;
}

Answer binary() {
  Answer answer = ternary();
  answer.task = Task::chart;
  answer.input.title.clear();
  answer.input.stream.resize(2);
  answer.input.amount_kg.reset();
  answer.mixture =
      Mixture({component("acetone", "67-64-1", 58.08, 329.2), component("methanol", "", 32.04, 337.7)}, Ideal(2));
  answer.pairs.resize(1);
  answer.pressure_set_ids.resize(2);
  answer.pressure_evidence.resize(2);
  answer.feed = {0.4, 0.6};
  Survey survey;
  survey.status = Status::complete;
  survey.pressure_Pa = 101325.0;
  survey.pure = {fixed_point("acetone", {0}, {1.0, 0.0}, 329.2, NodeType::stable_node, {-0.3}),
                 fixed_point("methanol", {1}, {0.0, 1.0}, 337.7, NodeType::stable_node, {-0.8})};
  Azeotrope azeotrope = answer.survey->azeotropes[0];
  azeotrope.point = fixed_point("az1(acetone,methanol)", {0, 1}, {0.78, 0.22}, 328.4, NodeType::unstable_node, {0.3});
  azeotrope.stability.incipient = {0.78, 0.22};
  azeotrope.box = {{0.7799, 0.2199}, {0.7801, 0.2201}, 328.39, 328.41};
  survey.azeotropes = {azeotrope};
  survey.faces = {face({0, 1}, Status::complete, 0)};
  survey.index_rule_holds = true;
  answer.measured[0][0].x = {0.79, 0.21};
  answer.measured_only.clear();
  Chart chart;
  chart.status = Status::complete;
  chart.fixed_points = {azeotrope.point, survey.pure[0], survey.pure[1]};
  chart.regions = {{"r1", 0, 2, {}, {}, 0.78}, {"r2", 0, 1, {}, {}, 0.22}};
  answer.survey = survey;
  answer.chart = chart;
  answer.position->vapour = {0.5, 0.5};
  answer.position->nearest.reset();
  answer.position->nearest_bottoms.reset();
  answer.position->residue_curve.curve = straight({0.78, 0.22}, {0.0, 1.0}, 328.4, 337.7);
  answer.position->residue_curve.to = 2;
  answer.feed_stability.reset();
  answer.reach.reset();
  answer.product_evidence.clear();
  answer.incomplete.clear();
  answer.exit_code = 0;
  return answer;
}

}  // namespace stillshed::sample
