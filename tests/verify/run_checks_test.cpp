#include "verify/run_checks.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <complex>

#include "tests/support/problems.hpp"
#include "tests/support/sections.hpp"
#include "verify/air_samples.hpp"

namespace barwall::verify {
namespace {

using support::mm;

/// Two bars, one of them round, beside a steel plate.
mesh::Section pair_beside_plate() {
  mesh::Section section;
  section.parts.push_back(support::bar("go", {mesh::Rectangle{{0.0, 0.0}, 10 * mm, 60 * mm, 0.0}}));
  section.parts.push_back(support::bar("return", {mesh::Round{{50 * mm, 0.0}, 24 * mm}}));
  section.parts.push_back(
      support::steel_wall("plate", {mesh::Rectangle{{25 * mm, -50 * mm}, 120 * mm, 6 * mm, 0.0}}));
  return section;
}

std::shared_ptr<solver::Problem> plate_problem(const support::TestGrid& grid = {}) {
  return support::problem_of(pair_beside_plate(), {1.0, 1.0, 500.0}, {1000.0, -800.0, 0.0}, grid);
}

const solver::Solution& solved_once() {
  static const solver::Solution solution = solve(plate_problem());
  return solution;
}

std::vector<Check> checks_of(const solver::Solution& solution) {
  const solver::RecoveredField field(solution);
  const solver::StressBands bands(*solution.problem, bodies(solution.problem->outline));
  return run_checks(solver::PartIntegrals(solution), field, bands);
}

bool passed(const std::vector<Check>& checks, const std::string& name) {
  const auto found = std::find_if(checks.begin(), checks.end(),
                                  [&](const Check& check) { return check.name == name; });
  REQUIRE(found != checks.end());
  return found->passed;
}

/// A copy of the solved problem that a test may spoil.
struct Spoiled {
  solver::Solution solution = solved_once();
  std::shared_ptr<solver::Problem> problem =
      std::make_shared<solver::Problem>(*solved_once().problem);
  Spoiled() { solution.problem = problem; }
};

}  // namespace

TEST_CASE("A sound solution passes every check") {
  for (const Check& check : checks_of(solved_once())) {
    INFO(check.name << ": " << check.measured << " of " << check.limit << ", " << check.detail);
    CHECK(check.passed);
  }
}

TEST_CASE("A sound solution at a frequency passes every check") {
  const std::complex<double> turned = std::polar(1000.0, -2.0943951023931953);
  const auto problem = support::problem_of(support::trefoil_in_pipe(), {1, 1, 1, 900},
                                           {1000.0, turned, std::conj(turned), 0.0}, {}, 50.0);
  for (const Check& check : checks_of(solve(problem))) {
    INFO(check.name << ": " << check.measured << " of " << check.limit << ", " << check.detail);
    CHECK(check.passed);
  }
}

TEST_CASE("A boundary too near fails the Biot-Savart checks and the force balance") {
  support::TestGrid near;
  near.reach = 1.6;
  auto spoiled = *plate_problem(near);
  const auto checks = checks_of(solve(std::make_shared<solver::Problem>(spoiled)));
  CHECK_FALSE(passed(checks, "biot-savart-rms"));
  CHECK_FALSE(passed(checks, "biot-savart-worst"));
  CHECK_FALSE(passed(checks, "force-balance"));
}

TEST_CASE("A wall's permeability changed after the solve fails the energy check") {
  Spoiled spoiled;
  const auto& grid = spoiled.solution.grid();
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part == 2)
      spoiled.solution.reluctivity[static_cast<std::size_t>(t)] *= 1.25;
  }
  CHECK_FALSE(passed(checks_of(spoiled.solution), "energy"));
}

TEST_CASE("A wall taken for far less permeable after the solve fails the Biot-Savart checks") {
  Spoiled spoiled;
  const auto& grid = spoiled.solution.grid();
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part == 2)
      spoiled.solution.reluctivity[static_cast<std::size_t>(t)] *= 20.0;
  }
  const auto checks = checks_of(spoiled.solution);
  CHECK_FALSE(passed(checks, "biot-savart-rms"));
  CHECK_FALSE(passed(checks, "biot-savart-worst"));
}

TEST_CASE("A current scaled by one per cent after the solve fails the checks that know it") {
  Spoiled spoiled;
  spoiled.problem->excitation.current[0] *= 1.01;
  spoiled.solution.patterns[0].part_current[0] *= 1.01;
  const auto checks = checks_of(spoiled.solution);
  CHECK_FALSE(passed(checks, "biot-savart-rms"));
  CHECK_FALSE(passed(checks, "long-wire"));
  CHECK_FALSE(passed(checks, "ampere-loops"));
  CHECK_FALSE(passed(checks, "force-agreement"));
  CHECK_FALSE(passed(checks, "energy"));
}

