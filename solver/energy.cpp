#include "solver/energy.hpp"

#include "solver/assembly.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {

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

SaturableEnergy saturable_energy(const Solution& solution) {
  const double energy = NonlinearOperator(*solution.problem).energy(solution.potential.col(0));
  return {energy, 2.0 * field_energy(solution).mean - energy};
}

TerminalEnergy terminal_energy(const PartIntegrals& integrals) {
  const Solution& solution = integrals.solution();
  const mesh::FittedGrid& grid = solution.grid();
  const int patterns = solution.pattern_count();
  TerminalEnergy energy;
  energy.linkage = over_cycle(patterns, [&](int current, int field) {
    double sum = 0.0;
    const auto& part_current = solution.patterns[static_cast<std::size_t>(current)].part_current;
    for (std::size_t k = 0; k < part_current.size(); ++k) {
      if (part_current[k] == 0.0) continue;
      sum += 0.5 * part_current[k] * integrals.mean_potential(static_cast<int>(k), field);
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
