#include "verify/filament.hpp"

#include <cmath>

#include "verify/complex_field.hpp"

namespace barwall::verify {

using mesh::Point;

Point field_of_filament(const Filament& filament, Point at) {
  const Point r = at - filament.at;
  return (mu_0_over_2pi * filament.current / dot(r, r)) * quarter_turn(r);
}

double potential_of_filament(const Filament& filament, Point at) {
  return -mu_0_over_2pi * filament.current * std::log(distance(filament.at, at));
}

Point field_of_filaments(std::span<const Filament> filaments, Point at) {
  Point sum;
  for (const Filament& filament : filaments) sum += field_of_filament(filament, at);
  return sum;
}

double potential_of_filaments(std::span<const Filament> filaments, Point at) {
  double sum = 0.0;
  for (const Filament& filament : filaments) sum += potential_of_filament(filament, at);
  return sum;
}

}  // namespace barwall::verify
