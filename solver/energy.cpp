#include "solver/energy.hpp"

#include "solver/assembly.hpp"
#include "solver/flux_density.hpp"
#include "solver/flux_linkage.hpp"

namespace barwall::solver {
namespace {

template <class Bilinear>
Pulsation over_cycle(int patterns, Bilinear product) {
  if (patterns == 1) return {product(0, 0), 0.0, 0.0};
  return pulsation_of(product(0, 0), product(1, 1), 0.5 * (product(0, 1) + product(1, 0)));
}

}  // namespace

Pulsation field_energy(const Solution& solution) {
  const mesh::FittedGrid& grid = solution.grid();
  return over_cycle(solution.pattern_count(), [&](int first, int second) {
    double sum = 0.0;
    for (int t = 0; t < grid.triangle_count(); ++t) {
      const mesh::Point b = cell_flux_density(grid, t, solution.potential.col(first));
      const mesh::Point c =
          first == second ? b : cell_flux_density(grid, t, solution.potential.col(second));
      sum += 0.5 * solution.reluctivity[static_cast<std::size_t>(t)] * dot(b, c) *
             triangle_area(grid.corners(t));
    }
    return sum;
  });
}

TerminalEnergy terminal_energy(const Solution& solution) {
  const Problem& problem = *solution.problem;
  const mesh::FittedGrid& grid = solution.grid();
  const int patterns = solution.pattern_count();
  Eigen::MatrixXd linkage =
      Eigen::MatrixXd::Zero(static_cast<Eigen::Index>(problem.section.parts.size()), patterns);
  for (const mesh::Occupant occupant : grid.occupants) {
    if (occupant.part < 0 || occupant.piece != 0) continue;
    for (int k = 0; k < patterns; ++k) {
      linkage(occupant.part, k) =
          mean_potential(solution, occupant.part, solution.potential.col(k));
    }
  }
  TerminalEnergy energy;
  energy.linkage = over_cycle(patterns, [&](int current, int field) {
    double sum = 0.0;
    const auto& part_current = solution.patterns[static_cast<std::size_t>(current)].part_current;
    for (std::size_t k = 0; k < part_current.size(); ++k) {
      if (part_current[k] == 0.0) continue;
      sum += 0.5 * part_current[k] * linkage(static_cast<Eigen::Index>(k), field);
    }
    return sum;
  });
  const auto stencil = assemble_operator(grid, solution.reluctivity);
  Eigen::MatrixXd reaction(grid.node_count(), patterns);
  for (int k = 0; k < patterns; ++k) {
    auto column = reaction.col(k);
    apply(stencil, solution.potential.col(k), column);
  }
  energy.boundary = over_cycle(patterns, [&](int first, int second) {
    double sum = 0.0;
    for (int n = 0; n < grid.node_count(); ++n) {
      if (grid.on_boundary(n)) sum += 0.5 * reaction(n, first) * solution.potential(n, second);
    }
    return sum;
  });
  return energy;
}

}  // namespace barwall::solver
