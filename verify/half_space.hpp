#pragma once

#include <cstddef>
#include <span>

#include "mesh/point.hpp"
#include "verify/round_bar.hpp"

namespace barwall::verify {

/// Steel of constant permeability that fills the half of space behind a plane: a point of the
/// surface [m] and the unit normal out of the steel into the air.
struct HalfSpace {
  mesh::Point on_surface;
  mesh::Point into_air{0.0, 1.0};
  double relative_permeability = 1.0;
};

// Round bars or filaments in the air before the steel, solved by images: seen from the air, each
// has an image of (mu_r - 1)/(mu_r + 1) times its current behind the surface; seen from the
// steel, it has 2 mu_r/(mu_r + 1) times its current, in air. Source: e.g. D. K. Cheng, Field and
// Wave Electromagnetics, method of images (from memory). Each function throws
// std::invalid_argument if a bar does not lie wholly in the air.

/// B [T] in the air, in a bar or in the steel.
mesh::Point field_of(const HalfSpace& steel, std::span<const RoundBar> bars, mesh::Point at);

/// A [Wb/m], continuous: the sum of the logarithms of the distances in metres, images included.
double potential_of(const HalfSpace& steel, std::span<const RoundBar> bars, mesh::Point at);

/// Force [N/m], per metre of run, on bars[index]: from the other bars and from the steel.
mesh::Point force_on_bar(const HalfSpace& steel, std::span<const RoundBar> bars, std::size_t index);

}  // namespace barwall::verify
