/// Stands in for parts of the engine that are not built yet: they say so. Removed when the last one is there.
#include "engine/reach.hpp"

namespace stillshed {

#ifdef STILLSHED_CHART_PENDING
const char* to_string(Confines confines) { return confines == Confines::overheads ? "overheads" : "bottoms"; }
Chart chart(const Mixture& /*mixture*/, const Survey& survey, const ChartOptions& /*options*/) {
  Chart chart;
  chart.message = "not built yet";
  chart.fixed_points = survey.fixed_points();
  return chart;
}
Position locate(const Mixture& /*mixture*/, const Chart& /*chart*/, const Composition& /*x*/) { return {}; }
#endif

#ifdef STILLSHED_REACH_PENDING
const char* to_string(Verdict /*verdict*/) { return "no-call"; }
Reach reach(const Mixture& /*mixture*/, const Survey& /*survey*/, const Chart& /*chart*/, const Composition& /*x*/,
            const std::vector<ProductSpec>& products, const ReachOptions& /*options*/) {
  Reach reach;
  reach.message = "not built yet";
  for (const ProductSpec& spec : products) {
    ProductOutcome outcome;
    outcome.component = spec.component;
    reach.products.push_back(outcome);
  }
  return reach;
}
#endif

}  // namespace stillshed
