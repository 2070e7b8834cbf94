#pragma once

#include <cmath>
#include <numbers>

namespace barwall::io {

/// Sine of an angle in degrees, exact at multiples of 30 degrees where it is 0, 1/2 or 1, so
/// that three balanced phasors sum to exactly zero.
inline double sin_degrees(double angle) {
  double folded = std::remainder(angle, 360.0);
  if (folded > 90.0) folded = 180.0 - folded;
  if (folded < -90.0) folded = -180.0 - folded;
  if (std::abs(folded) == 30.0) return std::copysign(0.5, folded);
  if (std::abs(folded) == 90.0) return std::copysign(1.0, folded);
  return std::sin(folded * std::numbers::pi / 180.0);
}

/// Cosine of an angle in degrees; exact where sin_degrees is.
inline double cos_degrees(double angle) {
  return sin_degrees(90.0 - std::abs(std::remainder(angle, 360.0)));
}

}  // namespace barwall::io
