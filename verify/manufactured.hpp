#pragma once

#include <memory>
#include <vector>

#include "mesh/fitted_grid.hpp"
#include "mesh/section.hpp"

namespace barwall::verify {

/// A made-up potential in a plane of air with one disc of constant permeability. With
/// s = r^2 / radius^2, r and the angle t taken about the disc's centre,
///
///   A = amplitude (s e^(1-s) cos 2t + mu (s - 1) e^(-s/2) (1 + (x/2 - 3 y/10) / radius))
///
/// where mu is the permeability over `mean_permeability`. The first term crosses the rim without
/// slope along the normal, the second is 0 there and has the same slope of nu A on both sides: A
/// and the tangential H are continuous, B across the rim as well as along it. The current density
/// that belongs to it follows from -div(nu grad A).
struct ManufacturedField {
  mesh::Point centre;
  double radius = 0.0;                 ///< [m]
  double relative_permeability = 1.0;  ///< of the disc
  double mean_permeability = 1.0;      ///< scale of the second term
  double amplitude = 1.0;              ///< [Wb/m]

  double potential(mesh::Point at, bool in_disc) const;        ///< A [Wb/m]
  double current_density(mesh::Point at, bool in_disc) const;  ///< J [A/m2]
};

/// Errors of A at the nodes of the scheme's solution, with exact values on the boundary and the
/// field's current density integrated against each node's hat function: r.m.s. over r.m.s. of A,
/// each node weighted with the area of its control cell. `disc` is the part that is the disc; all
/// other parts are as air.
double error_of(const ManufacturedField& field, int disc, const mesh::FittedGrid& grid);

}  // namespace barwall::verify
