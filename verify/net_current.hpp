#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// A notice where the currents of all bars do not sum to zero, above 1e-9 of the sum of their
/// magnitudes: how much returns outside the section.
std::vector<solver::Notice> net_current(const solver::Excitation& excitation);

}  // namespace barwall::verify
