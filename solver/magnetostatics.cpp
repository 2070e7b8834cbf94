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

/// Boundary values of a pattern, zero at all other nodes.
Eigen::VectorXd boundary_values(const mesh::FittedGrid& grid, const CurrentPattern& pattern,
                                const std::function<double(mesh::Point)>& given) {
  Eigen::VectorXd values = Eigen::VectorXd::Zero(grid.node_count());
  if (pattern.net == 0.0 && !given) return values;
  for (int n = 0; n < grid.node_count(); ++n) {
    if (!grid.on_boundary(n)) continue;
    const mesh::Point at = grid.nodes[static_cast<std::size_t>(n)];
    values[n] = given ? given(at) : pattern.boundary_value(at);
  }
  return values;
}

Eigen::VectorXd current_of(const Problem& problem, const CurrentPattern& pattern) {
  return assemble_current(*problem.grid, density_by_region(problem, pattern.part_current));
}

/// A of one grid at the inner nodes of another.
void interpolate(const Problem& from, const Eigen::VectorXd& potential,
                 const mesh::FittedGrid& grid, Eigen::VectorXd& result) {
#pragma omp parallel for schedule(static)
  for (int n = 0; n < grid.node_count(); ++n) {
    if (grid.on_boundary(n)) continue;
    const mesh::Location at =
        locate(*from.grid, from.section, grid.nodes[static_cast<std::size_t>(n)]);
    const auto corner = from.grid->triangle(at.triangle);
    result[n] = 0.0;
    for (std::size_t c = 0; c < 3; ++c) result[n] += at.weight[c] * potential[corner[c]];
  }
}

/// The potential of saturable steel, nested: from the coarse grid's when there is one.
Eigen::VectorXd nonlinear_potential(const Problem& problem, const CurrentPattern& pattern,
                                    const SolveOptions& options, Workspace& workspace,
                                    std::vector<NewtonReport>& reports) {
  const mesh::FittedGrid& grid = *problem.grid;
  Eigen::VectorXd potential = boundary_values(grid, pattern, options.boundary);
  if (options.start.size() > 0) {
    for (int n = 0; n < grid.node_count(); ++n) {
      if (!grid.on_boundary(n)) potential[n] = options.start[n];
    }
  } else if (problem.coarse_grid) {
    Problem coarse = problem;
    coarse.grid = problem.coarse_grid;
    coarse.coarse_grid = nullptr;
    // A start need not be closer to its grid's solution than that is to the fine one.
    SolveOptions rough = options;
    rough.newton_tolerance = 1e-4;
    Workspace of_coarse;
    of_coarse.fine = std::move(workspace.coarse);
    interpolate(coarse, nonlinear_potential(coarse, pattern, rough, of_coarse, reports), grid,
                potential);
    workspace.coarse = std::move(of_coarse.fine);
  }
  reports.push_back(newton_solve(NonlinearOperator(problem), grid, current_of(problem, pattern),
                                 potential, options.newton_tolerance, workspace.fine));
  return potential;
}

}  // namespace

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

SolveReport solve_nodes(const mesh::FittedGrid& grid, const std::vector<double>& reluctivity,
                        const Eigen::MatrixXd& current, Eigen::MatrixXd& potential,
                        double tolerance) {
  return prepare(assemble_operator(grid, reluctivity))->solve(current, potential, tolerance);
}

Solution solve(std::shared_ptr<const Problem> problem, const SolveOptions& options,
               Workspace* workspace) {
  Workspace own;
  if (workspace == nullptr) workspace = &own;
  const bool nonlinear = saturable(*problem);
  if (problem->excitation.alternating() && (options.boundary || nonlinear)) {
    throw std::invalid_argument(
        "boundary values are given, and saturable steel is solved, for steady currents alone");
  }
  Solution solution;
  const mesh::FittedGrid& grid = *problem->grid;
  solution.patterns = load_patterns(*problem);
  solution.unit_bars = bars_in_loops(*problem);
  const auto start = std::chrono::steady_clock::now();
  if (nonlinear) {
    solution.potential =
        nonlinear_potential(*problem, solution.patterns[0], options, *workspace, solution.newton);
    solution.reluctivity = NonlinearOperator(*problem).reluctivity(solution.potential.col(0));
  } else {
    solution.reluctivity = by_triangle(grid, reluctivity_by_region(*problem));
  }

  // Loads first, then 1 A in each bar of a loop: right-hand sides of one preparation. The unit
  // fields refer to the section's centre, so that any loop's boundary value is exactly 0.
  std::vector<CurrentPattern> all;
  if (!nonlinear) all = solution.patterns;
  const auto loads = static_cast<Eigen::Index>(all.size());
  const mesh::Point centre = bounds(problem->section).centre();
  for (int bar : solution.unit_bars) {
    std::vector<double> unit(problem->section.parts.size(), 0.0);
    unit[static_cast<std::size_t>(bar)] = 1.0;
    all.push_back({std::move(unit), 1.0, centre});
  }
  const auto columns = static_cast<Eigen::Index>(all.size());
  Eigen::MatrixXd rhs(grid.node_count(), columns);
  Eigen::MatrixXd x(grid.node_count(), columns);
  for (Eigen::Index c = 0; c < columns; ++c) {
    const CurrentPattern& pattern = all[static_cast<std::size_t>(c)];
    rhs.col(c) = current_of(*problem, pattern);
    x.col(c) = boundary_values(grid, pattern, c < loads ? options.boundary : nullptr);
  }
  if (nonlinear && columns > 0) {
    solution.unit_change = x;
    prepare(NonlinearOperator(*problem).tangent(solution.potential.col(0)))
        ->solve(rhs, solution.unit_change, options.tolerance);
  }
  if (columns > 0) {
    solution.report = solve_nodes(grid, solution.reluctivity, rhs, x, options.tolerance);
  }
  solution.linear_seconds =
      std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  if (!nonlinear) solution.potential = x.leftCols(loads);
  solution.unit_potential = x.rightCols(columns - loads);
  if (!options.boundary) set_reference(*problem, solution.patterns, solution.potential);
  const auto units = std::span(all).subspan(static_cast<std::size_t>(loads));
  set_reference(*problem, units, solution.unit_potential);
  if (nonlinear) set_reference(*problem, units, solution.unit_change);
  solution.problem = std::move(problem);
  return solution;
}

}  // namespace barwall::solver
