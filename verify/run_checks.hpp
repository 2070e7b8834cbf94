#pragma once

#include <vector>

#include "solver/flux_density.hpp"
#include "solver/force.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// All self-checks of a solved section, in the order they are printed.
std::vector<Check> run_checks(const solver::PartIntegrals& integrals,
                              const solver::RecoveredField& field,
                              const solver::StressBands& bands);

}  // namespace barwall::verify
