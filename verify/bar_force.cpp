#include "verify/bar_force.hpp"

#include <boost/multiprecision/cpp_bin_float.hpp>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "verify/complex_field.hpp"

namespace barwall::verify {

namespace {

using Digits = boost::multiprecision::cpp_bin_float_100;

/// phi with d^4 phi / dx^2 dy^2 = x / (x^2 + y^2), up to terms that drop out of the differences.
Digits fourth_integral(const Digits& x, const Digits& y) {
  const Digits x2 = x * x;
  const Digits y2 = y * y;
  Digits sum = 0;
  if (x2 + y2 > 0) sum += x * (3 * y2 - x2) / 12 * log(x2 + y2);
  if (y != 0) sum += y2 * y / 6 * (x == 0 ? Digits(0) : Digits(atan(x / y)));
  if (x != 0) sum += x2 * y / 2 * atan(y / x);
  return sum;
}

}  // namespace

double force_between_filaments(double current, double other_current, double distance) {
  return mu_0_over_2pi * current * other_current / distance;
}

double force_between_filament_and_strip(double current, double strip_current, double gap,
                                        double width) {
  return mu_0_over_2pi * current * strip_current / width * std::log1p(width / gap);
}

double bar_force_factor(double along, double across, double distance) {
  if (!(along >= 0.0 && across >= 0.0 && distance > 0.0)) {
    throw std::invalid_argument("bars need sizes of 0 or more and a distance above 0");
  }
  if (along > distance * (1.0 + 1e-12)) throw std::invalid_argument("the two bars overlap");
  // A size of 0 becomes one far below what the result can show, far above the last digit.
  const Digits s = distance;
  const Digits a = along > 0.0 ? Digits(along) : s * 1e-20;
  const Digits b = across > 0.0 ? Digits(across) : s * 1e-20;
  const Digits xs[] = {s + a, s, s - a};
  const Digits ys[] = {b, 0, -b};
  const int weights[] = {1, -2, 1};
  Digits sum = 0;
  for (int i = 0; i < 3; ++i) {
    for (int j = 0; j < 3; ++j) sum += weights[i] * weights[j] * fourth_integral(xs[i], ys[j]);
  }
  return static_cast<double>(s * sum / (a * a * b * b));
}

double force_between_bars(double current, double other_current, double along, double across,
                          double distance) {
  return bar_force_factor(along, across, distance) *
         force_between_filaments(current, other_current, distance);
}

double peak_force_two_phase(double peak, double distance) {
  return force_between_filaments(peak, peak, distance);
}

double peak_force_centre_phase(double peak, double distance) {
  return 0.5 * std::numbers::sqrt3 * force_between_filaments(peak, peak, distance);
}

double peak_force_outer_phase(double peak, double distance) {
  return (3.0 + 2.0 * std::numbers::sqrt3) / 8.0 * force_between_filaments(peak, peak, distance);
}

double peak_factor(double resistance_over_reactance) {
  return 1.02 + 0.98 * std::exp(-3.0 * resistance_over_reactance);
}

}  // namespace barwall::verify
