#include "verify/three_phase_line.hpp"

#include <boost/math/tools/roots.hpp>
#include <cmath>
#include <numbers>

#include "verify/complex_field.hpp"
#include "verify/filament.hpp"

namespace barwall::verify {

using mesh::Point;
using std::numbers::sqrt3;

namespace {

std::array<PhasorFilament, 3> balanced(double current, std::array<Point, 3> places) {
  const double third = 2.0 * std::numbers::pi / 3.0;
  return {PhasorFilament{places[0], current},
          {places[1], std::polar(current, -third)},
          {places[2], std::polar(current, -2.0 * third)}};
}

}  // namespace

std::array<PhasorFilament, 3> flat_line(double current, double spacing) {
  return balanced(current, {Point{-spacing, 0.0}, {0.0, 0.0}, {spacing, 0.0}});
}

std::array<PhasorFilament, 3> trefoil_line(double current, double spacing) {
  const double half = 0.5 * spacing;
  return balanced(current,
                  {Point{-half, -half / sqrt3}, {0.0, spacing / sqrt3}, {half, -half / sqrt3}});
}

double resultant_field(std::span<const PhasorFilament> filaments, Point at) {
  Point in_phase;
  Point quadrature;
  for (const PhasorFilament& filament : filaments) {
    in_phase += field_of_filament({filament.at, filament.current.real()}, at);
    quadrature += field_of_filament({filament.at, filament.current.imag()}, at);
  }
  return std::hypot(norm(in_phase), norm(quadrature));
}

double field_above_flat_line(double current, double spacing, double height) {
  const double s2 = spacing * spacing;
  const double y2 = height * height;
  return mu_0_over_2pi * current * spacing * std::sqrt(s2 + 3.0 * y2) / (height * (y2 + s2));
}

double distance_above_flat_line(double current, double spacing, double field) {
  const auto excess = [&](double height) {
    return std::log(field_above_flat_line(current, spacing, height) / field);
  };
  std::uintmax_t steps = 200;
  const auto bracket = boost::math::tools::bracket_and_solve_root(
      excess, spacing, 2.0, false, boost::math::tools::eps_tolerance<double>(50), steps);
  return 0.5 * (bracket.first + bracket.second);
}

double far_field_of_flat_line(double current, double spacing, double distance) {
  return sqrt3 * mu_0_over_2pi * current * spacing / (distance * distance);
}

double far_field_of_trefoil_line(double current, double spacing, double distance) {
  return std::sqrt(1.5) * mu_0_over_2pi * current * spacing / (distance * distance);
}

double field_above_pair(double current, double spacing, double height) {
  return mu_0_over_2pi * current * spacing / (height * height + 0.25 * spacing * spacing);
}

}  // namespace barwall::verify
