#pragma once

#include <vector>

#include "solver/flux_density.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// Checks of Ampere's law along closed paths in air, errors relative to the largest bar current,
/// limits 0.5 %:
/// "long-wire": mean tangential H times 2 pi r on circles at 2, 5 and 20 section sizes against
/// the net current, and round every bar where a circle in air fits against the bar's current;
/// "ampere-loops": along a line at constant clearance round every body, half way to its
/// neighbours, against the current inside.
std::vector<Check> check_ampere(const solver::Solution& solution,
                                const solver::RecoveredField& field,
                                const std::vector<std::vector<int>>& bodies);

}  // namespace barwall::verify
