#pragma once

namespace barwall::verify {

// Geometric mean distances [m]: the logarithm's mean over two cross-sections. The inductance of a
// loop of two equal conductors is (mu_0 / pi) ln(mutual / own) per metre. Sources: J. C. Maxwell,
// A Treatise on Electricity and Magnetism, arts. 691-693; E. B. Rosa, Bulletin of the Bureau of
// Standards 3, 1907; F. W. Grover, Inductance Calculations, ch. 3 (all from memory).

/// Of a rectangle from itself; one side may be 0.
double own_distance_of_rectangle(double width, double height);
/// Of a disc from itself: r e^(-1/4).
double own_distance_of_disc(double radius);
/// Of an ellipse from itself, half-axes [m].
double own_distance_of_ellipse(double half_axis, double other_half_axis);
/// Of a ring from itself; inner radius 0 is a disc, inner = outer a thin tube.
double own_distance_of_ring(double inner_radius, double outer_radius);

/// A rectangle with sides along the axes [m]; sides may be 0.
struct Sides {
  double width = 0.0;
  double height = 0.0;
};

/// Of two rectangles whose centres are (dx, dy) apart [m]. The closed form is a fourth difference
/// of a function that grows as the fourth power of the distance; it is taken with a hundred
/// digits, so thin and far bars keep full accuracy. Throws std::invalid_argument if they overlap
/// or a side is negative.
double mutual_distance(Sides first, Sides second, double dx, double dy);

/// Loop inductance [H/m] of two equal parallel bars of uniform current density, centres (dx, dy)
/// apart [m].
double inductance_of_bar_pair(Sides bar, double dx, double dy);

}  // namespace barwall::verify
