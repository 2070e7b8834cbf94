#pragma once

#include <array>
#include <complex>
#include <span>
#include <type_traits>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::solver {

/// A quantity that repeats every half cycle of the currents, such as a force or an energy:
/// f(wt) = mean + cosine cos(2 wt) + sine sin(2 wt), and so on in even harmonics. Products of two
/// sinusoidal currents end there; in saturable steel higher ones follow.
struct Pulsation {
  double mean = 0.0;
  double cosine = 0.0;
  double sine = 0.0;
  std::vector<std::array<double, 2>> higher = {};  ///< cosine and sine of 4 wt, 6 wt, ...

  double at(double wt) const;
  double largest() const { return largest_at().value; }
  double smallest() const;

  /// Where in the cycle it is largest.
  struct Crest {
    double wt = 0.0;  ///< 0 <= wt < pi [rad]
    double value = 0.0;
  };
  Crest largest_at() const;

  /// How far it can swing to either side of its mean, at most.
  double swing() const;
};

/// a + factor b
Pulsation sum_of(const Pulsation& a, const Pulsation& b, double factor = 1.0);

/// The pulsation through values at wt = k pi / n, k = 0 to n - 1; n is even.
Pulsation pulsation_through(std::span<const double> values);

/// The pulsation of a quantity q(i, i), symmetric and bilinear in the currents, where
/// i = sqrt(2) (in-phase cos wt - quadrature sin wt): from q of the r.m.s. parts.
/// \param both q(in-phase, in-phase), q(quadrature, quadrature), q(in-phase, quadrature)
Pulsation pulsation_of(double in_phase, double quadrature, double mixed);

/// A force, or any vector of two pulsations.
struct PulsatingVector {
  Pulsation x;
  Pulsation y;

  mesh::Point at(double wt) const { return {x.at(wt), y.at(wt)}; }
  /// Over the cycle; of steady currents the vector itself.
  mesh::Point mean() const { return {x.mean, y.mean}; }
};

PulsatingVector sum_of(const PulsatingVector& a, const PulsatingVector& b, double factor = 1.0);
/// The vector over the cycle from those of steady currents at wt = k pi / n, k = 0 to n - 1; n is
/// even.
PulsatingVector over_half_cycle(std::span<const PulsatingVector> instants);
/// The steady vectors themselves.
std::vector<mesh::Point> means_of(std::span<const PulsatingVector> vectors);

/// A figure over the cycle from its products q(j, k), bilinear in load patterns j and k, a number
/// or a vector. Steady currents, with one pattern, have a mean alone.
template <class Bilinear>
auto over_cycle(int patterns, Bilinear product) {
  if constexpr (std::is_same_v<decltype(product(0, 0)), mesh::Point>) {
    const mesh::Point first = product(0, 0);
    if (patterns == 1) return PulsatingVector{{first.x}, {first.y}};
    const mesh::Point second = product(1, 1);
    const mesh::Point mixed = 0.5 * (product(0, 1) + product(1, 0));
    return PulsatingVector{pulsation_of(first.x, second.x, mixed.x),
                           pulsation_of(first.y, second.y, mixed.y)};
  } else {
    if (patterns == 1) return Pulsation{product(0, 0)};
    return pulsation_of(product(0, 0), product(1, 1), 0.5 * (product(0, 1) + product(1, 0)));
  }
}

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

// A field changes its sign with the currents, every half cycle: f(wt + pi) = -f(wt).

/// The fundamental of such a quantity through values at wt = k pi / n, k = 0 to n - 1: the r.m.s.
/// phasor of sqrt(2) (in_phase cos wt - quadrature sin wt).
std::complex<double> fundamental_through(std::span<const double> values);

}  // namespace barwall::solver
