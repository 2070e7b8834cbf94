#pragma once

namespace barwall::verify {

/// Go and return of equal round wires of constant permeability, uniform current density [m].
struct SteelWires {
  double distance = 0.0;  ///< of the axes
  double radius = 0.0;
  double relative_permeability = 1.0;
};

// Exact: each wire answers every multipole of the other's field, (mu_r - 1)/(mu_r + 1) of it, and
// the multipoles of both are solved for together. Derived from the images in a circular boundary.
// Each function throws std::invalid_argument unless distance > 2 radius > 0.

/// Loop inductance [H/m]; the textbooks' (mu_0 / pi)(ln(D / r) + mu_r / 4) leaves out that the
/// wires magnetise each other.
double loop_inductance(const SteelWires& wires);

/// Force [N/m] by which go and return of `current` [A] push each other apart.
double repulsion(const SteelWires& wires, double current);

}  // namespace barwall::verify
