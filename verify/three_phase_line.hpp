#pragma once

#include <array>
#include <complex>
#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

/// A filament with a current phasor [A]; whether rms or peak decides what the resultant is.
struct PhasorFilament {
  mesh::Point at;
  std::complex<double> current;
};

/// Three filaments with balanced currents 0, -120 and -240 degrees of magnitude `current` [A], in
/// one line along x, neighbours `spacing` [m] apart, the middle one at the origin.
std::array<PhasorFilament, 3> flat_line(double current, double spacing);
/// The same at the corners of an equilateral triangle, centroid at the origin, apex up.
std::array<PhasorFilament, 3> trefoil_line(double current, double spacing);

/// Resultant [T] at a point: sqrt(|B_x|^2 + |B_y|^2) of the phasors, the rms of |B| for rms
/// currents.
double resultant_field(std::span<const PhasorFilament> filaments, mesh::Point at);

/// Resultant [T] of a balanced flat line on the perpendicular through its middle, `height` [m]
/// off it.
double field_above_flat_line(double current, double spacing, double height);
/// Height [m] on that perpendicular at which the resultant falls to `field` [T].
double distance_above_flat_line(double current, double spacing, double field);

/// Far-field limits [T] at a distance r [m]: sqrt(3) and sqrt(3/2) times mu_0 I s / 2 pi r^2.
double far_field_of_flat_line(double current, double spacing, double distance);
double far_field_of_trefoil_line(double current, double spacing, double distance);

/// B [T] of go and return, `spacing` [m] apart, on the perpendicular through the middle.
double field_above_pair(double current, double spacing, double height);

}  // namespace barwall::verify
