#include "verify/hand_force.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "solver/fault_extremes.hpp"
#include "tests/support/sections.hpp"
#include "verify/bar_force.hpp"
#include "verify/bar_pair.hpp"
#include "verify/complex_field.hpp"
#include "verify/filled_bar.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using support::bar;

namespace {

solver::Excitation steady(const std::vector<double>& currents) {
  return {0.0, {currents.begin(), currents.end()}};
}

/// J x B of uniform currents without steel, by Gauss-Legendre points.
Point direct_force(const Section& section, const std::vector<double>& currents, std::size_t on) {
  Point sum;
  for (std::size_t k = 0; k < currents.size(); ++k) {
    if (k == on) continue;
    for (const Filament& f : filaments_of(section.parts[on].pieces[0], currents[on], 16)) {
      sum += force_on(f.current, field_of(section.parts[k].pieces[0], currents[k], f.at));
    }
  }
  return sum;
}

/// Three flat bars in a row, turned as a whole.
Section flat_row(double turn, double pitch) {
  Section section;
  for (int k = -1; k <= 1; ++k) {
    const Point centre = Point{0.2, -0.1} + turned({k * pitch, 0.0}, turn);
    // The same bar in another guise: sides swapped, a quarter turn on.
    section.parts.push_back(
        k == 0 ? bar("L2", {Rectangle{centre, 0.01, 0.1, turn}})
               : bar("L", {Rectangle{centre, 0.1, 0.01, turn - 0.5 * std::numbers::pi}}));
  }
  return section;
}

}  // namespace

TEST_CASE("wires side by side have the forces of worked examples") {
  struct Row {
    double first, second, distance, force, last_digit;
  };
  // Kulshreshtha, Basic Electrical Engineering, 5.3; Robertson, Fundamental Electrical and
  // Electronic Principles, 5.11 and 5.12 (all read there).
  const Row rows[] = {
      {80, 30, 2, 2.4e-4, 1e-6}, {50, 40, 0.035, 11.4e-3, 1e-4}, {1000, 300, 2, 30e-3, 1e-3}};
  for (const Row& row : rows) {
    Section section;
    section.parts = {bar("a", {Round{{0.0, 0.0}, 0.01}}),
                     bar("b", {Round{{0.0, row.distance}, 0.01}})};
    const auto hand = hand_force(section, steady({row.first, row.second}), 0);
    REQUIRE(hand.has_value());
    CHECK(hand->value.y.mean == Approx(row.force).epsilon(0.0).margin(0.5 * row.last_digit));
    CHECK(hand->value.x.mean == 0.0);
    CHECK(hand->formula == "long wires");
    CHECK(hand_force(section, steady({row.first, -row.second}), 1)->value.y.mean ==
          Approx(hand->value.y.mean));
  }
}

TEST_CASE("flat bars in a row have the exact force at any turn") {
  const std::vector<double> currents{900.0, -400.0, -500.0};
  for (const double turn : {0.0, 0.4, 1.3, -2.0}) {
    const Section section = flat_row(turn, 0.05);
    for (std::size_t k = 0; k < 3; ++k) {
      const auto hand = hand_force(section, steady(currents), static_cast<int>(k));
      REQUIRE(hand.has_value());
      const Point direct = direct_force(section, currents, k);
      CHECK(norm(Point{hand->value.x.mean, hand->value.y.mean} - direct) < 1e-9 * norm(direct));
      CHECK(hand->formula == "flat bars (k12)");
      CHECK(hand->value.x.cosine == 0.0);
    }
  }
}

TEST_CASE("three flat bars at 80 kA peak have the worst forces of both distances over a cycle") {
  // Recomputed digits: 10 x 100 mm at 100 mm.
  const Section section = flat_row(0.0, 0.1);
  const double rms = 80e3 / std::numbers::sqrt2;
  const auto phase = [&](double degrees) {
    return std::polar(rms, degrees * std::numbers::pi / 180);
  };
  const solver::Excitation balanced{50.0, {phase(0), phase(-120), phase(120)}};
  CHECK(peak_of(hand_force(section, balanced, 1)->value).magnitude ==
        Approx(9738.1037).epsilon(1e-8));
  CHECK(peak_of(hand_force(section, balanced, 0)->value).magnitude ==
        Approx(9227.3503).epsilon(1e-8));
}

TEST_CASE("over the cycle the force is that of the currents of each instant") {
  Section section = flat_row(0.3, 0.05);
  section.parts.push_back(bar("N", {Round{{0.0, 0.3}, 0.03}}));
  const solver::Excitation phasors{60.0,
                                   {{100.0, 50.0}, {-300.0, 20.0}, {10.0, 400.0}, {190.0, -470.0}}};
  const auto hand = hand_force(section, phasors, 2);
  REQUIRE(hand.has_value());
  CHECK(hand->formula == "flat bars (k12) and long wires");
  for (const double wt : {0.0, 0.5, 1.7, 4.0}) {
    std::vector<double> currents;
    for (const auto& i : phasors.current) {
      currents.push_back(std::numbers::sqrt2 * (i * std::polar(1.0, wt)).real());
    }
    const auto then = hand_force(section, steady(currents), 2);
    CHECK(hand->value.at(wt).x == Approx(then->value.x.mean).epsilon(1e-12));
    CHECK(hand->value.at(wt).y == Approx(then->value.y.mean).epsilon(1e-12));
  }
}

