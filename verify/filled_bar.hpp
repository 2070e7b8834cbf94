#pragma once

#include <vector>

#include "mesh/point.hpp"
#include "mesh/shape.hpp"
#include "verify/filament.hpp"

namespace barwall::verify {

/// B [T] of `current` [A] spread evenly over a shape: in closed form at every point, inside,
/// outside and on the outline.
mesh::Point field_of(const mesh::Shape& shape, double current, mesh::Point at);

/// A [Wb/m] of the same, -(mu_0 I / 2 pi) ln(r / 1 m) far away: the mean over the shape of a
/// filament's.
double potential_of(const mesh::Shape& shape, double current, mesh::Point at);

/// Filaments that stand for `current` [A] spread evenly over a shape: Gauss-Legendre points,
/// `order` along each of two directions (rounds and tubes: along the radius, and 4 order evenly
/// round; a frame and a polygon: on each part of them). Inside the shape their field has nothing
/// to do with the bar's. Polygons that are not star-shaped get some negative currents.
std::vector<Filament> filaments_of(const mesh::Shape& shape, double current, int order);

}  // namespace barwall::verify
