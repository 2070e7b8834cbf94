#pragma once

#include "verify/point3.hpp"

namespace barwall::verify {

/// B [T] at a point in space of a straight wire from `from` to `to` [m] that carries `current`
/// [A] in that direction: the wire's own share of the law of Biot and Savart, its return left to
/// other wires. B = mu_0 I (cos alpha_1 - cos alpha_2) / 4 pi rho, arranged so that it keeps full
/// accuracy close to the wire, beyond its ends and on its axis (where B = 0); infinite on the
/// wire. A wire of no length gives 0.
Point3 field_of_finite_filament(Point3 from, Point3 to, double current, Point3 at);

/// How much the field at mid-span of a wire of length `run_length` [m], at a distance from it
/// [m], falls short of the long wire's: 1 - B / B_long, accurate also where it is tiny.
double mid_span_deficit(double run_length, double distance);

/// How much the force between two wires of the same length `run_length` [m] side by side, at a
/// distance [m], averaged over the length, falls short of that between long wires: 1 - F / F_long,
/// accurate also where it is tiny.
///
/// Derived from Neumann's integral for the two, M = (mu_0 / 2 pi) (L arsinh(L/d) - sqrt(L^2 + d^2)
/// + d): the force I_1 I_2 dM/dd is mu_0 I_1 I_2 L / 2 pi d times sqrt(1 + (d/L)^2) - d/L.
double force_deficit(double run_length, double distance);

}  // namespace barwall::verify
