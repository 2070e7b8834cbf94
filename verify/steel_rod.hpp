#pragma once

#include <cstddef>
#include <span>

#include "mesh/point.hpp"
#include "verify/round_bar.hpp"

namespace barwall::verify {

/// A solid round rod of constant permeability about the origin, radius [m].
struct SteelRod {
  double radius = 0.0;
  double relative_permeability = 1.0;
};

// Currents outside the rod (round bars or filaments) or embedded in it (filaments), by images.
// With kappa = (mu_r - 1)/(mu_r + 1), a current I at the distance d from the axis has
//   outside, seen from the air:  kappa I at R^2/d and -kappa I on the axis;
//   outside, seen from the rod:  2 mu_r/(mu_r + 1) I in its place, in air;
//   inside, seen from the rod:   -kappa I at R^2/d, all times mu_r;
//   inside, seen from the air:   2 mu_r/(mu_r + 1) I in its place and -kappa I on the axis.
// Source: e.g. K. J. Binns and P. J. Lawrenson, Analysis and Computation of Electric and Magnetic
// Field Problems, images in a circular boundary (from memory). Each function throws
// std::invalid_argument if a bar touches the surface of the rod or a bar with a radius lies in it.

/// B [T] anywhere.
mesh::Point field_of(const SteelRod& rod, std::span<const RoundBar> bars, mesh::Point at);

/// A [Wb/m] anywhere, continuous; -(mu_0 I / 2 pi) ln(r / 1 m) far away, I the net current.
double potential_of(const SteelRod& rod, std::span<const RoundBar> bars, mesh::Point at);

/// Force [N/m], per metre of run, on bars[index], which must lie outside the rod.
mesh::Point force_on_bar(const SteelRod& rod, std::span<const RoundBar> bars, std::size_t index);

}  // namespace barwall::verify
