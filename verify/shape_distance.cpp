#include "verify/shape_distance.hpp"

#include <cmath>
#include <numbers>
#include <utility>

#include "verify/complex_field.hpp"
#include "verify/filled_bar.hpp"
#include "verify/mean_distance.hpp"

namespace barwall::verify {

using mesh::Point;
using mesh::Rectangle;
using mesh::Round;
using mesh::Shape;
using mesh::Tube;

namespace {

bool covered(const Shape& shape) {
  return std::holds_alternative<Rectangle>(shape) || std::holds_alternative<Round>(shape) ||
         std::holds_alternative<Tube>(shape);
}

/// Mean distance of a filament from a shape.
double distance_from(const Shape& shape, Point filament) {
  return std::exp(-potential_of(shape, 1.0, filament) / mu_0_over_2pi);
}

/// Whether `other` lies in the bore of a tube.
bool in_bore(const Tube& tube, const Shape& other) {
  const Point somewhere = mesh::at(boundary(other).front().front(), 0.0);
  return mesh::distance(somewhere, tube.centre) < 0.5 * tube.outer_diameter - 0.5 * tube.thickness;
}

double mutual_distance_of_rectangles(const Rectangle& a, const Rectangle& b) {
  constexpr double parallel = 1e-9;
  const double difference = std::remainder(b.turn - a.turn, std::numbers::pi);
  const bool along = std::abs(difference) < parallel;
  if (along || std::abs(std::abs(difference) - 0.5 * std::numbers::pi) < parallel) {
    const Sides first{a.width, a.height};
    const Sides second = along ? Sides{b.width, b.height} : Sides{b.height, b.width};
    const Point apart = turned(b.centre - a.centre, -a.turn);
    return mutual_distance(first, second, apart.x, apart.y);
  }
  constexpr int order = 24;
  double mean = 0.0;
  for (const Filament& filament : filaments_of(a, 1.0, order)) {
    mean += filament.current * potential_of(b, 1.0, filament.at);
  }
  return std::exp(-mean / mu_0_over_2pi);
}

}  // namespace

std::optional<double> own_distance(const Shape& shape) {
  if (const auto* r = std::get_if<Rectangle>(&shape)) {
    return own_distance_of_rectangle(r->width, r->height);
  }
  if (const auto* r = std::get_if<Round>(&shape)) return own_distance_of_disc(0.5 * r->diameter);
  if (const auto* t = std::get_if<Tube>(&shape)) {
    const double outer = 0.5 * t->outer_diameter;
    return own_distance_of_ring(outer - t->thickness, outer);
  }
  return {};
}

std::optional<double> mutual_distance(const Shape& first, const Shape& second) {
  if (!covered(first) || !covered(second)) return {};
  // The potential in the bore of a tube is the same everywhere.
  for (const auto& [outer, inner] : {std::pair{&first, &second}, std::pair{&second, &first}}) {
    const auto* tube = std::get_if<Tube>(outer);
    if (tube != nullptr && in_bore(*tube, *inner)) return distance_from(*outer, tube->centre);
  }
  const auto* a = std::get_if<Rectangle>(&first);
  const auto* b = std::get_if<Rectangle>(&second);
  if (a != nullptr && b != nullptr) return mutual_distance_of_rectangles(*a, *b);
  if (a == nullptr) return distance_from(second, centroid(first));
  return distance_from(first, centroid(second));
}

}  // namespace barwall::verify
