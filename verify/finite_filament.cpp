#include "verify/finite_filament.hpp"

#include <cmath>

#include "verify/complex_field.hpp"

namespace barwall::verify {

Point3 field_of_finite_filament(Point3 from, Point3 to, double current, Point3 at) {
  const Point3 run = to - from;
  const double length = norm(run);
  if (length == 0.0) return {};
  const Point3 along = (1.0 / length) * run;
  const Point3 a = at - from;
  const Point3 b = at - to;
  const Point3 round = cross(along, a);  // rho times the direction of B
  const double far_a = norm(a);
  const double far_b = norm(b);
  const double axial_a = dot(along, a);
  const double axial_b = dot(along, b);
  const double scale = 0.5 * mu_0_over_2pi * current;
  if (axial_a * axial_b > 0.0) {
    // Beyond an end the two cosines nearly cancel; multiplied out, rho^2 drops from the quotient.
    const double numerator = length * (axial_a + axial_b);
    const double denominator = far_a * far_b * (axial_a * far_b + axial_b * far_a);
    return (scale * numerator / denominator) * round;
  }
  return (scale * (axial_a / far_a - axial_b / far_b) / dot(round, round)) * round;
}

double mid_span_deficit(double run_length, double distance) {
  const double ratio = 2.0 * distance / run_length;
  const double q = ratio * ratio;
  const double root = std::sqrt(1.0 + q);
  return q / (root * (root + 1.0));
}

double force_deficit(double run_length, double distance) {
  const double ratio = distance / run_length;
  return 2.0 * ratio / (1.0 + ratio + std::sqrt(1.0 + ratio * ratio));
}

}  // namespace barwall::verify
