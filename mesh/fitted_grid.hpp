#pragma once

#include <array>
#include <cstdint>
#include <stdexcept>
#include <vector>

#include "mesh/outline.hpp"

namespace barwall::mesh {

/// A grid of columns x rows of nodes, fitted to a section's outlines: logically rectangular,
/// every cell split into two triangles, every triangle in exactly one occupant.
///
/// Node (i, j) has index j * columns + i, i to the right, j up. Cell (i, j), with corners
/// (i, j) .. (i + 1, j + 1), has index j * (columns - 1) + i and holds triangles 2 cell (the
/// lower one) and 2 cell + 1 (the upper one).
struct FittedGrid {
  int columns = 0;
  int rows = 0;
  std::vector<double> x_lines;        ///< columns positions before fitting [m], ascending
  std::vector<double> y_lines;        ///< rows positions before fitting [m], ascending
  std::vector<Point> nodes;           ///< columns * rows positions [m]
  std::vector<std::uint8_t> falling;  ///< per cell: 0 split from lower left to upper right,
                                      ///< 1 from upper left to lower right
  std::vector<std::int32_t> region;   ///< per triangle: index into `occupants`
  std::vector<Occupant> occupants;    ///< occupants[0] is air

  int node_count() const { return columns * rows; }
  int cell_count() const { return (columns - 1) * (rows - 1); }
  int triangle_count() const { return 2 * cell_count(); }
  int node(int i, int j) const { return j * columns + i; }
  /// True when fitting moved a node off its place in the plain grid.
  bool moved(int node_index) const {
    const Point p = nodes[static_cast<std::size_t>(node_index)];
    return p.x != x_lines[static_cast<std::size_t>(node_index % columns)] ||
           p.y != y_lines[static_cast<std::size_t>(node_index / columns)];
  }
  bool on_boundary(int node_index) const {
    const int i = node_index % columns;
    const int j = node_index / columns;
    return i == 0 || j == 0 || i == columns - 1 || j == rows - 1;
  }
  /// Corner nodes of a triangle, counter-clockwise.
  std::array<int, 3> triangle(int t) const {
    const int cell = t / 2;
    const int a = (cell / (columns - 1)) * columns + cell % (columns - 1);
    const int b = a + 1;
    const int c = a + columns;
    const int d = c + 1;
    if (falling[static_cast<std::size_t>(cell)] == 0) {
      return t % 2 == 0 ? std::array{a, b, d} : std::array{a, d, c};
    }
    return t % 2 == 0 ? std::array{a, b, c} : std::array{b, d, c};
  }
  std::array<Point, 3> corners(int t) const {
    const auto n = triangle(t);
    return {nodes[static_cast<std::size_t>(n[0])], nodes[static_cast<std::size_t>(n[1])],
            nodes[static_cast<std::size_t>(n[2])]};
  }
  Occupant occupant(int t) const {
    return occupants[static_cast<std::size_t>(region[static_cast<std::size_t>(t)])];
  }
};

/// Area of a triangle [m2], positive when counter-clockwise.
inline double triangle_area(const std::array<Point, 3>& p) {
  return 0.5 * cross(p[1] - p[0], p[2] - p[0]);
}

struct GridOptions {
  int cells_across = 4;    ///< at least this many cells across every bar, wall and gap
  double reach = 400.0;    ///< outer boundary's distance, in half-sizes of the section
  Box fine;                ///< spacing grows by less than 1.12 a cell within this box [m] too
  double wide = 0.0;       ///< half-sizes out to which the field of a net current is looked at: so
                           ///< far the spacing grows by less than 1.17 a cell
  double max_nodes = 5e7;  ///< more is refused before anything is allocated
};

/// A section to which no valid grid was found, or one larger than allowed; the message names the
/// parts or the size.
class GridError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// Makes the grid of a section. The outer boundary is a square about the section's centre, its
/// half side the larger of reach half-sizes and 100 times the farthest point of `fine`.
/// \throws GridError
FittedGrid make_grid(const Section& section, const Outline& outline, const GridOptions& options);

}  // namespace barwall::mesh
