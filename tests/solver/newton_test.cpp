// Saturable steel: problems with known answers for any magnetising curve, and Newton's own
// promises.

#include <catch2/catch.hpp>
#include <numbers>

#include "solver/energy.hpp"
#include "solver/flux_linkage.hpp"
#include "solver/wall_field.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/solved.hpp"
#include "tests/support/steel.hpp"

namespace barwall {
namespace {

using mesh::Point;
using support::flux_density_of;
using support::mm;
using support::solved;
using support::Solved;
using support::straight_line;
using support::test_steel;
using support::with_curve;

/// A round bar on the axis of a steel tube, radii 50 and 60 mm: H = I / (2 pi r) for any curve.
std::shared_ptr<solver::Problem> bar_in_tube(double current) {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {mesh::Round{{0, 0}, 30 * mm}}));
  section.parts.push_back(support::steel_wall("tube", {mesh::Tube{{0, 0}, 120 * mm, 10 * mm}}));
  return with_curve(support::problem_of(section, {1, 1}, {current, 0.0}), test_steel());
}

TEST_CASE("In a steel tube round a centred bar B is that of I / (2 pi r) on the curve") {
  // From a fiftieth of a tesla to 3 T in the wall.
  for (double current : {5.0, 50.0, 200.0, 1000.0, 5000.0, 50000.0, 260000.0}) {
    const Solved run = solved(bar_in_tube(current));
    double worst = 0.0;
    double square = 0.0;
    constexpr int count = 400;
    for (int k = 0; k < count; ++k) {
      const double r = (50.0 + 10.0 * mesh::low_discrepancy_point(k).x) * mm;
      const double angle = 2.0 * std::numbers::pi * mesh::low_discrepancy_point(k).y;
      const double exact = flux_density_of(*test_steel(), current / (2.0 * std::numbers::pi * r));
      const Point b = run.b({r * std::cos(angle), r * std::sin(angle)});
      const double error = norm(b - exact * Point{-std::sin(angle), std::cos(angle)}) / exact;
      square += error * error / count;
      // Within a cell of the surfaces the fitted nodes leave a ripple.
      if (r > 52.5 * mm && r < 57.5 * mm) worst = std::max(worst, error);
    }
    INFO("current " << current << " A: r.m.s. " << std::sqrt(square) << ", mid-wall worst "
                    << worst);
    CHECK(std::sqrt(square) < 4e-3);
    CHECK(worst < 4e-3);
    // The wall's mean, as the figures give it.
    double flux = 0.0;
    constexpr int rings = 1000;
    for (int k = 0; k < rings; ++k) {
      const double r = (50.0 + 10.0 * (k + 0.5) / rings) * mm;
      flux += flux_density_of(*test_steel(), current / (2.0 * std::numbers::pi * r)) * r;
    }
    const double mean = flux * 10.0 * mm / rings * 2.0 / ((60.0 * 60.0 - 50.0 * 50.0) * mm * mm);
    CHECK(field_levels(*run.solution)[1].mean == Approx(mean).epsilon(2e-3));
    const auto& newton = run.solution->newton;
    REQUIRE(newton.size() == 2);
    INFO("iterations " << newton[0].iterations << ", " << newton[1].iterations);
    CHECK(newton[0].iterations <= 20);
    CHECK(newton[1].iterations <= 5);
  }
}

TEST_CASE("A straight line for a curve gives the figures of a constant permeability") {
  const mesh::Section section = support::trefoil_in_pipe();
  const std::vector<std::complex<double>> current{1000.0, -400.0, -600.0, 0.0};
  const auto make = [&] {
    auto problem = support::problem_of(section, {1, 1, 1, 900}, current);
    problem->loops = {{"12", {0}, {1}}, {"3-12", {2}, {0, 1}}};
    return problem;
  };
  const Solved constant = solved(make());
  const Solved curved = solved(with_curve(make(), straight_line(900.0)));
  const auto a = constant.figures();
  const auto b = curved.figures();
  const auto relative = [](double x, double y, double scale) { return std::abs(x - y) / scale; };
  double largest = 0.0;
  for (const auto& entry : a.bars) {
    largest = std::max({largest, std::abs(find_figure(entry.figures, "force_x")->value),
                        std::abs(find_figure(entry.figures, "force_y")->value)});
  }
  for (std::size_t k = 0; k < 3; ++k) {
    for (const char* key : {"force_x", "force_y"}) {
      CHECK(relative(find_figure(a.bars[k].figures, key)->value,
                     find_figure(b.bars[k].figures, key)->value, largest) < 1e-8);
    }
    CHECK(find_figure(b.bars[k].figures, "flux_linkage")->value ==
          Approx(find_figure(a.bars[k].figures, "flux_linkage")->value).epsilon(1e-8));
  }
  for (std::size_t k = 0; k < 2; ++k) {
    const double inductance = find_figure(a.loops[k].figures, "inductance")->value;
    for (const char* key : {"inductance_secant", "inductance_differential"}) {
      CHECK(find_figure(b.loops[k].figures, key)->value == Approx(inductance).epsilon(1e-8));
    }
  }
  CHECK(find_figure(b.energy, "energy")->value ==
        Approx(find_figure(a.energy, "energy")->value).epsilon(1e-8));
  CHECK(find_figure(b.energy, "coenergy")->value ==
        Approx(find_figure(a.energy, "energy")->value).epsilon(1e-8));
  CHECK(find_figure(b.walls[0].figures, "b_mean")->value ==
        Approx(find_figure(a.walls[0].figures, "b_mean")->value).epsilon(1e-8));
  CHECK(find_figure(b.walls[0].figures, "saturated_share")->value == 0.0);
}

