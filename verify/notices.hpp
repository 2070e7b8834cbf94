#pragma once

#include <optional>
#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// What a case's user should know of how the model fits the thing: closed steel loops, skin depths,
/// a net current, swapped phases, and with a length of the run [m] what its ends change. The
/// figures must have their probes.
std::vector<solver::Notice> notices_of(const solver::Problem& problem,
                                       const solver::Figures& figures,
                                       const std::vector<solver::Circuit>& circuits,
                                       std::optional<double> run_length);

}  // namespace barwall::verify
