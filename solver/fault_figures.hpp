#pragma once

#include <memory>
#include <optional>

#include "solver/fault_current.hpp"
#include "solver/figures.hpp"

namespace barwall::solver {

/// What holds the bars.
struct Supports {
  double span = 0.0;               ///< from one support to the next [m]
  std::optional<double> strength;  ///< of one support [N]
};

/// The problem whose load is the fault's sustained currents, on the same grid, without loops.
std::shared_ptr<const Problem> fault_problem(const Problem& problem, const FaultCurrent& fault);

/// The largest forces of a fault on every visible bar, its pieces, every wall and body, from the
/// solution of `fault_problem`: "force_x_max", "force_x_min", "force_y_max", "force_y_min",
/// "force_peak" [N/m], "force_peak_direction" [deg], and of the peak "force_peak_at", the time
/// since closing [s], and "force_peak_closing", the angle of the first bar's driving voltage then
/// [deg]; both not given where any will do or none is known. With supports, for bars
/// "support_force" [N], the peak force over a span, and "support_share" of their strength [1]:
/// static, no dynamic factor.
FaultFigures fault_figures(const FaultCurrent& fault, const PartIntegrals& integrals,
                           const StressBands& bands, const std::optional<Supports>& supports);

}  // namespace barwall::solver
