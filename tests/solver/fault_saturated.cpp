// Short circuits beside steel that saturates.

#include <catch2/catch.hpp>
#include <cmath>

#include "solver/fault_solve.hpp"
#include "tests/support/faults.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/steel.hpp"

namespace barwall::solver {
namespace {

using support::alternating_fault;
using support::told_by;

constexpr double hertz = support::fault_hertz;

/// Saturates the plate over which three bars lie.
constexpr double saturating = 32e3;

const Problem& saturable_problem() {
  static const auto problem = support::with_curve(
      support::on_small_grid(support::three_bars_over_plate(), 1.0), support::test_steel());
  return *problem;
}

const ForceGeometry& saturable_geometry() {
  static const ForceGeometry geometry(saturable_problem());
  return geometry;
}

FaultSolution saturated(const FaultCurrent& fault) {
  return solve_fault(saturable_problem(), fault, saturable_geometry());
}

const FaultSolution& saturated_worst() {
  static const FaultSolution worst = saturated(alternating_fault(3, saturating, 0.1));
  return worst;
}

/// Of steady currents in the bars.
PartForces<PulsatingVector> steady_forces(const std::vector<double>& currents) {
  auto problem = std::make_shared<Problem>(saturable_problem());
  problem->excitation = {};
  problem->excitation.current.assign(currents.begin(), currents.end());
  problem->excitation.current.resize(4, 0.0);
  const Solution solution = solve(std::shared_ptr<const Problem>(problem));
  const RecoveredField field(solution);
  return forces_of(PartIntegrals(solution), saturable_geometry(), &field);
}

double largest_on_a_bar(const FaultSolution& solution) {
  double largest = 0.0;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    largest = std::max(largest, solution.extremes.part[bar]->peak.magnitude);
  }
  return largest;
}

double largest_in_series(const FaultSolution& solution) {
  double largest = 0.0;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    for (const mesh::Point force : *solution.series.force.part[bar]) {
      largest = std::max(largest, norm(force));
    }
  }
  return largest;
}

}  // namespace

TEST_CASE(
    "Beside saturated steel no closing angle gives more than the worst, and its own as much") {
  const FaultSolution& worst = saturated_worst();
  CHECK(worst.levels[3].saturated_share > 0.5);
  CHECK(worst.levels[3].saturated_share < 1.0);
  for (const double closing : {0.1, 0.9, 1.7, 2.5}) {
    const FaultSolution given = saturated(alternating_fault(3, saturating, 0.1, closing));
    for (std::size_t part = 0; part < 4; ++part) {
      CAPTURE(closing, part);
      const auto more = told_by(*worst.extremes.part[part]);
      const auto less = told_by(*given.extremes.part[part]);
      const double size = worst.extremes.part[part]->peak.magnitude;
      for (std::size_t k = 0; k < more.size(); ++k) {
        CHECK(less[k].value <= more[k].value + 2e-3 * size);
      }
      CHECK(given.levels[part].mean <= worst.levels[part].mean * 1.001);
    }
  }
  const auto& peak = worst.extremes.part[0]->peak;
  const FaultSolution own = saturated(alternating_fault(3, saturating, 0.1, peak.closing));
  CHECK(own.extremes.part[0]->peak.magnitude == Approx(peak.magnitude).epsilon(2e-3));
  CHECK(*own.extremes.part[0]->peak.seconds == Approx(*peak.seconds).epsilon(0.02));
}

TEST_CASE("The worst force beside saturated steel is that of the currents of its instant") {
  const FaultCurrent fault = alternating_fault(3, saturating, 0.1);
  for (std::size_t bar = 0; bar < 3; ++bar) {
    const FaultPeak& peak = saturated_worst().extremes.part[bar]->peak;
    const auto forces = steady_forces(fault_currents(fault, *peak.seconds, *peak.closing));
    CHECK(distance(forces.part[bar]->at(0.0), peak.value) < 1e-3 * peak.magnitude);
  }
}

TEST_CASE("The force of a given direct peak current is that of a steady solve with it") {
  const FaultCurrent fault{{0, 2}, DirectPeak{50e3, 80e3}};
  const FaultSolution solution = saturated(fault);
  const auto forces = steady_forces({80e3, 0.0, -80e3});
  for (std::size_t part = 0; part < 4; ++part) {
    const mesh::Point expected = forces.part[part]->at(0.0);
    const double size = norm(forces.part[0]->at(0.0));
    const FaultExtremes& found = *solution.extremes.part[part];
    CHECK(distance(found.peak.value, expected) < 1e-8 * size);
    CHECK(found.x_max.value == Approx(std::max(0.0, expected.x)).margin(1e-8 * size));
    CHECK(found.x_min.value == Approx(std::min(0.0, expected.x)).margin(1e-8 * size));
    CHECK(found.y_max.value == Approx(std::max(0.0, expected.y)).margin(1e-8 * size));
    CHECK(found.y_min.value == Approx(std::min(0.0, expected.y)).margin(1e-8 * size));
    CHECK_FALSE(found.peak.closing.has_value());
    // A bar without current has no force at any time.
    CHECK(found.peak.seconds.has_value() == (part == 1));
  }
  REQUIRE(solution.extremes.push.size() == forces.push.size());
  for (std::size_t face = 0; face < forces.push.size(); ++face) {
    CHECK(solution.extremes.push[face].x_max.value ==
          Approx(std::max(0.0, forces.push[face].x.mean)));
  }
  CHECK(solution.series.seconds.empty());
  CHECK(solution.newton.size() == 1);
}

