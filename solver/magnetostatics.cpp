#include "solver/magnetostatics.hpp"

#include <chrono>
#include <set>

#include "solver/assembly.hpp"
#include "solver/constants.hpp"

namespace barwall::solver {
namespace {

std::vector<CurrentPattern> load_patterns(const Problem& problem) {
  const auto& current = problem.excitation.current;
  std::vector<double> in_phase;
  std::vector<double> quadrature;
  for (const auto& value : current) {
    in_phase.push_back(value.real());
    quadrature.push_back(value.imag());
  }
  std::vector<CurrentPattern> patterns{pattern_of(problem.section, std::move(in_phase))};
  if (problem.excitation.alternating()) {
    patterns.push_back(pattern_of(problem.section, std::move(quadrature)));
  }
  return patterns;
}

std::vector<int> bars_in_loops(const Problem& problem) {
  std::set<int> bars;
  for (const Loop& loop : problem.loops) {
    bars.insert(loop.go.begin(), loop.go.end());
    bars.insert(loop.back.begin(), loop.back.end());
  }
  return {bars.begin(), bars.end()};
}

}  // namespace

Solution solve(std::shared_ptr<const Problem> problem, const SolveOptions& options) {
  Solution solution;
  const mesh::FittedGrid& grid = *problem->grid;
  solution.patterns = load_patterns(*problem);
  solution.unit_bars = bars_in_loops(*problem);
  solution.reluctivity = by_triangle(grid, reluctivity_by_region(*problem));

  // Loads first, then 1 A in each bar of a loop: right-hand sides of one preparation. The unit
  // fields refer to the section's centre, so that any loop's boundary value is exactly 0.
  std::vector<CurrentPattern> all = solution.patterns;
  const mesh::Point centre = bounds(problem->section).centre();
  for (int bar : solution.unit_bars) {
    std::vector<double> unit(problem->section.parts.size(), 0.0);
    unit[static_cast<std::size_t>(bar)] = 1.0;
    all.push_back({std::move(unit), 1.0, centre});
  }
  const auto columns = static_cast<Eigen::Index>(all.size());
  Eigen::MatrixXd rhs(grid.node_count(), columns);
  Eigen::MatrixXd x = Eigen::MatrixXd::Zero(grid.node_count(), columns);
  for (Eigen::Index c = 0; c < columns; ++c) {
    const CurrentPattern& pattern = all[static_cast<std::size_t>(c)];
    rhs.col(c) = assemble_current(grid, density_by_region(*problem, pattern.part_current));
    if (pattern.net == 0.0) continue;
    for (int n = 0; n < grid.node_count(); ++n) {
      if (grid.on_boundary(n)) {
        x(n, c) = pattern.boundary_value(grid.nodes[static_cast<std::size_t>(n)]);
      }
    }
  }
  const auto stencil = assemble_operator(grid, solution.reluctivity);
  const auto start = std::chrono::steady_clock::now();
  const auto prepared = prepare(stencil);
  solution.report = prepared->solve(rhs, x, options.tolerance);
  solution.linear_seconds =
      std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  const auto loads = static_cast<Eigen::Index>(solution.patterns.size());
  solution.potential = x.leftCols(loads);
  solution.unit_potential = x.rightCols(columns - loads);
  solution.problem = std::move(problem);
  return solution;
}

}  // namespace barwall::solver
