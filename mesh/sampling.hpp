#pragma once

#include <array>

#include "mesh/fitted_grid.hpp"

namespace barwall::mesh {

/// A point within a triangle: its number, and barycentric weights of its three corners.
struct Location {
  int triangle = -1;  ///< -1 outside the grid
  std::array<double, 3> weight{};
};

/// The triangle that holds `point`. On an outline, where several do, the one whose occupant was
/// painted last: bars before walls, later parts before earlier ones, air last.
Location locate(const FittedGrid& grid, const Section& section, Point point);

/// Point k = 0, 1, 2, ... of a low-discrepancy sequence in the unit square: multiples of the
/// inverse powers of the plastic number (the two-dimensional golden-ratio sequence).
Point low_discrepancy_point(int k);

}  // namespace barwall::mesh
