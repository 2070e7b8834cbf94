#pragma once

#include <optional>

#include "mesh/shape.hpp"

namespace barwall::verify {

// Geometric mean distances [m] of the shapes of a section, with uniform current
// (mean_distance.hpp). Rectangles, rounds and tubes are covered; frames and polygons are not.

/// Of a shape from itself. None for frames and polygons.
std::optional<double> own_distance(const mesh::Shape& shape);

/// Of two shapes that do not overlap; a tube may hold the other in its bore. Exact: parallel
/// rectangles by the closed form; a round or a tube by the other's potential, whose mean over a
/// disc or ring outside it is that in the centre; rectangles turned against each other by
/// Gauss-Legendre points of one in the other's closed potential. None for frames and polygons.
std::optional<double> mutual_distance(const mesh::Shape& first, const mesh::Shape& second);

}  // namespace barwall::verify
