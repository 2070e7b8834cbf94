#pragma once

#include "solver/part_integrals.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// "energy": half the sum of current times flux linkage, with a net current plus the boundary's
/// own term from the reactions, against the integral of B.H / 2, relative to it, limit 1e-6. It
/// tests assembly, solver and figures, not the grid.
Check check_energy(const solver::PartIntegrals& integrals);

}  // namespace barwall::verify
