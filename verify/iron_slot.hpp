#pragma once

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

}  // namespace barwall::verify
