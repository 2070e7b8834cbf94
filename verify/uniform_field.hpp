#pragma once

#include "mesh/point.hpp"

namespace barwall::verify {

/// A round shell about the origin, of constant permeability, in a field that is uniform far away.
/// An inner radius of 0 is a solid cylinder. Radii [m].
struct Shell {
  double inner_radius = 0.0;
  double outer_radius = 0.0;
  double relative_permeability = 1.0;
};

/// Shielding factor: the applied field over the field in the bore. Source: J. D. Jackson,
/// Classical Electrodynamics, sec. 5.12, for a cylinder (from memory).
double shielding_factor(const Shell& shell);

/// B [T] anywhere when the field far away is `applied` [T].
mesh::Point field_in(const Shell& shell, mesh::Point applied, mesh::Point at);

/// A [Wb/m] anywhere, continuous, 0 on the line through the axis along the applied field.
double potential_in(const Shell& shell, mesh::Point applied, mesh::Point at);

/// By how much the shell multiplies the flux that would cross its outer diameter.
double flux_gain(const Shell& shell);

/// H [A/m] within an elliptic cylinder of constant permeability, uniform, when H far away is
/// `applied` [A/m]; half-axes [m] along x and y. The demagnetising factor along one half-axis is
/// the other's share of their sum.
mesh::Point field_strength_in_ellipse(double half_axis_x, double half_axis_y,
                                      double relative_permeability, mesh::Point applied);

}  // namespace barwall::verify
