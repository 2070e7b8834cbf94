#include "verify/round_conductor.hpp"

#include <cmath>
#include <stdexcept>

#include "verify/complex_field.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

void require_tube(double inner, double outer) {
  if (!(inner >= 0.0 && inner < outer)) {
    throw std::invalid_argument("a tube needs 0 <= inner radius < outer radius");
  }
}

/// Share of a tube's current within the distance r of its axis.
double enclosed_share(double inner, double outer, double r) {
  if (r >= outer) return 1.0;
  if (r <= inner) return 0.0;
  return (r - inner) * (r + inner) / ((outer - inner) * (outer + inner));
}

}  // namespace

Point field_of_disc(Point centre, double radius, double current, Point at) {
  const Point r = at - centre;
  const double r2 = std::fmax(dot(r, r), radius * radius);
  return (mu_0_over_2pi * current / r2) * quarter_turn(r);
}

double potential_of_disc(Point centre, double radius, double current, Point at) {
  const double r = distance(centre, at);
  if (r >= radius) return -mu_0_over_2pi * current * std::log(r);
  const double within = (1.0 - r / radius) * (1.0 + r / radius);
  return mu_0_over_2pi * current * (0.5 * within - std::log(radius));
}

Point field_of_tube(Point centre, double inner_radius, double outer_radius, double current,
                    Point at) {
  require_tube(inner_radius, outer_radius);
  const Point r = at - centre;
  const double share = enclosed_share(inner_radius, outer_radius, norm(r));
  if (share == 0.0) return {};
  return (mu_0_over_2pi * current * share / dot(r, r)) * quarter_turn(r);
}

double potential_of_tube(Point centre, double inner_radius, double outer_radius, double current,
                         Point at) {
  require_tube(inner_radius, outer_radius);
  const double a = inner_radius;
  const double b = outer_radius;
  const double r = std::fmax(distance(centre, at), a);
  if (r >= b) return -mu_0_over_2pi * current * std::log(r);
  // A(b) plus the flux between r and b.
  const double rim = a > 0.0 ? a * a * std::log(b / r) : 0.0;
  const double flux = (0.5 * (b - r) * (b + r) - rim) / ((b - a) * (b + a));
  return mu_0_over_2pi * current * (flux - std::log(b));
}

double field_of_coax(const Coax& coax, double current, double r) {
  require_tube(0.0, coax.core_radius);
  require_tube(coax.sheath_inner_radius, coax.sheath_outer_radius);
  const double share = enclosed_share(0.0, coax.core_radius, r) -
                       enclosed_share(coax.sheath_inner_radius, coax.sheath_outer_radius, r);
  return share == 0.0 ? 0.0 : mu_0_over_2pi * current * share / r;
}

double inductance_of_thin_coax(double core_radius, double sheath_radius, double core_permeability) {
  return mu_0_over_2pi * (0.25 * core_permeability + std::log(sheath_radius / core_radius));
}

double inductance_of_coax(const Coax& coax) {
  const double b = coax.sheath_inner_radius;
  const double c = coax.sheath_outer_radius;
  require_tube(b, c);
  const double rim = (c - b) * (c + b);
  const double sheath =
      c * c * c * c / (rim * rim) * std::log(c / b) - (3.0 * c * c - b * b) / (4.0 * rim);
  return inductance_of_thin_coax(coax.core_radius, b, 1.0) + mu_0_over_2pi * sheath;
}

double inductance_of_two_wires(double distance, double radius, double relative_permeability) {
  return 2.0 * mu_0_over_2pi * (std::log(distance / radius) + 0.25 * relative_permeability);
}

double inductance_of_transposed_line(double distance_12, double distance_23, double distance_31,
                                     double radius, double relative_permeability) {
  const double mean = std::cbrt(distance_12 * distance_23 * distance_31);
  return mu_0_over_2pi * (std::log(mean / radius) + 0.25 * relative_permeability);
}

}  // namespace barwall::verify
