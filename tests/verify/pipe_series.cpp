#include "verify/pipe_series.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"

using barwall::mesh::Point;
using namespace barwall::verify;

namespace {

// Numbers for a = 0.1 m, b = 0.105 m: recomputed outside this code from the series, and checked by
// residuals at the walls.
const Pipe soft{0.1, 0.105, 100.0};
const Pipe softer{0.1, 0.105, 1000.0};
const std::array single{RoundBar{{0.05, 0.0}, 1000.0}};
const std::array pair{RoundBar{{0.03, 0.0}, 1000.0}, RoundBar{{-0.03, 0.0}, -1000.0}};
const std::array three{RoundBar{{0.05, 0.01}, 700.0, 0.012}, RoundBar{{-0.04, 0.03}, -300.0, 0.02},
                       RoundBar{{0.01, -0.06}, 250.0, 0.015}};

Approx near(double value) {
  return Approx(value).epsilon(1e-9).margin(0.0);
}

Point curl(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  const double h = 2e-5;
  const auto a = [&](double x, double y) { return potential_of(pipe, bars, at + Point{x, y}); };
  return {(a(0, h) - a(0, -h)) / (2 * h), -(a(h, 0) - a(-h, 0)) / (2 * h)};
}

}  // namespace

TEST_CASE("the pipe passes and returns the multipoles that matching at both walls gives") {
  const double passed[2][5] = {{.3050631138, .1871176037, .1385356759, .1121297032, .0956014673},
                               {.0413288577, .0221063961, .0155474276, .0122505992, .0102744575}};
  const double returned[2][3] = {{.7089760152, .8293042629, .8788676437},
                                 {.9605904038, .9798513489, .9864234484}};
  const Pipe pipes[2] = {soft, softer};
  for (int i = 0; i < 2; ++i) {
    for (int n = 1; n <= 5; ++n) {
      CHECK(transmitted_share(pipes[i], n) == Approx(passed[i][n - 1]).margin(6e-11));
    }
    for (int n = 1; n <= 3; ++n) {
      CHECK(reflected_share(pipes[i], n) == Approx(returned[i][n - 1]).margin(6e-11));
    }
  }
}

TEST_CASE("a single current in a pipe is not screened outside it") {
  const auto check = [](const Pipe& pipe, double front, double side, double side_radial,
                        double back) {
    CHECK(field_of(pipe, single, {0.3, 0.0}).y == near(front));
    CHECK(-field_of(pipe, single, {0.0, 0.3}).x == near(side));
    CHECK(field_of(pipe, single, {0.0, 0.3}).y == Approx(side_radial).epsilon(2e-7));
    CHECK(-field_of(pipe, single, {-0.3, 0.0}).y == near(back));
  };
  check(soft, 7.045225837e-4, 6.632580279e-4, -3.347634e-5, 6.358588579e-4);
  check(softer, 6.717234588e-4, 6.662634655e-4, -4.544972e-6, 6.624414955e-4);
}

TEST_CASE("a current in a pipe is drawn towards the nearer wall") {
  CHECK(force_on_bar(soft, single, 0).x == near(0.990208429));
  CHECK(force_on_bar(softer, single, 0).x == near(1.287836414));
  const Pipe endless{0.1, 0.105, 1e12};
  CHECK(force_on_bar(endless, single, 0).x == Approx(4.0 / 3.0).epsilon(1e-8));
  CHECK(force_on_bar(soft, single, 0).y == Approx(0.0).margin(1e-15));
}

TEST_CASE("go and return in a pipe have the field, force and inductance of the series") {
  struct Row {
    Pipe pipe;
    double front, side, centre, above, wall_front, wall_side, added, pull;
  };
  const Row rows[] = {{soft, 4.086108101e-5, 4.049163222e-5, 1.418410457e-2, 4.357001482e-3,
                       3.537391316e-2, 1.064626881e-3, 5.121800187e-8, 0.859387061},
                      {softer, 5.531382340e-6, 5.489920391e-6, 1.448604181e-2, 4.656075991e-3,
                       4.759657975e-2, 1.061364486e-3, 6.935521221e-8, 1.162375239}};
  for (const Row& row : rows) {
    CAPTURE(row.pipe.relative_permeability);
    CHECK(norm(field_of(row.pipe, pair, {0.3, 0.0})) == near(row.front));
    CHECK(norm(field_of(row.pipe, pair, {0.0, 0.3})) == near(row.side));
    CHECK(norm(field_of(row.pipe, pair, {0.0, 0.0})) == Approx(row.centre).epsilon(2e-9));
    CHECK(norm(field_of(row.pipe, pair, {0.0, 0.05})) == near(row.above));
    CHECK(norm(field_of(row.pipe, pair, {0.1025, 0.0})) == near(row.wall_front));
    CHECK(norm(field_of(row.pipe, pair, {0.0, 0.1025})) == near(row.wall_side));
    CHECK(added_loop_inductance(row.pipe, 0.03) == near(row.added));
    CHECK(force_on_bar(row.pipe, pair, 0).x == Approx(10.0 / 3.0 + row.pull).epsilon(1e-9));
    CHECK(force_on_bar(row.pipe, pair, 1).x == Approx(-10.0 / 3.0 - row.pull).epsilon(1e-9));
  }
}

