/// Batch distillation at unlimited stages and reflux: the order and size of the cuts.
///
/// Rectifier   the distillate is the unstable node D of the pot's region, so the pot moves straight away from it:
///                 pot_end = (pot - share * D) / (1 - share)
///             - On a face of the simplex it stays: a missing component does not come back.
///             - Boundaries that start at an unstable node do not stop it (both sides share that node).
///             - A boundary that leaves a saddle toward a stable node parts unstable nodes. Where the pot meets it and
///               the far side would push it on, it crosses; where the far side pushes back, it slides along: the
///               distillate is the point where the tangent of the boundary at the pot meets the limiting curve that
///               joins the two unstable nodes through the saddle. The cut then drifts.
///             - At a fixed point nothing changes any more: all that is left is the last cut.
/// Stripper    the mirror image: products leave from stable nodes, boundaries change roles.
///
/// Shares are exact for straight pieces and, on a boundary, for the polyline that stands for it.
/// Valid       binary and ternary charts; a composition of four components: status not_applicable.
#pragma once

#include <functional>
#include <optional>

#include "engine/reach.hpp"

namespace stillshed {

/// `boiling_temperature_K` is asked only for drifting cuts. `region`: side to start from when x lies on a boundary;
/// found from x when empty.
[[nodiscard]] Batch run_batch(const Chart& chart, const Composition& x, Batch::Mode mode,
                              const std::function<double(const Composition&)>& boiling_temperature_K,
                              std::optional<int> region = {});

}  // namespace stillshed
