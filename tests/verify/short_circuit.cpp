#include "verify/short_circuit.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "solver/fault_extremes.hpp"
#include "tests/support/sections.hpp"
#include "verify/bar_force.hpp"
#include "verify/hand_force.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using std::numbers::sqrt2;
using support::bar;

namespace {

solver::FaultCurrent fault_of(std::vector<int> bars, double rms, double r_over_x) {
  return {std::move(bars), solver::AlternatingFault{50.0, rms, r_over_x, {}}};
}

/// Three bars of one shape, the first at the origin.
Section three(const Shape& shape, Point second, Point third) {
  Section section;
  section.parts = {bar("L1", {shape}), bar("L2", {moved(shape, second)}),
                   bar("L3", {moved(shape, third)})};
  return section;
}

}  // namespace

TEST_CASE("the standard's worked example has its force on the centre conductor") {
  // IEC TR 60865-2, example 1 (from memory): 16 kA, kappa 1.35, bars 60 x 10 mm at 0.2 m, 798 N on
  // a metre with i_p and k12 rounded; recomputed without rounding 796.71 N.
  const Section section = three(Rectangle{{}, 0.01, 0.06, 0.0}, {0.2, 0.0}, {0.4, 0.0});
  const double r_over_x = solver::r_over_x_of_kappa(1.35);
  const solver::FaultCurrent fault = fault_of({0, 1, 2}, 16e3, r_over_x);
  CHECK(standard_peak(fault) == Approx(1.35 * sqrt2 * 16e3));
  const auto centre = standard_fault_force(section, fault, standard_peak(fault), 1);
  REQUIRE(centre.has_value());
  CHECK(centre->value == Approx(796.71).epsilon(0.0).margin(5e-3));
  CHECK(centre->value == Approx(798.0).epsilon(2e-3));
  CHECK(centre->formula == "F_m3 on the centre conductor");
  CHECK(effective_distance(0.01, 0.06, 0.2) == Approx(0.202).epsilon(5e-3));
  // The order in which the phases stand does not count.
  const auto other =
      standard_fault_force(section, fault_of({2, 0, 1}, 16e3, r_over_x), standard_peak(fault), 1);
  CHECK(other.value().value == centre->value);
}

TEST_CASE("pieces have the effective distances of IEC 60865-1, table 1") {
  // Rounded to the millimetre there (from memory); recomputed digits beside it.
  struct Row {
    int pieces;
    double thickness, height, printed, exact;
  };
  const Row rows[] = {{2, 5, 60, 27, 27.072},   {2, 10, 60, 34, 34.417}, {2, 10, 100, 47, 47.543},
                      {2, 10, 200, 80, 80.485}, {3, 5, 80, 18, 18.5},    {3, 10, 60, 20, 20.5},
                      {3, 10, 100, 27, 27.1},   {3, 10, 200, 43, 43.6}};
  for (const Row& row : rows) {
    CAPTURE(row.pieces, row.thickness, row.height);
    std::vector<double> distances;
    for (int k = 1; k < row.pieces; ++k) distances.push_back(2.0 * k * row.thickness);
    const double effective = effective_distance_of_pieces(row.thickness, row.height, distances);
    CHECK(effective == Approx(row.exact).epsilon(0.0).margin(row.pieces == 2 ? 1e-3 : 0.05));
    CHECK(effective == Approx(row.printed).epsilon(0.0).margin(1.0));
    // The same from a bar of such pieces, in any order.
    std::vector<Shape> pieces;
    for (int k = 0; k < row.pieces; ++k) {
      pieces.push_back(
          Rectangle{{2e-3 * k * row.thickness, 0.1}, 1e-3 * row.thickness, 1e-3 * row.height, 0.0});
    }
    std::swap(pieces[0], pieces[1]);
    const auto force = standard_piece_force(bar("L1", pieces), 40e3);
    CHECK(force.value().value ==
          Approx(2e-7 * std::pow(40e3 / row.pieces, 2) / (1e-3 * effective)).epsilon(1e-9));
  }
}

TEST_CASE("the standard's force is that of the sum over wires where the offset never decays") {
  const double rms = 20e3;
  const Round wire{{}, 0.03};
  const double h = 0.5 * std::sqrt(3.0);
  const Section rows[] = {three(wire, {0.1, 0.0}, {0.2, 0.0}),
                          three(wire, {0.1, 0.0}, {0.05, 0.1 * h})};
  for (const Section& section : rows) {
    const solver::FaultCurrent fault = fault_of({1, 0, 2}, rms, 0.0);
    const auto currents = solver::sustained_excitation(fault, 3);
    for (int k = 0; k < 3; ++k) {
      const auto standard = standard_fault_force(section, fault, standard_peak(fault), k);
      const auto summed = extremes_of(fault, hand_force(section, currents, k).value().value);
      CHECK(standard.value().value == Approx(summed.peak.magnitude).epsilon(1e-12));
    }
  }
  const solver::FaultCurrent pair = fault_of({0, 2}, rms, 0.0);
  const auto summed =
      extremes_of(pair, hand_force(rows[0], solver::sustained_excitation(pair, 3), 2)->value);
  const auto standard = standard_fault_force(rows[0], pair, standard_peak(pair), 2);
  CHECK(standard.value().value == Approx(summed.peak.magnitude).epsilon(1e-12));
  CHECK(standard->formula == "F_m2 between two conductors");
}

