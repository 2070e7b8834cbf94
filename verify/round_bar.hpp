#pragma once

#include <cstddef>
#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

/// A round bar of uniform current density: centre, radius [m], current [A]. Radius 0: a filament.
struct RoundBar {
  mesh::Point centre;
  double current = 0.0;
  double radius = 0.0;
};

/// B [T] of the bars alone, in air.
mesh::Point field_of_bars(std::span<const RoundBar> bars, mesh::Point at);
/// A [Wb/m] of the bars alone, each -(mu_0 I / 2 pi) ln(r / 1 m) outside itself.
double potential_of_bars(std::span<const RoundBar> bars, mesh::Point at);
/// B [T] at the centre of bars[index] of all the other bars. What a source outside a disc
/// exerts on it per metre is its current times the field at its centre (mean value of a harmonic
/// function).
mesh::Point field_of_other_bars(std::span<const RoundBar> bars, std::size_t index);

}  // namespace barwall::verify
