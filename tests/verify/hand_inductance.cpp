#include "verify/hand_inductance.hpp"

#include <catch2/catch.hpp>
#include <cmath>

#include "tests/support/sections.hpp"
#include "verify/filled_bar.hpp"
#include "verify/mean_distance.hpp"
#include "verify/round_conductor.hpp"
#include "verify/shape_distance.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using support::bar;

namespace {

double pair_inductance(const Shape& go, const Shape& back) {
  Section section;
  section.parts = {bar("go", {go}), bar("back", {back})};
  return hand_inductance(section, {0}, {1}).value().value;
}

/// Mean distance by Gauss-Legendre points of one shape in the potential of the other.
double summed(const Shape& of, const Shape& in, int order = 24) {
  double mean = 0.0;
  for (const Filament& f : filaments_of(of, 1.0, order)) {
    mean += f.current * potential_of(in, 1.0, f.at);
  }
  return std::exp(-mean / 2e-7);
}

}  // namespace

TEST_CASE("pairs of busbars have the inductance of their mean distances, at any turn") {
  // Recomputed digits.
  struct Row {
    double width, height, distance, nanohenry;
  };
  const Row rows[] = {{0.01, 0.1, 0.02, 161.467816},
                      {0.01, 0.1, 0.2, 846.1707713},
                      {0.1, 0.01, 0.15, 707.0192913},
                      {0.02, 0.02, 0.06, 761.5205886}};
  for (const Row& row : rows) {
    for (const double turn : {0.0, 0.7, -2.2}) {
      const Point apart = turned({row.distance, 0.0}, turn);
      const Rectangle go{{0.3, 0.1}, row.width, row.height, turn};
      const Rectangle back{go.centre + apart, row.height, row.width, turn + 1.57079632679489662};
      CHECK(1e9 * pair_inductance(go, back) == Approx(row.nanohenry).epsilon(2e-9));
    }
  }
}

TEST_CASE("round wires have the inductances of worked examples") {
  // V. K. Mehta, Principles of Power System, example 9.1 (read there): 2.424 mH/km.
  const double mehta = pair_inductance(Round{{}, 0.012}, Round{{2.0, 0.0}, 0.012});
  CHECK(1e6 * mehta == Approx(2.424).epsilon(0.0).margin(5e-4));
  CHECK(mehta == Approx(inductance_of_two_wires(2.0, 0.006, 1.0)).epsilon(1e-12));
  // W. D. Stevenson, Elements of Power System Analysis, example 3.2: three wires go, two return;
  // the loop from memory, recomputed.
  Section section;
  section.parts = {bar("go", {Round{{0, 12}, 0.005}, Round{{0, 6}, 0.005}, Round{{0, 0}, 0.005}}),
                   bar("back", {Round{{9, 12}, 0.01}, Round{{9, 6}, 0.01}})};
  const auto loop = hand_inductance(section, {0}, {1});
  CHECK(loop.value().value == Approx(1.471763e-6).epsilon(1e-6));
  CHECK(loop->formula == "geometric mean distances");
  // The same wires as bars of their own.
  section.parts = {bar("a", {Round{{0, 12}, 0.005}}), bar("b", {Round{{9, 12}, 0.01}}),
                   bar("c", {Round{{0, 6}, 0.005}}), bar("d", {Round{{9, 6}, 0.01}}),
                   bar("e", {Round{{0, 0}, 0.005}})};
  CHECK(hand_inductance(section, {0, 2, 4}, {1, 3}).value().value ==
        Approx(loop->value).epsilon(1e-14));
}

TEST_CASE("a tube may hold its return in its bore") {
  const Coax coax{0.01, 0.03, 0.035};
  const Tube sheath{{}, 0.07, 0.005};
  CHECK(pair_inductance(Round{{}, 0.02}, sheath) ==
        Approx(inductance_of_coax(coax)).epsilon(1e-12));
  // Off its axis and of another shape: the potential in the bore is the same everywhere.
  CHECK(mutual_distance(Rectangle{{0.01, 0.0}, 0.01, 0.02, 0.3}, sheath).value() ==
        Approx(summed(Rectangle{{0.01, 0.0}, 0.01, 0.02, 0.3}, sheath)).epsilon(1e-12));
  CHECK(mutual_distance(sheath, Tube{{0.005, 0.0}, 0.03, 0.002}).value() ==
        Approx(mutual_distance(sheath, Round{{}, 0.02}).value()).epsilon(1e-14));
}

TEST_CASE("mean distances of unlike shapes are those of sums over filaments") {
  const Rectangle flat{{0.05, 0.02}, 0.01, 0.08, 0.3};
  const Rectangle across{{0.0, -0.01}, 0.03, 0.02, 1.1};
  const Round round{{-0.03, 0.06}, 0.04};
  const Tube tube{{0.13, 0.03}, 0.06, 0.004};
  const std::vector<Shape> shapes{flat, across, round, tube};
  for (const Shape& a : shapes) {
    for (const Shape& b : shapes) {
      if (&a == &b) continue;
      CHECK(mutual_distance(a, b).value() == Approx(summed(a, b)).epsilon(1e-10));
      CHECK(mutual_distance(a, b).value() == Approx(mutual_distance(b, a).value()).epsilon(1e-10));
    }
    CHECK(own_distance(a).value() == Approx(summed(a, a)).epsilon(1e-5));
  }
}

TEST_CASE("steel changes nothing in the hand inductance") {
  Section section;
  section.parts = {bar("go", {Rectangle{{}, 0.01, 0.1, 0.0}}),
                   bar("back", {Rectangle{{0.05, 0.0}, 0.01, 0.1, 0.0}}),
                   support::steel_wall("plate", {Rectangle{{0.0, 0.1}, 0.4, 0.01, 0.0}})};
  CHECK(1e9 * hand_inductance(section, {0}, {1}).value().value ==
        Approx(367.5150886).epsilon(1e-9));  // recomputed digits
}

TEST_CASE("frames, polygons and empty sides have no hand inductance") {
  Section section;
  section.parts = {bar("a", {Round{{}, 0.02}}),
                   bar("b", {Frame{{0.1, 0.0}, 0.05, 0.05, 0.005, 0.0}}),
                   bar("c", {Polygon{{{0.2, 0.0}, {0.25, 0.0}, {0.2, 0.05}}}}),
                   bar("d", {Round{{0.4, 0.0}, 0.02}})};
  CHECK(hand_inductance(section, {0}, {3}).has_value());
  CHECK_FALSE(hand_inductance(section, {0}, {1}).has_value());
  CHECK_FALSE(hand_inductance(section, {2}, {3}).has_value());
  CHECK_FALSE(hand_inductance(section, {0, 2}, {3}).has_value());
  CHECK_FALSE(hand_inductance(section, {}, {3}).has_value());
}
