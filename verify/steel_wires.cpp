#include "verify/steel_wires.hpp"

#include <Eigen/Dense>
#include <cmath>
#include <stdexcept>

#include "verify/complex_field.hpp"
#include "verify/round_conductor.hpp"

namespace barwall::verify {

namespace {

// (radius / distance)^n falls at least as 2^-n, and nearly twice as fast in the result.
constexpr int multipoles = 60;

double image_share(const SteelWires& wires) {
  return (wires.relative_permeability - 1.0) / (wires.relative_permeability + 1.0);
}

/// Around the axis of the wire that carries +1 in units of mu_0 I / 2 pi: entry n - 1 is e_n R^n
/// of the other wire's potential, the sum over n of e_n zeta^n. The wire's own answer to it is
/// kappa e_n R^n (R / zeta)^n, and the other wire's is the same mirrored and reversed.
Eigen::VectorXd applied_multipoles(const SteelWires& wires) {
  if (!(wires.radius > 0.0 && wires.distance > 2.0 * wires.radius)) {
    throw std::invalid_argument("two wires need a radius above 0 and a distance above two radii");
  }
  const double kappa = image_share(wires);
  const double q = wires.radius / wires.distance;
  Eigen::MatrixXd matrix(multipoles, multipoles);
  Eigen::VectorXd right(multipoles);
  for (int n = 1; n <= multipoles; ++n) {
    right(n - 1) = (n % 2 ? 1.0 : -1.0) * std::pow(q, n) / n;
    double coupling = std::pow(q, n + 1);  // q^(m + n) binomial(m + n - 1, n), from m = 1 on
    for (int m = 1; m <= multipoles; ++m) {
      matrix(n - 1, m - 1) = (m == n ? 1.0 : 0.0) + ((m + n) % 2 ? -1.0 : 1.0) * kappa * coupling;
      coupling *= q * (m + n) / m;
    }
  }
  return matrix.partialPivLu().solve(right);
}

}  // namespace

double loop_inductance(const SteelWires& wires) {
  const Eigen::VectorXd applied = applied_multipoles(wires);
  // What the other wire's magnetisation adds to the mean potential of this one.
  double constant = 0.0;
  double power = 1.0;
  for (int m = 1; m <= multipoles; ++m) {
    power *= -wires.radius / wires.distance;
    constant -= image_share(wires) * applied(m - 1) * power;
  }
  return inductance_of_two_wires(wires.distance, wires.radius, wires.relative_permeability) +
         2.0 * mu_0_over_2pi * constant;
}

double repulsion(const SteelWires& wires, double current) {
  const Eigen::VectorXd applied = applied_multipoles(wires);
  // Blasius: the residue of b^2 = (1 / zeta + own multipoles - applied field)^2.
  double residue = applied(0);
  for (int n = 1; n < multipoles; ++n) {
    residue += n * (n + 1.0) * image_share(wires) * applied(n - 1) * applied(n);
  }
  return mu_0_over_2pi * current * current * residue / wires.radius;
}

}  // namespace barwall::verify
