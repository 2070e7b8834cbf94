// The checks of alternating currents in saturable steel, and what they see of a single instant
// gone wrong.

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <functional>

#include "solver/instants.hpp"
#include "solver/part_forces.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/steel.hpp"
#include "verify/run_checks.hpp"

namespace barwall::verify {
namespace {

using support::mm;

/// Three phases that saturate the plate below them, and half a cycle of them.
struct Cycle {
  std::shared_ptr<const solver::Problem> problem;
  solver::Instants instants;
};

const Cycle& solved_once() {
  static const Cycle cycle = [] {
    const double current = 40e3;
    const double half_root = 0.5 * std::sqrt(3.0);
    const auto problem =
        support::with_curve(support::problem_of(support::three_bars_over_plate(), {1, 1, 1, 1},
                                                {current, current * std::complex(-0.5, -half_root),
                                                 current * std::complex(-0.5, half_root), 0.0},
                                                {}, 50.0),
                            support::test_steel());
    const solver::InstantOptions six{6, 6};  // few, as the checks do not ask how many
    return Cycle{problem,
                 solve_instants(*problem, solver::half_cycle_of(problem->excitation), six)};
  }();
  return cycle;
}

/// The instant that is spoiled, at 120 degrees.
constexpr std::size_t spoiled_instant = 4;

std::vector<Check> checks_of(const solver::Instants& instants) {
  const solver::Problem& problem = *solved_once().problem;
  static const solver::ForceGeometry geometry(problem);
  CycleChecks checks;
  for (std::size_t k = 0; k < instants.size(); ++k) {
    const solver::Solution& solution = *instants.solution[k];
    checks.add(instants.wt[k], solver::PartIntegrals(solution), solver::RecoveredField(solution),
               geometry.bands);
  }
  return checks.checks(problem, geometry.bands.bodies());
}

/// The checks with one instant's solution changed.
std::vector<Check> with_spoiled(const std::function<void(solver::Solution&)>& spoil) {
  solver::Instants instants = solved_once().instants;
  auto solution = std::make_shared<solver::Solution>(*instants.solution[spoiled_instant]);
  spoil(*solution);
  instants.solution[spoiled_instant] = solution;
  return checks_of(instants);
}

const Check& named(const std::vector<Check>& checks, const std::string& name) {
  const auto found = std::find_if(checks.begin(), checks.end(),
                                  [&](const Check& check) { return check.name == name; });
  REQUIRE(found != checks.end());
  return *found;
}

bool names_the_instant(const Check& check) {
  return check.detail.find("wt = 120 deg") != std::string::npos;
}

/// Multiplies A in a part's own triangles and at their corners.
void scale_within(solver::Solution& solution, int part, double factor) {
  const mesh::FittedGrid& grid = solution.grid();
  std::vector<bool> within(static_cast<std::size_t>(grid.node_count()), false);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part != part) continue;
    for (const int node : grid.triangle(t)) within[static_cast<std::size_t>(node)] = true;
  }
  for (int n = 0; n < grid.node_count(); ++n) {
    if (within[static_cast<std::size_t>(n)]) solution.potential(n, 0) *= factor;
  }
}

}  // namespace

TEST_CASE("A sound half cycle beside saturated steel passes every check") {
  const auto checks = checks_of(solved_once().instants);
  std::vector<std::string> names;
  for (const Check& check : checks) {
    INFO(check.name << ": " << check.measured << " of " << check.limit << ", " << check.detail);
    CHECK(check.passed);
    if (check.name == "ampere-loops") CHECK_FALSE(names_the_instant(check));
    names.push_back(check.name);
  }
  CHECK(names == std::vector<std::string>{"biot-savart-rms", "biot-savart-worst", "long-wire",
                                          "ampere-loops", "force-balance", "force-agreement",
                                          "stress-bands", "energy"});
}

TEST_CASE("One instant with another one's potential fails the checks that know its currents") {
  const auto checks = with_spoiled([](solver::Solution& solution) {
    solution.potential = solved_once().instants.solution[spoiled_instant - 2]->potential;
  });
  for (const char* name : {"biot-savart-rms", "force-agreement"}) {
    CHECK_FALSE(named(checks, name).passed);
  }
  for (const char* name : {"long-wire", "ampere-loops", "energy"}) {
    CHECK_FALSE(named(checks, name).passed);
    CHECK(names_the_instant(named(checks, name)));
  }
}

TEST_CASE("A potential five per cent too large within a bar at one instant fails checks") {
  const auto checks =
      with_spoiled([](solver::Solution& solution) { scale_within(solution, 0, 1.05); });
  CHECK_FALSE(named(checks, "energy").passed);
  CHECK(names_the_instant(named(checks, "energy")));
}

TEST_CASE("Steel taken for less permeable at one instant fails the Biot-Savart checks and energy") {
  const auto checks = with_spoiled([](solver::Solution& solution) {
    const mesh::FittedGrid& grid = solution.grid();
    for (int t = 0; t < grid.triangle_count(); ++t) {
      if (grid.occupant(t).part == 3) solution.reluctivity[static_cast<std::size_t>(t)] *= 20.0;
    }
  });
  CHECK_FALSE(named(checks, "biot-savart-rms").passed);
  CHECK_FALSE(named(checks, "energy").passed);
  CHECK(names_the_instant(named(checks, "energy")));
  CHECK(named(checks, "ampere-loops").passed);
}

TEST_CASE("A potential bent beside a bar at one instant fails the stress bands") {
  const auto checks = with_spoiled([](solver::Solution& solution) {
    const mesh::FittedGrid& grid = solution.grid();
    for (int n = 0; n < grid.node_count(); ++n) {
      // Half way from L1 to L2.
      const mesh::Point p = grid.nodes[static_cast<std::size_t>(n)];
      if (distance(p, {-20 * mm, 0.0}) < 6 * mm) solution.potential(n, 0) *= 1.05;
    }
  });
  CHECK_FALSE(named(checks, "stress-bands").passed);
}

TEST_CASE("A current told one per cent too large at one instant fails the checks that know it") {
  const auto checks = with_spoiled([](solver::Solution& solution) {
    auto problem = std::make_shared<solver::Problem>(*solution.problem);
    // L2 at its crest.
    problem->excitation.current[1] *= 1.01;
    solution.patterns[0].part_current[1] *= 1.01;
    solution.problem = problem;
  });
  for (const char* name : {"ampere-loops", "energy"}) {
    CHECK_FALSE(named(checks, name).passed);
    CHECK(names_the_instant(named(checks, name)));
  }
}

TEST_CASE("A potential that is not a number at one instant fails every check") {
  for (const Check& check :
       with_spoiled([](solver::Solution& solution) { solution.potential.setConstant(NAN); })) {
    CAPTURE(check.name);
    CHECK_FALSE(check.passed);
    if (check.name == "ampere-loops" || check.name == "energy") CHECK(names_the_instant(check));
  }
}

}  // namespace barwall::verify
