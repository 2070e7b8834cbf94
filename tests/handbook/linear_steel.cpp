// Steel of constant or unlimited permeability: digits computed outside the code by images and
// series, and checked there by the residuals at the surfaces.
#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>

#include "verify/bar_force.hpp"
#include "verify/half_space.hpp"
#include "verify/iron_box.hpp"
#include "verify/iron_slot.hpp"
#include "verify/pipe_series.hpp"
#include "verify/steel_rod.hpp"
#include "verify/uniform_field.hpp"

using barwall::mesh::Point;
using namespace barwall::verify;

namespace {

Approx digits(double value, double relative) {
  return Approx(value).epsilon(relative).margin(0.0);
}

}  // namespace

TEST_CASE("a wire before a steel half-space has the field and pull of its image") {
  const std::array wire{RoundBar{{0.0, 0.05}, 1000.0}};
  struct Row {
    double permeability, pull, below, above_x, above_y;
  };
  const Row rows[] = {{2, 0.666667, 5.714286e-3, 1.960784e-3, 2.352941e-3},
                      {10, 1.636364, 4.329004e-3, 5.347594e-4, 3.208556e-3},
                      {100, 1.960396, 3.866101e-3, 5.824117e-5, 3.494467e-3},
                      {1000, 1.996004, 3.815232e-3, 5.876532e-6, 3.525886e-3},
                      {1e12, 2.0, 3.809524e-3, 0, 3.529412e-3}};
  for (const Row& row : rows) {
    CAPTURE(row.permeability);
    const HalfSpace steel{{}, {0.0, 1.0}, row.permeability};
    CHECK(-force_on_bar(steel, wire, 0).y == digits(row.pull, 5e-7));
    CHECK(field_of(steel, wire, {0.0, 0.02}).x == digits(row.below, 2e-7));
    const Point above = field_of(steel, wire, {0.03, 1e-15});
    CHECK(above.x == Approx(row.above_x).epsilon(2e-7).margin(6e-11));
    const double kappa = (row.permeability - 1.0) / (row.permeability + 1.0);
    CHECK(above.x == Approx(2e-4 * 0.05 / 0.0034 * (1.0 - kappa)).epsilon(1e-9).margin(1e-15));
    CHECK(above.y == digits(row.above_y, 2e-7));
    const Point within = field_of(steel, wire, {0.03, -1e-15});
    CHECK(within.y == digits(above.y, 1e-12));
    if (row.permeability < 1e6) CHECK(within.x == digits(row.permeability * above.x, 1e-9));
  }
}

TEST_CASE("a bar before a steel half-space is drawn like two bars at twice the distance") {
  const double rows[][2] = {{10, 2.070524}, {1000, 2.525585}, {1e12, 2.530641}};
  for (const auto& [permeability, pull] : rows) {
    const double image = 1000.0 * (permeability - 1.0) / (permeability + 1.0);
    CHECK(force_between_bars(1000.0, image, 0.01, 0.1, 0.06) == digits(pull, 4e-7));
  }
}

TEST_CASE("a wire beside a steel rod has the field and pull of its images") {
  const std::array wire{RoundBar{{0.05, 0.0}, 1000.0}};
  const double rows[][3] = {{10, 1.840909, -7.272727e-3},
                            {100, 2.205446, -7.920792e-3},
                            {1000, 2.245504, -7.992008e-3},
                            {1e12, 2.25, -8e-3}};
  for (const auto& [permeability, pull, centre] : rows) {
    const SteelRod rod{0.03, permeability};
    CAPTURE(permeability);
    CHECK(-force_on_bar(rod, wire, 0).x == digits(pull, 3e-7));
    CHECK(field_of(rod, wire, {}).y == digits(centre, 2e-7));
  }
  const Point above = field_of(SteelRod{0.03, 1000.0}, wire, {0.0, 0.04});
  CHECK(above.x == digits(-1.110906e-3, 5e-7));
  CHECK(above.y == digits(-4.306388e-3, 2e-7));
}

TEST_CASE("a wire within a steel rod is seen outside almost as if it lay in the axis") {
  const std::array wire{RoundBar{{0.02, 0.0}, 1000.0}};
  const double rows[][3] = {{10, 2.909091e-3, -1.393939e-3}, {1000, 2.999001e-3, -1.333999e-3}};
  for (const auto& [permeability, front, back] : rows) {
    const SteelRod rod{0.05, permeability};
    // With the axis' share: 2e-4 [(1 + kappa)/(x - d) - kappa/x].
    CHECK(field_of(rod, wire, {0.1, 0.0}).y == digits(front, 2e-7));
    CHECK(field_of(rod, wire, {-0.1, 0.0}).y == digits(back, 4e-7));
  }
}

