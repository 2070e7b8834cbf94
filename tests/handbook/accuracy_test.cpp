// The accuracy that barwall promises at its defaults (cells_across 4): force errors relative to
// the largest bar force, B errors as vector differences over the local |B|, with a floor of a
// thousandth of the group's largest.

#include <catch2/catch.hpp>
#include <numbers>

#include "mesh/sampling.hpp"
#include "solver/flux_linkage.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/solved.hpp"
#include "verify/filled_bar.hpp"
#include "verify/mean_distance.hpp"
#include "verify/pipe_series.hpp"

namespace barwall {
namespace {

using mesh::Point;
using mesh::Rectangle;
using support::mm;
using support::solved;
using support::Solved;

/// Largest relative vector error of B over a group of points.
template <class Exact>
double worst_b(const Solved& run, const std::vector<Point>& group, Exact exact) {
  double largest = 0.0;
  for (Point p : group) largest = std::max(largest, norm(exact(p)));
  double worst = 0.0;
  for (Point p : group) {
    const double scale = std::max(norm(exact(p)), 1e-3 * largest);
    worst = std::max(worst, norm(run.b(p) - exact(p)) / scale);
  }
  return worst;
}

/// The place of the largest relative vector error, for messages.
template <class Exact>
std::string where_worst(const Solved& run, const std::vector<Point>& group, Exact exact) {
  std::string place;
  double worst = 0.0;
  for (Point p : group) {
    const double error = norm(run.b(p) - exact(p)) / norm(exact(p));
    if (error <= worst) continue;
    worst = error;
    place = "worst at (" + std::to_string(1e3 * p.x) + ", " + std::to_string(1e3 * p.y) +
            ") mm, |B| = " + std::to_string(1e3 * norm(exact(p))) + " mT";
  }
  return place;
}

/// Points of a box, on a low-discrepancy sequence, at least `clearance` from any outline and, in
/// air or in the given part only.
std::vector<Point> points_in(const mesh::Section& section, mesh::Box box, double clearance,
                             int count) {
  const mesh::Outline outline = outline_of(section);
  std::vector<Point> result;
  for (int k = 0; static_cast<int>(result.size()) < count; ++k) {
    const Point unit = mesh::low_discrepancy_point(k);
    const Point p = box.low + Point{unit.x * box.width(), unit.y * box.height()};
    if (occupant_at(section, p).part >= 0) continue;
    bool clear = true;
    for (const auto& piece : outline.pieces) clear = clear && distance(piece.curve, p) >= clearance;
    if (clear) result.push_back(p);
  }
  return result;
}

/// Points outside a box round the section, out to `reach` from its centre.
std::vector<Point> points_outside(double inner_half, double reach, int count) {
  std::vector<Point> result;
  for (int k = 0; k < count; ++k) {
    const Point unit = mesh::low_discrepancy_point(k);
    const double r = inner_half * std::pow(reach / inner_half, unit.x);
    const double angle = 2.0 * std::numbers::pi * unit.y;
    result.push_back({r * std::cos(angle), r * std::sin(angle)});
  }
  return result;
}

double force_error(const Solved& run, const Solved& exact, int bars) {
  double largest = 0.0;
  double worst = 0.0;
  for (int k = 0; k < bars; ++k) {
    const auto f = lorentz_force(*run.integrals, k);
    const auto g = lorentz_force(*exact.integrals, k);
    largest = std::max(largest, std::hypot(g.x.mean, g.y.mean));
    worst = std::max(worst, std::hypot(f.x.mean - g.x.mean, f.y.mean - g.y.mean));
  }
  return worst / largest;
}

support::TestGrid grid_to(double reach_of_probes, int cells_across = 4, double reach = 400.0) {
  support::TestGrid grid{cells_across, reach, {}};
  grid.probes.include(Point{-reach_of_probes, -reach_of_probes});
  grid.probes.include(Point{reach_of_probes, reach_of_probes});
  return grid;
}

}  // namespace

TEST_CASE("Rectangular bars in open air: B within 0.2 %, forces and linkage within 0.1 %") {
  mesh::Section section;
  const double x[] = {0.0, 50 * mm};
  for (int k = 0; k < 2; ++k) {
    section.parts.push_back(
        support::bar(k == 0 ? "go" : "return", {Rectangle{{x[k], 0.0}, 10 * mm, 100 * mm, 0.0}}));
  }
  auto problem = support::problem_of(section, {1, 1}, {1000.0, -1000.0}, grid_to(1.0));
  problem->loops = {{"pair", {0}, {1}}};
  const Solved run = solved(problem);
  const auto exact = [&](Point p) {
    return verify::field_of(section.parts[0].pieces[0], 1000.0, p) +
           verify::field_of(section.parts[1].pieces[0], -1000.0, p);
  };
  mesh::Box box;
  box.include(Point{-100 * mm, -120 * mm});
  box.include(Point{150 * mm, 120 * mm});
  CHECK(worst_b(run, points_in(section, box, 5 * mm, 200), exact) < 2e-3);

  // 2.824509787 N/m at 1 kA: the exact factor between flat bars (Dwight 1917), recomputed.
  for (int k = 0; k < 2; ++k) {
    const auto force = lorentz_force(*run.integrals, k);
    CHECK(std::abs(force.x.mean - (k == 0 ? -1 : 1) * 2.824509787) < 1e-3 * 2.824509787);
    CHECK(std::abs(force.y.mean) < 1e-3 * 2.824509787);
  }
  // 367.5150886 nH/m: geometric mean distances of rectangles (Maxwell, Treatise), recomputed.
  CHECK(1e9 * loop_inductance(*run.integrals, problem->loops[0]) ==
        Approx(367.5150886).epsilon(1e-3));
  for (int k = 0; k < 2; ++k) {
    const double linkage = run.integrals->mean_potential(k, 0);
    CHECK(1e6 * linkage == Approx((k == 0 ? 0.5 : -0.5) * 367.5150886).epsilon(1e-3));
  }
}

TEST_CASE("One rectangular bar in open air: B within 0.2 % and linkage within 0.1 %") {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {Rectangle{{0, 0}, 10 * mm, 100 * mm, 0.0}}));
  const Solved run = solved(support::problem_of(section, {1}, {1000.0}, grid_to(1.0)));
  const std::vector<Point> points{
      {20 * mm, 0},  {20 * mm, 30 * mm}, {50 * mm, 0},   {0, 100 * mm},       {100 * mm, 100 * mm},
      {500 * mm, 0}, {1000 * mm, 0},     {0, 1000 * mm}, {2.5 * mm, 25 * mm}, {5 * mm, 0}};
  CHECK(worst_b(run, points, [&](Point p) {
          return verify::field_of(section.parts[0].pieces[0], 1000.0, p);
        }) < 2e-3);
  // Flux linkage from the bar's own geometric mean distance, 24.59589409 mm (Maxwell), recomputed.
  const double exact = -2e-7 * 1000.0 * std::log(24.59589409e-3);
  CHECK(run.integrals->mean_potential(0, 0) == Approx(exact).epsilon(1e-3));
}

