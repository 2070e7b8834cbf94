#pragma once

#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

// Iron of unlimited permeability: H has no tangential component at its surface.

/// A parallel slot, open on top, filled to a height by a bar of uniform current density [m].
struct Slot {
  double width = 0.0;
  double filled_height = 0.0;
};

/// B_x [T] in the slot, `height` [m] above its bottom, for a current out of the page; the sign is
/// that of a field that runs to the left above the current: -mu_0 I y / (w h), -mu_0 I / w above
/// the bar.
double field_in_slot(const Slot& slot, double current, double height);
/// Inductance [H/m] of the slot's own flux, up to `gap` [m] above the bar.
double inductance_of_slot(const Slot& slot, double gap);
/// Force [N/m] on the bar towards the bottom of the slot.
double force_into_slot(const Slot& slot, double current);

/// B [T] of a filament half-way between two parallel iron plates, `gap` [m] apart, on the
/// mid-plane, `distance` [m] from it: perpendicular to the plates, (mu_0 I / 2 g) coth(pi x / g).
double field_between_plates(double current, double gap, double distance);
/// Force [N/m] on a filament `height` [m] above the lower plate, towards that plate.
double force_to_plate(double current, double gap, double height);

/// A closed box with iron walls, lower left corner at the origin [m].
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
