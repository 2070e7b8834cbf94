#include "verify/current_sheet.hpp"

#include <cmath>
#include <complex>

#include "verify/complex_field.hpp"
#include "verify/finite_filament.hpp"
#include "verify/gauss_legendre.hpp"
#include "verify/log_ratio.hpp"

namespace barwall::verify {

using mesh::Point;

Point field_of_sheet(const CurrentSheet& sheet, Point at) {
  const Point chord = sheet.to - sheet.from;
  const double width = norm(chord);
  if (width == 0.0) return {};
  // b = (mu_0 K / 2 pi) * integral of ds / (z - z'), with ds = conj(t) dz' along the sheet.
  const std::complex<double> logarithm = log_ratio(sheet.from - at, sheet.to - at, chord);
  const std::complex<double> direction = complex_of(chord) / width;
  return field_from(-mu_0_over_2pi * sheet.density * std::conj(direction) * logarithm);
}

double potential_of_sheet(const CurrentSheet& sheet, Point at) {
  const Point chord = sheet.to - sheet.from;
  const double width = norm(chord);
  if (width == 0.0) return 0.0;
  const Point along = (1.0 / width) * chord;
  const Point a = sheet.from - at;
  const Point b = sheet.to - at;
  const auto weighted_log = [&](Point end) {
    const double r = norm(end);
    return r == 0.0 ? 0.0 : dot(along, end) * std::log(r);
  };
  const double height = cross(along, a);
  const double angle = height == 0.0 ? 0.0 : log_ratio(a, b, chord).imag();
  const double integral = weighted_log(b) - weighted_log(a) - width - height * angle;
  return -mu_0_over_2pi * sheet.density * integral;
}

namespace {

/// The near form: for every strip of the width, the finite filament's (axial / far) / rho^2,
/// integrated. u runs along the sheet and v across it, both from the point; the antiderivatives
/// are asinh for the normal and atan for the tangential component.
struct Integrals {
  double tangential = 0.0;  ///< of v Z / (rho^2 R)
  double normal = 0.0;      ///< of u Z / (rho^2 R)
};

Integrals integrals(double u0, double u1, double v, double axial) {
  const auto tangential = [&](double u) {
    return v == 0.0 ? 0.0 : std::atan(u * axial / (v * std::hypot(u, v, axial)));
  };
  const auto normal = [&](double u) { return -std::asinh(axial / std::hypot(u, v)); };
  return {tangential(u1) - tangential(u0), normal(u1) - normal(u0)};
}

}  // namespace

Point field_of_finite_sheet(const CurrentSheet& sheet, double start, double end, Point3 at) {
  const Point chord = sheet.to - sheet.from;
  const double width = norm(chord);
  if (width == 0.0) return {};
  const Point plane{at.x, at.y};
  const Point middle = between(sheet.from, sheet.to, 0.5);
  if (distance(middle, plane) > 4.0 * width) {
    static const QuadratureRule rule = gauss_legendre(12);
    Point3 sum;
    for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
      const Point foot = middle + 0.5 * rule.nodes[i] * chord;
      sum += field_of_finite_filament({foot.x, foot.y, start}, {foot.x, foot.y, end},
                                      0.5 * rule.weights[i] * width * sheet.density, at);
    }
    return {sum.x, sum.y};
  }
  const Point along = (1.0 / width) * chord;
  const Point across = quarter_turn(along);
  const double u0 = dot(along, sheet.from - plane);
  const double v = dot(across, sheet.from - plane);
  const Integrals top = integrals(u0, u0 + width, v, end - at.z);
  const Integrals bottom = integrals(u0, u0 + width, v, start - at.z);
  // A strip at (u, v) from the point gives z x (-(u, v)) = (v, -u) in the sheet's own axes.
  const double scale = 0.5 * mu_0_over_2pi * sheet.density;
  return (scale * (top.tangential - bottom.tangential)) * along -
         (scale * (top.normal - bottom.normal)) * across;
}

}  // namespace barwall::verify
