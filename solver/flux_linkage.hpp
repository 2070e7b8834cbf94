#pragma once

#include "solver/part_integrals.hpp"

namespace barwall::solver {

/// Inductance of a loop per metre of run [H/m]: (mean A over the go bars - mean A over the
/// return bars) / I with the loop alone carrying I, shared by area within each side. With saturable
/// steel, at the permeability of the operating point.
double loop_inductance(const PartIntegrals& integrals, const Loop& loop);

/// With saturable steel, the change of a loop's flux linkage with a current in the loop, at the
/// operating point, per metre of run [H/m].
double differential_inductance(const PartIntegrals& integrals, const Loop& loop);

}  // namespace barwall::solver
