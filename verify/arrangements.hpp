#pragma once

#include "verify/arrangement.hpp"

namespace barwall::verify {

// The arrangements of the accuracy ladder, lengths of a real installation. Those of round bars
// take the relative permeability of the steel, so that a wrong one can be tried.

/// A round bar of 30 mm in open air: field of a disc, logarithm far out.
Arrangement round_bar_in_air();
/// A flat bar of 10 x 60 mm in open air: field of a rectangle.
Arrangement flat_bar_in_air();
/// Two flat bars of 10 x 60 mm, 30 mm apart, go and return: field, force, inductance.
Arrangement pair_of_flat_bars();
/// Two round bars of 20 mm, one above the other before a plane of steel, that carry unequal
/// currents. The steel reaches the outer boundary, which carries the image solution.
Arrangement bars_before_steel();
/// Three round bars at odd places in a steel pipe of 130 x 10 mm, with a net current.
Arrangement bars_in_pipe();
/// Two round bars beside a steel rod of 60 mm.
Arrangement bars_beside_rod();
/// A tube within a tube, go and return, field and inductance.
Arrangement coaxial_line();

}  // namespace barwall::verify
