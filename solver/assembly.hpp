#pragma once

#include <Eigen/Dense>

#include "mesh/fitted_grid.hpp"
#include "solver/stencil.hpp"

namespace barwall::solver {

/// The operator of -div(nu grad A) over all nodes, boundary nodes included: the flux of
/// H = nu grad A balanced over every node's control cell, A linear on each triangle
/// (R. H. MacNeal, Q. Appl. Math. 11, 1953). Rows sum to zero.
/// \param reluctivity per triangle [m/H]
Stencil<double> assemble_operator(const mesh::FittedGrid& grid,
                                  const std::vector<double>& reluctivity);

/// Current through every node's control cell [A]: a third of each adjoining triangle's.
/// \param density per occupant of the grid [A/m2]
Eigen::VectorXd assemble_current(const mesh::FittedGrid& grid, const std::vector<double>& density);

/// Values per occupant spread over the triangles.
std::vector<double> by_triangle(const mesh::FittedGrid& grid, const std::vector<double>& by_region);

}  // namespace barwall::solver
