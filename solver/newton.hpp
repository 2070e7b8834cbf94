#pragma once

#include <memory>

#include "solver/linear_solve.hpp"
#include "solver/nonlinear_operator.hpp"

namespace barwall::solver {

/// What became of a nonlinear solve on one grid.
struct NewtonReport {
  int nodes = 0;  ///< of the grid
  bool converged = false;
  int iterations = 0;
  std::vector<double> residuals;  ///< relative, before the first iteration and after each
  std::vector<double> steps;      ///< length of each step, 1 for Newton's own
};

/// A nonlinear solve that did not reach its tolerance; carries the history.
class NewtonError : public SolveError {
public:
  NewtonError(const std::string& what, NewtonReport report)
      : SolveError(what), report_(std::move(report)) {}
  const NewtonReport& report() const { return report_; }

private:
  NewtonReport report_;
};

/// Finds the potential at which the flux of H balances the current at every node within the
/// boundary, by Newton's method with a line search on the discrete energy E(A) - current . A: as
/// that is strictly convex, from any start (J. Nocedal and S. J. Wright, Numerical Optimization,
/// section 3.3 and chapter 11; from memory).
/// \param current through each node's control cell [A]; boundary rows are not read
/// \param potential in: A at the boundary nodes, a start at the others; out: A at all nodes [Wb/m]
/// \param tolerance on the residual, relative to what it is with A = 0 inside the boundary
/// \param system a prepared system of this grid to work with, whatever it was prepared for; made
///        when null, and left for the next solve
/// \throws NewtonError
NewtonReport newton_solve(const NonlinearOperator& equations, const mesh::FittedGrid& grid,
                          const Eigen::VectorXd& current, Eigen::VectorXd& potential,
                          double tolerance, std::unique_ptr<PreparedSystem<double>>& system);

}  // namespace barwall::solver
