#pragma once

#include <Eigen/Dense>
#include <vector>

#include "solver/problem.hpp"
#include "solver/stencil.hpp"

namespace barwall::solver {

/// The scheme's equations with saturable steel: the flux of H = nu(|B|) B out of every node's
/// control cell, its derivative, and the energy whose gradient it is. A is linear and B constant on
/// each triangle, so every one of them is exact for the scheme's own field.
class NonlinearOperator {
public:
  explicit NonlinearOperator(const Problem& problem);

  /// H's balance at every node, boundary nodes included [A]: the gradient of the energy.
  Eigen::VectorXd flux(const Eigen::Ref<const Eigen::VectorXd>& potential) const;

  /// Derivative of `flux` with respect to the potential: on every triangle the differential
  /// reluctivity along B, nu across it. Symmetric, and positive as the curves rise.
  Stencil<double> tangent(const Eigen::Ref<const Eigen::VectorXd>& potential) const;

  /// nu = H / B per triangle [m/H].
  std::vector<double> reluctivity(const Eigen::Ref<const Eigen::VectorXd>& potential) const;

  /// Integral over the grid of the energy density w, H dB from 0 to B, per metre of run [J/m].
  double energy(const Eigen::Ref<const Eigen::VectorXd>& potential) const;

private:
  const mesh::FittedGrid* grid_;
  std::vector<const BhCurve*> curve_;  ///< per occupant, null for constant permeability
  std::vector<double> constant_;       ///< reluctivity per occupant where it is constant [m/H]
};

}  // namespace barwall::solver
