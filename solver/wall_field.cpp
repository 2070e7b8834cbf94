#include "solver/wall_field.hpp"

#include <algorithm>

#include "solver/constants.hpp"
#include "solver/cycle.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {
namespace {

/// |B| on one triangle of a part, and the triangle's area.
struct Sample {
  double level = 0.0;
  double area = 0.0;
};

FieldLevel level_of(std::vector<Sample> samples, const BhCurve* curve) {
  FieldLevel result;
  double area = 0.0;
  for (const Sample& sample : samples) {
    area += sample.area;
    result.mean += sample.level * sample.area;
    if (curve == nullptr) continue;
    if (curve->differential_permeability(sample.level) < saturated_below * mu_0) {
      result.saturated_share += sample.area;
    }
    if (sample.level > curve->table_end()) result.share_beyond_table += sample.area;
  }
  if (area > 0.0) {
    for (double* value : {&result.mean, &result.saturated_share, &result.share_beyond_table}) {
      *value /= area;
    }
  }
  std::sort(samples.begin(), samples.end(),
            [](const Sample& a, const Sample& b) { return a.level > b.level; });
  double above = 0.0;
  for (const Sample& sample : samples) {
    above += sample.area;
    result.high = sample.level;
    if (above >= 0.01 * area) break;
  }
  return result;
}

}  // namespace

std::vector<FieldLevel> field_levels(const Solution& solution) {
  const mesh::FittedGrid& grid = solution.grid();
  std::vector<std::vector<Sample>> samples(solution.problem->section.parts.size());
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const int part = grid.occupant(t).part;
    if (part < 0) continue;
    const mesh::Point b = cell_flux_density(grid, t, solution.potential.col(0));
    const double level =
        solution.pattern_count() == 1
            ? norm(b)
            : peak_magnitude(b, cell_flux_density(grid, t, solution.potential.col(1)));
    samples[static_cast<std::size_t>(part)].push_back({level, triangle_area(grid.corners(t))});
  }
  std::vector<FieldLevel> levels;
  for (std::size_t k = 0; k < samples.size(); ++k) {
    levels.push_back(level_of(std::move(samples[k]), solution.problem->materials[k].curve.get()));
  }
  return levels;
}

}  // namespace barwall::solver
