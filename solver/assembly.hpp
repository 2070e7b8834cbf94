#pragma once

#include <Eigen/Dense>
#include <array>
#include <vector>

#include "mesh/fitted_grid.hpp"
#include "solver/stencil.hpp"

namespace barwall::solver {

/// The operator of -div(nu grad A) over all nodes, boundary nodes included: the flux of
/// H = nu grad A balanced over every node's control cell, A linear on each triangle
/// (R. H. MacNeal, Q. Appl. Math. 11, 1953). Rows sum to zero.
/// \param reluctivity per triangle [m/H]
Stencil<double> assemble_operator(const mesh::FittedGrid& grid,
                                  const std::vector<double>& reluctivity);

/// Shares of a triangle's area [m2] that belong to the control cells of its corners: what lies
/// nearest to each, bounded by the perpendicular bisectors of the edges; in an obtuse triangle half
/// to the obtuse corner and a quarter to the others, as in the right-angled one it came from. On
/// plain lines the cell of a node ends halfway to its neighbours, and a uniform current's quadratic
/// potential is exact at the nodes. (M. Meyer, M. Desbrun, P. Schroeder and A. H. Barr, in
/// Visualization and Mathematics III, 2003: mixed cells; from memory.)
std::array<double, 3> control_areas(const std::array<mesh::Point, 3>& corners);

/// Current through every node's control cell [A].
/// \param density per occupant of the grid [A/m2]
Eigen::VectorXd assemble_current(const mesh::FittedGrid& grid, const std::vector<double>& density);

/// Values per occupant spread over the triangles.
std::vector<double> by_triangle(const mesh::FittedGrid& grid, const std::vector<double>& by_region);

}  // namespace barwall::solver
