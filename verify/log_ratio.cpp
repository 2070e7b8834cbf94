#include "verify/log_ratio.hpp"

#include <cmath>

namespace barwall::verify {

using mesh::Point;

std::complex<double> log_ratio(Point a, Point b, Point chord) {
  // |b|^2 - |a|^2 as one product: no difference of nearly equal squares. log1p is taken of a
  // positive argument, so it is sound from an end of the segment out to infinity.
  const double growth = dot(chord, a + b);
  const double logarithm =
      growth >= 0.0 ? 0.5 * std::log1p(growth / dot(a, a)) : -0.5 * std::log1p(-growth / dot(b, b));
  const double sine = cross(a, chord);
  const double angle = sine == 0.0 ? 0.0 : std::atan2(sine, dot(a, b));
  return {logarithm, angle};
}

}  // namespace barwall::verify
