#include <algorithm>

#include "reports/findings.hpp"
#include "reports/format.hpp"
#include "reports/html_parts.hpp"
#include "reports/html_sections.hpp"

namespace stillshed {
namespace {

std::string kilogram_cell(const Answer& answer, const Composition& x, double share) {
  const std::optional<double> kg = kilograms(answer, x, share);
  return kg.has_value() ? significant(*kg, 3) : "–";
}

std::string temperature_cell(const Cut& cut) {
  const std::string start = celsius(cut.t_start_K, 1);
  const std::string end = celsius(cut.t_end_K, 1);
  return start == end ? start : start + " to " + end;
}

std::string cut_name(const Answer& answer, const Cut& cut) {
  if (cut.fixed_point.has_value()) {
    const FixedPoint point = fixed_points(answer)[static_cast<std::size_t>(*cut.fixed_point)];
    return point.pure() ? point.id : short_id(point.id) + " (" + member_names(answer.mixture, point.members) + ")";
  }
  return "drifting cut";
}

std::string where_words(const Answer& answer, const std::string& on) {
  if (on == "interior") {
    return "across the region";
  }
  return on == "face" ? "along an edge of the map" : "along " + place_words(answer, on);
}

std::string batch_table(const Answer& answer, const Batch& batch) {
  const bool rectifier = batch.mode == Batch::Mode::rectifier;
  HtmlTable table(rectifier ? "Batch rectifier: cuts in the order they leave overhead"
                            : "Batch stripper: cuts in the order they leave at the bottom");
  table.column("Cut");
  table.column("Leaves as");
  table.column(rectifier ? "Head, °C" : "Bottom, °C", true);
  table.column("Holds, mol%", true);
  table.column("Holds, wt%", true);
  table.column("Share of the charge, mol%", true);
  table.column("kg", true);
  table.column("Meanwhile the pot moves");
  for (std::size_t c = 0; c < batch.cuts.size(); ++c) {
    const Cut& cut = batch.cuts[c];
    table.row({std::to_string(c + 1), escape_markup(cut_name(answer, cut)), temperature_cell(cut),
               mole_percent_lines(answer, cut.average), mass_percent_lines(answer, cut.average),
               escape_markup(share_percent(cut.share)), kilogram_cell(answer, cut.average, cut.share),
               escape_markup(where_words(answer, cut.on))});
  }
  if (!batch.heel.empty() && batch.heel_share > 0.0) {
    table.row({"heel", "stays in the vessel", "–", mole_percent_lines(answer, batch.heel),
               mass_percent_lines(answer, batch.heel), escape_markup(share_percent(batch.heel_share)),
               kilogram_cell(answer, batch.heel, batch.heel_share), "–"});
  }
  std::string text = table.empty() ? "" : table.markup();
  if (!batch.message.empty()) {
    text += element("p", batch.message);
  }
  return text;
}

std::string stream_cell(const Answer& answer, const Composition& x, double share) {
  std::string text = mole_percent_lines(answer, x);
  const std::optional<double> kg = kilograms(answer, x, share);
  text += "<br/><i>" +
          (share < 1.0 - 1e-12 ? escape_markup(share_percent(share)) + " mol% of the charge" : "the whole charge");
  if (kg.has_value()) {
    text += ", " + kilogram_text(*kg);
  }
  return text + "</i>";
}

std::string sequence_table(const Answer& answer, std::size_t k) {
  const Sequence& sequence = answer.reach->sequences[k];
  HtmlTable table("Sequence " + std::to_string(k + 1) + ": columns at total reflux, mol%");
  table.column("Column");
  table.column("Fed by");
  table.column("Feed");
  table.column("Distillate");
  table.column("Bottoms");
  table.column("Split");
  for (std::size_t c = 0; c < sequence.columns.size(); ++c) {
    const Column& column = sequence.columns[c];
    std::string source = "the charge";
    if (column.parent.has_value()) {
      source = std::string(column.parent_distillate ? "distillate" : "bottoms") + " of column " +
               std::to_string(*column.parent + 1);
    }
    const double distillate = column.feed_to_charge * column.distillate_to_feed;
    table.row({std::to_string(c + 1), source, stream_cell(answer, column.feed, column.feed_to_charge),
               stream_cell(answer, column.distillate, distillate),
               stream_cell(answer, column.bottoms, column.feed_to_charge - distillate),
               column.direct ? "direct" : "indirect"});
  }
  return table.markup();
}

std::string reason_list(const ProductOutcome& outcome) {
  std::string list;
  for (const Reason reason : outcome.reasons) {
    list += (list.empty() ? "" : ", ") + std::string(to_string(reason));
  }
  return list.empty() ? "–" : list;
}

}  // namespace

std::vector<std::size_t> sequences_to_print(const Answer& answer, std::size_t most) {
  std::vector<std::size_t> chosen;
  const auto& sequences = answer.reach->sequences;
  for (const ProductOutcome& outcome : answer.reach->products) {
    std::optional<std::size_t> best;
    double purity = 0.0;
    double recovery = 0.0;
    for (std::size_t k = 0; k < sequences.size(); ++k) {
      const std::optional<BestStream> stream = best_stream(sequences[k], answer.feed, outcome.component);
      if (!stream.has_value()) {
        continue;
      }
      const double here = sequences[k].streams[stream->stream].x[outcome.component];
      if (!best.has_value() || here > purity + 1e-7 || (here > purity - 1e-7 && stream->recovery > recovery + 1e-9)) {
        best = k;
        purity = here;
        recovery = stream->recovery;
      }
    }
    if (best.has_value() && std::find(chosen.begin(), chosen.end(), *best) == chosen.end() && chosen.size() < most) {
      chosen.push_back(*best);
    }
  }
  return chosen;
}

std::string reach_section(const Answer& answer) {
  std::string text =
      "<p>Every amount here is the limit for unlimited stages and reflux, without recycle and without hold-up in the "
      "column; a real "
      "run takes longer and leaves less.</p>\n";
  for (const Batch& batch : answer.reach->batch) {
    text += batch_table(answer, batch);
  }
  const std::vector<std::size_t> chosen = sequences_to_print(answer, 3);
  for (const std::size_t k : chosen) {
    text += sequence_table(answer, k);
  }
  const std::size_t left = answer.reach->sequences.size() - chosen.size();
  if (left > 0) {
    text += "<p>Shown: for each product the sequence that recovers it best. The result file has " +
            std::to_string(left) + " more.</p>\n";
  }
  return text;
}

std::string hold_section(const Answer& answer) {
  std::string text;
  HtmlTable table("What was asked, what can be reached at the limit, and what stands in the way");
  table.column("Product");
  table.column("Verdict");
  table.column("Asked");
  table.column("Limit", true);
  table.column("Margin, points", true);
  table.column("Met");
  table.column("Stopped by");
  table.column("Reasons");
  for (const ProductOutcome& outcome : answer.reach->products) {
    std::string asked;
    std::string limit;
    std::string margin;
    std::string met;
    for (const TestOutcome& item : outcome.tests) {
      const char* gap = asked.empty() ? "" : "<br/>";
      asked += gap + test_markup(item.test, answer.mixture);
      limit += gap + escape_markup(reached_text(item));
      margin += gap + fixed(100.0 * item.margin, 2);
      met += std::string(gap) + (item.pass ? "yes" : "no");
    }
    table.row({escape_markup(answer.mixture.component(outcome.component).id), verdict_badge(outcome.verdict), asked,
               limit, margin, met,
               outcome.limited_by.empty() ? "–" : escape_markup(place_words(answer, outcome.limited_by)),
               reason_list(outcome)});
  }
  if (!table.empty()) {
    text += table.markup();
  }
  for (const ProductOutcome& outcome : answer.reach->products) {
    if (outcome.pocket_width.has_value()) {
      text += element("p", answer.mixture.component(outcome.component).id +
                               ": the boundary is curved; finite reflux may gain a pocket up to " +
                               significant(100.0 * *outcome.pocket_width, 2) + " mol% wide beyond what is shown.");
    }
  }
  return text;
}

}  // namespace stillshed
