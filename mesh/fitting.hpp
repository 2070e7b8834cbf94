#pragma once

#include <vector>

#include "mesh/fitted_grid.hpp"

namespace barwall::mesh {

/// Result of one attempt to fit a grid: the cells that could not be made to hold whole
/// triangles of one occupant each; empty when the grid is valid.
struct FitResult {
  FittedGrid grid;
  std::vector<int> faulty_cells;
};

/// Moves nodes of the plain grid x_lines x y_lines onto the section's outlines, splits the
/// cells along them and says which occupant each triangle belongs to.
///
/// Each grid edge that an outline crosses moves the nearer of its two nodes onto the crossing
/// (S. Frei and T. Richter, SIAM J. Numer. Anal. 52, 2014, describe fitting within a fixed
/// structure); corners get the nearest node first. Then an outline runs from node to node along
/// edges and diagonals.
FitResult fit(const Section& section, const Outline& outline, std::vector<double> x_lines,
              std::vector<double> y_lines);

}  // namespace barwall::mesh
