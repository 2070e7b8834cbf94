#pragma once

#include <Eigen/Dense>
#include <memory>

#include "solver/linear_solve.hpp"
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
  std::vector<double> reluctivity;  ///< per triangle [m/H]
  SolveReport report;
  double linear_seconds = 0.0;  ///< preparing and solving

  const mesh::FittedGrid& grid() const { return *problem->grid; }
  int pattern_count() const { return static_cast<int>(patterns.size()); }
};

struct SolveOptions {
  double tolerance = 1e-12;  ///< on the relative residual
};

/// \throws SolveError
Solution solve(std::shared_ptr<const Problem> problem, const SolveOptions& options = {});

}  // namespace barwall::solver
