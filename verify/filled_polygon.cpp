#include "verify/filled_polygon.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <complex>
#include <stdexcept>

#include "verify/complex_field.hpp"
#include "verify/log_ratio.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

using Complex = std::complex<double>;

// Six radii away the first moment left out is below 6^-21 = 5e-17 of the first kept.
constexpr double far_in_radii = 6.0;
constexpr int moment_count = 21;
using Moments = std::array<Complex, moment_count>;

struct Extent {
  Point centroid;
  double radius = 0.0;
  double orientation = 1.0;  ///< +1 counter-clockwise, -1 clockwise
};

Extent extent_of(std::span<const Point> corners) {
  Extent extent{centroid_of(corners), 0.0, signed_area(corners) > 0.0 ? 1.0 : -1.0};
  for (const Point corner : corners) {
    extent.radius = std::max(extent.radius, distance(corner, extent.centroid));
  }
  return extent;
}

template <class Visit>
void for_each_edge(std::span<const Point> corners, Visit visit) {
  for (std::size_t i = 0; i < corners.size(); ++i) {
    visit(corners[i], corners[i + 1 < corners.size() ? i + 1 : 0]);
  }
}

/// Integrals of (z' - c)^n over the polygon, as signed triangles from the centroid c to the edges:
/// the triangle 0, p, q gives p x q / ((n + 1)(n + 2)) times the sum of p^j q^(n - j).
Moments moments_of(std::span<const Point> corners, Point centroid) {
  Moments moments{};
  for_each_edge(corners, [&](Point from, Point to) {
    const Complex p = complex_of(from - centroid);
    const Complex q = complex_of(to - centroid);
    const double twice_area = cross(from - centroid, to - centroid);
    Complex powers = 1.0;
    Complex power = 1.0;
    for (int n = 0; n < moment_count; ++n) {
      moments[n] += twice_area / ((n + 1.0) * (n + 2.0)) * powers;
      power *= p;
      powers = powers * q + power;
    }
  });
  return moments;
}

/// Integral over the polygon of 1 / (z - z').
Complex field_integral(std::span<const Point> corners, Point at) {
  const Extent extent = extent_of(corners);
  const Point offset = at - extent.centroid;
  if (norm(offset) > far_in_radii * extent.radius) {
    const Moments moments = moments_of(corners, extent.centroid);
    const Complex inverse = 1.0 / complex_of(offset);
    Complex sum = 0.0;
    for (int n = moment_count - 1; n >= 0; --n) sum = (sum + moments[n]) * inverse;
    return extent.orientation * sum;
  }
  // 1 / (z - z') is d/d(conj z') of conj(z' - z) / (z - z'): what is left on an edge of direction
  // t, at the signed distance d = t x (p - z) from the point, is d conj(t) log((q - z) / (p - z)).
  Complex sum = 0.0;
  for_each_edge(corners, [&](Point from, Point to) {
    const Point chord = to - from;
    const double length = norm(chord);
    if (length == 0.0) return;
    const double twice = cross(chord, from - at);
    if (twice == 0.0) return;  // on the edge's line, corners included: no share
    const Complex direction = complex_of(chord) / length;
    sum += twice / length * std::conj(direction) * log_ratio(from - at, to - at, chord);
  });
  return extent.orientation * sum;
}

/// Integral over the polygon of ln |z - z'|.
double potential_integral(std::span<const Point> corners, Point at) {
  const Extent extent = extent_of(corners);
  const Point offset = at - extent.centroid;
  if (norm(offset) > far_in_radii * extent.radius) {
    const Moments moments = moments_of(corners, extent.centroid);
    const Complex inverse = 1.0 / complex_of(offset);
    Complex sum = 0.0;
    for (int n = moment_count - 1; n >= 1; --n) sum = (sum + moments[n] / double(n)) * inverse;
    return extent.orientation * (moments[0].real() * std::log(norm(offset)) - sum.real());
  }
  // ln r is the divergence of (z' - z)(ln r / 2 - 1 / 4), whose normal part is constant on an edge
  // but for ln r.
  double sum = 0.0;
  for_each_edge(corners, [&](Point from, Point to) {
    const Point chord = to - from;
    const double length = norm(chord);
    if (length == 0.0) return;
    const Point a = from - at;
    const Point b = to - at;
    const double height = cross(chord, a) / length;
    if (height == 0.0) return;
    const Complex logarithm = log_ratio(a, b, chord);
    // Integral of ln r along the edge, about its middle so that nothing large cancels.
    const double middle = dot(chord, 0.5 * (a + b)) / length;
    const double integral = 0.5 * length * std::log(norm(a) * norm(b)) + middle * logarithm.real() -
                            length - height * logarithm.imag();
    sum -= height * (0.5 * integral - 0.25 * length);
  });
  return extent.orientation * sum;
}

}  // namespace

double signed_area(std::span<const Point> corners) {
  if (corners.size() < 3) throw std::invalid_argument("a polygon needs at least three corners");
  double twice = 0.0;
  for_each_edge(corners, [&](Point from, Point to) {
    twice += cross(from - corners.front(), to - corners.front());
  });
  return 0.5 * twice;
}

Point centroid_of(std::span<const Point> corners) {
  const double area = signed_area(corners);
  if (area == 0.0) throw std::invalid_argument("the polygon encloses no area");
  Point moment;
  for_each_edge(corners, [&](Point from, Point to) {
    const Point a = from - corners.front();
    const Point b = to - corners.front();
    moment += cross(a, b) / 6.0 * (a + b);
  });
  return corners.front() + (1.0 / area) * moment;
}

Point field_of_polygon(std::span<const Point> corners, double density, Point at) {
  return field_from(mu_0_over_2pi * density * field_integral(corners, at));
}

double potential_of_polygon(std::span<const Point> corners, double density, Point at) {
  return -mu_0_over_2pi * density * potential_integral(corners, at);
}

}  // namespace barwall::verify
