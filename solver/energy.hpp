#pragma once

#include "solver/cycle.hpp"
#include "solver/part_integrals.hpp"

namespace barwall::solver {

/// Integral of B.H / 2 over the grid, per metre of run [J/m]: the energy where all permeabilities
/// are constant.
Pulsation field_energy(const Solution& solution);

/// Energy and coenergy of steady currents in saturable steel, per metre of run [J/m].
struct SaturableEnergy {
  double energy = 0.0;    ///< integral over the grid of H dB from 0 to B
  double coenergy = 0.0;  ///< integral over the grid of B dH from 0 to H: B.H less the energy
};
SaturableEnergy saturable_energy(const Solution& solution);

/// Half the sum of current times flux linkage over the parts, per metre of run [J/m], and with
/// it half the work of the boundary: the reaction of each boundary node times its given A. The
/// two together equal the field energy of a solved system.
struct TerminalEnergy {
  Pulsation linkage;
  Pulsation boundary;
};
TerminalEnergy terminal_energy(const PartIntegrals& integrals);

}  // namespace barwall::solver