TEST_CASE("the standard's peak and the waveform's crest differ by what kappa rounds") {
  const Section section = three(Round{{}, 0.03}, {0.1, 0.0}, {0.2, 0.0});
  for (const double r_over_x : {0.07, 0.249, 0.5}) {
    const solver::FaultCurrent fault = fault_of({0, 1, 2}, 10e3, r_over_x);
    const double standard =
        standard_fault_force(section, fault, standard_peak(fault), 1).value().value;
    const auto exact = extremes_of(
        fault, hand_force(section, solver::sustained_excitation(fault, 3), 1).value().value);
    const double crest = solver::crest_of(fault).current;
    CHECK(standard / exact.peak.magnitude ==
          Approx(std::pow(standard_peak(fault) / crest, 2)).epsilon(1e-12));
    CHECK(standard / exact.peak.magnitude == Approx(1.0).epsilon(0.012));
  }
  CHECK(standard_peak({{0, 1}, solver::DirectRise{5e3, 0.01}}) == 5e3);
  CHECK(standard_peak({{0, 1}, solver::DirectPeak{5e3, 7e3}}) == Approx(7e3));
}

TEST_CASE("a bar of several pieces counts as the rectangle round them") {
  // IEC TR 60865-2, example 2 (from memory): three pieces of 60 x 10 mm, 10 mm apart, main
  // conductors at 0.2 m: k12 of 50 x 60 mm is 1.00.
  Section section;
  for (int phase = 0; phase < 3; ++phase) {
    std::vector<Shape> pieces;
    for (int k = -1; k <= 1; ++k) {
      pieces.push_back(Rectangle{{0.2 * phase + 0.02 * k, 0.0}, 0.01, 0.06, 0.0});
    }
    section.parts.push_back(bar("L", pieces));
  }
  const auto force = standard_fault_force(section, fault_of({0, 1, 2}, 1.0, 0.1), 30e3, 1);
  CHECK(force.value().value == Approx(peak_force_centre_phase(30e3, 0.2)).epsilon(5e-3));
  CHECK(force->value ==
        Approx(peak_force_centre_phase(30e3, effective_distance(0.05, 0.06, 0.2))).epsilon(1e-12));
}

TEST_CASE("where the standard has no formula there is none") {
  const Rectangle flat{{}, 0.01, 0.06, 0.0};
  const auto given = [](const Section& section, std::vector<int> bars, int bar) {
    return standard_fault_force(section, fault_of(std::move(bars), 1e3, 0.1), 2e3, bar).has_value();
  };
  const Section row = three(flat, {0.1, 0.0}, {0.2, 0.0});
  CHECK(given(row, {0, 1, 2}, 1));
  CHECK(given(row, {0, 1, 2}, 0));
  CHECK(given(row, {0, 1}, 1));
  CHECK_FALSE(given(row, {0, 1}, 2));                                       // outside the fault
  CHECK_FALSE(given(three(flat, {0.1, 0.0}, {0.25, 0.0}), {0, 1, 2}, 1));   // uneven
  CHECK_FALSE(given(three(flat, {0.1, 0.03}, {0.2, 0.06}), {0, 1, 2}, 1));  // a stair
  const double h = 0.05 * std::sqrt(3.0);
  CHECK_FALSE(given(three(flat, {0.1, 0.0}, {0.05, h}), {0, 1, 2}, 1));  // flat in a triangle
  CHECK(given(three(Round{{}, 0.02}, {0.1, 0.0}, {0.05, h}), {0, 1, 2}, 1));
  CHECK_FALSE(given(three(Round{{}, 0.02}, {0.1, 0.0}, {0.0, 0.1}), {0, 1, 2}, 1));
  CHECK_FALSE(given(three(Frame{{}, 0.02, 0.02, 0.002, 0.0}, {0.1, 0.0}, {0.2, 0.0}), {0, 1}, 1));
  Section coaxial;
  coaxial.parts = {bar("core", {Round{{}, 0.02}}), bar("sheath", {Tube{{}, 0.06, 0.004}})};
  CHECK_FALSE(given(coaxial, {0, 1}, 0));

  CHECK_FALSE(standard_piece_force(bar("one", {flat}), 1e3).has_value());
  CHECK_FALSE(standard_piece_force(bar("rounds", {Round{{}, 0.02}, Round{{0.03, 0.0}, 0.02}}), 1e3)
                  .has_value());
  CHECK_FALSE(
      standard_piece_force(bar("stair", {flat, moved(flat, {0.02, 0.01})}), 1e3).has_value());
  const Rectangle square{{}, 0.02, 0.02, 0.0};
  CHECK_FALSE(
      standard_piece_force(
          bar("angle", {square, moved(square, {0.04, 0.0}), moved(square, {0.0, 0.04})}), 1e3)
          .has_value());
}
