#include "mesh/shape.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace barwall::mesh {
namespace {

constexpr double pi = std::numbers::pi;

template <class... Ts>
struct Overloaded : Ts... {
  using Ts::operator()...;
};
template <class... Ts>
Overloaded(Ts...) -> Overloaded<Ts...>;

/// Corners of a turned rectangle, counter-clockwise from lower left. Without a turn the
/// coordinates are exact, so that equal edges of different shapes compare equal.
std::vector<Point> corners_of(Point centre, double width, double height, double turn) {
  std::vector<Point> corners;
  for (const Point unit :
       {Point{-0.5, -0.5}, Point{0.5, -0.5}, Point{0.5, 0.5}, Point{-0.5, 0.5}}) {
    const Point corner{unit.x * width, unit.y * height};
    corners.push_back(centre + (turn == 0.0 ? corner : turned(corner, turn)));
  }
  return corners;
}

std::vector<Curve> chain_of(const std::vector<Point>& corners) {
  std::vector<Curve> chain;
  for (std::size_t k = 0; k < corners.size(); ++k) {
    chain.emplace_back(Segment{corners[k], corners[(k + 1) % corners.size()]});
  }
  return chain;
}

std::vector<Curve> circle(Point centre, double radius, double sweep) {
  return {Arc{centre, radius, 0.0, sweep}};
}

double signed_area(const std::vector<Point>& corners) {
  double sum = 0.0;
  for (std::size_t k = 0; k < corners.size(); ++k) {
    // About the first corner: no cancellation for a small polygon far from the origin.
    sum += cross(corners[k] - corners[0], corners[(k + 1) % corners.size()] - corners[0]);
  }
  return 0.5 * sum;
}

std::vector<Point> counter_clockwise(std::vector<Point> corners) {
  if (signed_area(corners) < 0.0) std::reverse(corners.begin(), corners.end());
  return corners;
}

bool in_rectangle(Point local, double width, double height) {
  return std::abs(local.x) <= 0.5 * width && std::abs(local.y) <= 0.5 * height;
}

/// Coordinates of `point` in the axes of a shape at `centre` turned by `turn`.
Point local_of(Point point, Point centre, double turn) {
  const Point r = point - centre;
  return turn == 0.0 ? r : turned(r, -turn);
}

double narrowest(const std::vector<Point>& corners) {
  double least = HUGE_VAL;
  const std::size_t n = corners.size();
  for (std::size_t k = 0; k < n; ++k) {
    const Point a = corners[k];
    const Point b = corners[(k + 1) % n];
    const Point middle = between(a, b, 0.5);
    const Point inward = (1.0 / distance(a, b)) * quarter_turn(b - a);
    for (std::size_t m = 0; m < n; ++m) {
      if (m == k) continue;
      const Point e = corners[(m + 1) % n] - corners[m];
      const double area = cross(inward, e);
      if (area == 0.0) continue;
      const double t = cross(corners[m] - middle, e) / area;
      const double u = cross(corners[m] - middle, inward) / area;
      if (t > 0.0 && u >= 0.0 && u <= 1.0) least = std::min(least, t);
    }
  }
  return least;
}

}  // namespace

bool contains(const Shape& shape, Point point) {
  return std::visit(
      Overloaded{[&](const Rectangle& r) {
                   return in_rectangle(local_of(point, r.centre, r.turn), r.width, r.height);
                 },
                 [&](const Round& r) { return distance(point, r.centre) <= 0.5 * r.diameter; },
                 [&](const Tube& t) {
                   const double d = distance(point, t.centre);
                   return d <= 0.5 * t.outer_diameter && d >= 0.5 * t.outer_diameter - t.thickness;
                 },
                 [&](const Frame& f) {
                   const Point p = local_of(point, f.centre, f.turn);
                   return in_rectangle(p, f.width, f.height) &&
                          !in_rectangle(p, f.width - 2.0 * f.thickness,
                                        f.height - 2.0 * f.thickness);
                 },
                 [&](const Polygon& g) {
                   bool inside = false;
                   const std::size_t n = g.corners.size();
                   for (std::size_t k = 0, m = n - 1; k < n; m = k++) {
                     const Point a = g.corners[k];
                     const Point b = g.corners[m];
                     if ((a.y > point.y) != (b.y > point.y)) {
                       const double x = a.x + (b.x - a.x) * ((point.y - a.y) / (b.y - a.y));
                       if (point.x < x) inside = !inside;
                     }
                   }
                   return inside;
                 }},
      shape);
}

