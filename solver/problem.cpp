#include "solver/problem.hpp"

#include <algorithm>

#include "solver/constants.hpp"

namespace barwall::solver {

bool saturable(const Problem& problem) {
  return std::any_of(problem.materials.begin(), problem.materials.end(),
                     [](const Material& material) { return material.saturable(); });
}

std::vector<double> permeability_by_region(const Problem& problem) {
  std::vector<double> result;
  for (const mesh::Occupant occupant : problem.grid->occupants) {
    result.push_back(
        occupant.part < 0
            ? 1.0
            : problem.materials[static_cast<std::size_t>(occupant.part)].relative_permeability);
  }
  return result;
}

std::vector<double> reluctivity_by_region(const Problem& problem) {
  std::vector<double> result = permeability_by_region(problem);
  for (double& value : result) value = nu_0 / value;
  return result;
}

mesh::Point field_strength(const Problem& problem, int region, mesh::Point flux_density) {
  const int part = problem.grid->occupants[static_cast<std::size_t>(region)].part;
  if (part < 0) return nu_0 * flux_density;
  const Material& material = problem.materials[static_cast<std::size_t>(part)];
  const double nu = material.saturable() ? material.curve->reluctivity(norm(flux_density))
                                         : nu_0 / material.relative_permeability;
  return nu * flux_density;
}

std::vector<double> area_by_region(const mesh::FittedGrid& grid) {
  std::vector<double> area(grid.occupants.size(), 0.0);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid.region[static_cast<std::size_t>(t)]);
    if (region != 0) area[region] += triangle_area(grid.corners(t));
  }
  return area;
}

std::vector<double> density_by_region(const Problem& problem,
                                      const std::vector<double>& part_current) {
  const auto area = area_by_region(*problem.grid);
  const auto& occupants = problem.grid->occupants;
  std::vector<double> part_area(problem.section.parts.size(), 0.0);
  for (std::size_t r = 1; r < occupants.size(); ++r) {
    part_area[static_cast<std::size_t>(occupants[r].part)] += area[r];
  }
  std::vector<double> density(occupants.size(), 0.0);
  for (std::size_t r = 1; r < occupants.size(); ++r) {
    const auto part = static_cast<std::size_t>(occupants[r].part);
    density[r] = part_current[part] / part_area[part];
  }
  return density;
}

}  // namespace barwall::solver
