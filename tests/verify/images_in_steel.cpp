#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <functional>
#include <numbers>

#include "solver/constants.hpp"
#include "verify/half_space.hpp"
#include "verify/steel_rod.hpp"
#include "verify/uniform_field.hpp"

using barwall::mesh::Point;
using barwall::mesh::turned;
using namespace barwall::verify;

namespace {

const HalfSpace slanting{{0.02, -0.01}, turned({0.0, 1.0}, 0.3), 50.0};
const std::array in_air{RoundBar{{0.0, 0.05}, 700.0, 0.01}, RoundBar{{0.06, 0.09}, -300.0}};

const SteelRod rod{0.03, 80.0};
const std::array round_rod{RoundBar{{0.05, 0.01}, 700.0, 0.015}, RoundBar{{0.01, -0.012}, 400.0},
                           RoundBar{{0.0, 0.0}, 150.0}, RoundBar{{-0.02, 0.06}, -300.0}};

const Shell shell{0.03, 0.035, 120.0};
const Point applied{0.3, -0.4};

using Field = std::function<Point(Point)>;
using Potential = std::function<double(Point)>;

void check_curl(const Field& field, const Potential& potential, double clear_of,
                const std::function<double(Point)>& level) {
  const double h = 1e-6;
  for (double x = -0.0913; x < 0.1; x += 0.0137) {
    for (double y = -0.0907; y < 0.1; y += 0.0129) {
      const Point at{x, y};
      if (std::abs(level(at)) < clear_of) continue;
      const auto a = [&](double dx, double dy) { return potential(at + Point{dx, dy}); };
      const Point curl{(a(0, h) - a(0, -h)) / (2 * h), -(a(h, 0) - a(-h, 0)) / (2 * h)};
      CAPTURE(x, y);
      CHECK(distance(curl, field(at)) < 1e-5 * norm(field(at)));
    }
  }
}

void check_interface(const Field& field, const Potential& potential, Point at, Point out,
                     double mu_behind, double mu_before) {
  const Point behind = field(at - 1e-11 * out);
  const Point before = field(at + 1e-11 * out);
  const double scale = norm(behind) + norm(before);
  CAPTURE(at.x, at.y);
  CHECK(std::abs(dot(out, behind - before)) < 1e-7 * scale);
  CHECK(std::abs(cross(out, behind) / mu_behind - cross(out, before) / mu_before) < 1e-8 * scale);
  CHECK(potential(at - 1e-11 * out) - potential(at + 1e-11 * out) ==
        Approx(0.0).margin(1e-10 * scale));
}

}  // namespace

TEST_CASE("B is the curl of A on both sides of a steel surface, images and all") {
  const auto field = [](Point p) { return field_of(slanting, in_air, p); };
  const auto potential = [](Point p) { return potential_of(slanting, in_air, p); };
  check_curl(field, potential, 1e-5,
             [](Point p) { return dot(slanting.into_air, p - slanting.on_surface); });
  for (double s = -0.2; s < 0.2; s += 0.03) {
    const Point at = slanting.on_surface + s * quarter_turn(slanting.into_air);
    check_interface(field, potential, at, slanting.into_air, slanting.relative_permeability, 1.0);
  }
}

TEST_CASE("B is the curl of A inside and outside a steel rod with currents in and about it") {
  const auto field = [](Point p) { return field_of(rod, round_rod, p); };
  const auto potential = [](Point p) { return potential_of(rod, round_rod, p); };
  check_curl(field, potential, 1e-5, [](Point p) { return norm(p) - rod.radius; });
  for (int k = 0; k < 20; ++k) {
    const Point out = turned({1.0, 0.0}, 0.1 + 0.31 * k);
    check_interface(field, potential, rod.radius * out, out, rod.relative_permeability, 1.0);
  }
  CHECK(potential({1e5, 0.0}) == Approx(-2e-7 * 950.0 * std::log(1e5)).epsilon(1e-6));
}

TEST_CASE("B is the curl of A in, within and about a shell in a uniform field") {
  const auto field = [](Point p) { return field_in(shell, applied, p); };
  const auto potential = [](Point p) { return potential_in(shell, applied, p); };
  check_curl(field, potential, 1e-5, [](Point p) {
    return std::fmin(std::abs(norm(p) - shell.inner_radius),
                     std::abs(norm(p) - shell.outer_radius));
  });
  for (int k = 0; k < 20; ++k) {
    const Point out = turned({1.0, 0.0}, 0.1 + 0.31 * k);
    check_interface(field, potential, shell.inner_radius * out, out, 1.0,
                    shell.relative_permeability);
    check_interface(field, potential, shell.outer_radius * out, out, shell.relative_permeability,
                    1.0);
  }
  CHECK(distance(field({40.0, 30.0}), applied) < 1e-6 * norm(applied));
  CHECK(norm(field({0.01, 0.02})) == Approx(0.5 / shielding_factor(shell)).epsilon(1e-13));
}

TEST_CASE("Maxwell's stress round the bars by a rod equals the forces on them") {
  const std::array bars{RoundBar{{0.05, 0.01}, 700.0, 0.01}, RoundBar{{0.07, 0.0}, -300.0}};
  Point stress;
  const int count = 600;
  const double radius = 0.028;
  for (int k = 0; k < count; ++k) {
    const Point out = turned({1.0, 0.0}, 2.0 * std::numbers::pi * k / count);
    const Point b = field_of(rod, bars, Point{0.0595, 0.005} + radius * out);
    stress += (2.0 * std::numbers::pi * radius / count / barwall::solver::mu_0) *
              (dot(b, out) * b - 0.5 * dot(b, b) * out);
  }
  const Point sum = force_on_bar(rod, bars, 0) + force_on_bar(rod, bars, 1);
  CHECK(distance(sum, stress) < 1e-9 * norm(sum));
}

TEST_CASE("bars that touch the steel are refused") {
  const std::array sunk{RoundBar{{0.0, 0.005}, 1.0, 0.01}};
  CHECK_THROWS_AS(field_of(HalfSpace{}, sunk, {0.0, 1.0}), std::invalid_argument);
  CHECK_THROWS_AS(force_on_bar(HalfSpace{}, sunk, 0), std::invalid_argument);
  CHECK_THROWS_AS(field_of(SteelRod{0.01, 5.0}, sunk, {0.0, 1.0}), std::invalid_argument);
  CHECK_THROWS_AS(shielding_factor(Shell{0.1, 0.1, 5.0}), std::invalid_argument);
}
