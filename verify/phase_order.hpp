#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// Notices of three bars whose phases follow each other against their names: L1, L3, L2. Names are
/// compared that differ only in a number at their end, or in a letter there: A B C, R S T, U V W.
/// Looked at are the bars of every circuit as listed, and three bars with currents of their own,
/// equal within 1 % and 120 degrees apart within 1 degree. A sequence may begin anywhere.
std::vector<solver::Notice> phase_order(const mesh::Section& section,
                                        const solver::Excitation& excitation,
                                        const std::vector<solver::Circuit>& circuits);

}  // namespace barwall::verify
