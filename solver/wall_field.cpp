#include "solver/wall_field.hpp"

#include <algorithm>

#include "solver/cycle.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {

FieldLevel field_level(const Solution& solution, int part) {
  const mesh::FittedGrid& grid = solution.grid();
  std::vector<std::pair<double, double>> levels;  // |B|, area
  double area = 0.0;
  double sum = 0.0;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part != part) continue;
    const mesh::Point b = cell_flux_density(grid, t, solution.potential.col(0));
    const double level =
        solution.pattern_count() == 1
            ? norm(b)
            : peak_magnitude(b, cell_flux_density(grid, t, solution.potential.col(1)));
    const double a = triangle_area(grid.corners(t));
    levels.emplace_back(level, a);
    area += a;
    sum += level * a;
  }
  std::sort(levels.begin(), levels.end(), std::greater<>());
  FieldLevel result{sum / area, 0.0};
  double above = 0.0;
  for (const auto& [level, a] : levels) {
    above += a;
    result.high = level;
    if (above >= 0.01 * area) break;
  }
  return result;
}

}  // namespace barwall::solver
