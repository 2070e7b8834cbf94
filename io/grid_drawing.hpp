#pragma once

#include "io/frame.hpp"
#include "solver/problem.hpp"

namespace barwall::io {

/// The grid's lines through the fitted nodes, and if asked for the cells' diagonals where they
/// are long enough. Where lines come closer than 2.5 pixels only some of them are drawn.
void draw_grid(Canvas& canvas, const mesh::FittedGrid& grid, const Frame& frame, bool diagonals);

/// A frame with the page box given, round the place where the grid is finest.
Frame finest_detail(const solver::Problem& problem, const PageBox& box);

}  // namespace barwall::io
