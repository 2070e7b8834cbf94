#pragma once

#include <complex>
#include <numbers>

#include "mesh/point.hpp"
#include "solver/constants.hpp"

namespace barwall::verify {

// The plane field as one analytic function. With z = x + i y, A = Re W outside the currents and
//
//   b(z) = B_y + i B_x = -dW/dz,
//
// and a line current I at z0, positive out of the page, gives
//
//   W = -(mu_0 I / 2 pi) log(z - z0),    b = (mu_0 I / 2 pi) / (z - z0).

/// mu_0 / 2 pi [H/m].
inline constexpr double mu_0_over_2pi = solver::mu_0 / (2.0 * std::numbers::pi);

inline std::complex<double> complex_of(mesh::Point p) {
  return {p.x, p.y};
}

/// B [T] from b = B_y + i B_x.
inline mesh::Point field_from(std::complex<double> b) {
  return {b.imag(), b.real()};
}

/// Force [N/m], per metre of run, on a current [A] in the field B [T].
constexpr mesh::Point force_on(double current, mesh::Point field) {
  return {-current * field.y, current * field.x};
}

}  // namespace barwall::verify