double area(const Shape& shape) {
  return std::visit(
      Overloaded{[](const Rectangle& r) { return r.width * r.height; },
                 [](const Round& r) { return 0.25 * pi * r.diameter * r.diameter; },
                 [](const Tube& t) { return pi * t.thickness * (t.outer_diameter - t.thickness); },
                 [](const Frame& f) {
                   return 2.0 * f.thickness * (f.width + f.height - 2.0 * f.thickness);
                 },
                 [](const Polygon& g) { return std::abs(signed_area(g.corners)); }},
      shape);
}

Point centroid(const Shape& shape) {
  if (const auto* g = std::get_if<Polygon>(&shape)) {
    const Point o = g->corners.front();
    Point sum;
    double twice = 0.0;
    for (std::size_t k = 0; k < g->corners.size(); ++k) {
      const Point a = g->corners[k] - o;
      const Point b = g->corners[(k + 1) % g->corners.size()] - o;
      const double c = cross(a, b);
      twice += c;
      sum += c * (a + b);
    }
    return o + (1.0 / (3.0 * twice)) * sum;
  }
  return std::visit(Overloaded{[](const Polygon&) { return Point{}; },
                               [](const auto& other) { return other.centre; }},
                    shape);
}

double thickness(const Shape& shape) {
  return std::visit(
      Overloaded{[](const Rectangle& r) { return std::min(r.width, r.height); },
                 [](const Round& r) { return r.diameter; },
                 [](const Tube& t) { return t.thickness; },
                 [](const Frame& f) { return f.thickness; },
                 [](const Polygon& g) { return narrowest(counter_clockwise(g.corners)); }},
      shape);
}

std::vector<std::vector<Curve>> boundary(const Shape& shape) {
  using Chains = std::vector<std::vector<Curve>>;
  return std::visit(
      Overloaded{
          [](const Rectangle& r) -> Chains {
            return {chain_of(corners_of(r.centre, r.width, r.height, r.turn))};
          },
          [](const Round& r) -> Chains { return {circle(r.centre, 0.5 * r.diameter, 2.0 * pi)}; },
          [](const Tube& t) -> Chains {
            return {circle(t.centre, 0.5 * t.outer_diameter, 2.0 * pi),
                    circle(t.centre, 0.5 * t.outer_diameter - t.thickness, -2.0 * pi)};
          },
          [](const Frame& f) -> Chains {
            auto hole = corners_of(f.centre, f.width - 2.0 * f.thickness,
                                   f.height - 2.0 * f.thickness, f.turn);
            std::reverse(hole.begin(), hole.end());
            return {chain_of(corners_of(f.centre, f.width, f.height, f.turn)), chain_of(hole)};
          },
          [](const Polygon& g) -> Chains { return {chain_of(counter_clockwise(g.corners))}; }},
      shape);
}

Box bounds(const Shape& shape) {
  const auto chains = boundary(shape);
  Box box;
  for (const Curve& curve : chains.front()) box.include(bounds(curve));
  return box;
}

Shape moved(const Shape& shape, Point shift) {
  return std::visit(Overloaded{[shift](Polygon g) -> Shape {
                                 for (Point& corner : g.corners) corner += shift;
                                 return g;
                               },
                               [shift](auto other) -> Shape {
                                 other.centre += shift;
                                 return other;
                               }},
                    shape);
}

}  // namespace barwall::mesh
