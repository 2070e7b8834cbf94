#pragma once

#include <vector>

#include "mesh/outline.hpp"

namespace barwall::mesh {

/// The outermost closed line at a constant clearance round some parts, counter-clockwise,
/// closed (the first point is not repeated). Chords stay within `clearance` / 2000 of it.
/// \param parts indices of parts; their common outermost outline counts, gaps between them that
///              are narrower than twice the clearance are bridged
/// \param clearance > 0 [m]
/// Several lines, one per group of parts that the clearance does not join, largest area first.
std::vector<std::vector<Point>> offset_lines(const Outline& outline, const std::vector<int>& parts,
                                             double clearance);

/// `count` points equally spaced along a closed line, the first at its rightmost point.
std::vector<Point> spread_along(const std::vector<Point>& closed_line, int count);

}  // namespace barwall::mesh
