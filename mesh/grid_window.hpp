#pragma once

#include "mesh/fitted_grid.hpp"

namespace barwall::mesh {

/// A block of a grid's cells, by column and row; `last` is the first cell beyond.
struct GridWindow {
  int first_column = 0;
  int last_column = 0;
  int first_row = 0;
  int last_row = 0;

  bool contains(int column, int row) const {
    return column >= first_column && column < last_column && row >= first_row && row < last_row;
  }
};

/// The smallest block, and a cell or two more on every side, whose cells cover the part of `box`
/// [m] that the grid covers: nodes that the fitting moved never leave a gap.
GridWindow window_covering(const FittedGrid& grid, const Box& box);

}  // namespace barwall::mesh
