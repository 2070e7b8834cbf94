#pragma once

#include <optional>

#include "mesh/section.hpp"

namespace barwall::verify {

// How two conductors lie to each other, as far as handbook formulas ask.

/// Two equal parallel rectangles whose line of centres runs along a side of both: face to face or
/// edge to edge. Sizes along and across that line, distance of the centres [m].
struct BarPair {
  double along = 0.0;
  double across = 0.0;
  double distance = 0.0;
};

/// Sizes, angles and the line of centres may be off by 1e-4 of the distance, as rounded coordinates
/// of turned bars are; none where the two are not such a pair.
std::optional<BarPair> bar_pair(const mesh::Shape& first, const mesh::Shape& second);

/// Whether a shape reaches round a point: the point lies within its convex hull. Two conductors of
/// which one reaches round the other's centroid are no two wires side by side.
bool reaches_round(const mesh::Shape& shape, mesh::Point point);

/// The rectangle that just holds all pieces of a bar: of parallel rectangles with their sides
/// along it. None for a bar with pieces of another shape.
std::optional<mesh::Rectangle> hull_of_rectangles(const mesh::Part& bar);

}  // namespace barwall::verify
