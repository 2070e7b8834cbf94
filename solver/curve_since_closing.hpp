#pragma once

#include <boost/math/interpolators/cardinal_cubic_b_spline.hpp>
#include <span>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::solver {

using CurveSinceClosing = boost::math::interpolators::cardinal_cubic_b_spline<double>;

/// The smooth curve through a force at evenly spaced times from closing on: a cubic spline. At
/// closing nothing flows, and the force, as the square of the currents, does not rise yet.
/// \param values five or more
/// \param step between neighbouring times
inline CurveSinceClosing curve_since_closing(const std::vector<double>& values, double step) {
  // The last slope by backward differences of the fourth order: the spline's own estimate of it is,
  // in Boost 1.74, that of a place four steps before.
  const double* last = &values.back();
  const double slope =
      (25.0 * last[0] - 48.0 * last[-1] + 36.0 * last[-2] - 16.0 * last[-3] + 3.0 * last[-4]) /
      (12.0 * step);
  return CurveSinceClosing(values.begin(), values.end(), 0.0, step, 0.0, slope);
}

/// The same through a force's two components.
struct ForceSinceClosing {
  CurveSinceClosing x;
  CurveSinceClosing y;

  mesh::Point operator()(double time) const { return {x(time), y(time)}; }
};

inline ForceSinceClosing force_since_closing(std::span<const mesh::Point> values, double step) {
  const auto [x, y] = mesh::components(values);
  return {curve_since_closing(x, step), curve_since_closing(y, step)};
}

}  // namespace barwall::solver
