#include "mesh/sampling.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/spacing.hpp"

namespace barwall::mesh {
namespace {

/// Painting order as a number: air below walls below bars.
int paint_rank(const Section& section, Occupant occupant) {
  if (occupant.part < 0) return -1;
  const auto k = static_cast<std::size_t>(occupant.part);
  const bool bar = section.parts[k].kind == Part::Kind::bar;
  return occupant.part + (bar ? static_cast<int>(section.parts.size()) : 0);
}

}  // namespace

Location locate(const FittedGrid& grid, const Section& section, Point point) {
  const int i0 = interval_of(grid.x_lines, point.x);
  const int j0 = interval_of(grid.y_lines, point.y);
  constexpr double slack = 1e-9;
  Location best;
  int best_rank = -2;
  // A node moves by half an edge at most, so the neighbours of the plain cell suffice.
  for (int ring = 0; ring <= 2 && best.triangle < 0; ++ring) {
    const int reach = ring + 1;
    for (int j = std::max(0, j0 - reach); j <= std::min(grid.rows - 2, j0 + reach); ++j) {
      for (int i = std::max(0, i0 - reach); i <= std::min(grid.columns - 2, i0 + reach); ++i) {
        for (int t = 2 * (j * (grid.columns - 1) + i), end = t + 2; t < end; ++t) {
          const auto p = grid.corners(t);
          const double whole = cross(p[1] - p[0], p[2] - p[0]);
          const double w0 = cross(p[1] - point, p[2] - point) / whole;
          const double w1 = cross(p[2] - point, p[0] - point) / whole;
          const double w2 = 1.0 - w0 - w1;
          if (std::min({w0, w1, w2}) < -slack) continue;
          const int rank = paint_rank(section, grid.occupant(t));
          if (rank > best_rank) {
            best_rank = rank;
            best = {t, {w0, w1, w2}};
          }
        }
      }
    }
  }
  return best;
}

Point low_discrepancy_point(int k) {
  constexpr double g = 1.32471795724474602596;  // root of g^3 = g + 1
  const double n = k + 1;
  const auto fraction = [](double v) { return v - std::floor(v); };
  return {fraction(0.5 + n / g), fraction(0.5 + n / (g * g))};
}

}  // namespace barwall::mesh
