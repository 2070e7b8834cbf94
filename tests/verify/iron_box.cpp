#include "verify/iron_box.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>

#include "solver/constants.hpp"
#include "verify/filled_bar.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;
using barwall::solver::mu_0;

namespace {

const IronBox box{0.2, 0.1};
const std::array bars{BoxBar{{0.05, 0.06}, 0.02, 0.05, 1000.0},
                      BoxBar{{0.16, 0.03}, 0.03, 0.04, -700.0},
                      BoxBar{{0.05, 0.02}, 0.04, 0.02, -300.0}};

/// The bars in the empty space made of the box's mirror images, out to `shells` boxes each way.
/// The images carry the same currents; the sum lacks a share that falls as their square.
Point by_images(Point at, int shells) {
  Point sum;
  for (int i = -shells; i <= shells; ++i) {
    for (int j = -shells; j <= shells; ++j) {
      for (const BoxBar& bar : bars) {
        for (const double sx : {1.0, -1.0}) {
          for (const double sy : {1.0, -1.0}) {
            const Point centre{2.0 * i * box.width + sx * bar.centre.x,
                               2.0 * j * box.height + sy * bar.centre.y};
            sum += field_of(Rectangle{centre, bar.width, bar.height, 0.0}, bar.current, at);
          }
        }
      }
    }
  }
  return sum;
}

}  // namespace

TEST_CASE("the field in an iron box is that of the bars' mirror images") {
  const double scale = norm(field_of(box, bars, {0.1, 0.05}));
  for (const Point at : {Point{0.1, 0.05}, Point{0.05, 0.05}, Point{0.155, 0.02}, Point{0.01, 0.08},
                         Point{0.12, 0.001}}) {
    const Point series = field_of(box, bars, at);
    CAPTURE(at.x, at.y);
    CHECK(distance(series, by_images(at, 20)) < 2e-4 * scale);
    CHECK(distance(series, by_images(at, 40)) < 5e-5 * scale);
  }
}

TEST_CASE("field lines leave the walls of an iron box at right angles") {
  for (const double s : {0.1, 0.35, 0.8}) {
    const double scale = norm(field_of(box, bars, {0.1, 0.05}));
    CHECK(std::abs(field_of(box, bars, {s * box.width, 0.0}).x) < 1e-12 * scale);
    CHECK(std::abs(field_of(box, bars, {s * box.width, box.height}).x) < 1e-7 * scale);
    CHECK(std::abs(field_of(box, bars, {0.0, s * box.height}).y) < 1e-12 * scale);
    CHECK(std::abs(field_of(box, bars, {box.width, s * box.height}).y) < 1e-12 * scale);
  }
}

TEST_CASE("the force in an iron box is the slope of the field's energy at constant currents") {
  const double h = 1e-5;
  auto moved = bars;
  const auto energy = [&](double dx, double dy) {
    moved[1].centre = bars[1].centre + Point{dx, dy};
    return energy_of(box, moved);
  };
  const Point force = force_on_bar(box, bars, 1);
  CHECK((energy(h, 0) - energy(-h, 0)) / (2 * h) == Approx(force.x).epsilon(1e-6));
  CHECK((energy(0, h) - energy(0, -h)) / (2 * h) == Approx(force.y).epsilon(1e-6));
}

TEST_CASE("an iron box with a net current has no solution and is refused") {
  CHECK_THROWS_AS(field_of(box, std::span(bars).first(2), {0.1, 0.05}), std::invalid_argument);
  const std::array outside{BoxBar{{0.0, 0.05}, 0.02, 0.02, 0.0}};
  CHECK_THROWS_AS(energy_of(box, outside), std::invalid_argument);
}
