#include "solver/magnetostatics.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>
#include <numbers>
#include <set>
#include <span>
#include <stdexcept>

#include "mesh/sampling.hpp"
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

/// Mean of A over a circle about the section's centre, where the grid is still fine.
double mean_on_circle(const Problem& problem, const Eigen::Ref<const Eigen::VectorXd>& potential,
                      mesh::Point centre, double radius) {
  constexpr int points = 360;
  double sum = 0.0;
  for (int k = 0; k < points; ++k) {
    const double angle = 2.0 * std::numbers::pi * (k + 0.5) / points;
    const mesh::Point p = centre + radius * mesh::Point{std::cos(angle), std::sin(angle)};
    const mesh::Location at = locate(*problem.grid, problem.section, p);
    const auto n = problem.grid->triangle(at.triangle);
    for (std::size_t c = 0; c < 3; ++c) sum += at.weight[c] * potential[n[c]];
  }
  return sum / points;
}

/// Sets the constant of A anew where the grid is fine: beyond, it is so coarse that a net
/// current's logarithm gathers an error. On a circle round all currents, free and bound, the
/// mean of A is that of the net current at any place inside (mean value property), exactly.
void set_reference(const Problem& problem, std::span<const CurrentPattern> patterns,
                   Eigen::Ref<Eigen::MatrixXd> potential) {
  const mesh::Point centre = bounds(problem.section).centre();
  const auto& x = problem.grid->x_lines;
  const double radius = std::min(5.0 * half_size(problem.section), 0.4 * (x.back() - x.front()));
  for (Eigen::Index c = 0; c < potential.cols(); ++c) {
    const double net = patterns[static_cast<std::size_t>(c)].net;
    const double exact = -mu_0 * net / (2.0 * std::numbers::pi) * std::log(radius);
    potential.col(c).array() += exact - mean_on_circle(problem, potential.col(c), centre, radius);
  }
}

}  // namespace

SolveReport solve_nodes(const mesh::FittedGrid& grid, const std::vector<double>& reluctivity,
                        const Eigen::MatrixXd& current, Eigen::MatrixXd& potential,
                        double tolerance) {
  return prepare(assemble_operator(grid, reluctivity))->solve(current, potential, tolerance);
}

Solution solve(std::shared_ptr<const Problem> problem, const SolveOptions& options) {
  if (options.boundary && problem->excitation.alternating()) {
    throw std::invalid_argument("boundary values are given for steady currents alone");
  }
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
    const bool given = options.boundary && c == 0;
    if (pattern.net == 0.0 && !given) continue;
    for (int n = 0; n < grid.node_count(); ++n) {
      if (grid.on_boundary(n)) {
        const mesh::Point at = grid.nodes[static_cast<std::size_t>(n)];
        x(n, c) = given ? options.boundary(at) : pattern.boundary_value(at);
      }
    }
  }
  const auto start = std::chrono::steady_clock::now();
  solution.report = solve_nodes(grid, solution.reluctivity, rhs, x, options.tolerance);
  solution.linear_seconds =
      std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  const Eigen::Index kept = options.boundary ? 1 : 0;
  set_reference(*problem, std::span(all).subspan(static_cast<std::size_t>(kept)),
                x.rightCols(columns - kept));
  const auto loads = static_cast<Eigen::Index>(solution.patterns.size());
  solution.potential = x.leftCols(loads);
  solution.unit_potential = x.rightCols(columns - loads);
  solution.problem = std::move(problem);
  return solution;
}

}  // namespace barwall::solver
