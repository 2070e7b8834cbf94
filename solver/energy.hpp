#pragma once

#include "solver/cycle.hpp"
#include "solver/part_integrals.hpp"

namespace barwall::solver {

/// Integral of B.H / 2 over the grid, per metre of run [J/m].
Pulsation field_energy(const Solution& solution);

/// Half the sum of current times flux linkage over the parts, per metre of run [J/m], and with
/// it half the work of the boundary: the reaction of each boundary node times its given A. The
/// two together equal the field energy of a solved system.
struct TerminalEnergy {
  Pulsation linkage;
  Pulsation boundary;
};
TerminalEnergy terminal_energy(const PartIntegrals& integrals);

}  // namespace barwall::solver
