// Hand values beside the forces on the pieces of a bar in a short circuit.

#include "verify/hand_figures.hpp"

#include <catch2/catch.hpp>
#include <cmath>

#include "solver/fault_figures.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/solved.hpp"
#include "verify/short_circuit.hpp"

namespace barwall::verify {
namespace {

using support::mm;

/// Flat pieces of 10 x 60 mm, 10 mm apart, in a row round a middle.
std::vector<mesh::Shape> row_of(int pieces, double middle) {
  std::vector<mesh::Shape> row;
  for (int k = 0; k < pieces; ++k) {
    const double x = middle + (20.0 * k - 10.0 * (pieces - 1)) * mm;
    row.push_back(mesh::Rectangle{{x, 0.0}, 10 * mm, 60 * mm, 0.0});
  }
  return row;
}

/// Bars of two and of three pieces far from each other, and two that the fault passes by.
std::shared_ptr<solver::Problem> far_apart() {
  mesh::Section section;
  section.parts = {support::bar("L1", row_of(2, 0.0)), support::bar("L2", row_of(3, 2.0)),
                   support::bar("N", row_of(2, 4.0)),
                   support::bar("PE", {mesh::Round{{4.2, 0.0}, 20 * mm}})};
  return support::problem_of(section, {1, 1, 1, 1}, {1000.0, -1000.0, 0.0, 0.0}, {2, 50.0}, 50.0);
}

const solver::FaultCurrent fault{{0, 1}, solver::AlternatingFault{50.0, 20e3, 0.1, {}}};

const solver::FaultFigures& figures() {
  static const solver::FaultFigures result = [] {
    const auto problem = far_apart();
    const solver::ForceGeometry geometry(*problem);
    solver::Figures all = support::solved(problem).figures();
    all.fault =
        fault_figures(fault, *problem, geometry, solve_fault(*problem, fault, geometry), {});
    add_hand_values(all, *problem, &fault);
    return *all.fault;
  }();
  return result;
}

const solver::Figure& peak_of(const solver::Entry& entry) {
  const solver::Figure* figure = find_figure(entry.figures, "force_peak");
  REQUIRE(figure != nullptr);
  return *figure;
}

}  // namespace

// IEC 60865-1, table 1 (from memory): a_s is 34 mm of two pieces of 60 x 10 mm, 20 mm of three,
// rounded to the millimetre.
TEST_CASE("Outer pieces of a bar in a fault have the standard's force between pieces") {
  const double peak = standard_peak(fault);
  const double printed_distance[] = {34 * mm, 20 * mm};
  for (std::size_t bar = 0; bar < 2; ++bar) {
    const solver::Entry& entry = figures().bars[bar];
    const auto count = entry.pieces.size();
    REQUIRE(count == bar + 2);
    const double expected =
        standard_piece_force(far_apart()->section.parts[bar], peak).value().value;
    const double share = peak / static_cast<double>(count);
    CHECK(expected == Approx(2e-7 * share * share / printed_distance[bar]).epsilon(0.03));
    for (const std::size_t outer : {std::size_t{0}, count - 1}) {
      CAPTURE(entry.pieces[outer].name);
      CHECK(peak_of(entry.pieces[outer]).hand == Approx(expected));
      CHECK(entry.pieces[outer].hand_formula == "F_s between the pieces");
      CHECK(entry.pieces[outer].hand_source == "IEC 60865-1");
    }
  }
}

TEST_CASE("Inner pieces, and pieces of a bar that the fault passes by, have no hand value") {
  const solver::Entry& inner = figures().bars[1].pieces[1];
  CHECK(std::isnan(peak_of(inner).hand));
  CHECK(inner.hand_formula.empty());
  for (const solver::Entry& piece : figures().bars[2].pieces) {
    CHECK(std::isnan(peak_of(piece).hand));
  }
  CHECK(figures().bars[3].pieces.empty());
}

TEST_CASE("In open air the hand values of outer pieces agree with the solved field") {
  // The other bar, 2 m away, pulls both outer pieces the same way: their mean is left. The standard
  // takes kappa for the crest: 1 % over at R/X = 0.1.
  for (std::size_t bar = 0; bar < 2; ++bar) {
    const auto& pieces = figures().bars[bar].pieces;
    CAPTURE(pieces.front().name);
    const double mean = 0.5 * (peak_of(pieces.front()).value + peak_of(pieces.back()).value);
    CHECK(mean / peak_of(pieces.front()).hand == Approx(0.9895).epsilon(5e-3));
  }
  // What stands in the middle is held back by both neighbours.
  const auto& three = figures().bars[1].pieces;
  CHECK(peak_of(three[1]).value < 0.05 * peak_of(three[0]).value);
}

TEST_CASE("Pieces in the order of no row still have their hand values on the outer ones") {
  auto problem = far_apart();
  std::swap(problem->section.parts[1].pieces[0], problem->section.parts[1].pieces[1]);
  solver::Figures all;
  all.fault = figures();
  for (solver::Entry& bar : all.fault->bars) {
    for (solver::Entry& piece : bar.pieces) {
      for (solver::Figure& figure : piece.figures) figure.hand = solver::not_given;
    }
  }
  add_hand_values(all, *problem, &fault);
  const auto& pieces = all.fault->bars[1].pieces;
  CHECK(std::isnan(peak_of(pieces[0]).hand));
  CHECK(peak_of(pieces[1]).hand > 0.0);
  CHECK(peak_of(pieces[2]).hand == peak_of(pieces[1]).hand);
}

}  // namespace barwall::verify
