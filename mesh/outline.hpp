#pragma once

#include <vector>

#include "mesh/section.hpp"

namespace barwall::mesh {

/// A piece of curve that separates two different occupants, seen along its direction.
struct OutlinePiece {
  Curve curve;
  Occupant left;
  Occupant right;
};

/// All visible outlines of a section: what is painted over, cut away or lies between equal
/// occupants is gone; pieces meet only in vertices.
struct Outline {
  std::vector<OutlinePiece> pieces;
  /// Ends of pieces [m]: corners, and points where outlines meet. Whole circles have none.
  std::vector<Point> vertices;
  /// Two outlines closer than this are in contact [m].
  double contact = 0.0;
};

Outline outline_of(const Section& section);

/// Shortest distance between two curves and where it is taken.
struct Gap {
  double width = HUGE_VAL;  ///< [m]
  Point from;               ///< on the first
  Point to;                 ///< on the second
};

Gap gap_between(const Curve& first, const Curve& second);

/// Two visible parts, by index, and the shortest distance between their outlines, 0 in contact.
struct PartGap {
  int first = 0;
  int second = 0;
  Gap gap;
};

/// The gaps between all pairs of visible parts, first < second, in that order.
std::vector<PartGap> gaps(const Outline& outline);

/// The parts of a section that show anywhere, by index, ascending.
std::vector<int> visible_parts(const Outline& outline);

/// Groups of visible parts in contact with one another: each part's index appears once, groups
/// and their members ascending.
std::vector<std::vector<int>> bodies(const Outline& outline);

}  // namespace barwall::mesh
