#pragma once

#include <vector>

#include "solver/figures.hpp"

namespace barwall::verify {

/// Depth [m] at which a field of one frequency [Hz] has fallen to 1/e in a thick conductor:
/// sqrt(2 rho / (w mu)), with its resistivity [ohm m] and relative permeability.
double skin_depth(double resistivity, double relative_permeability, double frequency_hz);

/// How thick a conductor is [m]: the smaller side, the wall of a tube or frame, a diameter; of a
/// polygon the larger of its narrowest place and twice its area over its perimeter.
double conductor_thickness(const mesh::Shape& shape);
/// Of its thickest piece.
double conductor_thickness(const mesh::Part& part);

/// With a frequency, a notice each of bars, of non-magnetic and of steel walls that are thicker
/// than their skin depth: which, how thick, and which way static figures err. All make the validity
/// indicative. Pieces are looked at one by one. Of saturable steel the largest permeability of its
/// table counts, which gives the least depth. Materials without a known resistivity are left out.
std::vector<solver::Notice> skin_depth_notices(const solver::Problem& problem);

}  // namespace barwall::verify
