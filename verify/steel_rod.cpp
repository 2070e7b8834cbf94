#include "verify/steel_rod.hpp"

#include <cassert>
#include <cmath>
#include <complex>
#include <stdexcept>

#include "verify/complex_field.hpp"
#include "verify/filament.hpp"
#include "verify/round_conductor.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

using Complex = std::complex<double>;

void require_clear_of_surface(const SteelRod& rod, std::span<const RoundBar> bars) {
  if (!(rod.radius > 0.0 && rod.relative_permeability > 0.0)) {
    throw std::invalid_argument("a rod needs a radius and a permeability above 0");
  }
  for (const RoundBar& bar : bars) {
    const double d = norm(bar.centre);
    const bool outside = d - bar.radius > rod.radius;
    const bool inside = d < rod.radius && bar.radius == 0.0;
    if (!outside && !inside) {
      throw std::invalid_argument("a bar touches the surface of the rod, or has a radius in it");
    }
  }
}

double image_share(const SteelRod& rod) {
  return (rod.relative_permeability - 1.0) / (rod.relative_permeability + 1.0);
}

bool in_rod(const SteelRod& rod, Point at) {
  return norm(at) < rod.radius;
}

Point inverse_point(const SteelRod& rod, Point p) {
  return (rod.radius * rod.radius / dot(p, p)) * p;
}

/// The rod's answer in the air to one outer current.
Point outer_image_field(const SteelRod& rod, const RoundBar& bar, Point at) {
  const double image = image_share(rod) * bar.current;
  return field_of_filament({inverse_point(rod, bar.centre), image}, at) +
         field_of_filament({{}, -image}, at);
}

Point field_of_one(const SteelRod& rod, const RoundBar& bar, Point at) {
  const double kappa = image_share(rod);
  const Point direct = field_of_disc(bar.centre, bar.radius, bar.current, at);
  if (!in_rod(rod, bar.centre)) {
    if (in_rod(rod, at)) return (1.0 + kappa) * direct;
    return direct + outer_image_field(rod, bar, at);
  }
  if (!in_rod(rod, at)) {
    return (1.0 + kappa) * direct + field_of_filament({{}, -kappa * bar.current}, at);
  }
  // 1 / (z - R^2 / conj(z0)) written so that z0 may be 0, the image then at infinity.
  const Complex z0 = std::conj(complex_of(bar.centre));
  const Complex image = z0 / (complex_of(at) * z0 - rod.radius * rod.radius);
  return rod.relative_permeability *
         (direct + field_from(-kappa * mu_0_over_2pi * bar.current * image));
}

double potential_of_one(const SteelRod& rod, const RoundBar& bar, Point at) {
  const double kappa = image_share(rod);
  const double mu = rod.relative_permeability;
  const double scale = mu_0_over_2pi * bar.current;
  const double direct = potential_of_disc(bar.centre, bar.radius, bar.current, at);
  if (!in_rod(rod, bar.centre)) {
    if (in_rod(rod, at)) return (1.0 + kappa) * direct + scale * kappa * std::log(norm(bar.centre));
    return direct - scale * kappa * std::log(distance(inverse_point(rod, bar.centre), at)) +
           scale * kappa * std::log(norm(at));
  }
  if (!in_rod(rod, at)) return (1.0 + kappa) * direct + scale * kappa * std::log(norm(at));
  const double r2 = rod.radius * rod.radius;
  const Complex image = 1.0 - complex_of(at) * std::conj(complex_of(bar.centre)) / r2;
  return mu * (direct + scale * kappa * std::log(std::abs(image))) +
         scale * (mu - 1.0) * std::log(rod.radius);
}

}  // namespace

Point field_of(const SteelRod& rod, std::span<const RoundBar> bars, Point at) {
  require_clear_of_surface(rod, bars);
  Point sum;
  for (const RoundBar& bar : bars) sum += field_of_one(rod, bar, at);
  return sum;
}

double potential_of(const SteelRod& rod, std::span<const RoundBar> bars, Point at) {
  require_clear_of_surface(rod, bars);
  double sum = 0.0;
  for (const RoundBar& bar : bars) sum += potential_of_one(rod, bar, at);
  return sum;
}

Point force_on_bar(const SteelRod& rod, std::span<const RoundBar> bars, std::size_t index) {
  assert(index < bars.size());
  require_clear_of_surface(rod, bars);
  const RoundBar& bar = bars[index];
  if (in_rod(rod, bar.centre)) {
    throw std::invalid_argument("the force on a current within magnetised steel is not defined");
  }
  Point field = outer_image_field(rod, bar, bar.centre);
  for (std::size_t k = 0; k < bars.size(); ++k) {
    if (k != index) field += field_of_one(rod, bars[k], bar.centre);
  }
  return force_on(bar.current, field);
}

}  // namespace barwall::verify
