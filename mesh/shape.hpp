#pragma once

#include <variant>
#include <vector>

#include "mesh/curve.hpp"
#include "mesh/point.hpp"

namespace barwall::mesh {

// The shapes of a section. Lengths in metres, angles in radians, counter-clockwise.

struct Rectangle {
  Point centre;
  double width = 0.0;
  double height = 0.0;
  double turn = 0.0;
};

struct Round {
  Point centre;
  double diameter = 0.0;
};

/// A round ring: outer diameter and wall thickness, 2 thickness < outer_diameter.
struct Tube {
  Point centre;
  double outer_diameter = 0.0;
  double thickness = 0.0;
};

/// A rectangular ring: outer size and wall thickness, 2 thickness < width and height.
struct Frame {
  Point centre;
  double width = 0.0;
  double height = 0.0;
  double thickness = 0.0;
  double turn = 0.0;
};

/// A simple polygon, either orientation, at least three corners.
struct Polygon {
  std::vector<Point> corners;
};

using Shape = std::variant<Rectangle, Round, Tube, Frame, Polygon>;

/// True when `point` lies inside; on the boundary itself either answer may come.
bool contains(const Shape& shape, Point point);

/// Enclosed area [m2].
double area(const Shape& shape);

/// Centroid [m].
Point centroid(const Shape& shape);

/// Thickness [m] that the shape's cells must resolve: the smaller side of a rectangle, the
/// diameter of a round, the wall of a tube or frame, for a polygon the smallest width across
/// it, measured perpendicularly from the middle of each of its edges.
double thickness(const Shape& shape);

/// Closed chains of curves that bound the shape, the shape's inside on their left: the outer
/// chain runs counter-clockwise and comes first, holes follow clockwise.
std::vector<std::vector<Curve>> boundary(const Shape& shape);

Box bounds(const Shape& shape);

/// The shape moved by `shift` [m].
Shape moved(const Shape& shape, Point shift);

}  // namespace barwall::mesh
