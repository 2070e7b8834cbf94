#pragma once

#include <vector>

#include "io/results.hpp"
#include "mesh/point.hpp"

namespace barwall::io {

/// A line of constant A, in the direction of B; equal flux passes between neighbouring lines.
struct FluxLine {
  double potential = 0.0;  ///< A [Wb/m]
  bool closed = false;
  std::vector<mesh::Point> points;  ///< [m], in order; a closed line's first is not repeated
};

/// Lines of constant A within a window of the section, at `count` equally spaced levels between
/// the smallest and the largest A there, the first and the last half a step from these; cut off
/// at the window's sides. A is linear in each triangle, so the lines are straight there. With a
/// frequency the lines belong to the instant of largest energy, `flux_line_instant`.
std::vector<FluxLine> flux_lines(const Results& results, const mesh::Box& window, int count);

/// wt [rad] of the instant of largest energy, 0 for steady currents.
double flux_line_instant(const Results& results);

}  // namespace barwall::io
