#pragma once

#include <cstddef>
#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

/// A closed box with walls of iron of unlimited permeability, lower left corner at the origin [m].
struct IronBox {
  double width = 0.0;
  double height = 0.0;
};

/// A rectangular bar of uniform current density, sides along the axes [m], current [A].
struct BoxBar {
  mesh::Point centre;
  double width = 0.0;
  double height = 0.0;
  double current = 0.0;
};

// The field of bars in the box: a cosine series over the height, each term of which is solved
// exactly across the width. Same solution as the double series of E. Roth (P. Hammond, "Roth's
// method for the solution of boundary-value problems in electrical engineering", Proc. IEE 114,
// 1967, from memory), but its terms fall off faster. Each function throws std::invalid_argument
// if a bar leaves the box, or if the net current is not 0: no field satisfies Ampere's law then.

/// B [T] in the box. Within 1e-9 of the largest field, less at the level of a bar's edge.
mesh::Point field_of(const IronBox& box, std::span<const BoxBar> bars, mesh::Point at);
/// Force [N/m], per metre of run, on bars[index].
mesh::Point force_on_bar(const IronBox& box, std::span<const BoxBar> bars, std::size_t index);
/// Energy of the field in the box [J/m]; 2 W / I^2 is a loop's inductance [H/m].
double energy_of(const IronBox& box, std::span<const BoxBar> bars);

}  // namespace barwall::verify
