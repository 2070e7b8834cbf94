#pragma once

#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

/// A thin straight wire, infinitely long, at a point of the section [m] with its current [A].
struct Filament {
  mesh::Point at;
  double current = 0.0;
};

/// B [T] of a filament; infinite on the filament itself.
mesh::Point field_of_filament(const Filament& filament, mesh::Point at);

/// A [Wb/m] of a filament, 0 at a distance of 1 m: -(mu_0 I / 2 pi) ln(r / 1 m).
double potential_of_filament(const Filament& filament, mesh::Point at);

/// B [T] of many filaments by direct sum.
mesh::Point field_of_filaments(std::span<const Filament> filaments, mesh::Point at);

/// A [Wb/m] of many filaments by direct sum, reference as for one.
double potential_of_filaments(std::span<const Filament> filaments, mesh::Point at);

}  // namespace barwall::verify
