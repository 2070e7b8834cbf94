#include "solver/newton.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace barwall::solver {
namespace {

constexpr int most_iterations = 100;

/// Sets the values of a vector on the outermost ring of nodes to zero.
void clear_boundary(const mesh::FittedGrid& grid, Eigen::VectorXd& values) {
  for (int n = 0; n < grid.node_count(); ++n) {
    if (grid.on_boundary(n)) values[n] = 0.0;
  }
}

/// The start with A = 0 at every node within the boundary.
Eigen::VectorXd boundary_alone(const mesh::FittedGrid& grid, const Eigen::VectorXd& potential) {
  Eigen::VectorXd result = potential;
  for (int n = 0; n < grid.node_count(); ++n) {
    if (!grid.on_boundary(n)) result[n] = 0.0;
  }
  return result;
}

/// Length of the step along a direction of descent at which the slope of a convex function of it
/// has fallen to a fraction of what it is at the start.
/// \param slope_at derivative with respect to the length; negative at 0
template <class Slope>
double line_search(double slope_at_start, Slope slope_at) {
  constexpr double enough = 0.3;
  constexpr double longest = 64.0;
  const double target = enough * std::abs(slope_at_start);
  double low = 0.0;
  double low_slope = slope_at_start;
  double high = 1.0;
  double high_slope = slope_at(high);
  while (high_slope < -target && high < longest) {
    low = high;
    low_slope = high_slope;
    high *= 2.0;
    high_slope = slope_at(high);
  }
  if (high_slope <= target) return high;
  // The root lies between: regula falsi, with bisection where that creeps (Illinois rule).
  for (int k = 0; k < 60; ++k) {
    const double share = low_slope / (low_slope - high_slope);
    const double length = low + std::clamp(share, 0.02, 0.98) * (high - low);
    const double slope = slope_at(length);
    if (std::abs(slope) <= target) return length;
    if (slope < 0.0) {
      low = length;
      low_slope = slope;
      high_slope *= 0.5;
    } else {
      high = length;
      high_slope = slope;
      low_slope *= 0.5;
    }
  }
  return low > 0.0 ? low : high;
}

}  // namespace

NewtonReport newton_solve(const NonlinearOperator& equations, const mesh::FittedGrid& grid,
                          const Eigen::VectorXd& current, Eigen::VectorXd& potential,
                          double tolerance, std::unique_ptr<PreparedSystem<double>>& system) {
  NewtonReport report;
  report.nodes = grid.node_count();
  const auto residual_of = [&](const Eigen::VectorXd& a) {
    Eigen::VectorXd residual = current - equations.flux(a);
    clear_boundary(grid, residual);
    return residual;
  };
  const double scale = residual_of(boundary_alone(grid, potential)).norm();
  if (scale == 0.0) {  // no current and no boundary value: no field
    potential = boundary_alone(grid, potential);
    report.residuals = {0.0};
    report.converged = true;
    return report;
  }
  Eigen::VectorXd residual = residual_of(potential);
  report.residuals.push_back(residual.norm() / scale);
  const auto fail = [&](const std::string& why) {
    throw NewtonError(
        fmt::format("the nonlinear solve stopped at a relative residual of {:.2e} after {} "
                    "iterations: {}; relative residuals: {:.2e}",
                    report.residuals.back(), report.iterations, why,
                    fmt::join(report.residuals, ", ")),
        report);
  };
  while (!(report.residuals.back() <= tolerance)) {
    if (!std::isfinite(report.residuals.back())) fail("it met values that are not finite numbers");
    if (report.iterations == most_iterations) fail("the tolerance was not reached");
    Eigen::MatrixXd step = Eigen::MatrixXd::Zero(grid.node_count(), 1);
    if (system) {
      system->prepare_again(equations.tangent(potential));
    } else {
      system = prepare(equations.tangent(potential));
    }
    system->solve(residual, step, 1e-10);
    const Eigen::VectorXd direction = step.col(0);
    const double length = line_search(-residual.dot(direction), [&](double s) {
      return -residual_of(potential + s * direction).dot(direction);
    });
    potential += length * direction;
    residual = residual_of(potential);
    report.residuals.push_back(residual.norm() / scale);
    report.steps.push_back(length);
    ++report.iterations;
  }
  report.converged = true;
  return report;
}

}  // namespace barwall::solver
