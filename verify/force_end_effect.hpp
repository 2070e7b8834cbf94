#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// A notice on the length of the run: on the bar where it matters most, the force of the free
/// currents on one another, as wires in their pieces' centres, averaged over a straight run of
/// `run_length` [m], against the endless one; of peaks with a frequency. Above 5 % the notice makes
/// the validity indicative. Left out are bars whose force is below 1e-3 of the largest, and those
/// of which one reaches round the other.
std::vector<solver::Notice> force_end_effect(const mesh::Section& section,
                                             const solver::Excitation& excitation,
                                             double run_length);

}  // namespace barwall::verify