TEST_CASE("B is the curl of A in the bars, the bore, the wall and outside a pipe") {
  for (const double radius : {0.01, 0.04, 0.055, 0.09, 0.1022, 0.1044, 0.107, 0.2, 1.0}) {
    for (int k = 0; k < 9; ++k) {
      const Point at = barwall::mesh::turned({radius, 0.0}, 0.3 + 0.7 * k);
      const Point b = field_of(soft, three, at);
      CAPTURE(radius, k);
      CHECK(distance(curl(soft, three, at), b) < 2e-5 * norm(b));
    }
  }
}

TEST_CASE("A, normal B and tangential H are continuous at both walls of a pipe") {
  for (const double radius : {soft.inner_radius, soft.outer_radius}) {
    for (int k = 0; k < 12; ++k) {
      const Point out = barwall::mesh::turned({1.0, 0.0}, 0.1 + 0.5 * k);
      const Point low = (radius * (1.0 - 1e-13)) * out;
      const Point high = (radius * (1.0 + 1e-13)) * out;
      const Point b_low = field_of(soft, three, low);
      const Point b_high = field_of(soft, three, high);
      const double mu_low = radius == soft.inner_radius ? 1.0 : soft.relative_permeability;
      const double mu_high = radius == soft.inner_radius ? soft.relative_permeability : 1.0;
      const double scale = norm(b_low) + norm(b_high);
      CHECK(std::abs(dot(out, b_low - b_high)) < 1e-10 * scale);
      CHECK(std::abs(cross(out, b_low) / mu_low - cross(out, b_high) / mu_high) < 1e-10 * scale);
      CHECK(potential_of(soft, three, low) ==
            Approx(potential_of(soft, three, high)).epsilon(1e-10));
    }
  }
}

TEST_CASE("far outside a pipe A is the logarithm of the net current") {
  const double expected = -2e-7 * 650.0 * std::log(1e4);
  CHECK(potential_of(soft, three, {1e4, 0.0}) == Approx(expected).epsilon(1e-6));
}

TEST_CASE("without magnetisation a pipe changes nothing") {
  const Pipe copper{0.1, 0.105, 1.0};
  for (const Point at : {Point{0.02, 0.03}, Point{0.1, 0.02}, Point{0.3, -0.2}}) {
    CHECK(distance(field_of(copper, three, at), field_of_bars(three, at)) <
          1e-13 * norm(field_of_bars(three, at)));
    CHECK(potential_of(copper, three, at) == Approx(potential_of_bars(three, at)).epsilon(1e-12));
  }
}

TEST_CASE("Maxwell's stress round the bars in a pipe equals the sum of their forces") {
  const std::array bars{RoundBar{{0.05, 0.01}, 700.0}, RoundBar{{-0.04, 0.03}, -300.0}};
  Point stress;
  const int count = 400;
  const double radius = 0.075;
  for (int k = 0; k < count; ++k) {
    const Point out = barwall::mesh::turned({1.0, 0.0}, 2.0 * std::numbers::pi * k / count);
    const Point b = field_of(soft, bars, radius * out);
    stress += (2.0 * std::numbers::pi * radius / count / barwall::solver::mu_0) *
              (dot(b, out) * b - 0.5 * dot(b, b) * out);
  }
  const Point sum = force_on_bar(soft, bars, 0) + force_on_bar(soft, bars, 1);
  CHECK(distance(sum, stress) < 1e-9 * norm(sum));
}

TEST_CASE("a bar that reaches into the wall of a pipe is refused") {
  const std::array bars{RoundBar{{0.09, 0.0}, 1.0, 0.011}};
  CHECK_THROWS_AS(field_of(soft, bars, {}), std::invalid_argument);
  CHECK_THROWS_AS(field_of(Pipe{0.1, 0.1, 10.0}, single, {}), std::invalid_argument);
}
