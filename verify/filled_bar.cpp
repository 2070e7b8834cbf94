#include "verify/filled_bar.hpp"

#include <array>
#include <cmath>
#include <numbers>

#include "verify/filled_polygon.hpp"
#include "verify/gauss_legendre.hpp"
#include "verify/round_conductor.hpp"

namespace barwall::verify {

using mesh::Frame;
using mesh::Point;
using mesh::Polygon;
using mesh::Rectangle;
using mesh::Round;
using mesh::Shape;
using mesh::Tube;
using mesh::turned;

namespace {

template <class... Cases>
struct Overloaded : Cases... {
  using Cases::operator()...;
};
template <class... Cases>
Overloaded(Cases...) -> Overloaded<Cases...>;

using Corners = std::array<Point, 4>;

Corners corners_of(Point centre, double width, double height, double turn) {
  const Point x = turned({0.5 * width, 0.0}, turn);
  const Point y = turned({0.0, 0.5 * height}, turn);
  return {centre - x - y, centre + x - y, centre + x + y, centre - x + y};
}

struct FrameParts {
  Corners outer;
  Corners inner;
  double density_per_ampere = 0.0;  ///< 1 / area [1/m2]
};

FrameParts parts_of(const Frame& frame) {
  const double t = 2.0 * frame.thickness;
  return {corners_of(frame.centre, frame.width, frame.height, frame.turn),
          corners_of(frame.centre, frame.width - t, frame.height - t, frame.turn),
          1.0 / (t * (frame.width + frame.height - t))};
}

/// Even sums over a parallelogram with two sides from a corner.
void add_parallelogram(std::vector<Filament>& filaments, const QuadratureRule& rule, Point corner,
                       Point side, Point other, double current) {
  for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
    for (std::size_t j = 0; j < rule.nodes.size(); ++j) {
      filaments.push_back(
          {corner + 0.5 * (1.0 + rule.nodes[i]) * side + 0.5 * (1.0 + rule.nodes[j]) * other,
           0.25 * rule.weights[i] * rule.weights[j] * current});
    }
  }
}

/// Even sums over a ring: equal areas along the radius, equal angles round.
void add_ring(std::vector<Filament>& filaments, const QuadratureRule& rule, Point centre,
              double inner, double outer, double current) {
  const int round = 4 * static_cast<int>(rule.nodes.size());
  for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
    const double share = 0.5 * (1.0 + rule.nodes[i]);
    const double r = std::sqrt(inner * inner + share * (outer * outer - inner * inner));
    for (int k = 0; k < round; ++k) {
      const double angle = 2.0 * std::numbers::pi * (k + 0.5) / round;
      filaments.push_back(
          {centre + turned({r, 0.0}, angle), 0.5 * rule.weights[i] * current / round});
    }
  }
}

/// Even sums over a polygon: signed triangles from the centroid, squares collapsed onto them.
void add_polygon(std::vector<Filament>& filaments, const QuadratureRule& rule,
                 const std::vector<Point>& corners, double current) {
  const Point centre = centroid_of(corners);
  const double density = current / signed_area(corners);
  for (std::size_t e = 0; e < corners.size(); ++e) {
    const Point a = corners[e] - centre;
    const Point b = corners[(e + 1) % corners.size()] - centre;
    for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
      const double out = 0.5 * (1.0 + rule.nodes[i]);
      for (std::size_t j = 0; j < rule.nodes.size(); ++j) {
        const double weight = 0.25 * rule.weights[i] * rule.weights[j] * out;
        filaments.push_back({centre + out * between(a, b, 0.5 * (1.0 + rule.nodes[j])),
                             density * cross(a, b) * weight});
      }
    }
  }
}

}  // namespace

Point field_of(const Shape& shape, double current, Point at) {
  return std::visit(
      Overloaded{
          [&](const Rectangle& r) {
            return field_of_polygon(corners_of(r.centre, r.width, r.height, r.turn),
                                    current / (r.width * r.height), at);
          },
          [&](const Round& r) { return field_of_disc(r.centre, 0.5 * r.diameter, current, at); },
          [&](const Tube& t) {
            const double outer = 0.5 * t.outer_diameter;
            return field_of_tube(t.centre, outer - t.thickness, outer, current, at);
          },
          [&](const Frame& f) {
            const FrameParts parts = parts_of(f);
            const double density = current * parts.density_per_ampere;
            return field_of_polygon(parts.outer, density, at) -
                   field_of_polygon(parts.inner, density, at);
          },
          [&](const Polygon& p) {
            return field_of_polygon(p.corners, current / std::abs(signed_area(p.corners)), at);
          }},
      shape);
}

double potential_of(const Shape& shape, double current, Point at) {
  return std::visit(
      Overloaded{[&](const Rectangle& r) {
                   return potential_of_polygon(corners_of(r.centre, r.width, r.height, r.turn),
                                               current / (r.width * r.height), at);
                 },
                 [&](const Round& r) {
                   return potential_of_disc(r.centre, 0.5 * r.diameter, current, at);
                 },
                 [&](const Tube& t) {
                   const double outer = 0.5 * t.outer_diameter;
                   return potential_of_tube(t.centre, outer - t.thickness, outer, current, at);
                 },
                 [&](const Frame& f) {
                   const FrameParts parts = parts_of(f);
                   const double density = current * parts.density_per_ampere;
                   return potential_of_polygon(parts.outer, density, at) -
                          potential_of_polygon(parts.inner, density, at);
                 },
                 [&](const Polygon& p) {
                   return potential_of_polygon(p.corners,
                                               current / std::abs(signed_area(p.corners)), at);
                 }},
      shape);
}

std::vector<Filament> filaments_of(const Shape& shape, double current, int order) {
  const QuadratureRule rule = gauss_legendre(order);
  std::vector<Filament> filaments;
  std::visit(
      Overloaded{[&](const Rectangle& r) {
                   const Corners c = corners_of(r.centre, r.width, r.height, r.turn);
                   add_parallelogram(filaments, rule, c[0], c[1] - c[0], c[3] - c[0], current);
                 },
                 [&](const Round& r) {
                   add_ring(filaments, rule, r.centre, 0.0, 0.5 * r.diameter, current);
                 },
                 [&](const Tube& t) {
                   const double outer = 0.5 * t.outer_diameter;
                   add_ring(filaments, rule, t.centre, outer - t.thickness, outer, current);
                 },
                 [&](const Frame& f) {
                   // Two bars the full width below and above, two between them.
                   const FrameParts parts = parts_of(f);
                   const double density = current * parts.density_per_ampere;
                   const double t = f.thickness;
                   const Point x = turned({1.0, 0.0}, f.turn);
                   const Point y = turned({0.0, 1.0}, f.turn);
                   const double rise = f.height - 2.0 * t;
                   add_parallelogram(filaments, rule, parts.outer[0], f.width * x, t * y,
                                     density * f.width * t);
                   add_parallelogram(filaments, rule, parts.outer[3], f.width * x, -t * y,
                                     density * f.width * t);
                   add_parallelogram(filaments, rule, parts.inner[0], -t * x, rise * y,
                                     density * rise * t);
                   add_parallelogram(filaments, rule, parts.inner[1], t * x, rise * y,
                                     density * rise * t);
                 },
                 [&](const Polygon& p) { add_polygon(filaments, rule, p.corners, current); }},
      shape);
  return filaments;
}

}  // namespace barwall::verify