TEST_CASE("Trefoil in a steel pipe: forces within 0.05 %, B within 0.3 % inside and 2 % outside") {
  const mesh::Section section = support::trefoil_in_pipe();
  const std::vector<std::complex<double>> current{1000.0, -400.0, -600.0, 0.0};
  const Solved run = solved(support::problem_of(section, {1, 1, 1, 900}, current, grid_to(1.0)));
  const verify::Pipe pipe{60 * mm, 65 * mm, 900.0};
  std::vector<verify::RoundBar> bars;
  for (std::size_t k = 0; k < 3; ++k) {
    const auto& round = std::get<mesh::Round>(section.parts[k].pieces[0]);
    bars.push_back({round.centre, current[k].real(), 0.5 * round.diameter});
  }
  const auto exact = [&](Point p) { return verify::field_of(pipe, bars, p); };
  double largest = 0.0;
  double worst = 0.0;
  for (std::size_t k = 0; k < 3; ++k) {
    const Point f = force_on_bar(pipe, bars, k);
    const auto g = lorentz_force(*run.integrals, static_cast<int>(k));
    largest = std::max(largest, norm(f));
    worst = std::max(worst, norm(f - Point{g.x.mean, g.y.mean}));
  }
  CHECK(worst < 5e-4 * largest);
  // In air 5 mm and more from any outline, as in the trunking.
  mesh::Box box;
  box.include(Point{-60 * mm, -60 * mm});
  box.include(Point{60 * mm, 60 * mm});
  std::vector<Point> inside;
  for (Point p : points_in(section, box, 5 * mm, 300)) {
    if (norm(p) < 60 * mm) inside.push_back(p);
  }
  INFO(where_worst(run, inside, exact));
  CHECK(worst_b(run, inside, exact) < 3e-3);
  CHECK(worst_b(run, points_outside(70 * mm, 1.0, 200), exact) < 2e-2);
}

TEST_CASE("Three bars in a steel trunking against a grid four times finer", "[long]") {
  const mesh::Section section = support::three_bars_in_trunking();
  const std::vector<std::complex<double>> current{1000.0, -400.0, -600.0, 0.0};
  const auto run_at = [&](int cells) {
    auto problem = support::problem_of(section, {1, 1, 1, 600}, current, grid_to(1.0, cells));
    problem->loops = {{"12", {0}, {1}}, {"13", {0}, {2}}, {"23", {1}, {2}}};
    return solved(problem);
  };
  const Solved fine = run_at(16);
  const Solved run = run_at(4);
  const auto exact = [&](Point p) { return fine.b(p); };
  CHECK(run.problem->grid->node_count() < 150000);

  CHECK(force_error(run, fine, 3) < 1e-3);
  for (const solver::Loop& loop : run.problem->loops) {
    CHECK(loop_inductance(*run.integrals, loop) ==
          Approx(loop_inductance(*fine.integrals, loop)).epsilon(2e-3));
  }
  const auto a = run.figures();
  const auto b = fine.figures();
  CHECK(run.value(a, "energy") == Approx(run.value(b, "energy")).epsilon(2e-3));
  CHECK(run.value(a, "walls/trunking/b_mean") ==
        Approx(run.value(b, "walls/trunking/b_mean")).epsilon(3e-3));
  const double largest = std::abs(run.value(b, "bars/L1/force_x"));
  CHECK(std::abs(run.value(a, "walls/trunking/force_x") - run.value(b, "walls/trunking/force_x")) <
        5e-3 * largest);

  mesh::Box box;
  box.include(Point{-157 * mm, -107 * mm});
  box.include(Point{157 * mm, 107 * mm});
  CHECK(worst_b(run, points_in(section, box, 5 * mm, 300), exact) < 5e-3);
  std::vector<Point> mid_wall;
  for (int k = -10; k <= 10; ++k) {
    mid_wall.push_back({14.5 * k * mm, 108.5 * mm});
    mid_wall.push_back({-158.5 * mm, 9.5 * k * mm});
  }
  CHECK(worst_b(run, mid_wall, exact) < 5e-3);
  std::vector<Point> outside;
  for (Point p : points_outside(165 * mm, 1.0, 400)) {
    if (std::abs(p.x) > 165 * mm || std::abs(p.y) > 115 * mm) outside.push_back(p);
  }
  CHECK(worst_b(run, outside, exact) < 2e-2);
}

