#pragma once

#include <Eigen/Dense>
#include <functional>
#include <memory>
#include <vector>

#include "solver/linear_solve.hpp"
#include "solver/newton.hpp"
#include "solver/open_boundary.hpp"
#include "solver/problem.hpp"

namespace barwall::solver {

/// The solved field of a problem.
struct Solution {
  std::shared_ptr<const Problem> problem;
  /// Load patterns: steady, one; with a frequency, in phase and quadrature.
  std::vector<CurrentPattern> patterns;
  /// A_z at the nodes [Wb/m], one column per load pattern; r.m.s. with a frequency.
  Eigen::MatrixXd potential;
  /// Bars that take part in loops, by part index, and the field of 1 A in each alone, a column
  /// each [Wb/(m A)].
  std::vector<int> unit_bars;
  Eigen::MatrixXd unit_potential;
  /// With saturable steel, the change of the field with the current in each of these bars at the
  /// operating point, a column each [Wb/(m A)]; else no columns.
  Eigen::MatrixXd unit_change;
  std::vector<double> reluctivity;  ///< H / B per triangle, of the operating point [m/H]
  SolveReport report;  ///< of the linear solve; of the unit fields with saturable steel
  std::vector<NewtonReport> newton;  ///< with saturable steel, coarse grid to fine; else empty
  double linear_seconds = 0.0;       ///< preparing and solving

  const mesh::FittedGrid& grid() const { return *problem->grid; }
  int pattern_count() const { return static_cast<int>(patterns.size()); }
};

struct SolveOptions {
  double tolerance = 1e-12;  ///< on the relative residual
  /// A at the nodes of the outer boundary [Wb/m] in place of the open boundary's values, for steady
  /// currents alone; A then keeps the constant that these values give it. Fields of 1 A in a bar
  /// have the open boundary always.
  std::function<double(mesh::Point)> boundary = nullptr;
  /// On the residual of a nonlinear solve, relative to that of no field. Newton closes in so fast
  /// that a step more changes nothing in the first ten digits of any figure.
  double newton_tolerance = 1e-9;
  /// Where a nonlinear solve starts [Wb/m], all nodes; empty: from the coarse grid, or from zero.
  Eigen::VectorXd start = {};
};

/// Prepared systems that one solve leaves for the next on the same grids.
struct Workspace {
  std::unique_ptr<PreparedSystem<double>> fine;
  std::unique_ptr<PreparedSystem<double>> coarse;
};

/// The patterns of a problem's own currents: steady, one; with a frequency, in phase and
/// quadrature.
std::vector<CurrentPattern> load_patterns(const Problem& problem);

/// The equations of the scheme, as they are: at every node within the boundary the flux of
/// H = nu grad A out of its control cell, with the current through it, adds up to nothing.
/// \param reluctivity per triangle [m/H]
/// \param current through each node's control cell [A], all nodes, a column per right-hand side;
///        boundary rows are not read
/// \param potential in: A at the boundary nodes; out: A at all nodes [Wb/m]
/// \throws SolveError
SolveReport solve_nodes(const mesh::FittedGrid& grid, const std::vector<double>& reluctivity,
                        const Eigen::MatrixXd& current, Eigen::MatrixXd& potential,
                        double tolerance = 1e-12);

/// With saturable steel the currents must be steady; an alternating cycle is solved instant by
/// instant (solve_instants). Unit fields are then those at the permeability of the operating point.
/// \throws SolveError, NewtonError
/// \throws std::invalid_argument when currents alternate and boundary values are given or steel is
///         saturable
/// \param workspace of the same grids, used where steel is saturable; may be null
Solution solve(std::shared_ptr<const Problem> problem, const SolveOptions& options = {},
               Workspace* workspace = nullptr);

}  // namespace barwall::solver
