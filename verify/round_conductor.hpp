#pragma once

#include "mesh/point.hpp"

namespace barwall::verify {

// Round conductors of uniform current density, non-magnetic: Ampere's law on circles.

/// B [T] of a disc of radius [m]: mu_0 I r / 2 pi R^2 inside, as a filament outside. A radius of
/// 0 is a filament.
mesh::Point field_of_disc(mesh::Point centre, double radius, double current, mesh::Point at);
/// A [Wb/m] of the disc; outside -(mu_0 I / 2 pi) ln(r / 1 m).
double potential_of_disc(mesh::Point centre, double radius, double current, mesh::Point at);

/// B [T] of a tube: 0 in its bore, mu_0 I (r^2 - a^2) / (2 pi r (b^2 - a^2)) in the wall.
/// Throws std::invalid_argument unless 0 <= inner_radius < outer_radius.
mesh::Point field_of_tube(mesh::Point centre, double inner_radius, double outer_radius,
                          double current, mesh::Point at);
/// A [Wb/m] of the tube; outside -(mu_0 I / 2 pi) ln(r / 1 m).
double potential_of_tube(mesh::Point centre, double inner_radius, double outer_radius,
                         double current, mesh::Point at);

/// A go conductor in the bore of its return: core radius, sheath radii [m].
struct Coax {
  double core_radius = 0.0;
  double sheath_inner_radius = 0.0;
  double sheath_outer_radius = 0.0;
};

/// B [T], counter-clockwise, at the distance r [m] from the axis of a coaxial pair that carries
/// +I in its core and -I in its sheath.
double field_of_coax(const Coax& coax, double current, double r);

/// Inductance [H/m] of a coaxial pair whose sheath is thin; `core_permeability` is relative, 1
/// for copper, 0 leaves the core's own linkage out.
double inductance_of_thin_coax(double core_radius, double sheath_radius, double core_permeability);
/// Inductance [H/m] of a coaxial pair with a thick sheath, all of it non-magnetic.
double inductance_of_coax(const Coax& coax);

/// Loop inductance [H/m] of two equal round wires, axes `distance` [m] apart:
/// (mu_0 / pi)(ln(D / r) + mu_r / 4). The last term is exact for mu_r = 1; for steel it leaves out
/// that each wire also magnetises the other (0.04 % to 0.6 % low). 0 leaves the wires' own
/// linkage out.
double inductance_of_two_wires(double distance, double radius, double relative_permeability);
/// Inductance [H/m] per phase of three transposed round wires, from their three distances [m].
double inductance_of_transposed_line(double distance_12, double distance_23, double distance_31,
                                     double radius, double relative_permeability);

}  // namespace barwall::verify
