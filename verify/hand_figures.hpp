#pragma once

#include "solver/fault_current.hpp"
#include "solver/figures.hpp"

namespace barwall::verify {

/// Sets beside the figures of bars and loops what a handbook's formula gives for them, with its
/// name and source: hand_force and hand_inductance, and for a fault standard_fault_force beside the
/// peak force of a bar and standard_piece_force beside that of its outer pieces. Where no formula
/// applies the hand value stays not given.
void add_hand_values(solver::Figures& figures, const solver::Problem& problem,
                     const solver::FaultCurrent* fault);

}  // namespace barwall::verify