TEST_CASE("pieces share their bar's current by area and do not push their own bar") {
  Section section;
  section.parts = {bar("a", {Round{{0.0, 0.0}, 0.01}, Round{{0.0, 0.04}, 0.02}}),
                   bar("b", {Round{{0.1, 0.0}, 0.01}})};
  const auto on_a = hand_force(section, steady({500.0, 700.0}), 0);
  // A fifth of the current in the thinner piece.
  const double near = 2e-7 * 100.0 * 700.0 / 0.1;
  const double far = 2e-7 * 400.0 * 700.0 / (0.01 + 0.0016);
  CHECK(on_a.value().value.x.mean == Approx(near + far * 0.1));
  CHECK(on_a->value.y.mean == Approx(-far * 0.04));
  const auto on_b = hand_force(section, steady({500.0, 700.0}), 1);
  CHECK(on_b.value().value.x.mean == Approx(-on_a->value.x.mean));
}

TEST_CASE("steel beside the bars changes nothing in the hand value, unlike bars that differ") {
  Section section = flat_row(0.0, 0.05);
  const auto bare = hand_force(section, steady({1e3, -1e3, 0.0}), 0);
  section.parts.push_back(support::steel_wall("plate", {Rectangle{{0.2, -0.3}, 1.0, 0.01, 0.0}}));
  const auto with_steel = hand_force(section, steady({1e3, -1e3, 0.0, 0.0}), 0);
  CHECK(with_steel.value().value.x.mean == bare.value().value.x.mean);
  CHECK(bare->formula == "flat bars (k12)");
  section.parts[1].pieces[0] = Rectangle{{0.2, -0.1}, 0.01, 0.08, 0.0};
  CHECK(hand_force(section, steady({1e3, -1e3, 0.0, 0.0}), 0)->formula == "long wires");
}

TEST_CASE("where no hand formula applies there is no hand force") {
  Section coaxial;
  coaxial.parts = {bar("core", {Round{{0.0, 0.0}, 0.02}}),
                   bar("sheath", {Tube{{0.001, 0.0}, 0.08, 0.005}}),
                   bar("beside", {Round{{0.2, 0.0}, 0.02}})};
  CHECK_FALSE(hand_force(coaxial, steady({100.0, -100.0, 50.0}), 0).has_value());
  CHECK_FALSE(hand_force(coaxial, steady({100.0, -100.0, 50.0}), 1).has_value());
  CHECK(hand_force(coaxial, steady({100.0, -100.0, 50.0}), 2).has_value());
  // A tube without current is no hindrance; a bar without current has no force.
  CHECK(hand_force(coaxial, steady({100.0, 0.0, 50.0}), 0).has_value());
  CHECK_FALSE(hand_force(coaxial, steady({0.0, 100.0, 50.0}), 0).has_value());
  CHECK_FALSE(hand_force(coaxial, steady({100.0, 0.0, 0.0}), 0).has_value());
}

TEST_CASE("pairs of bars are known by equal sizes and a line of centres along their sides") {
  const Rectangle upright{{}, 0.01, 0.1, 0.0};
  const auto facing = bar_pair(upright, Rectangle{{0.05, 0.0}, 0.01, 0.1, std::numbers::pi});
  REQUIRE(facing.has_value());
  CHECK(facing->along == 0.01);
  CHECK(facing->across == 0.1);
  CHECK(facing->distance == 0.05);
  const auto edge_to_edge = bar_pair(upright, Rectangle{{0.0, -0.15}, 0.01, 0.1, 0.0});
  REQUIRE(edge_to_edge.has_value());
  CHECK(edge_to_edge->along == 0.1);
  CHECK_FALSE(bar_pair(upright, Rectangle{{0.05, 0.02}, 0.01, 0.1, 0.0}).has_value());
  CHECK_FALSE(bar_pair(upright, Rectangle{{0.05, 0.0}, 0.01, 0.09, 0.0}).has_value());
  CHECK_FALSE(bar_pair(upright, Rectangle{{0.05, 0.0}, 0.01, 0.1, 0.1}).has_value());
  CHECK_FALSE(bar_pair(upright, Rectangle{{0.15, 0.0}, 0.1, 0.01, 0.0}).has_value());
  CHECK_FALSE(bar_pair(upright, Round{{0.05, 0.0}, 0.01}).has_value());
}

TEST_CASE("a shape reaches round the points of its convex hull alone") {
  const Polygon channel{{{0, 0}, {4, 0}, {4, 3}, {3, 3}, {3, 1}, {1, 1}, {1, 3}, {0, 3}}};
  CHECK(reaches_round(channel, {2.0, 2.0}));
  CHECK_FALSE(reaches_round(channel, {2.0, 3.5}));
  CHECK(reaches_round(Frame{{1.0, 1.0}, 2.0, 2.0, 0.1, 0.0}, {1.5, 0.5}));
  CHECK(reaches_round(Tube{{}, 2.0, 0.1}, {0.7, 0.6}));
  CHECK_FALSE(reaches_round(Tube{{}, 2.0, 0.1}, {0.8, 0.65}));
}
