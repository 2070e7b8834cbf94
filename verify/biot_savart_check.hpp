#pragma once

#include <vector>

#include "solver/flux_density.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// Compares the grid's B in air with the direct Biot-Savart sum over the bars (closed forms) and
/// the steel's bound currents, at samples of every stretch of air. Each error is relative to the
/// largest of |B| there, a tenth of the r.m.s. |B| of its group, and 2 % of the sum of the
/// magnitudes of the single bars' fields.
/// \return "biot-savart-rms", the r.m.s. over the worst group, limit 0.5 %, and
///         "biot-savart-worst", limit 3 %
std::vector<Check> check_biot_savart(const solver::Solution& solution,
                                     const solver::RecoveredField& field);

}  // namespace barwall::verify