TEST_CASE("A node shifted after the solve fails the energy check") {
  Spoiled spoiled;
  auto grid = std::make_shared<mesh::FittedGrid>(*spoiled.problem->grid);
  const mesh::Location at = locate(*grid, spoiled.problem->section, {25 * mm, 0.0});
  auto& node = grid->nodes[static_cast<std::size_t>(grid->triangle(at.triangle)[0])];
  node.x +=
      0.3 * (grid->nodes[static_cast<std::size_t>(grid->triangle(at.triangle)[1])].x - node.x);
  node.y +=
      0.2 * (grid->nodes[static_cast<std::size_t>(grid->triangle(at.triangle)[2])].y - node.y);
  spoiled.problem->grid = grid;
  CHECK_FALSE(passed(checks_of(spoiled.solution), "energy"));
}

TEST_CASE("A potential bent between a body and its neighbours fails the stress bands") {
  Spoiled spoiled;
  const auto& grid = spoiled.solution.grid();
  for (int n = 0; n < grid.node_count(); ++n) {
    const mesh::Point p = grid.nodes[static_cast<std::size_t>(n)];
    if (distance(p, {25 * mm, 0.0}) < 6 * mm) spoiled.solution.potential(n, 0) *= 1.05;
  }
  CHECK_FALSE(passed(checks_of(spoiled.solution), "stress-bands"));
}

TEST_CASE("A potential that is not a number fails every check") {
  Spoiled spoiled;
  spoiled.solution.potential.setConstant(NAN);
  for (const Check& check : checks_of(spoiled.solution)) {
    INFO(check.name);
    CHECK_FALSE(check.passed);
  }
}

TEST_CASE("A potential that is not a number at one place fails the checks that look there") {
  const auto spoiled_at = [](int triangle) {
    Spoiled spoiled;
    spoiled.solution.potential(spoiled.solution.grid().triangle(triangle)[0], 0) = NAN;
    return checks_of(spoiled.solution);
  };
  // Among the first of the samples in air, and on the first of the circles.
  const solver::Problem& problem = *solved_once().problem;
  const auto by_sample =
      spoiled_at(air_samples(problem).groups.front().samples.front().location.triangle);
  CHECK_FALSE(passed(by_sample, "biot-savart-rms"));
  CHECK_FALSE(passed(by_sample, "biot-savart-worst"));
  const mesh::Point on_circle =
      bounds(problem.section).centre() + mesh::Point{4.0 * half_size(problem.section), 0.0};
  const auto by_circle = spoiled_at(locate(*problem.grid, problem.section, on_circle).triangle);
  CHECK_FALSE(passed(by_circle, "long-wire"));
}

TEST_CASE("No checks at all are not soundness") {
  CHECK_FALSE(sound({}));
}

TEST_CASE("Loops in air pass round a wall thicker than its clearance") {
  mesh::Section thick;
  thick.parts.push_back(support::bar("bar", {mesh::Round{{0.0, 0.0}, 20 * mm}}));
  thick.parts.push_back(support::steel_wall("tube", {mesh::Tube{{0.0, 0.0}, 90 * mm, 20 * mm}}));
  CHECK(passed(checks_of(solve(support::problem_of(thick, {1.0, 500.0}, {800.0, 0.0}))),
               "ampere-loops"));
}

TEST_CASE("Loops in air pass round bars in contact") {
  mesh::Section touching;
  const double x[] = {0.0, 0.0, 40 * mm};
  const double y[] = {0.0, 60 * mm, 60 * mm};
  for (std::size_t k = 0; k < 3; ++k) {
    touching.parts.push_back(support::bar(std::string(1, static_cast<char>('A' + k)),
                                          {mesh::Rectangle{{x[k], y[k]}, 40 * mm, 10 * mm, 0.0}}));
  }
  CHECK(passed(
      checks_of(solve(support::problem_of(touching, {1.0, 1.0, 1.0}, {600.0, -300.0, -300.0}))),
      "ampere-loops"));
}

TEST_CASE("Of two sets of checks the worse of each is kept, with where it was") {
  std::vector<Check> checks{make_check("a", 0.1, 1.0, "load"), make_check("b", 0.3, 1.0, "load"),
                            make_check("c", 0.1, 1.0, "load"), make_check("d", NAN, 1.0, "load")};
  keep_worse(checks,
             {make_check("a", 2.0, 1.0, "bar"), make_check("b", 0.2, 1.0, "bar"),
              make_check("c", NAN, 1.0, "bar"), make_check("d", 0.1, 1.0, "bar")},
             "in the fault");
  CHECK(checks[0].detail == "in the fault: bar");
  CHECK_FALSE(checks[0].passed);
  CHECK(checks[1].detail == "load");
  CHECK_FALSE(checks[2].passed);
  CHECK_FALSE(checks[3].passed);
}

}  // namespace barwall::verify
