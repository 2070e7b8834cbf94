// Values from the literature and closed forms in air. Values with no book named were computed for
// these tests outside the code by the closed form and a second way (quadrature).
#include <array>
#include <catch2/catch.hpp>
#include <cmath>

#include "verify/bar_force.hpp"
#include "verify/current_sheet.hpp"
#include "verify/filament.hpp"
#include "verify/filled_bar.hpp"
#include "verify/finite_filament.hpp"
#include "verify/finite_run.hpp"
#include "verify/round_conductor.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;

namespace {

Approx near(double value) {
  return Approx(value).epsilon(1e-9).margin(1e-17);
}
Approx printed(double value, double half_last_digit) {
  return Approx(value).epsilon(0.0).margin(half_last_digit);
}

}  // namespace

TEST_CASE("a long wire has the field of the textbooks") {
  CHECK(field_of_filament({{}, 1000.0}, {0.1, 0.0}).y == near(2e-3));
  CHECK(field_of_filament({{}, 1000.0}, {0.0, 0.1}).x == near(-2e-3));
  CHECK(potential_of_filament({{}, 1000.0}, {0.0, 1.0}) == 0.0);
}

TEST_CASE("parallel wires attract as in worked examples") {
  // Kulshreshtha, Basic Electrical Engineering, example 5.3.
  CHECK(force_between_filaments(80.0, 30.0, 2.0) == printed(2.4e-4, 5e-8));
  // Robertson, Fundamental Electrical and Electronic Principles, examples 5.11 and 5.12.
  CHECK(force_between_filaments(50.0, 40.0, 0.035) == printed(11.4e-3, 5e-5));
  CHECK(force_between_filaments(1000.0, 300.0, 2.0) == printed(30e-3, 5e-4));
}

TEST_CASE("a wire and a strip in one plane attract as in Irodov's problem 3.258") {
  CHECK(force_between_filament_and_strip(1000.0, 1000.0, 0.01, 0.05) ==
        near(7.167038).epsilon(1e-7));
  // And the strip's field at the wire gives the same.
  const CurrentSheet strip{{0.01, 0.0}, {0.06, 0.0}, 1000.0 / 0.05};
  CHECK(-1000.0 * field_of_sheet(strip, {}).y == near(7.167038).epsilon(1e-7));
}

TEST_CASE("a finite wire falls short of a long one at mid-span by the closed form") {
  const double deficits[][2] = {
      {5, 7.152e-2}, {10, 1.942e-2}, {20, 4.963e-3}, {50, 7.990e-4}, {100, 1.999e-4}};
  for (const auto& [ratio, deficit] : deficits) {
    CHECK(mid_span_deficit(ratio, 1.0) == near(deficit).epsilon(3e-4));
  }
  const double fields[][2] = {
      {1, 1.961161351e-3}, {2, 1.990074380e-3}, {3, 1.995570316e-3}, {10, 1.999600120e-3}};
  for (const auto& [length, field] : fields) {
    const Point3 b =
        field_of_finite_filament({0, 0, -0.5 * length}, {0, 0, 0.5 * length}, 1000.0, {0.1, 0, 0});
    CHECK(b.y == near(field));
    const std::array bar{BarCurrent{Round{{}, 1e-6}, 1000.0}};
    CHECK(field_of_run(bar, length, {0.1, 0.0}).mid_span.y == near(field));
  }
}

TEST_CASE("finite wires have the fields of Sadiku's examples 7.1 and 7.2") {
  // Elements of Electromagnetics. 7.1: one side of a triangular loop, 10 A from (0, 0) to (2, 0),
  // seen from 5 m above its near end.
  const double mu_0 = 4e-7 * 3.14159265358979323846;
  const Point3 side = field_of_finite_filament({0, 0, 0}, {2, 0, 0}, 10.0, {0, 0, 5});
  CHECK(-side.y / mu_0 == printed(59.1e-3, 5e-5));
  CHECK(-side.y / mu_0 == printed(59.10866e-3, 5e-9));
  // 7.2: 3 A in along the z axis from infinity to the origin and out along x, seen from (-3, 4, 0).
  const double endless = 1e9;
  const Point3 in = field_of_finite_filament({0, 0, endless}, {0, 0, 0}, 3.0, {-3, 4, 0});
  const Point3 out = field_of_finite_filament({0, 0, 0}, {endless, 0, 0}, 3.0, {-3, 4, 0});
  CHECK(norm(in) / mu_0 == printed(47.75e-3, 5e-6));
  CHECK(norm(in) / mu_0 == printed(47.7465e-3, 5e-8));
  CHECK(out.z / mu_0 == printed(23.87e-3, 5e-6));
  CHECK(out.z / mu_0 == printed(23.8732e-3, 5e-8));
}

