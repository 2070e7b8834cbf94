#include "verify/current_sheet.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <complex>
#include <numbers>

#include "solver/constants.hpp"
#include "verify/finite_filament.hpp"
#include "verify/gauss_legendre.hpp"

using barwall::mesh::Point;
using barwall::mesh::turned;
using barwall::solver::mu_0;
using namespace barwall::verify;

namespace {

const CurrentSheet sheet{{0.02, -0.01}, {0.05, 0.03}, 2e4};
const Point middle = between(sheet.from, sheet.to, 0.5);
const double width = distance(sheet.from, sheet.to);
const Point along = (1.0 / width) * (sheet.to - sheet.from);

/// The multipole series in long double: b = (mu_0 I / 2 pi w) sum of v^n / (2 n + 1).
Point series(Point at) {
  using Complex = std::complex<long double>;
  const Complex h = 0.5L * Complex(sheet.to.x - sheet.from.x, sheet.to.y - sheet.from.y);
  const Complex w = Complex(at.x, at.y) - Complex(middle.x, middle.y);
  const Complex v = h * h / (w * w);
  Complex sum = 0.0L;
  for (int n = 60; n >= 0; --n) sum = sum * v + 1.0L / (2.0L * n + 1.0L);
  const Complex b = 2e-7L * static_cast<long double>(sheet.density) * 2.0L * std::abs(h) * sum / w;
  return {static_cast<double>(b.imag()), static_cast<double>(b.real())};
}

}  // namespace

TEST_CASE("a sheet keeps twelve digits of its field out to a thousand widths") {
  for (double ratio = 1.2; ratio < 2e3; ratio *= 1.3) {
    for (int k = 0; k < 16; ++k) {
      const Point at = middle + ratio * width * turned(along, 0.39269908 * k);
      CAPTURE(ratio, k);
      CHECK(distance(field_of_sheet(sheet, at), series(at)) < 1e-12 * norm(series(at)));
    }
  }
}

TEST_CASE("in a sheet's own plane beyond its ends the field is perpendicular to the sheet") {
  for (const double beyond : {1e-6, 1e-3, 0.1, 10.0}) {
    const CurrentSheet level{{-0.05, 0.0}, {0.05, 0.0}, 1e4};
    const Point right = field_of_sheet(level, {0.05 + beyond, 0.0});
    const Point left = field_of_sheet(level, {-0.05 - beyond, 0.0});
    CHECK(right.x == 0.0);
    CHECK(right.y == Approx(2e-3 * std::log1p(0.1 / beyond)).epsilon(1e-9));
    CHECK(left.y == Approx(-right.y).epsilon(1e-9));
  }
}

TEST_CASE("across a sheet the tangential field jumps by mu_0 K and on it has the mean value") {
  const Point across = quarter_turn(along);
  const Point at = between(sheet.from, sheet.to, 0.3);
  const Point above = field_of_sheet(sheet, at + 1e-9 * across);
  const Point below = field_of_sheet(sheet, at - 1e-9 * across);
  CHECK(dot(below - above, along) == Approx(mu_0 * sheet.density).epsilon(1e-6));
  CHECK(dot(below - above, across) == Approx(0.0).margin(1e-9));
  const CurrentSheet level{{-0.05, 0.0}, {0.05, 0.0}, 1e4};
  CHECK(field_of_sheet(level, {0.02, 0.0}).x == 0.0);
}

TEST_CASE("the field of a sheet is the curl of its potential") {
  const double h = 1e-5;
  for (const Point at : {Point{0.0, 0.0}, Point{0.04, 0.01}, Point{0.03, 0.02}, Point{0.3, 0.4}}) {
    const auto a = [&](double x, double y) { return potential_of_sheet(sheet, at + Point{x, y}); };
    const Point curl{(a(0, h) - a(0, -h)) / (2 * h), -(a(h, 0) - a(-h, 0)) / (2 * h)};
    CHECK(distance(curl, field_of_sheet(sheet, at)) < 1e-5 * norm(curl));
  }
}

TEST_CASE("a very long sheet of finite length has the field of the endless one") {
  for (const Point at : {Point{0.0, 0.0}, Point{0.031, 0.012}, Point{0.3, 0.1}}) {
    const Point endless = field_of_sheet(sheet, at);
    const Point finite = field_of_finite_sheet(sheet, -1e4, 1e4, {at.x, at.y, 3.0});
    CHECK(distance(finite, endless) < 1e-8 * norm(endless));
  }
}

TEST_CASE("the closed form of a finite sheet equals its filaments added up, beyond its ends too") {
  const QuadratureRule rule = gauss_legendre(60);
  const double edge = 4.0 * width;  // where the near form takes over
  for (const Point3 at : {Point3{0.0, 0.02, 0.1}, Point3{0.1, 0.0, 0.0}, Point3{0.06, 0.04, 1.7},
                          Point3{middle.x + 0.999 * edge, middle.y, 0.2},
                          Point3{middle.x + 1.001 * edge, middle.y, 0.2}, Point3{2.0, 1.0, -3.0}}) {
    Point sum;
    for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
      const Point foot = between(sheet.from, sheet.to, 0.5 * (1.0 + rule.nodes[i]));
      const Point3 b = field_of_finite_filament({foot.x, foot.y, -0.5}, {foot.x, foot.y, 1.0},
                                                0.5 * rule.weights[i] * width * sheet.density, at);
      sum += {b.x, b.y};
    }
    CAPTURE(at.x, at.y, at.z);
    CHECK(distance(field_of_finite_sheet(sheet, -0.5, 1.0, at), sum) < 1e-10 * norm(sum));
  }
}

TEST_CASE("a sheet of no width carries nothing") {
  const CurrentSheet none{{1.0, 2.0}, {1.0, 2.0}, 5.0};
  CHECK(field_of_sheet(none, {1.0, 2.0}) == Point{});
  CHECK(potential_of_sheet(none, {0.0, 0.0}) == 0.0);
  CHECK(field_of_finite_sheet(none, 0.0, 1.0, {0.0, 0.0, 0.0}) == Point{});
}
