// Alternating currents in saturable steel, solved instant by instant.

#include "solver/instants.hpp"

#include <omp.h>

#include <catch2/catch.hpp>
#include <numbers>

#include "solver/cycle_recovery.hpp"
#include "solver/readings.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/solved.hpp"
#include "tests/support/steel.hpp"

namespace barwall {
namespace {

using mesh::Point;
using support::mm;

constexpr double pi = std::numbers::pi;
const double half_root = 0.5 * std::sqrt(3.0);

/// A round bar on the axis of a steel tube, radii 50 and 60 mm.
std::shared_ptr<solver::Problem> bar_in_tube(double current) {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {mesh::Round{{0, 0}, 30 * mm}}));
  section.parts.push_back(support::steel_wall("tube", {mesh::Tube{{0, 0}, 120 * mm, 10 * mm}}));
  return support::with_curve(
      support::problem_of(section, {1, 1}, {std::polar(current, 0.3), 0.0}, {}, 50.0),
      support::test_steel());
}

std::shared_ptr<solver::Problem> three_phases(double current, int cells_across = 2) {
  return support::problem_of(support::three_bars_in_trunking(), {1, 1, 1, 600},
                             {current, current * std::complex(-0.5, -half_root),
                              current * std::complex(-0.5, half_root), 0.0},
                             {cells_across}, 50.0);
}

/// What run_case reads off half a cycle.
struct Cycle {
  solver::Instants instants;
  std::shared_ptr<const solver::Solution> fundamental;
  std::shared_ptr<const solver::RecoveredField> field;
  solver::Readings readings;
};

Cycle cycle_of(const std::shared_ptr<solver::Problem>& problem,
               const std::vector<solver::Probe>& probes = {}) {
  Cycle cycle;
  cycle.instants = solver::solve_instants(*problem, solver::half_cycle_of(problem->excitation));
  auto fundamental = std::make_shared<solver::Solution>(fundamental_of(problem, cycle.instants));
  const solver::ForceGeometry geometry(*problem);
  solver::CycleRecovery recovery(static_cast<int>(cycle.instants.size()));
  std::vector<solver::Readings> readings;
  for (const auto& solution : cycle.instants.solution) {
    const solver::RecoveredField field(*solution);
    readings.push_back(
        readings_at_instant(solver::PartIntegrals(*solution), field, geometry, probes));
    recovery.add(field);
  }
  cycle.field = std::make_shared<solver::RecoveredField>(recovery.over_cycle(*fundamental));
  cycle.fundamental = fundamental;
  cycle.readings = over_half_cycle(std::span<const solver::Readings>(readings));
  cycle.readings.levels = field_levels(cycle.instants);
  cycle.readings.loops = loop_inductances(solver::PartIntegrals(*fundamental));
  return cycle;
}

/// Mean over the cycle of f(cos wt), as fine as it takes.
template <class F>
double mean_over_cycle(F f) {
  constexpr int count = 720;
  double sum = 0.0;
  for (int k = 0; k < count; ++k) sum += f(std::cos(pi * (k + 0.5) / count)) / count;
  return sum;
}

}  // namespace

TEST_CASE("In a steel tube round a bar with alternating current B follows the curve in the cycle") {
  for (double current : {100.0, 600.0, 20000.0}) {
    const double r = 55 * mm;
    const Point at{r * std::cos(1.0), r * std::sin(1.0)};
    const Cycle cycle = cycle_of(bar_in_tube(current), {{"wall", {at}, false, {}, {}}});
    const double amplitude = std::numbers::sqrt2 * current / (2.0 * pi * r);
    const auto b = [&](double cosine) {
      return support::flux_density_of(*support::test_steel(), amplitude * std::abs(cosine));
    };
    const solver::FieldReading& found = cycle.readings.probes[0][0];
    INFO("current " << current << " A, " << cycle.instants.size() << " instants");
    // As exact as steady currents are in this tube, 0.4 %.
    CHECK(found.peak == Approx(b(1.0)).epsilon(4e-3));
    CHECK(found.rms ==
          Approx(std::sqrt(mean_over_cycle([&](double c) { return b(c) * b(c); }))).epsilon(4e-3));
    const double fundamental =
        std::numbers::sqrt2 * mean_over_cycle([&](double c) { return b(c) * std::abs(c); });
    CHECK(std::hypot(norm(found.in_phase), norm(found.quadrature)) ==
          Approx(fundamental).epsilon(4e-3));
    CHECK(std::atan2(norm(found.quadrature), norm(found.in_phase)) == Approx(0.3).margin(5e-3));
  }
}

