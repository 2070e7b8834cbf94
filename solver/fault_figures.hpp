#pragma once

#include <optional>

#include "solver/fault_solve.hpp"
#include "solver/figures.hpp"

namespace barwall::solver {

/// What holds the bars.
struct Supports {
  double span = 0.0;               ///< from one support to the next [m]
  std::optional<double> strength;  ///< of one support [N]
};

/// The largest forces of a fault on every visible bar, its pieces, every wall and body:
/// "force_x_max", "force_x_min", "force_y_max", "force_y_min", "force_peak" [N/m],
/// "force_peak_direction" [deg], and of the peak "force_peak_after", the time since closing [s],
/// and "force_peak_closing", the angle of the first bar's driving voltage then [deg]; both not
/// given where any will do or none is known. With supports, for bars "support_force" [N], the peak
/// force over a span, and "support_share" of their strength [1]: static, no dynamic factor. Of
/// walls also "b_mean" and "b_high" of each point's largest magnitude in the fault [T], and of
/// saturable ones "saturated_share" [1]; of their faces "push_max", "push_min" [N/m] and
/// "pressure_mean_max", "pressure_mean_min" [Pa], outward positive.
FaultFigures fault_figures(const FaultCurrent& fault, const Problem& problem,
                           const ForceGeometry& geometry, const FaultSolution& solution,
                           const std::optional<Supports>& supports);

}  // namespace barwall::solver
