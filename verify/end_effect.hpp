#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// Notices on the length of the run: at the probe where it matters most, the field of the free
/// currents of a straight run of `run_length` [m], at mid-span, against the endless one. Above
/// 5 % the notice makes the validity indicative.
std::vector<solver::Notice> end_effect(const solver::Problem& problem,
                                       const solver::Figures& figures, double run_length);

}  // namespace barwall::verify
