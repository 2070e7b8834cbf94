#pragma once

#include <string>
#include <vector>

#include "mesh/shape.hpp"

namespace barwall::mesh {

/// A straight side of a shape's outer boundary.
struct Side {
  std::string name;
  Segment edge;
  Point normal;  ///< unit, out of the shape
};

/// The sides of a rectangle or frame, "left", "right", "top" and "bottom" by where each faces
/// before the shape is turned, or of a polygon, "side 1" from its first corner to its second and so
/// on. A round and a tube have none.
std::vector<Side> sides(const Shape& shape);

/// The side nearest to a point, by index, of equals the first; there must be one.
std::size_t nearest_side(const std::vector<Side>& sides, Point point);

}  // namespace barwall::mesh
