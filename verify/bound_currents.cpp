#include "verify/bound_currents.hpp"

#include "mesh/triangle_edges.hpp"
#include "solver/constants.hpp"
#include "solver/flux_density.hpp"

namespace barwall::verify {

std::vector<CurrentSheet> bound_currents(const solver::Solution& solution,
                                         const Eigen::Ref<const Eigen::VectorXd>& potential) {
  const mesh::FittedGrid& grid = solution.grid();
  const auto magnetic = [&](int t) {
    return solution.reluctivity[static_cast<std::size_t>(t)] != solver::nu_0;
  };
  const auto magnetisation = [&](int t) {
    const double nu = solution.reluctivity[static_cast<std::size_t>(t)];
    return (solver::nu_0 - nu) * solver::cell_flux_density(grid, t, potential);
  };
  std::vector<CurrentSheet> sheets;
  each_inner_edge(grid, [&](int from, int to, int left, int right) {
    if (!magnetic(left) && !magnetic(right)) return;
    const mesh::Point p = grid.nodes[static_cast<std::size_t>(from)];
    const mesh::Point q = grid.nodes[static_cast<std::size_t>(to)];
    const double length = distance(p, q);
    // Stokes round the edge: along its right side forward, along its left side back.
    const double density = dot(magnetisation(right) - magnetisation(left), q - p) / length;
    if (density != 0.0) sheets.push_back({p, q, density});
  });
  return sheets;
}

}  // namespace barwall::verify
