#pragma once

#include <Eigen/Dense>
#include <memory>
#include <stdexcept>
#include <string>
#include <vector>

#include "solver/stencil.hpp"

namespace barwall::solver {

/// What became of a linear solve.
struct SolveReport {
  std::string method;
  bool converged = false;
  int iterations = 0;             ///< refinement steps, or iterations
  std::vector<double> residuals;  ///< relative to the right-hand side, largest over the columns,
                                  ///< before the first iteration and after each
};

/// A solve that did not reach its tolerance, ran out of memory or met a singular matrix.
class SolveError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// A symmetric operator on the interior nodes of a grid, made ready for many right-hand sides.
/// The outermost ring of nodes carries given values.
template <class Scalar>
class PreparedSystem {
public:
  using Matrix = Eigen::Matrix<Scalar, Eigen::Dynamic, Eigen::Dynamic>;

  virtual ~PreparedSystem() = default;

  /// Solves K x = rhs at the interior nodes with x as given on the boundary.
  /// \param rhs one column per right-hand side, all nodes; boundary rows are not read
  /// \param x   in: boundary values; out: the solution, all nodes
  /// \throws SolveError when the relative residual stays above `tolerance`
  virtual SolveReport solve(const Matrix& rhs, Matrix& x, double tolerance) const = 0;

  /// Prepares another operator of the same grid in place of this one: what depends on the grid alone
  /// is kept.
  /// \throws SolveError
  virtual void prepare_again(const Stencil<Scalar>& stencil) = 0;

  /// Bytes held.
  virtual double memory() const = 0;
};

/// Factors the operator by supernodal Cholesky (CHOLMOD), nodes ordered by nested dissection of
/// the grid.
/// \throws SolveError when out of memory or not positive definite
std::unique_ptr<PreparedSystem<double>> prepare_direct(const Stencil<double>& stencil);

/// Prepares the operator by the method that suits its size.
std::unique_ptr<PreparedSystem<double>> prepare(const Stencil<double>& stencil);

}  // namespace barwall::solver
