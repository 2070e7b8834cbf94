#pragma once

#include <vector>

#include "mesh/point.hpp"
#include "io/results.hpp"

namespace barwall::io {

/// A line of constant A: B runs along it, and equal flux passes between neighbouring lines.
struct FluxLine {
  double potential = 0.0;  ///< A [Wb/m]
  bool closed = false;
  std::vector<mesh::Point> points;  ///< [m], in order
};

/// Lines of constant A within a window of the section, at `count` equally spaced levels between
/// the smallest and the largest A there. With a frequency the lines belong to the instant of
/// largest energy, `flux_line_instant`.
std::vector<FluxLine> flux_lines(const Results& results, const mesh::Box& window, int count);

/// wt [rad] of the instant of largest energy, 0 for steady currents.
double flux_line_instant(const Results& results);

}  // namespace barwall::io
