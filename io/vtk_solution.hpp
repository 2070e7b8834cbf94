#pragma once

#include <vtkUnstructuredGrid.h>

#include <vector>

#include "io/grid_window.hpp"
#include "solver/flux_density.hpp"

namespace barwall::io {

/// The triangles of a block of cells, or all others, in order.
std::vector<int> triangles_of(const mesh::FittedGrid& grid, const GridWindow& window, bool inside);

/// Puts some of a solution's triangles into a data set: points in metres, a node on an outline once
/// per part; per point B_T, H_A_per_m, A_Wb_per_m as recovered, per cell J_A_per_m2, mu_r, part and
/// B_cell_T, with the suffixes of a frequency.
void add_solution(vtkUnstructuredGrid* data, const solver::Solution& solution,
                  const solver::RecoveredField& field, const std::vector<int>& triangles);

/// Makes such a data set fit for one of many in a time series: single precision, without H and
/// B_cell_T.
void thin_out(vtkUnstructuredGrid* data);

}  // namespace barwall::io