TEST_CASE("a flat strip has the logarithm and angle of the textbooks") {
  const CurrentSheet strip{{-0.05, 0.0}, {0.05, 0.0}, 1e4};
  const double rows[][4] = {{0, 0.05, -3.141592654e-3, 0},
                            {0, 0.001, -6.203195971e-3, 0},
                            {0.05, 0.05, -2.214297436e-3, 1.609437912e-3},
                            {0.1, 0, 0, 2.197224577e-3},
                            {0.1, 0.05, -9.272952180e-4, 1.609437912e-3},
                            {0, 1, -1.998335829e-4, 0}};
  for (const auto& [x, y, bx, by] : rows) {
    const Point b = field_of_sheet(strip, {x, y});
    CAPTURE(x, y);
    CHECK(b.x == near(bx));
    CHECK(b.y == near(by));
  }
}

TEST_CASE("two wide sheets add between them and cancel outside as in Sadiku's example 7.5") {
  const double half = 1e6;
  const CurrentSheet low{{-half, 0.0}, {half, 0.0}, -10.0};
  const CurrentSheet high{{-half, 4.0}, {half, 4.0}, 10.0};
  const double mu_0 = 4e-7 * 3.14159265358979323846;
  const auto h = [&](double z) {
    return std::abs((field_of_sheet(low, {0.0, z}) + field_of_sheet(high, {0.0, z})).x) / mu_0;
  };
  CHECK(h(1.0) == Approx(10.0).epsilon(1e-5));
  CHECK(h(10.0) == Approx(0.0).margin(1e-4));
}

TEST_CASE("a rectangular bar of uniform current has the field and potential of its closed form") {
  // Closed form published e.g. by Hague, Electromagnetic Problems in Electrical Engineering, 1929
  // (from memory); numbers checked by quadrature. 10 x 100 mm, 1 kA.
  const Rectangle bar{{}, 0.01, 0.1, 0.0};
  const double rows[][5] = {{0, 0, 0, 0, 7.837714924e-4},
                            {0.005, 0, 0, 5.885810199e-3, 7.690585881e-4},
                            {0.005, 0.05, -6.608493567e-3, 3.041758657e-3, 6.451420563e-4},
                            {0, 0.05, -7.992297256e-3, 0, 6.527463495e-4},
                            {0.0025, 0.025, -2.177061585e-3, 2.878266495e-3, 7.541217257e-4},
                            {0.02, 0, 0, 4.765108535e-3, 6.893685033e-4},
                            {0.02, 0.03, -2.141049096e-3, 4.233422449e-3, 6.577429470e-4},
                            {0.05, 0, 0, 3.144925975e-3, 5.729188539e-4},
                            {0, 0.1, -2.194271444e-3, 0, 4.694518170e-4},
                            {0.1, 0.1, -9.560099936e-4, 1.037995155e-3, 3.910518381e-4},
                            {0.5, 0, 0, 3.986876813e-4, 1.383003985e-4},
                            {1, 0, 0, 1.998352413e-4, -8.243965e-8},
                            {0, 1, -2.001652421e-4, 0, 8.256049e-8}};
  for (const auto& [x, y, bx, by, a] : rows) {
    const Point b = field_of(bar, 1000.0, {x, y});
    CAPTURE(x, y);
    CHECK(b.x == near(bx));
    CHECK(b.y == near(by));
    CHECK(potential_of(bar, 1000.0, {x, y}) == near(a).margin(5.1e-15));
  }
}

TEST_CASE("round bars and tubes have the field of Ampere's law") {
  const Round bar{{}, 0.04};
  CHECK(field_of(bar, 1000.0, {0.01, 0.0}).y == near(5e-3));
  CHECK(field_of(bar, 1000.0, {0.02, 0.0}).y == near(1e-2));
  CHECK(field_of(bar, 1000.0, {0.04, 0.0}).y == near(5e-3));
  CHECK(potential_of(bar, 1000.0, {0.01, 0.0}) - potential_of(bar, 1000.0, {0.02, 0.0}) ==
        near(1e-4 * 0.75));
  const Tube tube{{}, 0.06, 0.01};
  CHECK(field_of(tube, 1000.0, {0.019, 0.0}) == Point{});
  CHECK(field_of(tube, 1000.0, {0.025, 0.0}).y == near(3.6e-3));
  CHECK(field_of(tube, 1000.0, {0.03, 0.0}).y == near(2e-4 / 0.03));
  CHECK(field_of(tube, 1000.0, {0.05, 0.0}).y == near(4e-3));
}
