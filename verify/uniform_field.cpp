#include "verify/uniform_field.hpp"

#include <stdexcept>

namespace barwall::verify {

using mesh::Point;

namespace {

/// With B_0 along some axis and theta from the direction a quarter turn behind it,
/// A = -B_0 (p r + q / r) cos theta in each of the three regions.
struct Region {
  double uniform = 0.0;  ///< p
  double dipole = 0.0;   ///< q [m2]
};

Region region_at(const Shell& shell, double r) {
  const double a = shell.inner_radius;
  const double b = shell.outer_radius;
  const double mu = shell.relative_permeability;
  const double factor = shielding_factor(shell);
  if (r < a) return {1.0 / factor, 0.0};
  const Region wall{0.5 * (1.0 + mu) / factor, 0.5 * (1.0 - mu) * a * a / factor};
  if (r <= b) return wall;
  return {1.0, b * b * (wall.uniform - 1.0) + wall.dipole};
}

}  // namespace

double shielding_factor(const Shell& shell) {
  const double a = shell.inner_radius;
  const double b = shell.outer_radius;
  const double mu = shell.relative_permeability;
  if (!(a >= 0.0 && a < b && mu > 0.0)) {
    throw std::invalid_argument("a shell needs 0 <= inner radius < outer radius and mu_r > 0");
  }
  return 1.0 + (mu - 1.0) * (mu - 1.0) / (4.0 * mu) * (b - a) * (b + a) / (b * b);
}

double potential_in(const Shell& shell, Point applied, Point at) {
  const double r2 = dot(at, at);
  const Region region = region_at(shell, norm(at));
  const double radial = region.uniform + (region.dipole != 0.0 ? region.dipole / r2 : 0.0);
  return radial * cross(applied, at);
}

Point field_in(const Shell& shell, Point applied, Point at) {
  // Curl of (p + q / r^2)(B_0 x r).
  const double r2 = dot(at, at);
  const Region region = region_at(shell, norm(at));
  if (region.dipole == 0.0) return region.uniform * applied;
  const double slope = -2.0 * region.dipole / (r2 * r2) * cross(applied, at);
  return (region.uniform + region.dipole / r2) * applied + slope * Point{at.y, -at.x};
}

double flux_gain(const Shell& shell) {
  const double b = shell.outer_radius;
  return region_at(shell, b).uniform + region_at(shell, b).dipole / (b * b);
}

Point field_strength_in_ellipse(double half_axis_x, double half_axis_y,
                                double relative_permeability, Point applied) {
  const double sum = half_axis_x + half_axis_y;
  const double excess = relative_permeability - 1.0;
  return {applied.x / (1.0 + excess * half_axis_y / sum),
          applied.y / (1.0 + excess * half_axis_x / sum)};
}

}  // namespace barwall::verify
