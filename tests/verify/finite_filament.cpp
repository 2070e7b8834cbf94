#include "verify/finite_filament.hpp"

#include <catch2/catch.hpp>
#include <cmath>

#include "verify/filament.hpp"
#include "verify/gauss_legendre.hpp"

using namespace barwall::verify;

namespace {

/// mu_0 I / 4 pi times the integral of dl x r / r^3, by brute force.
Point3 by_quadrature(Point3 from, Point3 to, double current, Point3 at) {
  const QuadratureRule rule = gauss_legendre(80);
  Point3 sum;
  for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
    const Point3 foot = from + 0.5 * (1.0 + rule.nodes[i]) * (to - from);
    const Point3 r = at - foot;
    sum += (1e-7 * current * 0.5 * rule.weights[i] / std::pow(norm(r), 3)) * cross(to - from, r);
  }
  return sum;
}

}  // namespace

TEST_CASE("a finite wire has the field of the law of Biot and Savart in every direction") {
  const Point3 from{0.1, -0.2, 0.3};
  const Point3 to{0.4, 0.5, -0.6};
  for (const Point3 at : {Point3{1.0, 0.0, 0.0}, Point3{-0.5, -1.0, 1.5}, Point3{0.3, 0.3, 0.9},
                          Point3{2.0, 3.0, -4.0}}) {
    const Point3 exact = by_quadrature(from, to, 700.0, at);
    CHECK(norm(field_of_finite_filament(from, to, 700.0, at) - exact) < 1e-11 * norm(exact));
  }
}

TEST_CASE("a finite wire is exact close to it, however long it is") {
  for (const double length : {1.0, 1e3, 1e6}) {
    for (const double rho : {1e-6, 1e-3, 0.1}) {
      const Point3 b = field_of_finite_filament({0, 0, -0.5 * length}, {0, 0, 0.5 * length}, 1000.0,
                                                {rho, 0, 0});
      const double endless = field_of_filament({{}, 1000.0}, {rho, 0.0}).y;
      CHECK(b.y == Approx(endless * (1.0 - mid_span_deficit(length, rho))).epsilon(1e-13));
    }
  }
}

TEST_CASE("beyond its end and on its axis a finite wire's field falls to zero without noise") {
  const Point3 from{0, 0, 0};
  const Point3 to{0, 0, 1};
  CHECK(field_of_finite_filament(from, to, 1.0, {0, 0, 3}) == Point3{});
  // Close to the axis B = (mu_0 I rho / 8 pi)(1/(z - 1)^2 - 1/z^2).
  for (const double rho : {1e-9, 1e-6, 1e-4}) {
    const double b = field_of_finite_filament(from, to, 1.0, {rho, 0, 3}).y;
    CHECK(b == Approx(0.5e-7 * rho * (0.25 - 1.0 / 9.0)).epsilon(1e-7));
  }
  CHECK(field_of_finite_filament(from, from, 1.0, {1, 0, 0}) == Point3{});
}

TEST_CASE("two wires of one length lose of their force what Biot and Savart's law says") {
  const QuadratureRule rule = gauss_legendre(80);
  for (const double d : {0.05, 0.3, 2.0}) {
    double force = 0.0;  // on 1 m of wire with 1 A, from a wire of 1 m beside it
    for (std::size_t k = 0; k < rule.nodes.size(); ++k) {
      const Point3 b =
          field_of_finite_filament({0, 0, 0}, {0, 0, 1}, 1.0, {d, 0, 0.5 * (1.0 + rule.nodes[k])});
      force += 0.5 * rule.weights[k] * b.y;
    }
    CHECK(1.0 - force / field_of_filament({{}, 1.0}, {d, 0.0}).y ==
          Approx(force_deficit(1.0, d)).epsilon(1e-4));
  }
  CHECK(force_deficit(1.0, 1e-12) == Approx(1e-12).epsilon(1e-10));
}
