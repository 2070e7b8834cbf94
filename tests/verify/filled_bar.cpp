#include "verify/filled_bar.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <vector>

#include "solver/constants.hpp"
#include "verify/filled_polygon.hpp"
#include "verify/round_conductor.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;
using barwall::solver::mu_0;

namespace {

const double turn = 0.4;

/// An L: not star-shaped seen from its centroid, and given clockwise.
const Polygon angle_bar{
    {{0.0, 0.0}, {0.0, 0.1}, {0.01, 0.1}, {0.01, 0.012}, {0.08, 0.012}, {0.08, 0.0}}};

const std::vector<Shape> shapes{Rectangle{{0.01, 0.02}, 0.01, 0.1, turn}, Round{{0.01, 0.02}, 0.04},
                                Tube{{0.01, 0.02}, 0.06, 0.005},
                                Frame{{0.01, 0.02}, 0.08, 0.06, 0.004, turn}, angle_bar};

const double size = 0.06;  // half-sizes of the shapes are about this [m]

Point curl(const Shape& shape, Point at, double h) {
  const auto a = [&](double x, double y) { return potential_of(shape, 1000.0, at + Point{x, y}); };
  return {(a(0, h) - a(0, -h)) / (2 * h), -(a(h, 0) - a(-h, 0)) / (2 * h)};
}

}  // namespace

TEST_CASE("outside a bar of any shape the closed form equals a sum of filaments") {
  for (const Shape& shape : shapes) {
    const auto filaments = filaments_of(shape, 1000.0, 24);
    double total = 0.0;
    for (const Filament& filament : filaments) total += filament.current;
    CHECK(total == Approx(1000.0).epsilon(1e-13));
    for (int k = 0; k < 12; ++k) {
      const Point at = Point{0.015, 0.03} + turned({0.15, 0.0}, 0.1 + 0.5 * k);
      const Point exact = field_of(shape, 1000.0, at);
      CAPTURE(shape.index(), k);
      CHECK(distance(field_of_filaments(filaments, at), exact) < 1e-10 * norm(exact));
      CHECK(potential_of_filaments(filaments, at) ==
            Approx(potential_of(shape, 1000.0, at)).epsilon(1e-11));
    }
  }
}

TEST_CASE("B is the curl of A inside and outside bars of every shape") {
  const double h = 1e-5;
  for (const Shape& shape : shapes) {
    const double scale = norm(field_of(shape, 1000.0, {0.08, 0.08}));
    for (double x = -0.0613; x < 0.1; x += 0.0071) {
      for (double y = -0.0527; y < 0.1; y += 0.0083) {
        // Kinks of B at the outline cost one order of h.
        CHECK(distance(curl(shape, {x, y}, h), field_of(shape, 1000.0, {x, y})) < 1e-3 * scale);
      }
    }
  }
}

TEST_CASE("the circulation of B round a bar is mu_0 times its current") {
  for (const Shape& shape : shapes) {
    const int count = 2000;
    double circulation = 0.0;
    for (int k = 0; k < count; ++k) {
      const double angle = 2.0 * std::numbers::pi * k / count;
      const Point out = turned({1.0, 0.0}, angle);
      const Point at = Point{0.02, 0.03} + 0.12 * out;
      circulation += 0.12 * 2.0 * std::numbers::pi / count *
                     dot(field_of(shape, -700.0, at), quarter_turn(out));
    }
    CHECK(circulation == Approx(-mu_0 * 700.0).epsilon(1e-12));
  }
}

TEST_CASE("on edges and corners of a bar the field is the limit from beside them") {
  const Rectangle bar{{0.0, 0.0}, 0.01, 0.1, 0.0};
  for (const Point at : {Point{0.005, 0.0}, Point{0.005, 0.05}, Point{0.0, 0.05},
                         Point{0.005, 0.03}, Point{-0.005, -0.05}}) {
    const Point on = field_of(bar, 1000.0, at);
    for (const Point step : {Point{1e-9, 0.0}, Point{-1e-9, 0.0}, Point{0.0, 1e-9}}) {
      CHECK(distance(field_of(bar, 1000.0, at + step), on) < 1e-6 * norm(on));
      CHECK(potential_of(bar, 1000.0, at + step) ==
            Approx(potential_of(bar, 1000.0, at)).epsilon(1e-7));
    }
  }
}

TEST_CASE("the edge sum and the far series of a polygon meet without a step") {
  for (const Shape& shape : shapes) {
    const auto filaments = filaments_of(shape, 1000.0, 16);
    for (double ratio = 2.5; ratio < 2e3; ratio *= 1.11) {
      const Point at = Point{0.012, 0.021} + turned({ratio * size, 0.0}, ratio);
      const Point sum = field_of_filaments(filaments, at);
      CAPTURE(shape.index(), ratio);
      CHECK(distance(field_of(shape, 1000.0, at), sum) < 1e-11 * norm(sum));
      CHECK(std::abs(potential_of(shape, 1000.0, at) - potential_of_filaments(filaments, at)) <
            1e-11 * 2e-4);
    }
  }
}

TEST_CASE("far from the origin a bar keeps its field") {
  const Point shift{300.0, -200.0};
  const Rectangle here{{0.0, 0.0}, 0.01, 0.1, turn};
  const Rectangle there{shift, 0.01, 0.1, turn};
  for (const Point at : {Point{0.001, 0.01}, Point{0.03, 0.0}, Point{0.2, 0.1}}) {
    const Point b = field_of(here, 1000.0, at);
    CHECK(distance(field_of(there, 1000.0, shift + at), b) < 1e-9 * norm(b));
  }
}

TEST_CASE("a thin bar has the field of a strip and a round one that of its inscribed polygon") {
  const Rectangle foil{{0.0, 0.0}, 1e-6, 0.1, 0.0};
  const Point at{0.03, 0.01};
  const double up = std::atan2(0.04, 0.03) + std::atan2(0.06, 0.03);
  CHECK(field_of(foil, 1000.0, at).y == Approx(2e-7 * 1e4 * up).epsilon(1e-8));

  std::vector<Point> corners;
  for (int k = 0; k < 3000; ++k) {
    corners.push_back(turned({0.02, 0.0}, 2.0 * std::numbers::pi * k / 3000));
  }
  for (const Point p : {Point{0.005, 0.003}, Point{0.0, 0.05}}) {
    const Point polygon = field_of(Polygon{corners}, 1000.0, p);
    CHECK(distance(polygon, field_of_disc({}, 0.02, 1000.0, p)) < 2e-6 * norm(polygon));
  }
}

TEST_CASE("a polygon without area is refused") {
  const std::vector<Point> line{{0.0, 0.0}, {1.0, 0.0}, {2.0, 0.0}};
  CHECK_THROWS_AS(field_of_polygon(line, 1.0, {0.0, 1.0}), std::invalid_argument);
  CHECK_THROWS_AS(signed_area(std::span(line).first(2)), std::invalid_argument);
}
