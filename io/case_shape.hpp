#pragma once

#include <string>
#include <vector>

#include "io/case_text.hpp"
#include "mesh/shape.hpp"

namespace barwall::io {

/// The keys that give a shape: rectangle_mm, round_mm, tube_mm, frame_mm, polygon_mm.
const std::vector<std::string>& shape_keys();

/// The pieces of a part or an opening, and the place of its shape.
struct ShapeGiven {
  Place place;
  std::vector<mesh::Shape> pieces;
};

/// Reads the one shape of a bar, a wall or an opening.
/// \throws InputError for a wrong one: sizes out of range, a thickness that leaves no hole, a
/// polygon that crosses itself or has no area, coordinates beyond 1e7 mm.
ShapeGiven read_shape(const CaseTable& table);

/// Most corners of one polygon, and most pieces of one part.
inline constexpr int most_corners = 10000;
inline constexpr int most_pieces = 10000;

}  // namespace barwall::io
