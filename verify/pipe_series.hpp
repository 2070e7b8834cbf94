#pragma once

#include <cstddef>
#include <span>

#include "mesh/point.hpp"
#include "verify/round_bar.hpp"

namespace barwall::verify {

/// A steel pipe of constant permeability about the origin, radii [m].
struct Pipe {
  double inner_radius = 0.0;
  double outer_radius = 0.0;
  double relative_permeability = 1.0;
};

// Round bars or filaments in the bore of a pipe, air inside and outside: Fourier series in the
// angle, exact. Each function takes any number of bars at any places in the bore and throws
// std::invalid_argument if a bar does not lie wholly in it, or the pipe is none. Currents that
// alternate are taken as two calls, real parts and imaginary parts.
//
// A bar with uniform current density has the field of a filament outside itself, so the pipe's
// wall, and with it everything the pipe sends back, cannot tell the two apart.
//
// Derived by matching A and H_theta at both radii for each harmonic; the first harmonic outside
// is the reciprocal of the shielding factor of a shell in a uniform field (J. D. Jackson,
// Classical Electrodynamics, sec. 5.12, from memory).

/// The share of the n-th multipole (n >= 1) of the bore's currents that appears outside the pipe.
double transmitted_share(const Pipe& pipe, int n);
/// The share of the n-th multipole's field at the inner wall that comes back into the bore.
double reflected_share(const Pipe& pipe, int n);

/// B [T] anywhere: in a bar, the bore, the wall or outside.
mesh::Point field_of(const Pipe& pipe, std::span<const RoundBar> bars, mesh::Point at);

/// A [Wb/m] anywhere, continuous; -(mu_0 I / 2 pi) ln(r / 1 m) far outside, I the net current.
double potential_of(const Pipe& pipe, std::span<const RoundBar> bars, mesh::Point at);

/// B [T] in the bore that the pipe's magnetisation adds to that of the bars alone.
mesh::Point reflected_field(const Pipe& pipe, std::span<const RoundBar> bars, mesh::Point at);

/// Force [N/m], per metre of run, on bars[index]: from the other bars and from the pipe.
mesh::Point force_on_bar(const Pipe& pipe, std::span<const RoundBar> bars, std::size_t index);

/// Inductance [H/m] that the pipe adds to a loop of +I at (offset, 0) and -I at (-offset, 0).
double added_loop_inductance(const Pipe& pipe, double offset);

}  // namespace barwall::verify