TEST_CASE("With a straight line for a curve the cycle is that of a constant permeability") {
  auto problem = three_phases(1000.0);
  problem->loops = {{"pair", {0}, {1}}};
  const std::vector<solver::Probe> probes{{"inside", {{20 * mm, 30 * mm}}, false, {}, {}},
                                          {"outside", {{0.0, 0.3}}, false, {}, {}}};
  const support::Solved plain = support::solved(problem);
  const auto expected = readings_of(*plain.integrals, *plain.field, *plain.geometry, probes);
  auto curved_problem = three_phases(1000.0);
  curved_problem->loops = problem->loops;
  const auto found =
      cycle_of(support::with_curve(curved_problem, support::straight_line(600.0)), probes).readings;
  const double largest = peak_of(*expected.forces.part[0]).magnitude;
  for (std::size_t part = 0; part < 4; ++part) {
    for (double wt : {0.1, 0.8, 2.0}) {
      CHECK(distance(found.forces.part[part]->at(wt), expected.forces.part[part]->at(wt)) <
            1e-6 * largest);
    }
    CHECK(std::abs(found.linkage[part] - expected.linkage[part]) <=
          1e-6 * std::abs(expected.linkage[0]));
    CHECK(found.levels[part].mean == Approx(expected.levels[part].mean).epsilon(1e-4));
    CHECK(found.levels[part].high == Approx(expected.levels[part].high).epsilon(1e-4));
  }
  CHECK(found.energy.largest() == Approx(expected.energy.largest()).epsilon(1e-7));
  CHECK(found.coenergy->mean == Approx(expected.energy.mean).epsilon(1e-7));
  CHECK(found.loops[0].value == Approx(expected.loops[0].value).epsilon(1e-7));
  for (std::size_t probe = 0; probe < 2; ++probe) {
    const auto& a = found.probes[probe][0];
    const auto& b = expected.probes[probe][0];
    CHECK(a.rms == Approx(b.rms).epsilon(1e-5));
    CHECK(a.peak == Approx(b.peak).epsilon(1e-4));
    CHECK(distance(a.in_phase, b.in_phase) < 1e-5 * b.rms);
    CHECK(distance(a.quadrature, b.quadrature) < 1e-5 * b.rms);
  }
}

TEST_CASE("A peak between instants in saturated steel is what a solve at its own instant gives") {
  const auto problem = support::with_curve(three_phases(30000.0), support::test_steel());
  const Cycle cycle = cycle_of(problem);
  CHECK(cycle.readings.levels[3].saturated_share > 0.1);
  const solver::ForceGeometry geometry(*problem);
  for (std::size_t bar = 0; bar < 3; ++bar) {
    const solver::Peak peak = peak_of(*cycle.readings.forces.part[bar]);
    auto steady = std::make_shared<solver::Problem>(*problem);
    steady->excitation = {};
    for (double current : solver::half_cycle_of(problem->excitation).currents(peak.wt)) {
      steady->excitation.current.emplace_back(current);
    }
    const solver::Solution solution = solver::solve(std::shared_ptr<const solver::Problem>(steady));
    const auto force =
        forces_of(solver::PartIntegrals(solution), geometry, nullptr).part[bar]->at(0.0);
    CHECK(distance(force, peak.value) < 1e-3 * peak.magnitude);
    // No instant is at it, and none beyond it.
    for (std::size_t k = 0; k < cycle.instants.size(); ++k) {
      CHECK(norm(cycle.readings.forces.part[bar]->at(cycle.instants.wt[k])) <=
            peak.magnitude * (1.0 + 1e-12));
    }
  }
}

