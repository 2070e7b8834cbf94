#include "verify/mean_distance.hpp"

#include <algorithm>
#include <boost/multiprecision/cpp_bin_float.hpp>
#include <cmath>
#include <stdexcept>

#include "verify/complex_field.hpp"

namespace barwall::verify {

namespace {

using Digits = boost::multiprecision::cpp_bin_float_100;

/// F with d^4 F / dx^2 dy^2 = ln(x^2 + y^2) / 2, up to terms that drop out of the differences.
Digits fourth_integral(const Digits& x, const Digits& y) {
  const Digits x2 = x * x;
  const Digits y2 = y * y;
  Digits sum = -25 * x2 * y2 / 48;
  if (x2 + y2 > 0) sum += (6 * x2 * y2 - x2 * x2 - y2 * y2) / 48 * log(x2 + y2);
  if (x != 0 && y != 0) sum += x * y * (y2 * atan(x / y) + x2 * atan(y / x)) / 6;
  return sum;
}

/// A side of 0 is given a width far below what the result can show, far above the last digit.
Digits widened(double side, double scale) {
  return side > 0.0 ? Digits(side) : Digits(scale) * 1e-20;
}

}  // namespace

double own_distance_of_rectangle(double width, double height) {
  const double a = std::min(width, height);
  const double b = std::max(width, height);
  if (!(a >= 0.0 && b > 0.0)) throw std::invalid_argument("a rectangle needs a side above 0");
  if (a == 0.0) return b * std::exp(-1.5);
  const double t = a / b;
  const double logarithm = 0.5 * std::log1p(t * t) - t * t / 12.0 * std::log1p(1.0 / (t * t)) -
                           std::log1p(t * t) / (12.0 * t * t) +
                           2.0 / 3.0 * (t * std::atan(1.0 / t) + std::atan(t) / t) - 25.0 / 12.0;
  return b * std::exp(logarithm);
}

double own_distance_of_disc(double radius) {
  return radius * std::exp(-0.25);
}

double own_distance_of_ellipse(double half_axis, double other_half_axis) {
  return 0.5 * (half_axis + other_half_axis) * std::exp(-0.25);
}

double own_distance_of_ring(double inner_radius, double outer_radius) {
  if (!(inner_radius >= 0.0 && inner_radius <= outer_radius && outer_radius > 0.0)) {
    throw std::invalid_argument("a ring needs 0 <= inner radius <= outer radius");
  }
  if (inner_radius == 0.0) return own_distance_of_disc(outer_radius);
  const double t = inner_radius / outer_radius;
  const double rim = (1.0 - t) * (1.0 + t);
  // Near t = 1 the two terms cancel to (t - 1)/3 and higher powers of the wall's thickness.
  if (rim < 1e-5) return outer_radius * std::exp(-(1.0 - t) / 3.0);
  const double t2 = t * t;
  const double logarithm = t2 * t2 * std::log(t) / (rim * rim) + (3.0 * t2 - 1.0) / (4.0 * rim);
  return outer_radius * std::exp(logarithm);
}

double mutual_distance(Sides first, Sides second, double dx, double dy) {
  if (!(std::min({first.width, first.height, second.width, second.height}) >= 0.0)) {
    throw std::invalid_argument("a rectangle needs sides of 0 or more");
  }
  const double slack = 1e-12 * (std::abs(dx) + std::abs(dy));
  if (std::abs(dx) + slack < 0.5 * (first.width + second.width) &&
      std::abs(dy) + slack < 0.5 * (first.height + second.height)) {
    throw std::invalid_argument("the two rectangles overlap");
  }
  const double scale = std::hypot(dx, dy);
  const Digits p1 = widened(first.width, scale);
  const Digits p2 = widened(second.width, scale);
  const Digits q1 = widened(first.height, scale);
  const Digits q2 = widened(second.height, scale);
  const Digits xs[] = {dx + (p1 + p2) / 2, dx + (p1 - p2) / 2, dx - (p1 - p2) / 2,
                       dx - (p1 + p2) / 2};
  const Digits ys[] = {dy + (q1 + q2) / 2, dy + (q1 - q2) / 2, dy - (q1 - q2) / 2,
                       dy - (q1 + q2) / 2};
  const int signs[] = {1, -1, -1, 1};
  Digits sum = 0;
  for (int i = 0; i < 4; ++i) {
    for (int j = 0; j < 4; ++j) sum += signs[i] * signs[j] * fourth_integral(xs[i], ys[j]);
  }
  return static_cast<double>(exp(sum / (p1 * p2 * q1 * q2)));
}

double inductance_of_bar_pair(Sides bar, double dx, double dy) {
  const double mutual = mutual_distance(bar, bar, dx, dy);
  const double own = own_distance_of_rectangle(bar.width, bar.height);
  return 2.0 * mu_0_over_2pi * std::log(mutual / own);
}

}  // namespace barwall::verify
