#include "engine/verdict_words.hpp"

#include <cmath>
#include <cstdio>

namespace stillshed {

namespace {

std::string number(double value, int decimals) {
  char text[64];
  std::snprintf(text, sizeof text, "%.*f", decimals, value);
  std::string result = text;
  while (result.find('.') != std::string::npos && (result.back() == '0' || result.back() == '.')) {
    const bool point = result.back() == '.';
    result.pop_back();
    if (point) {
      break;
    }
  }
  return result;
}

std::string degrees(double temperature_K) {
  char text[64];
  std::snprintf(text, sizeof text, "%.1f degC", temperature_K - 273.15);
  return text;
}

const char* unit(Basis basis) {
  return basis == Basis::mass ? " wt%" : " mol%";
}

std::string azeotrope_words(const Names& names, const FixedPoint& point, int component) {
  std::string others;
  int left = 0;
  for (const int i : point.members) {
    left += i != component ? 1 : 0;
  }
  const bool with = left < point.members.size();
  for (const int i : point.members) {
    if (i == component) {
      continue;
    }
    others += others.empty() ? "" : (left == 1 ? " and " : ", ");
    others += names.mixture.component(i).id;
    --left;
  }
  return std::string("the azeotrope ") + (with ? "with " : "of ") + others + " at " + degrees(point.temperature_K);
}

std::string point_words(const Names& names, const FixedPoint& point, int component) {
  return point.pure() ? point.id : azeotrope_words(names, point, component);
}

/// The test the sentence is about: the first that fails, else the first purity test, else the first of all.
const TestOutcome* main_test(const ProductOutcome& outcome) {
  for (const TestOutcome& item : outcome.tests) {
    if (!item.pass && item.test.what != ProductTest::What::recovery) {
      return &item;
    }
  }
  for (const TestOutcome& item : outcome.tests) {
    if (item.test.what == ProductTest::What::purity) {
      return &item;
    }
  }
  for (const TestOutcome& item : outcome.tests) {
    if (item.test.what == ProductTest::What::impurity) {
      return &item;
    }
  }
  return nullptr;
}

std::string spec_words(const Names& names, const TestOutcome* item) {
  if (item == nullptr) {
    return "any purity";
  }
  const std::string value = number(100.0 * item->test.value, 4) + unit(item->test.basis);
  if (item->test.what == ProductTest::What::impurity) {
    return names.mixture.component(item->test.component).id + (item->test.at_least ? " of at least " : " of at most ") +
           value;
  }
  return (item->test.at_least ? "" : "at most ") + value;
}

std::string share_words(double recovery, const std::string& id) {
  if (recovery >= 0.9995) {
    return "nearly all the " + id + " of the charge";
  }
  return number(std::floor(1000.0 * recovery + 1e-6) / 10.0, 1) + " % of the " + id + " of the charge";
}

std::string open_sentence(const Names& names, const ProductOutcome& outcome, const Receiver& receiver,
                          const std::string& id) {
  return id + " can leave within " + spec_words(names, main_test(outcome)) + " as " + receiver.words + ", up to " +
         share_words(outcome.recovery, id) + ".";
}

std::string tight_sentence(const Names& names, const ProductOutcome& outcome, const std::string& id,
                           bool short_of_recovery) {
  const TestOutcome* item = main_test(outcome);
  std::string text = id + " meets " + spec_words(names, item);
  const std::string where = outcome.limited_by.empty() ? "" : limit_words(names, outcome.limited_by, outcome.component);
  if (!outcome.reasons.empty() && outcome.reasons.front() == Reason::pinch && outcome.purity_at_stages.has_value()) {
    return text + ", but not with " + std::to_string(names.options.stages.value_or(0)) +
           " stages: they bring the head to " + percent_down(*outcome.purity_at_stages) + " mol% at most.";
  }
  if (short_of_recovery) {
    text += ", but one receiver holds no more than " + share_words(outcome.recovery, id);
    const bool along = where.rfind("the distillation boundary", 0) == 0;
    return text + (where.empty() ? "."
                                 : (along ? "; most of the rest leaves along " : "; most of the rest leaves with ") +
                                       where + ".");
  }
  text += " with little room";
  if (item != nullptr) {
    text += ": the limit is " + percent_down(item->limit) + unit(item->test.basis);
  }
  return text + (where.empty() ? "." : ", " + where + ".");
}

std::string capped_sentence(const Names& names, const ProductOutcome& outcome, const std::string& id) {
  const TestOutcome* item = main_test(outcome);
  const std::string where =
      outcome.limited_by.empty() ? "." : ": " + limit_words(names, outcome.limited_by, outcome.component) + ".";
  if (item != nullptr && item->test.what == ProductTest::What::impurity) {
    return id + " does not meet " + spec_words(names, item) + ": it keeps " +
           number(std::ceil(1e4 * item->limit - 1e-6) / 100.0, 2) + unit(item->test.basis) + where;
  }
  const bool mole = item != nullptr && item->test.basis == Basis::mole;
  return id + " stops at " + percent_down(mole ? outcome.purity_limit_mole : outcome.purity_limit_mass) +
         unit(mole ? Basis::mole : Basis::mass) + where;
}

}  // namespace

std::string percent_down(double fraction) {
  if (fraction > 0.9999) {
    return "more than 99.99";
  }
  return number(std::floor(1e4 * fraction + 1e-6) / 100.0, 2);
}

std::string limit_words(const Names& names, const std::string& id, int component) {
  for (const FixedPoint& point : names.chart.fixed_points) {
    if (point.id == id) {
      return point_words(names, point, component);
    }
  }
  for (const Boundary& boundary : names.chart.boundaries) {
    if (boundary.id == id) {
      const auto end = [&](int k) { return names.chart.fixed_points[static_cast<std::size_t>(k)]; };
      return "the distillation boundary from " + point_words(names, end(boundary.from), -1) + " to " +
             point_words(names, end(boundary.to), -1);
    }
  }
  return id;
}

std::string sentence(const Names& names, const ProductOutcome& outcome, const Receiver& receiver,
                     bool short_of_recovery) {
  const std::string& id = names.mixture.component(outcome.component).id;
  switch (outcome.verdict) {
    case Verdict::open: return open_sentence(names, outcome, receiver, id);
    case Verdict::tight: return tight_sentence(names, outcome, id, short_of_recovery);
    case Verdict::capped: return capped_sentence(names, outcome, id);
    case Verdict::shut: break;
    case Verdict::no_call: return "No call for " + id + ".";
  }
  const std::string start = id + " gains nothing at total reflux: ";
  if (outcome.limited_by.empty()) {
    return start + "no receiver is richer in it than the charge.";
  }
  return start + "the charge already stands at " + limit_words(names, outcome.limited_by, outcome.component) + ".";
}

}  // namespace stillshed
