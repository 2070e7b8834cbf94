#pragma once

#include "mesh/point.hpp"

namespace barwall::solver {

/// A quantity that is a product of two currents over a cycle:
/// f(wt) = mean + cosine cos(2 wt) + sine sin(2 wt).
struct Pulsation {
  double mean = 0.0;
  double cosine = 0.0;
  double sine = 0.0;

  double at(double wt) const;
  double largest() const;
  double smallest() const;
};

/// The pulsation of a quantity q(i, i), symmetric and bilinear in the currents, where
/// i = sqrt(2) (in-phase cos wt - quadrature sin wt): from q of the r.m.s. parts.
/// \param both q(in-phase, in-phase), q(quadrature, quadrature), q(in-phase, quadrature)
Pulsation pulsation_of(double in_phase, double quadrature, double mixed);

/// A force, or any vector of two pulsations.
struct PulsatingVector {
  Pulsation x;
  Pulsation y;

  mesh::Point at(double wt) const { return {x.at(wt), y.at(wt)}; }
};

/// Where in the cycle a vector is largest.
struct Peak {
  double magnitude = 0.0;
  double wt = 0.0;  ///< 0 <= wt < pi [rad]
  mesh::Point value;
};

Peak peak_of(const PulsatingVector& vector);

/// Largest magnitude in the cycle of sqrt(2) (in_phase cos wt - quadrature sin wt): the longer
/// half axis of the ellipse that the vector's tip runs along.
double peak_magnitude(mesh::Point in_phase, mesh::Point quadrature);

}  // namespace barwall::solver
