// Fields of balanced three-phase lines; digits computed outside the code.
#include <array>
#include <catch2/catch.hpp>

#include "verify/three_phase_line.hpp"

using barwall::mesh::Point;
using namespace barwall::verify;

TEST_CASE("flat and trefoil lines have the resultant fields of the table") {
  const auto flat = flat_line(1000.0, 0.1);
  const auto trefoil = trefoil_line(1000.0, 0.1);
  const double rows[][4] = {
      {0, 0.5, 1.341199675e-4, 9.878270998e-5},   {0, 1, 3.435515163e-5, 2.454041110e-5},
      {0, 2, 8.642256085e-6, 6.126422756e-6},     {1, 0, 3.504919510e-5, 2.453568784e-5},
      {0.5, 0.5, 6.949869044e-5, 4.913390762e-5}, {0.05, 0.2, 6.979951517e-4, 6.083724939e-4}};
  for (const auto& [x, y, in_line, in_triangle] : rows) {
    CAPTURE(x, y);
    CHECK(resultant_field(flat, {x, y}) == Approx(in_line).epsilon(1e-9));
    CHECK(resultant_field(trefoil, {x, y}) == Approx(in_triangle).epsilon(1e-9));
    if (x == 0.0) {
      CHECK(field_above_flat_line(1000.0, 0.1, y) == Approx(in_line).epsilon(1e-9));
    }
  }
}

TEST_CASE("far away the lines follow the guides' 0.2 sqrt(3) and 0.1 sqrt(6) s I / r^2 uT") {
  // CEI 106-11 and 211-4 (from memory).
  CHECK(far_field_of_flat_line(1000.0, 0.1, 1.0) == Approx(3.464101615e-5).epsilon(1e-9));
  CHECK(far_field_of_trefoil_line(1000.0, 0.1, 1.0) == Approx(2.449489743e-5).epsilon(1e-9));
  for (int k = 0; k < 7; ++k) {
    const Point at = barwall::mesh::turned({50.0, 0.0}, 0.4 * k);
    CHECK(resultant_field(flat_line(1000.0, 0.1), at) ==
          Approx(far_field_of_flat_line(1000.0, 0.1, 50.0)).epsilon(1e-5));
    CHECK(resultant_field(trefoil_line(1000.0, 0.1), at) ==
          Approx(far_field_of_trefoil_line(1000.0, 0.1, 50.0)).epsilon(1e-5));
  }
}

TEST_CASE("go and return have the field of the pair on its perpendicular") {
  CHECK(field_above_pair(1000.0, 0.1, 0.5) == Approx(7.920792079e-5).epsilon(1e-9));
  CHECK(field_above_pair(1000.0, 0.1, 1.0) == Approx(1.995012469e-5).epsilon(1e-9));
  const std::array pair{PhasorFilament{{-0.05, 0.0}, 1000.0}, PhasorFilament{{0.05, 0.0}, -1000.0}};
  CHECK(resultant_field(pair, {0.0, 0.5}) == Approx(7.920792079e-5).epsilon(1e-9));
}

TEST_CASE("a flat line at 2 kA reaches the levels of exposure at the distances of the table") {
  CHECK(1e6 * field_above_flat_line(2000.0, 0.1, 2.0) == Approx(17.28451).epsilon(1e-6));
  CHECK(1e6 * field_above_flat_line(2000.0, 0.1, 1.5) == Approx(30.67847).epsilon(1e-6));
  CHECK(1e6 * field_above_flat_line(2000.0, 0.1, 1.0) == Approx(68.71030).epsilon(1e-6));
  const double rows[][2] = {
      {100e-6, 0.827348}, {200e-6, 0.581475}, {500e-6, 0.361005}, {1000e-6, 0.247276}};
  for (const auto& [field, distance] : rows) {
    CHECK(distance_above_flat_line(2000.0, 0.1, field) == Approx(distance).epsilon(2e-6));
  }
}
