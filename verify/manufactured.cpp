#include "verify/manufactured.hpp"

#include <cmath>

#include "solver/constants.hpp"
#include "solver/magnetostatics.hpp"

namespace barwall::verify {
namespace {

/// Square of r, x^2 - y^2 and the tilted factor of the second term, in radii.
struct Place {
  double s;
  double saddle;
  double tilt;
};

Place place_of(const ManufacturedField& field, mesh::Point at) {
  const mesh::Point p = (1.0 / field.radius) * (at - field.centre);
  return {dot(p, p), p.x * p.x - p.y * p.y, 0.5 * p.x - 0.3 * p.y};
}

}  // namespace

double ManufacturedField::potential(mesh::Point at, bool in_disc) const {
  const auto [s, saddle, tilt] = place_of(*this, at);
  const double mu = (in_disc ? relative_permeability : 1.0) / mean_permeability;
  return amplitude *
         (saddle * std::exp(1.0 - s) + mu * (s - 1.0) * std::exp(-0.5 * s) * (1.0 + tilt));
}

double ManufacturedField::current_density(mesh::Point at, bool in_disc) const {
  // Of g(s) P, P harmonic and homogeneous of degree m, the Laplacian is
  // 4 (s g'' + (1 + m) g') P / radius^2.
  const auto [s, saddle, tilt] = place_of(*this, at);
  const double mu_r = in_disc ? relative_permeability : 1.0;
  const double first = 4.0 * (s - 3.0) * std::exp(1.0 - s) * saddle;
  const auto second = [s = s](int m) {
    return std::exp(-0.5 * s) * (s * (s - 5.0) + 2.0 * (1 + m) * (3.0 - s));
  };
  const double scale = amplitude * solver::nu_0 / (radius * radius);
  return -scale * (first / mu_r + (second(0) + second(1) * tilt) / mean_permeability);
}

double error_of(const ManufacturedField& field, int disc, const mesh::FittedGrid& grid) {
  const auto node = [&](int n) { return grid.nodes[static_cast<std::size_t>(n)]; };
  std::vector<double> reluctivity(static_cast<std::size_t>(grid.triangle_count()), solver::nu_0);
  std::vector<bool> in_disc(static_cast<std::size_t>(grid.node_count()), false);
  Eigen::MatrixXd current = Eigen::MatrixXd::Zero(grid.node_count(), 1);
  Eigen::VectorXd weight = Eigen::VectorXd::Zero(grid.node_count());
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto n = grid.triangle(t);
    const double area = triangle_area(grid.corners(t));
    const bool inside = grid.occupant(t).part == disc;
    if (inside) reluctivity[static_cast<std::size_t>(t)] /= field.relative_permeability;
    for (std::size_t k = 0; k < 3; ++k) {
      if (inside) in_disc[static_cast<std::size_t>(n[k])] = true;
      weight[n[k]] += area / 3.0;
      // Middles of the edges, a third of the area each: exact for J times a hat function up to
      // linear J.
      const int next = n[(k + 1) % 3];
      const mesh::Point middle = between(node(n[k]), node(next), 0.5);
      const double share = area / 6.0 * field.current_density(middle, inside);
      current(n[k], 0) += share;
      current(next, 0) += share;
    }
  }
  Eigen::VectorXd exact(grid.node_count());
  Eigen::MatrixXd potential = Eigen::MatrixXd::Zero(grid.node_count(), 1);
  for (int k = 0; k < grid.node_count(); ++k) {
    exact[k] = field.potential(node(k), in_disc[static_cast<std::size_t>(k)]);
    if (grid.on_boundary(k)) potential(k, 0) = exact[k];
  }
  solver::solve_nodes(grid, reluctivity, current, potential);
  const auto square = [&](const Eigen::VectorXd& v) { return weight.dot(v.cwiseAbs2()); };
  return std::sqrt(square(potential.col(0) - exact) / square(exact));
}

}  // namespace barwall::verify
