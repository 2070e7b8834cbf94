#include "solver/wall_field.hpp"

#include <algorithm>
#include <numbers>
#include <optional>

#include "solver/constants.hpp"
#include "solver/cycle.hpp"
#include "solver/field_peak.hpp"
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

/// \param level_at of a triangle: |B|
template <class Level>
std::vector<FieldLevel> levels_of(const Problem& problem, Level level_at) {
  const mesh::FittedGrid& grid = *problem.grid;
  std::vector<std::vector<Sample>> samples(problem.section.parts.size());
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const int part = grid.occupant(t).part;
    if (part < 0) continue;
    samples[static_cast<std::size_t>(part)].push_back(
        {level_at(t), triangle_area(grid.corners(t))});
  }
  std::vector<FieldLevel> levels;
  for (std::size_t k = 0; k < samples.size(); ++k) {
    levels.push_back(level_of(std::move(samples[k]), problem.materials[k].curve.get()));
  }
  return levels;
}

}  // namespace

std::vector<FieldLevel> field_levels(const Solution& solution) {
  return levels_of(*solution.problem, [&](int t) {
    const mesh::Point b = cell_flux_density(solution.grid(), t, solution.potential.col(0));
    if (solution.pattern_count() == 1) return norm(b);
    return peak_magnitude(b, cell_flux_density(solution.grid(), t, solution.potential.col(1)));
  });
}

std::vector<FieldLevel> field_levels(const Solution& solution,
                                     std::span<const std::complex<double>> factors) {
  return levels_of(*solution.problem, [&](int t) {
    const mesh::Point b = cell_flux_density(solution.grid(), t, solution.potential.col(0));
    const mesh::Point q = cell_flux_density(solution.grid(), t, solution.potential.col(1));
    double largest = 0.0;
    for (const std::complex<double> factor : factors) {
      largest = std::max(largest, norm(factor.real() * b - factor.imag() * q));
    }
    return std::numbers::sqrt2 * largest;
  });
}

std::vector<FieldLevel> field_levels(const Instants& instants) {
  std::optional<PeakFinder> between;
  if (instants.half_cycle) between.emplace();
  std::vector<mesh::Point> b(instants.size());
  const mesh::FittedGrid& grid = instants.solution.front()->grid();
  return levels_of(*instants.solution.front()->problem, [&](int t) {
    double largest = 0.0;
    for (std::size_t k = 0; k < b.size(); ++k) {
      b[k] = cell_flux_density(grid, t, instants.solution[k]->potential.col(0));
      largest = std::max(largest, norm(b[k]));
    }
    return between ? between->peak(b) : largest;
  });
}

}  // namespace barwall::solver
