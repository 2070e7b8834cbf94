#pragma once

#include <string>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::io {

/// What keeps a closed polygon from being a shape: corners that coincide, edges that cross or
/// touch, no area; empty when it is sound. Corners and edges are counted from 1 in the order
/// given, edge k leaving corner k.
/// \param corners at least three [m]
/// \param nearest corners and edges nearer to each other than this coincide [m]
std::string polygon_fault(const std::vector<mesh::Point>& corners, double nearest);

}  // namespace barwall::io
