#pragma once

#include "mesh/fitted_grid.hpp"

namespace barwall::mesh {

/// Triangles of a cell that own its four sides, whichever way it is split.
inline int triangle_below(int cell) {
  return 2 * cell;
}
inline int triangle_above(int cell) {
  return 2 * cell + 1;
}
inline int triangle_left(const FittedGrid& grid, int cell) {
  return 2 * cell + (grid.falling[static_cast<std::size_t>(cell)] == 0 ? 1 : 0);
}
inline int triangle_right(const FittedGrid& grid, int cell) {
  return 2 * cell + (grid.falling[static_cast<std::size_t>(cell)] == 0 ? 0 : 1);
}

/// Visits every edge between two triangles once: visit(from node, to node, triangle on the left
/// of that direction, triangle on the right).
template <class Visit>
void each_inner_edge(const FittedGrid& grid, Visit visit) {
  for (int j = 0; j + 1 < grid.rows; ++j) {
    for (int i = 0; i + 1 < grid.columns; ++i) {
      const int cell = j * (grid.columns - 1) + i;
      const int a = grid.node(i, j);
      const int b = a + 1;
      const int c = a + grid.columns;
      const int d = c + 1;
      if (grid.falling[static_cast<std::size_t>(cell)] == 0) {
        visit(a, d, 2 * cell + 1, 2 * cell);
      } else {
        visit(b, c, 2 * cell, 2 * cell + 1);
      }
      if (i + 2 < grid.columns) {
        visit(b, d, triangle_right(grid, cell), triangle_left(grid, cell + 1));
      }
      if (j + 2 < grid.rows) {
        visit(c, d, triangle_below(cell + grid.columns - 1), triangle_above(cell));
      }
    }
  }
}

}  // namespace barwall::mesh
