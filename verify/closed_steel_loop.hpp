#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// One notice for every closed loop of magnetic walls, of one wall or of several in contact, that
/// has a net current within: above 1e-6 of what the bars within carry. An alternating one drives
/// flux all round the steel and heats it, of which a static field says nothing: the validity is
/// then indicative. Loops of the same walls, as the holes of a gland plate, share a notice. Bars
/// never close a loop, not even of steel.
std::vector<solver::Notice> closed_steel_loops(const solver::Problem& problem);

}  // namespace barwall::verify
