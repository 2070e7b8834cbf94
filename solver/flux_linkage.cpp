#include "solver/flux_linkage.hpp"

#include <algorithm>

#include "solver/assembly.hpp"

namespace barwall::solver {
namespace {

/// Shares of a unit of current among bars, by their areas on the grid.
std::vector<double> shares(const Solution& solution, const std::vector<int>& bars) {
  const auto area = area_by_region(solution.grid());
  const auto& occupants = solution.grid().occupants;
  std::vector<double> result;
  double whole = 0.0;
  for (int bar : bars) {
    double sum = 0.0;
    for (std::size_t r = 1; r < occupants.size(); ++r) {
      if (occupants[r].part == bar) sum += area[r];
    }
    result.push_back(sum);
    whole += sum;
  }
  for (double& share : result) share /= whole;
  return result;
}

}  // namespace

double mean_potential(const Solution& solution, int part,
                      const Eigen::Ref<const Eigen::VectorXd>& potential) {
  const mesh::FittedGrid& grid = solution.grid();
  double sum = 0.0;
  double area = 0.0;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part != part) continue;
    const auto n = grid.triangle(t);
    const auto share = control_areas(grid.corners(t));
    for (std::size_t k = 0; k < 3; ++k) {
      sum += share[k] * potential[n[k]];
      area += share[k];
    }
  }
  return sum / area;
}

double loop_inductance(const Solution& solution, const Loop& loop) {
  const auto go = shares(solution, loop.go);
  const auto back = shares(solution, loop.back);
  Eigen::VectorXd potential = Eigen::VectorXd::Zero(solution.grid().node_count());
  const auto add = [&](int bar, double current) {
    const auto& units = solution.unit_bars;
    const auto column = std::find(units.begin(), units.end(), bar) - units.begin();
    potential += current * solution.unit_potential.col(column);
  };
  for (std::size_t k = 0; k < go.size(); ++k) add(loop.go[k], go[k]);
  for (std::size_t k = 0; k < back.size(); ++k) add(loop.back[k], -back[k]);
  double linkage = 0.0;
  for (std::size_t k = 0; k < go.size(); ++k) {
    linkage += go[k] * mean_potential(solution, loop.go[k], potential);
  }
  for (std::size_t k = 0; k < back.size(); ++k) {
    linkage -= back[k] * mean_potential(solution, loop.back[k], potential);
  }
  return linkage;
}

}  // namespace barwall::solver