TEST_CASE("Newton converges from zero, from linear to a hundred times saturation") {
  for (double scale : {1e-3, 1.0, 10.0, 100.0, 1000.0}) {
    auto problem =
        support::problem_of(support::trefoil_in_pipe(), {1, 1, 1, 1},
                            {3000.0 * scale, -1200.0 * scale, -1800.0 * scale, 0.0}, {2});
    problem->materials.back() = solver::saturable_material("steel", test_steel());
    const solver::Solution solution = solve(problem);
    REQUIRE(solution.newton.size() == 1);
    const auto& newton = solution.newton[0];
    INFO("scale " << scale << ", iterations " << newton.iterations);
    CHECK(newton.converged);
    CHECK(newton.iterations <= 25);
    // The end is quadratic: r_next <= C r^2 with a C that is not large.
    const auto& r = newton.residuals;
    REQUIRE(r.size() >= 3);
    const double before = r[r.size() - 3];
    const double last = r[r.size() - 2];
    if (before < 0.1 && last > 1e-9) CHECK(last / (before * before) < 1e3);
  }
}

TEST_CASE("The differential inductance is the change of flux linkage with current") {
  const auto linkage_at = [](double current) {
    auto problem = support::problem_of(support::trefoil_in_pipe(), {1, 1, 1, 1},
                                       {current, -current, 0.0, 0.0}, {2});
    problem->materials.back() = solver::saturable_material("steel", test_steel());
    problem->loops = {{"12", {0}, {1}}};
    const Solved run = solved(problem);
    return std::pair{run.integrals->mean_potential(0, 0) - run.integrals->mean_potential(1, 0),
                     std::pair{loop_inductance(*run.integrals, problem->loops[0]),
                               differential_inductance(*run.integrals, problem->loops[0])}};
  };
  for (double current : {500.0, 5000.0, 30000.0}) {
    const double step = 1e-3 * current;
    const auto [linkage, inductance] = linkage_at(current);
    const double quotient =
        (linkage_at(current + step).first - linkage_at(current - step).first) / (2.0 * step);
    CHECK(inductance.first == Approx(linkage / current).epsilon(1e-8));
    CHECK(inductance.second == Approx(quotient).epsilon(1e-5));
  }
}

TEST_CASE("Coenergy grows with current by the flux linkage") {
  const auto at = [](double scale) {
    auto problem =
        support::problem_of(support::trefoil_in_pipe(), {1, 1, 1, 1},
                            {10000.0 * scale, -4000.0 * scale, -6000.0 * scale, 0.0}, {2});
    problem->materials.back() = solver::saturable_material("steel", test_steel());
    return solved(problem);
  };
  const Solved run = at(1.0);
  const double step = 1e-3;
  const double quotient = (saturable_energy(*at(1.0 + step).solution).coenergy -
                           saturable_energy(*at(1.0 - step).solution).coenergy) /
                          (2.0 * step);
  double work = 0.0;
  for (int k = 0; k < 3; ++k) {
    work += run.solution->patterns[0].part_current[static_cast<std::size_t>(k)] *
            run.integrals->mean_potential(k, 0);
  }
  CHECK(quotient == Approx(work).epsilon(1e-5));
}

TEST_CASE("In saturated steel a force is the change of coenergy with the body's place") {
  // A bar off the axis of a pipe that its return, on the other side, helps to saturate.
  const auto at = [](double shift) {
    mesh::Section section;
    section.parts.push_back(support::bar("go", {mesh::Round{{-25 * mm + shift, 0.0}, 20 * mm}}));
    section.parts.push_back(support::bar("back", {mesh::Round{{25 * mm, 0.0}, 20 * mm}}));
    section.parts.push_back(
        support::steel_wall("pipe", {mesh::Tube{{0.0, 0.0}, 130 * mm, 5 * mm}}));
    return solved(with_curve(support::problem_of(section, {1, 1, 1}, {80000.0, -80000.0, 0.0}),
                             test_steel()));
  };
  const Solved run = at(0.0);
  const auto levels = field_levels(*run.solution);
  CHECK(levels[2].saturated_share > 0.05);
  CHECK(levels[2].saturated_share < 0.95);
  const double step = 0.01 * 25 * mm;  // a hundredth of the gap to the pipe
  const double quotient = (saturable_energy(*at(step).solution).coenergy -
                           saturable_energy(*at(-step).solution).coenergy) /
                          (2.0 * step);
  const double force = lorentz_force(*run.integrals, 0).x.mean;
  CHECK(force == Approx(quotient).epsilon(5e-3));
  const double stress = run.geometry->bands.force(*run.solution, 0, solver::whole_band).x.mean;
  CHECK(stress == Approx(force).epsilon(5e-3));
  const double inner = run.geometry->bands.force(*run.solution, 0, solver::inner_band).x.mean;
  const double outer = run.geometry->bands.force(*run.solution, 0, solver::outer_band).x.mean;
  CHECK(inner == Approx(outer).epsilon(5e-3));
}

}  // namespace
}  // namespace barwall
