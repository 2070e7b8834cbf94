#pragma once

#include <vtkUnstructuredGrid.h>

#include <vector>

#include "mesh/grid_window.hpp"
#include "solver/flux_density.hpp"

namespace barwall::io {

/// The triangles of a block of cells, or all others, in order.
std::vector<int> triangles_of(const mesh::FittedGrid& grid, const mesh::GridWindow& window,
                              bool inside);

/// Puts some of a solution's triangles into a data set: points in metres, a node on an outline once
/// per part; per point B_T, H_A_per_m, A_Wb_per_m as recovered, per cell J_A_per_m2, mu_r, part and
/// B_cell_T, with the suffixes of a frequency.
void add_solution(vtkUnstructuredGrid* data, const solver::Solution& solution,
                  const solver::RecoveredField& field, const std::vector<int>& triangles);

/// The same of steady currents as one of many in a time series: single precision, without H and
/// B_cell_T.
void add_instant(vtkUnstructuredGrid* data, const solver::Solution& solution,
                 const solver::RecoveredField& field, const std::vector<int>& triangles);

}  // namespace barwall::io
