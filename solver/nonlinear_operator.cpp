#include "solver/nonlinear_operator.hpp"

#include "solver/assembly.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {

NonlinearOperator::NonlinearOperator(const Problem& problem)
    : grid_(problem.grid.get()), constant_(reluctivity_by_region(problem)) {
  for (const mesh::Occupant occupant : grid_->occupants) {
    curve_.push_back(occupant.part < 0
                         ? nullptr
                         : problem.materials[static_cast<std::size_t>(occupant.part)].curve.get());
  }
}

Eigen::VectorXd NonlinearOperator::flux(const Eigen::Ref<const Eigen::VectorXd>& potential) const {
  Eigen::VectorXd result = Eigen::VectorXd::Zero(grid_->node_count());
  for (int t = 0; t < grid_->triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid_->region[static_cast<std::size_t>(t)]);
    const mesh::Point b = cell_flux_density(*grid_, t, potential);
    const double nu = curve_[region] ? curve_[region]->reluctivity(norm(b)) : constant_[region];
    const mesh::Point h = nu * b;
    const auto n = grid_->triangle(t);
    const auto p = grid_->corners(t);
    // B = sum of A_k e_k / (2 area), e_k the edge opposite corner k: the derivative of the
    // triangle's energy is area H . e_k / (2 area).
    result[n[0]] += 0.5 * dot(h, p[2] - p[1]);
    result[n[1]] += 0.5 * dot(h, p[0] - p[2]);
    result[n[2]] += 0.5 * dot(h, p[1] - p[0]);
  }
  return result;
}

Stencil<double> NonlinearOperator::tangent(
    const Eigen::Ref<const Eigen::VectorXd>& potential) const {
  Stencil<double> stencil = assemble_operator(*grid_, reluctivity(potential));
  for (int t = 0; t < grid_->triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid_->region[static_cast<std::size_t>(t)]);
    if (curve_[region] == nullptr) continue;
    const mesh::Point b = cell_flux_density(*grid_, t, potential);
    const auto n = grid_->triangle(t);
    const auto p = grid_->corners(t);
    // dH = nu dB + 2 nu' B (B . dB), nu' = d nu / d(B^2)
    const double factor = curve_[region]->reluctivity_slope(norm(b)) / (2.0 * triangle_area(p));
    const double e[3] = {dot(b, p[2] - p[1]), dot(b, p[0] - p[2]), dot(b, p[1] - p[0])};
    for (std::size_t i = 0; i < 3; ++i) {
      stencil.add(n[i], n[i], factor * e[i] * e[i]);
      stencil.add(n[i], n[(i + 1) % 3], factor * e[i] * e[(i + 1) % 3]);
    }
  }
  return stencil;
}

std::vector<double> NonlinearOperator::reluctivity(
    const Eigen::Ref<const Eigen::VectorXd>& potential) const {
  std::vector<double> result = by_triangle(*grid_, constant_);
  for (int t = 0; t < grid_->triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid_->region[static_cast<std::size_t>(t)]);
    if (curve_[region] == nullptr) continue;
    result[static_cast<std::size_t>(t)] =
        curve_[region]->reluctivity(norm(cell_flux_density(*grid_, t, potential)));
  }
  return result;
}

double NonlinearOperator::energy(const Eigen::Ref<const Eigen::VectorXd>& potential) const {
  double sum = 0.0;
  for (int t = 0; t < grid_->triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid_->region[static_cast<std::size_t>(t)]);
    const double b = norm(cell_flux_density(*grid_, t, potential));
    const double density =
        curve_[region] ? curve_[region]->energy(b) : 0.5 * constant_[region] * b * b;
    sum += density * triangle_area(grid_->corners(t));
  }
  return sum;
}

}  // namespace barwall::solver