TEST_CASE("steel shells shield a uniform field by the table's factors") {
  // Jackson, Classical Electrodynamics, 5.12; Celozzi, Araneo and Lovat, Electromagnetic
  // Shielding, app. B (from memory).
  const double permeability[] = {10, 100, 200, 500, 1000, 2000, 10000};
  const double rows[][9] = {
      {0.1, 0.101, 1.0399005, 1.482796, 1.9753702, 3.4531517, 5.9161406, 10.842126, 50.250025},
      {0.1, 0.102, 1.0786332, 1.9514619, 2.9221939, 5.8345062, 10.688399, 20.396199, 98.058632},
      {0.1, 0.105, 1.1882653, 3.2780102, 5.602157, 12.574876, 24.196168, 47.438787, 233.37982},
      {0.1, 0.11, 1.3514463, 5.2525, 9.591126, 22.607525, 44.301696, 87.690104, 434.79752},
      {0.1, 0.2, 2.51875, 19.376875, 38.125937, 94.375375, 188.12519, 375.62509, 1875.625},
      {0.5, 0.503, 1.024083, 1.2914047, 1.5887113, 2.4806667, 3.9672709, 6.9404838, 30.726198}};
  for (const auto& row : rows) {
    for (int c = 0; c < 7; ++c) {
      CAPTURE(row[0], row[1], permeability[c]);
      CHECK(shielding_factor({row[0], row[1], permeability[c]}) == digits(row[c + 2], 5e-8));
      // What a pipe keeps in, it keeps out.
      CHECK(transmitted_share({row[0], row[1], permeability[c]}, 1) ==
            digits(1.0 / shielding_factor({row[0], row[1], permeability[c]}), 1e-12));
    }
  }
}

TEST_CASE("a steel shell's wall carries the flux that it keeps out of the bore") {
  const Shell shell{0.1, 0.105, 1000.0};
  const Point applied{0.0, 1.0};
  CHECK(field_in(shell, applied, {0.01, 0.02}).y == digits(0.04132886, 1e-7));
  CHECK(field_in(shell, applied, {0.1 + 1e-12, 0.0}).y == digits(41.328858, 2e-8));
  CHECK(field_in(shell, applied, {0.105 - 1e-12, 0.0}).y == digits(39.409596, 2e-8));
  const double flux =
      potential_in(shell, applied, {0.1, 0.0}) - potential_in(shell, applied, {0.105, 0.0});
  CHECK(flux / 0.005 == digits(40.345821, 2e-8));
  CHECK(flux_gain(shell) == digits(1.960590404, 1e-9));
}

TEST_CASE("solid and elliptic cylinders are magnetised evenly in a uniform field") {
  const double rows[][2] = {{10, 1.818182}, {100, 1.980198}, {1000, 1.998002}};
  for (const auto& [permeability, gain] : rows) {
    CHECK(field_in({0.0, 0.03, permeability}, {1.0, 0.0}, {0.01, 0.02}).x == digits(gain, 3e-7));
  }
  const Point along = field_strength_in_ellipse(0.1, 0.005, 1000.0, {1.0, 0.0});
  const Point across = field_strength_in_ellipse(0.1, 0.005, 1000.0, {0.0, 1.0});
  CHECK(1000.0 * along.x == digits(20.588235, 5e-8));
  CHECK(1000.0 * across.y == digits(1.04994750, 1e-8));
}

TEST_CASE("a slot in iron has the field, inductance and pull of any machine textbook") {
  const Slot slot{0.02, 0.05};  // from memory
  CHECK(field_in_slot(slot, 1000.0, 0.05) == digits(-6.283185e-2, 1e-7));
  CHECK(field_in_slot(slot, 1000.0, 0.025) == digits(-0.5 * 6.283185e-2, 1e-7));
  CHECK(inductance_of_slot(slot, 0.0) == digits(1.047197551e-6, 1e-9));
  CHECK(inductance_of_slot(slot, 0.01) - inductance_of_slot(slot, 0.0) ==
        digits(6.283185e-7, 1e-7));
  CHECK(force_into_slot(slot, 1000.0) == digits(31.41592654, 1e-9));
}

TEST_CASE("a wire between iron plates has the hyperbolic cotangent of its images") {
  const double rows[][2] = {
      {0.01, 2.065368463e-2}, {0.05, 6.850754300e-3}, {0.1, 6.306696190e-3}, {0.2, 6.283229131e-3}};
  for (const auto& [x, field] : rows) {
    CHECK(field_between_plates(1000.0, 0.1, x) == digits(field, 1e-9));
  }
  CHECK(force_to_plate(1000.0, 0.1, 0.03) == digits(2.282500669, 1e-9));
}

TEST_CASE("two bars in a closed iron box have the field, force and inductance of Roth's series") {
  const IronBox box{0.2, 0.1};
  const std::array bars{BoxBar{{0.045, 0.05}, 0.01, 0.06, 1000.0},
                        BoxBar{{0.155, 0.05}, 0.01, 0.06, -1000.0}};
  CHECK(2e-6 * energy_of(box, bars) == digits(1.42946540e-6, 5e-9));
  CHECK(force_on_bar(box, bars, 0).x == digits(-6.29805453, 2e-9));
  CHECK(force_on_bar(box, bars, 1).x == digits(6.29805453, 2e-9));
  const double rows[][4] = {{0.1, 0.05, 0, 1.297040280e-2},
                            {0.045, 0.05, 0, 6.312139509e-3},
                            {0.07, 0.02, 1.314038803e-3, 1.220463150e-2},
                            {0.1, 0, 0, 1.215401462e-2},
                            {0.02, 0.02, 1.441283071e-3, 3.17308629e-4},
                            {0.02, 0.09, -9.217331657e-4, 1.030013646e-3}};
  for (const auto& [x, y, bx, by] : rows) {
    const Point b = field_of(box, bars, {x, y});
    CAPTURE(x, y);
    // Level with the bars' ends the double series behind these digits converges slowest.
    const double margin = y == 0.02 ? 2e-9 : 1e-11;
    CHECK(b.x == Approx(bx).epsilon(0.0).margin(margin));
    CHECK(b.y == Approx(by).epsilon(0.0).margin(margin));
  }
}