TEST_CASE("The recovered field over the cycle has r.m.s. and peak of more than its fundamental") {
  const auto problem = support::with_curve(three_phases(30000.0), support::test_steel());
  const Cycle cycle = cycle_of(problem);
  double most = 0.0;
  for (int place = 0; place < cycle.field->place_count(); ++place) {
    const double fundamental = std::hypot(norm(cycle.field->flux_density(place, 0)),
                                          norm(cycle.field->flux_density(place, 1)));
    const double rms = cycle.field->rms(place);
    REQUIRE(rms >= fundamental * (1.0 - 1e-9));
    REQUIRE(cycle.field->peak(place) >= rms * (1.0 - 1e-9));
    REQUIRE(cycle.field->peak(place) <= std::sqrt(12.0) * 2.0 * rms);
    most = std::max(most, rms / fundamental);
  }
  CHECK(most > 1.02);  // saturated steel flattens what is in it
}

TEST_CASE("Instants do not depend on the number of threads") {
  const auto problem = support::with_curve(three_phases(30000.0), support::test_steel());
  const int threads = omp_get_max_threads();
  std::vector<solver::Instants> runs;
  for (int count : {1, 2}) {
    omp_set_num_threads(count);
    runs.push_back(solver::solve_instants(*problem, solver::half_cycle_of(problem->excitation)));
  }
  omp_set_num_threads(threads);
  REQUIRE(runs[0].size() == runs[1].size());
  CHECK(runs[0].strongest == runs[1].strongest);
  for (std::size_t k = 0; k < runs[0].size(); ++k) {
    REQUIRE(runs[0].solution[k]->potential == runs[1].solution[k]->potential);
  }
}

TEST_CASE("Instants are added until the others foretell them, and at most so many") {
  const auto problem = support::with_curve(three_phases(30000.0), support::test_steel());
  const auto course = solver::half_cycle_of(problem->excitation);
  const auto plain = solver::solve_instants(*problem, course);
  CHECK(plain.surprise <= 1e-2);
  CHECK(plain.size() >= 12);
  solver::InstantOptions strict;
  strict.surprise = 0.0;
  strict.most = 24;
  const auto all = solver::solve_instants(*problem, course, strict);
  CHECK(all.size() == 24);
  for (std::size_t k = 1; k < all.size(); ++k) {
    CHECK(all.wt[k] - all.wt[k - 1] == Approx(pi / 24.0));
  }
}

TEST_CASE("At an instant without any current there is no field") {
  mesh::Section section;
  section.parts.push_back(support::bar("go", {mesh::Round{{-40 * mm, 0}, 20 * mm}}));
  section.parts.push_back(support::bar("return", {mesh::Round{{40 * mm, 0}, 20 * mm}}));
  section.parts.push_back(support::steel_wall("duct", {mesh::Tube{{0, 0}, 160 * mm, 6 * mm}}));
  const auto problem = support::with_curve(
      support::problem_of(section, {1, 1, 1}, {2000.0, -2000.0, 0.0}, {2}, 50.0),
      support::test_steel());
  const auto instants =
      solver::solve_instants(*problem, solver::half_cycle_of(problem->excitation));
  const auto quarter = instants.size() / 2;
  CHECK(instants.wt[quarter] == Approx(pi / 2.0));
  CHECK(instants.solution[quarter]->potential.cwiseAbs().maxCoeff() == 0.0);
  CHECK(instants.strongest == 0);
}

}  // namespace barwall
