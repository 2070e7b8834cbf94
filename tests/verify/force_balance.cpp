// The checks of forces, on accounts made by hand.

#include "verify/force_balance.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"
#include "tests/support/sections.hpp"

namespace barwall::verify {
namespace {

using solver::PulsatingVector;
using support::mm;

const std::vector<std::vector<int>> bodies{{0}, {1}, {2}};

/// Two bars and a plate, 100 mm from end to end.
solver::Problem problem_with(double current) {
  solver::Problem problem;
  problem.section.parts = {
      support::bar("A", {mesh::Rectangle{{-45 * mm, 0.0}, 10 * mm, 40 * mm, 0.0}}),
      support::bar("B", {mesh::Rectangle{{45 * mm, 0.0}, 10 * mm, 40 * mm, 0.0}}),
      support::steel_wall("plate", {mesh::Rectangle{{0.0, 0.0}, 4 * mm, 40 * mm, 0.0}})};
  problem.excitation.current = {current, -current, 0.0};
  return problem;
}

PulsatingVector along_x(double force) {
  return {{force}, {}};
}

/// A body on which every way finds the same force.
BodyForce body(double force, bool lorentz = true) {
  return {lorentz, along_x(force), along_x(force), along_x(force), along_x(force)};
}

const Check& named(const std::vector<Check>& checks, const std::string& name) {
  for (const Check& check : checks) {
    if (check.name == name) return check;
  }
  throw std::runtime_error("no check " + name);
}

/// Largest force 100 N/m on A, B's given, the plate balancing both.
std::vector<BodyForce> account_with(double force_on_b) {
  return {body(100.0), body(force_on_b), body(-100.0 - force_on_b, false)};
}

}  // namespace

TEST_CASE("Forces that agree and cancel pass every check") {
  for (const Check& check : check_forces(problem_with(1000.0), bodies, account_with(-80.0))) {
    CHECK(check.measured == Approx(0.0).margin(1e-15));
    CHECK(check.limit == 0.005);
    CHECK(check.passed);
  }
}

TEST_CASE("An error of a force above a tenth of the largest is relative to itself") {
  // 0.2 % of the largest force, 1 % of B's own.
  std::vector<BodyForce> account = account_with(-20.0);
  account[1].stress = along_x(-20.2);
  const auto agreement = check_forces(problem_with(1000.0), bodies, account);
  CHECK(named(agreement, "force-agreement").measured == Approx(0.2 / 20.0));
  CHECK_FALSE(named(agreement, "force-agreement").passed);
  CHECK(named(agreement, "force-agreement").detail == "worst: B");
  CHECK(named(agreement, "stress-bands").passed);
  account = account_with(-20.0);
  account[1].inner = along_x(-20.2);
  const auto bands = check_forces(problem_with(1000.0), bodies, account);
  CHECK(named(bands, "stress-bands").measured == Approx(0.2 / 20.0));
  CHECK(named(bands, "stress-bands").detail == "worst: B");
  CHECK(named(bands, "force-agreement").passed);
}

TEST_CASE("An error of a force below a tenth of the largest is relative to that") {
  // 4 % of B's own force, 0.3 % of the largest.
  std::vector<BodyForce> account{body(100.0), body(-7.5), body(-92.5, false)};
  account[1].stress = along_x(-7.8);
  account[1].outer = along_x(-7.8);
  const auto checks = check_forces(problem_with(1000.0), bodies, account);
  for (const char* name : {"force-agreement", "stress-bands"}) {
    CHECK(named(checks, name).measured == Approx(0.003));
    CHECK(named(checks, name).passed);
    CHECK(named(checks, name).detail == "worst: B");
  }
}

TEST_CASE("At a tenth of the largest force the scale changes from that to the force itself") {
  for (const bool above : {false, true}) {
    const double own = above ? -10.001 : -9.999;
    std::vector<BodyForce> account = account_with(own);
    account[1].stress = along_x(own + 0.1);
    const double measured =
        named(check_forces(problem_with(1000.0), bodies, account), "force-agreement").measured;
    CHECK(measured == Approx(0.1 / (above ? 10.001 : 100.0)));
  }
}

TEST_CASE("Forces that do not cancel fail the balance, relative to the largest") {
  for (const double missing : {0.4, 0.6}) {
    const std::vector<BodyForce> account{body(100.0), body(-20.0), body(-80.0 + missing, false)};
    const Check balance =
        named(check_forces(problem_with(1000.0), bodies, account), "force-balance");
    CHECK(balance.measured == Approx(missing / 100.0));
    CHECK(balance.passed == (missing < 0.5));
    CHECK(balance.detail == "of the largest force, 100 N/m");
  }
}

TEST_CASE("Where there is next to no force the currents are the scale") {
  // 1 % of mu_0 (sum of |I|)^2 / (2 pi size).
  const double floor =
      0.01 * solver::mu_0 * std::pow(2000.0, 2) / (2.0 * std::numbers::pi * 100 * mm);
  const double tiny = 1e-3 * floor;
  const std::vector<BodyForce> account{body(tiny), body(0.0), body(0.0, false)};
  const Check balance = named(check_forces(problem_with(1000.0), bodies, account), "force-balance");
  CHECK(balance.measured == Approx(1e-3));
  CHECK(balance.passed);
  CHECK(balance.detail.find("no force to speak of") == 0);
  CHECK_FALSE(named(check_forces(problem_with(10.0), bodies, account), "force-balance").passed);
}

TEST_CASE("Over a cycle a force's size is its largest magnitude") {
  // Forces whose means vanish, 20 N/m on B and an error of a hundredth of it at one phase of 2 wt.
  const auto swing = [](double force) { return PulsatingVector{{0.0, force, 0.0}, {}}; };
  std::vector<BodyForce> account(3);
  const double sizes[] = {100.0, -20.0, -80.0};
  for (std::size_t k = 0; k < 3; ++k) {
    account[k] = {k < 2, swing(sizes[k]), swing(sizes[k]), swing(sizes[k]), swing(sizes[k])};
  }
  solver::Problem problem = problem_with(1000.0);
  problem.excitation.frequency_hz = 50.0;
  for (const Check& check : check_forces(problem, bodies, account)) CHECK(check.passed);
  account[1].stress.y.sine = 0.2;
  const Check agreement = named(check_forces(problem, bodies, account), "force-agreement");
  CHECK(agreement.measured == Approx(0.01));
  CHECK(agreement.detail == "worst: B");
}

TEST_CASE("Steel and bodies of several parts have no J x B to agree with") {
  std::vector<BodyForce> account = account_with(-20.0);
  for (BodyForce& entry : account) entry.lorentz = false;
  account[0].stress = along_x(50.0);
  const Check agreement =
      named(check_forces(problem_with(1000.0), bodies, account), "force-agreement");
  CHECK(agreement.measured == 0.0);
  CHECK(agreement.detail == "no bar alone");
}

TEST_CASE("One body's force that is not a number fails every check, wherever it stands") {
  for (std::size_t place = 0; place < 2; ++place) {
    std::vector<BodyForce> account = account_with(-80.0);
    account[place] = body(NAN);
    for (const Check& check : check_forces(problem_with(1000.0), bodies, account)) {
      CAPTURE(place, check.name);
      CHECK_FALSE(check.passed);
    }
  }
}

}  // namespace barwall::verify