TEST_CASE("Beside saturated steel forces no longer grow with the square of the currents") {
  const auto per_square = [](double current) {
    const FaultSolution solution = saturated({{0, 2}, DirectPeak{1e3, current}});
    return solution.extremes.part[3]->peak.magnitude / (current * current);
  };
  // As long as the plate is permeable it mirrors the currents, however permeable; then no more.
  const double permeable = per_square(5e3);
  CHECK(per_square(10e3) == Approx(permeable).epsilon(0.02));
  CHECK(per_square(80e3) < 0.8 * permeable);
  const double constant = largest_on_a_bar(saturated(alternating_fault(3, 5e3, 0.1))) / (5e3 * 5e3);
  CHECK(largest_on_a_bar(saturated_worst()) / (saturating * saturating) < 0.99 * constant);
}

TEST_CASE("The first cycle beside steel begins with nothing and has a fault's currents") {
  const FaultCurrent given = alternating_fault(3, saturating, 0.1, 0.9);
  const FaultSolution solutions[] = {saturated_worst(), saturated(given)};
  for (const FaultSolution& solution : solutions) {
    const FaultSeries& series = solution.series;
    REQUIRE(series.seconds.size() == 121);
    CHECK(series.seconds.front() == 0.0);
    CHECK(series.seconds.back() == Approx(1.0 / hertz));
    REQUIRE(series.current.size() == 3);
    for (std::size_t part = 0; part < 4; ++part) {
      CHECK(norm(series.force.part[part]->front()) < 1e-9 * largest_on_a_bar(solution));
    }
    for (std::size_t k = 0; k < series.seconds.size(); ++k) {
      const auto expected = fault_currents(given, series.seconds[k], *series.closing);
      for (std::size_t bar = 0; bar < 3; ++bar) {
        REQUIRE(series.current[bar][k] == Approx(expected[bar]).margin(1e-9 * saturating));
      }
    }
    // The course that was solved: both ends of the cycle, every instant with its own currents.
    REQUIRE(solution.course.has_value());
    REQUIRE(solution.course_seconds.size() == solution.course->size());
    CHECK(solution.course_seconds.front() == 0.0);
    CHECK(solution.course_seconds.back() == Approx(1.0 / hertz));
    for (std::size_t k = 0; k < solution.course->size(); ++k) {
      const auto expected = fault_currents(given, solution.course_seconds[k], *series.closing);
      for (std::size_t bar = 0; bar < 3; ++bar) {
        CHECK(solution.course->solution[k]->patterns[0].part_current[bar] ==
              Approx(expected[bar]).margin(1e-9 * saturating));
      }
    }
    CHECK(solution.course->solution.front()->potential.cwiseAbs().maxCoeff() == 0.0);
  }
  CHECK(*solutions[1].series.closing == 0.9);
}

TEST_CASE("The largest force on a bar in the first cycle is the extreme that is told") {
  // At its worst closing angle the series is that of the bar with the largest force.
  const FaultSolution& worst = saturated_worst();
  CHECK(largest_in_series(worst) == Approx(largest_on_a_bar(worst)).epsilon(5e-3));
  const FaultSolution given = saturated(alternating_fault(2, saturating, 0.0, 0.9));
  CHECK(largest_in_series(given) == Approx(largest_on_a_bar(given)).epsilon(5e-3));
}

TEST_CASE("A direct current that rises beside saturable steel takes its force to the steady one") {
  const double time_constant = 0.03;
  const FaultCurrent fault{{0, 2}, DirectRise{60e3, time_constant}};
  const FaultSolution solution = saturated(fault);
  const auto forces = steady_forces({60e3, 0.0, -60e3});
  const double size = norm(forces.part[0]->at(0.0));
  CHECK(distance(solution.extremes.part[0]->peak.value, forces.part[0]->at(0.0)) < 1e-8 * size);
  CHECK_FALSE(solution.extremes.part[0]->peak.seconds.has_value());
  const FaultSeries& series = solution.series;
  CHECK_FALSE(series.closing.has_value());
  CHECK(series.seconds.back() == Approx(5.0 * time_constant));
  const auto& course = *series.force.part[0];
  CHECK(norm(course.front()) < 1e-9 * size);
  for (std::size_t k = 1; k < course.size(); ++k) {
    REQUIRE(norm(course[k]) >= norm(course[k - 1]) - 1e-6 * size);
  }
  CHECK(norm(course.back()) < size);
  CHECK(norm(course.back()) > 0.97 * size);  // the square of 0.993
}

}  // namespace barwall::solver
