#pragma once

#include "mesh/point.hpp"
#include "verify/point3.hpp"

namespace barwall::verify {

/// A flat sheet of surface current across the section, from one point to another [m], infinitely
/// long; uniform `density` [A/m] out of the page per metre of its width.
struct CurrentSheet {
  mesh::Point from;
  mesh::Point to;
  double density = 0.0;
};

/// B [T] of a sheet: logarithm and angle, exact at every distance. On the sheet itself the
/// tangential field jumps by mu_0 K and its mean is returned; at the two ends it is infinite.
/// Source: the potential theory of a line charge drawn out to a strip, e.g. Binns and Lawrenson,
/// Analysis and Computation of Electric and Magnetic Field Problems (from memory).
mesh::Point field_of_sheet(const CurrentSheet& sheet, mesh::Point at);

/// A [Wb/m] of a sheet, -(mu_0 / 2 pi) times the integral of K ln(r / 1 m) over its width.
double potential_of_sheet(const CurrentSheet& sheet, mesh::Point at);

/// B [T] in space of the same sheet when it runs only from z = `start` to z = `end` [m], `at`
/// anywhere off the sheet: B has no z component. Beyond four widths the width is integrated by
/// Gauss-Legendre points of finite filaments (relative error below 1e-14), nearer in closed form.
mesh::Point field_of_finite_sheet(const CurrentSheet& sheet, double start, double end, Point3 at);

}  // namespace barwall::verify
