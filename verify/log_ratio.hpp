#pragma once

#include <complex>

#include "mesh/point.hpp"

namespace barwall::verify {

/// log(b / a) for the two ends of a straight segment seen from the origin, `chord` = b - a:
/// the real part is ln(|b| / |a|), the imaginary part the angle [rad] in (-pi, pi) that the
/// segment sweeps. `chord` is passed because its own rounding would spoil the result far away;
/// with an exact chord the relative error stays near 1e-16 at any distance. On the segment
/// itself the angle jumps from -pi to pi; its mean, 0, is returned. Infinite at either end.
std::complex<double> log_ratio(mesh::Point a, mesh::Point b, mesh::Point chord);

}  // namespace barwall::verify
