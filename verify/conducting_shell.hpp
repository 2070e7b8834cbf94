#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// Share of a field across a thin conducting tube that its eddy currents hold back from within:
/// 1 - 1 / sqrt(1 + x^2), x = w mu_0 R t / 2 rho, with its mean radius R and thickness t [m],
/// resistivity [ohm m] and the frequency [Hz]. Source: S. Celozzi, R. Araneo and G. Lovat,
/// Electromagnetic Shielding (from memory; a solution of the shell's own equation).
double share_held_back(double radius, double thickness, double resistivity, double frequency_hz);

/// With a frequency, a notice of non-magnetic conducting walls that are thinner than their skin
/// depth, and yet large enough that eddy currents would hold back more than 5 % of a field across a
/// tube of their size. Makes the validity indicative.
std::vector<solver::Notice> conducting_shells(const solver::Problem& problem);

}  // namespace barwall::verify
