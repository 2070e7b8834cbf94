#pragma once

#include <string>
#include <vector>

#include "mesh/shape.hpp"

namespace barwall::mesh {

/// One bar or wall of a section: a name and one or more pieces of like shape.
struct Part {
  enum class Kind { bar, wall };

  std::string name;
  Kind kind = Kind::bar;
  std::vector<Shape> pieces;
  /// A wall that paints air over what lies below it; it is no part of any result.
  bool empty = false;
  /// The field grows without bound towards this part's corners (its material differs
  /// magnetically from air): the grid is graded towards them.
  bool sharp_corners = false;
};

/// Area of all pieces together [m2], also where something covers or cuts them.
double area(const Part& part);

/// Centroid of all pieces together [m].
Point centroid(const Part& part);

/// A slot or hole cut from the walls it names.
struct Opening {
  std::string name;
  std::vector<int> through;  ///< indices into Section::parts
  std::vector<Shape> pieces;
};

/// Parts painted in order: walls in file order, a later one covering an earlier, openings cut
/// from the walls they name, bars last.
struct Section {
  std::vector<Part> parts;  ///< bars and walls in file order
  std::vector<Opening> openings;
};

/// What lies at a point: the part's index into Section::parts and the piece's index in it, or
/// part = -1 in air.
struct Occupant {
  int part = -1;
  int piece = -1;

  friend bool operator==(const Occupant&, const Occupant&) = default;
  friend auto operator<=>(const Occupant&, const Occupant&) = default;
};

/// Occupant of a point; on an outline either side may be given. Pieces of one wall that
/// overlap belong to the earlier piece's index.
Occupant occupant_at(const Section& section, Point point);

/// Box round all parts [m].
Box bounds(const Section& section);

/// Half the longer side of the box round all parts [m]: the section's half-size.
double half_size(const Section& section);

}  // namespace barwall::mesh
