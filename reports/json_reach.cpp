#include "reports/json_blocks.hpp"

namespace stillshed {
namespace {

const char* what_text(ProductTest::What what) {
  switch (what) {
    case ProductTest::What::purity: return "purity";
    case ProductTest::What::impurity: return "impurity";
    case ProductTest::What::recovery: return "recovery";
  }
  return "purity";
}

}  // namespace

void ResultWriter::chart() {
  const Chart& chart = *answer_.chart;
  json_.open_array("boundaries");
  for (const Boundary& boundary : chart.boundaries) {
    json_.open_object();
    json_.member("id", boundary.id);
    json_.member("from", point_id(boundary.from));
    json_.member("to", point_id(boundary.to));
    json_.member("confines", to_string(boundary.confines));
    compositions("points", boundary.curve.points);
    numbers("temperature_K", boundary.curve.temperature_K);
    json_.member("error", boundary.error);
    json_.close();
  }
  json_.close();
  json_.open_array("regions");
  for (const Region& region : chart.regions) {
    json_.open_object();
    json_.member("id", region.id);
    json_.member("unstable_node", point_id(region.unstable_node));
    json_.member("stable_node", point_id(region.stable_node));
    texts("boundaries", region.boundaries);
    compositions("polygon", region.polygon);
    json_.member("area", region.area);
    json_.close();
  }
  json_.close();
  json_.open_array("curves");
  for (const ResidueCurve& item : chart.curves) {
    json_.open_object();
    curve(item);
    json_.close();
  }
  json_.close();
}

void ResultWriter::curve(const ResidueCurve& item) {
  WhyNull why;
  json_.member("status", to_string(item.status));
  for (const auto& [key, end] : {std::pair("from", item.from), std::pair("to", item.to)}) {
    if (end.has_value()) {
      json_.member(key, point_id(*end));
    } else {
      json_.member_null(key);
      why.add(key, "the curve was not followed to a fixed point");
    }
  }
  json_.member("through", item.through);
  compositions("points", item.curve.points);
  numbers("temperature_K", item.curve.temperature_K);
  why.write(json_);
}

void ResultWriter::nearest(const char* key, const std::optional<Nearest>& nearest, WhyNull& why) {
  if (!nearest.has_value()) {
    json_.member_null(key);
    why.add(key, "no such boundary");
    return;
  }
  json_.open_object(key, Layout::inline_);
  json_.member("value", nearest->distance);
  json_.member("boundary", nearest->boundary);
  composition("point", nearest->point);
  json_.close();
}

void ResultWriter::feed(const Position& position) {
  WhyNull why;
  json_.open_object("feed");
  composition("mole_fractions", answer_.feed);
  mass_composition("mass_fractions", answer_.feed);
  if (answer_.feed_stability.has_value() && answer_.feed_stability->outcome == Stability::stable) {
    json_.member("liquid_phases", 1);
  } else {
    json_.member_null("liquid_phases");
    why.add("liquid_phases",
            answer_.feed_stability.has_value() ? to_string(answer_.feed_stability->outcome) : "not tested");
  }
  json_.member("bubble_temperature_K", position.bubble_temperature_K);
  composition("vapour", position.vapour);
  if (position.region.has_value() && answer_.chart.has_value()) {
    json_.member("region", answer_.chart->regions.at(static_cast<std::size_t>(*position.region)).id);
  } else {
    json_.member_null("region");
    why.add("region", position.on_boundary ? "on a boundary" : "no region found");
  }
  json_.member("on_boundary", position.on_boundary);
  nearest("distance", position.nearest, why);
  nearest("distance_overheads", position.nearest_overheads, why);
  nearest("distance_bottoms", position.nearest_bottoms, why);
  if (position.flip_component.has_value()) {
    json_.open_object("flip", Layout::inline_);
    json_.member("component", id(*position.flip_component));
    json_.member("kg_per_100kg", position.flip_kg_per_100kg);
    json_.close();
  } else {
    json_.member_null("flip");
    why.add("flip", "no addition of one component changes the region");
  }
  json_.open_object("residue_curve");
  curve(position.residue_curve);
  json_.close();
  why.write(json_);
  json_.close();
}

void ResultWriter::batch() {
  json_.open_array("batch");
  for (const Batch& batch : answer_.reach->batch) {
    WhyNull why;
    json_.open_object();
    json_.member("mode", batch.mode == Batch::Mode::rectifier ? "rectifier" : "stripper");
    json_.member("status", to_string(batch.status));
    json_.member("message", batch.message);
    json_.open_array("cuts");
    for (const Cut& item : batch.cuts) {
      cut(item);
    }
    json_.close();
    if (batch.heel.empty()) {
      json_.member_null("heel");
      why.add("heel", "the last cut empties the pot");
    } else {
      amount("heel", batch.heel, batch.heel_share);
    }
    why.write(json_);
    json_.close();
  }
  json_.close();
}

void ResultWriter::cut(const Cut& item) {
  WhyNull why;
  json_.open_object();
  composition("start", item.start);
  composition("end", item.end);
  composition("average", item.average);
  if (item.fixed_point.has_value()) {
    json_.member("fixed_point", point_id(*item.fixed_point));
  } else {
    json_.member_null("fixed_point");
    why.add("fixed_point", "the cut drifts between two points");
  }
  json_.member("share_of_charge_mole", item.share);
  const std::optional<double> kg = kilograms(answer_, item.average, item.share);
  json_.member("kg", kg);
  if (!kg.has_value()) {
    why.add("kg", "amount not given");
  }
  pair_of_numbers("temperature_K", item.t_start_K, item.t_end_K);
  composition("pot_start", item.pot_start);
  composition("pot_end", item.pot_end);
  json_.member("on", item.on);
  json_.open_array("drift");
  for (const Cut::Piece& piece : item.drift) {
    json_.open_object();
    composition("mole_fractions", piece.x);
    json_.member("share_of_charge_mole", piece.share);
    json_.close();
  }
  json_.close();
  why.write(json_);
  json_.close();
}

void ResultWriter::sequences() {
  json_.open_array("sequences");
  for (std::size_t k = 0; k < answer_.reach->sequences.size(); ++k) {
    sequence(answer_.reach->sequences[k], k);
  }
  json_.close();
}

void ResultWriter::sequence(const Sequence& item, std::size_t k) {
  json_.open_object();
  json_.open_array("columns");
  for (const Column& column : item.columns) {
    json_.open_object();
    WhyNull why;
    if (column.parent.has_value()) {
      json_.member("fed_by", "columns[" + std::to_string(*column.parent) + "]." +
                                 (column.parent_distillate ? "distillate" : "bottoms"));
    } else {
      json_.member("fed_by", "charge");
    }
    const double distillate = column.feed_to_charge * column.distillate_to_feed;
    amount("feed", column.feed, column.feed_to_charge);
    amount("distillate", column.distillate, distillate);
    amount("bottoms", column.bottoms, column.feed_to_charge - distillate);
    json_.member("distillate_to_feed", column.distillate_to_feed);
    json_.member("split", column.direct ? "direct" : "indirect");
    compositions("witness", column.witness);
    json_.close();
  }
  json_.close();
  json_.open_array("streams");
  for (const Sequence::Stream& stream : item.streams) {
    json_.open_object(Layout::inline_);
    json_.member("from",
                 "columns[" + std::to_string(stream.column) + "]." + (stream.distillate ? "distillate" : "bottoms"));
    composition("mole_fractions", stream.x);
    json_.member("share_of_charge_mole", stream.share);
    json_.close();
  }
  json_.close();
  json_.open_object("products");
  for (const ProductOutcome& outcome : answer_.reach->products) {
    const std::optional<BestStream> best = best_stream(item, answer_.feed, outcome.component);
    if (best.has_value()) {
      json_.open_object(id(outcome.component), Layout::inline_);
      json_.member("stream", "sequences[" + std::to_string(k) + "].streams[" + std::to_string(best->stream) + "]");
      json_.member("purity_mole", item.streams[best->stream].x[outcome.component]);
      json_.member("recovery", best->recovery);
      json_.close();
    }
  }
  json_.close();
  json_.close();
}

void ResultWriter::stages() {
  if (!answer_.input.plant.stages.has_value() || answer_.reach->stage_profile.empty()) {
    return;
  }
  json_.open_object("stages");
  json_.member("n", *answer_.input.plant.stages);
  json_.member("pot_is_stage_1", true);
  compositions("x", answer_.reach->stage_profile);
  json_.close();
}

void ResultWriter::products() {
  json_.open_array("products");
  for (std::size_t k = 0; k < answer_.reach->products.size(); ++k) {
    product(answer_.reach->products[k], k);
  }
  json_.close();
}

void ResultWriter::product(const ProductOutcome& outcome, std::size_t k) {
  WhyNull why;
  json_.open_object();
  json_.member("component", id(outcome.component));
  json_.member("verdict", to_string(outcome.verdict));
  json_.open_array("tests");
  for (const TestOutcome& item : outcome.tests) {
    json_.open_object(Layout::inline_);
    json_.member("what", what_text(item.test.what));
    json_.member("component", id(item.test.component));
    json_.member("op", item.test.at_least ? ">=" : "<=");
    json_.member("value", item.test.value);
    json_.member("basis", item.test.basis == Basis::mass ? "wt" : "mol");
    json_.member("limit", item.limit);
    json_.member("margin", item.margin);
    json_.member("pass", item.pass);
    json_.close();
  }
  json_.close();
  const auto text_or_null = [&](const char* key, const std::string& text, const char* reason) {
    if (text.empty()) {
      json_.member_null(key);
      why.add(key, reason);
    } else {
      json_.member(key, text);
    }
  };
  text_or_null("reading", outcome.reading, "no reading yields this product");
  json_.member("purity_limit_mole", outcome.purity_limit_mole);
  json_.member("purity_limit_mass", outcome.purity_limit_mass);
  json_.member("recovery", outcome.recovery);
  text_or_null("limited_by", outcome.limited_by, "nothing at this pressure");
  json_.open_array("reasons", Layout::inline_);
  for (const Reason reason : outcome.reasons) {
    json_.value(to_string(reason));
  }
  json_.close();
  json_.member("sentence", outcome.sentence);
  json_.member("pocket_width_mole", outcome.pocket_width);
  if (!outcome.pocket_width.has_value()) {
    why.add("pocket_width_mole", "no curved boundary bounds this product");
  }
  json_.member("purity_at_stages_mole", outcome.purity_at_stages);
  if (!outcome.purity_at_stages.has_value()) {
    why.add("purity_at_stages_mole", "no number of stages given");
  }
  texts("opens_with", {});
  if (k < answer_.product_evidence.size()) {
    json_.member("evidence", to_string(answer_.product_evidence[k]));
  } else {
    json_.member_null("evidence");
    why.add("evidence", "not assessed");
  }
  why.write(json_);
  json_.close();
}

}  // namespace stillshed