TEST_CASE("A net-current bar beside a 300 x 6 mm plate against a grid four times finer", "[long]") {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {Rectangle{{0, 0}, 10 * mm, 100 * mm, 0.0}}));
  section.parts.push_back(
      support::steel_wall("plate", {Rectangle{{50 * mm, 0}, 6 * mm, 300 * mm, 0.0}}));
  const auto run_at = [&](int cells) {
    return solved(support::problem_of(section, {1, 500}, {2000.0, 0.0}, grid_to(0.5, cells)));
  };
  const Solved fine = run_at(16);
  const Solved run = run_at(4);
  const auto exact = [&](Point p) { return fine.b(p); };
  CHECK(force_error(run, fine, 1) < 1e-3);
  std::vector<Point> wall;
  std::vector<Point> air;
  for (int k = -9; k <= 9; ++k) {
    wall.push_back({50 * mm, 15.5 * k * mm});
    air.push_back({37 * mm, 15.5 * k * mm});
    air.push_back({63 * mm, 15.5 * k * mm});
  }
  CHECK(worst_b(run, wall, exact) < 5e-3);
  CHECK(worst_b(run, air, exact) < 5e-3);
  const auto a = run.figures();
  const auto b = fine.figures();
  CHECK(run.value(a, "walls/plate/b_mean") ==
        Approx(run.value(b, "walls/plate/b_mean")).epsilon(3e-3));
}

TEST_CASE("Doubling reach changes every figure by less than 0.02 %") {
  const mesh::Section trunking = support::three_bars_in_trunking();
  mesh::Section plate;
  plate.parts.push_back(support::bar("bar", {Rectangle{{0, 0}, 10 * mm, 100 * mm, 0.0}}));
  plate.parts.push_back(
      support::bar("other", {Rectangle{{-60 * mm, 10 * mm}, 10 * mm, 80 * mm, 0.2}}));
  plate.parts.push_back(
      support::steel_wall("plate", {Rectangle{{50 * mm, 5 * mm}, 6 * mm, 200 * mm, 0.0}}));
  struct Item {
    const mesh::Section& section;
    std::vector<double> permeability;
    std::vector<std::complex<double>> current;
  };
  for (const Item& item : {Item{trunking, {1, 1, 1, 600}, {1000.0, -400.0, -600.0, 0.0}},
                           Item{plate, {1, 1, 500}, {2000.0, -500.0, 0.0}}}) {
    solver::Figures figures[2];
    for (int k = 0; k < 2; ++k) {
      auto problem = support::problem_of(item.section, item.permeability, item.current,
                                         grid_to(0.3, 4, k == 0 ? 400.0 : 800.0));
      problem->loops = {{"pair", {0}, {1}}};
      const Solved run = solved(problem);
      std::vector<solver::Probe> probes{{"near", {{20 * mm, 70 * mm}}, false, {}, ""},
                                        {"far", {{300 * mm, -100 * mm}}, false, {}, ""}};
      figures[k] = run.figures(probes);
    }
    const auto a = addresses(figures[0]);
    const auto b = addresses(figures[1]);
    double largest_force = 0.0;
    for (const auto& [address, figure] : a) {
      if (figure->unit == "N/m") largest_force = std::max(largest_force, std::abs(figure->value));
    }
    for (std::size_t k = 0; k < a.size(); ++k) {
      const double value = a[k].second->value;
      if (std::isnan(value)) continue;
      INFO(a[k].first);
      // Forces against the largest; components of a small vector against its length.
      double scale = std::abs(value);
      if (a[k].second->unit == "N/m") scale = largest_force;
      if (a[k].first.ends_with("b_x") || a[k].first.ends_with("b_y")) {
        scale = std::abs(a[k + (a[k].first.ends_with("b_x") ? 2u : 1u)].second->value);
      }
      CHECK(std::abs(b[k].second->value - value) < 2e-4 * scale);
    }
  }
}

}  // namespace barwall
