#include <catch2/catch.hpp>
#include <cmath>
#include <functional>

#include "solver/assembly.hpp"
#include "solver/constants.hpp"
#include "solver/flux_density.hpp"
#include "solver/magnetostatics.hpp"

using namespace barwall;
using mesh::Point;

namespace {

/// Lines without any outline, one occupant, cells split from lower left to upper right.
mesh::FittedGrid plain_grid(std::vector<double> x, std::vector<double> y) {
  mesh::FittedGrid grid;
  grid.columns = static_cast<int>(x.size());
  grid.rows = static_cast<int>(y.size());
  for (double v : y) {
    for (double u : x) grid.nodes.push_back({u, v});
  }
  grid.x_lines = std::move(x);
  grid.y_lines = std::move(y);
  grid.falling.assign(static_cast<std::size_t>(grid.cell_count()), 0);
  grid.region.assign(static_cast<std::size_t>(grid.triangle_count()), 0);
  grid.occupants = {{}};
  return grid;
}

mesh::FittedGrid graded_grid() {
  return plain_grid({-2.0, -1.2, -0.9, 0.1, 0.35, 0.5, 1.7}, {0.0, 0.1, 0.5, 0.7, 1.9, 2.0});
}

std::vector<double> ones(const mesh::FittedGrid& grid) {
  return std::vector<double>(static_cast<std::size_t>(grid.triangle_count()), 1.0);
}

double coupling(const solver::Stencil<double>& stencil, const std::vector<double>& of, int node) {
  CHECK(of.size() == stencil.size());
  return of[static_cast<std::size_t>(node)];
}

/// Largest difference at the nodes between the scheme's solution with exact values on the
/// boundary and the exact potential, relative to the largest potential.
double worst_error(const mesh::FittedGrid& grid, const std::vector<double>& reluctivity,
                   const Eigen::MatrixXd& current, const std::function<double(Point)>& exact) {
  Eigen::MatrixXd potential = Eigen::MatrixXd::Zero(grid.node_count(), 1);
  for (int n = 0; n < grid.node_count(); ++n) {
    if (grid.on_boundary(n)) potential(n, 0) = exact(grid.nodes[static_cast<std::size_t>(n)]);
  }
  solver::solve_nodes(grid, reluctivity, current, potential);
  double worst = 0.0;
  double scale = 0.0;
  for (int n = 0; n < grid.node_count(); ++n) {
    const double value = exact(grid.nodes[static_cast<std::size_t>(n)]);
    worst = std::max(worst, std::abs(potential(n, 0) - value));
    scale = std::max(scale, std::abs(value));
  }
  return worst / scale;
}

Eigen::MatrixXd no_current(const mesh::FittedGrid& grid) {
  return Eigen::MatrixXd::Zero(grid.node_count(), 1);
}

mesh::Part steel(mesh::Shape shape) {
  return {"steel", mesh::Part::Kind::wall, {std::move(shape)}, false, false};
}

/// A square of 2 m about the origin, the outer boundary of a grid with reach 1, with a bar in it
/// and steel below a slanting line from side to side.
mesh::Section slanting_steel() {
  mesh::Section section;
  section.parts = {
      steel(mesh::Polygon{{{-1.0, -1.0}, {1.0, -1.0}, {1.0, 0.13}, {-1.0, -0.31}}}),
      {"air", mesh::Part::Kind::wall, {mesh::Rectangle{{}, 2.0, 2.0, 0.0}}, true, false},
      {"bar", mesh::Part::Kind::bar, {mesh::Round{{0.2, 0.45}, 0.4}}, false, false}};
  std::swap(section.parts[0], section.parts[1]);
  return section;
}

mesh::FittedGrid grid_within(const mesh::Section& section) {
  return make_grid(section, outline_of(section), {3, 1.0, {}, 1e6});
}

}  // namespace

TEST_CASE("on plain lines the stencil is the five-point one with the widths of the control cell") {
  const auto grid = plain_grid({0.0, 1.0, 3.0}, {0.0, 2.0, 3.0});
  const auto stencil = solver::assemble_operator(grid, ones(grid));
  const int centre = 4;
  // The control cell is 1.5 x 1.5: its sides over the distances 2, 1, 1 and 2 to the neighbours.
  CHECK(coupling(stencil, stencil.right, centre) == Approx(-0.75));
  CHECK(coupling(stencil, stencil.right, centre - 1) == Approx(-1.5));
  CHECK(coupling(stencil, stencil.up, centre) == Approx(-1.5));
  CHECK(coupling(stencil, stencil.up, centre - 3) == Approx(-0.75));
  CHECK(coupling(stencil, stencil.diagonal, centre) == Approx(4.5));
  for (double value : stencil.up_right) CHECK(std::abs(value) < 1e-15);
  for (double value : stencil.up_left) CHECK(value == 0.0);
}

TEST_CASE("where a node was moved the couplings are half the cotangents of the opposite angles") {
  auto grid = plain_grid({0.0, 2.0}, {0.0, 1.0});
  grid.nodes[3] = {2.0, 2.0};
  const auto stencil = solver::assemble_operator(grid, {3.0, 5.0});
  // The lower triangle, reluctivity 3, has a right angle at (2, 0) and two of 45 degrees. The
  // upper one, 5, has cotangents 1 at (0, 0), 3 at (2, 2) and -1/2 at (0, 1).
  CHECK(coupling(stencil, stencil.right, 0) == Approx(-1.5));
  CHECK(coupling(stencil, stencil.up, 1) == Approx(-1.5));
  CHECK(coupling(stencil, stencil.right, 2) == Approx(-2.5));
  CHECK(coupling(stencil, stencil.up, 0) == Approx(-7.5));
  CHECK(coupling(stencil, stencil.up_right, 0) == Approx(1.25));
  CHECK(coupling(stencil, stencil.diagonal, 0) == Approx(1.5 + 7.5 - 1.25));
}

TEST_CASE("a current goes to the corners by the areas nearest to each") {
  auto grid = plain_grid({0.0, 2.0}, {0.0, 3.0});
  const auto quarters = solver::assemble_current(grid, {7.0});
  for (Eigen::Index n = 0; n < 4; ++n) CHECK(quarters[n] == Approx(10.5));
  // An equilateral triangle of side 2: thirds. One of 120 degrees at the first corner: half there.
  const double height = std::sqrt(3.0);
  for (double area : solver::control_areas({Point{0.0, 0.0}, {2.0, 0.0}, {1.0, height}})) {
    CHECK(area == Approx(height / 3.0));
  }
  const auto obtuse = solver::control_areas({Point{0.0, 0.0}, {2.0, 0.0}, {-1.0, height}});
  CHECK(obtuse[0] == Approx(0.5 * height));
  CHECK(obtuse[1] == Approx(0.25 * height));
  CHECK(obtuse[2] == Approx(0.25 * height));
  // 45, 60 and 75 degrees; the shares of a side are its square times the opposite cotangent.
  const auto acute =
      solver::control_areas({Point{0.0, 0.0}, {1.0 + height, 0.0}, {height, height}});
  CHECK(acute[0] + acute[1] + acute[2] == Approx(0.5 * (1.0 + height) * height));
  CHECK(acute[0] ==
        Approx((std::pow(1.0 + height, 2) * (height - 1.0) / (height + 1.0) + 6.0 / height) / 8.0));
}

TEST_CASE("a saddle-shaped potential is exact at the nodes of any graded plain grid") {
  const auto grid = graded_grid();
  const auto saddle = [](Point p) { return p.x * p.x - p.y * p.y + 0.3 * p.x + 2.0; };
  CHECK(worst_error(grid, ones(grid), no_current(grid), saddle) < 1e-13);
  const auto cubic = [](Point p) { return p.x * p.x * p.x - 3.0 * p.x * p.y * p.y; };
  CHECK(worst_error(grid, ones(grid), no_current(grid), cubic) > 1e-3);
}

TEST_CASE("a uniform current's quadratic potential is exact at the nodes of a graded plain grid") {
  const auto bowl = [](Point p) { return 3.0 - 1.5 * p.x * p.x - 0.5 * p.y * p.y; };  // J = 4
  const auto grid = graded_grid();
  CHECK(worst_error(grid, ones(grid), solver::assemble_current(grid, {4.0}), bowl) < 1e-13);
}

TEST_CASE("a uniform field is exact on any fitted grid") {
  mesh::Section section;
  section.parts = {
      {"bar", mesh::Part::Kind::bar, {mesh::Round{{0.1, 0.2}, 1.0}}, false, false},
      {"tube", mesh::Part::Kind::bar, {mesh::Tube{{0.3, 0.1}, 3.0, 0.4}}, false, false},
      {"flat", mesh::Part::Kind::bar, {mesh::Rectangle{{2.4, 0.3}, 0.3, 2.0, 0.4}}, false, false}};
  const auto grid = make_grid(section, outline_of(section), {4, 5.0, {}, 1e6});
  CHECK(worst_error(grid, ones(grid), no_current(grid),
                    [](Point p) { return 1.0 + 2.0 * p.x - 0.7 * p.y; }) < 1e-12);
}

TEST_CASE("a field refracted at a slanting surface of steel is exact on the fitted grid") {
  const auto section = slanting_steel();
  const auto grid = grid_within(section);
  const Point from{-1.0, -0.31};
  const Point slope{2.0, 0.44};
  const Point along = (1.0 / norm(slope)) * slope;
  const double permeability = 250.0;
  std::vector<double> reluctivity = ones(grid);
  bool found = false;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part != 1) continue;
    reluctivity[static_cast<std::size_t>(t)] = 1.0 / permeability;
    found = true;
  }
  REQUIRE(found);
  // A rises along the surface alike on both sides, and away from it mu times as steeply in steel.
  const auto refracted = [&](double mu) {
    return [=](Point p) {
      const double depth = cross(along, p - from);
      return dot(along, p - from) + (depth < 0.0 ? mu : 1.0) * depth;
    };
  };
  CHECK(worst_error(grid, reluctivity, no_current(grid), refracted(permeability)) < 1e-12);
  CHECK(worst_error(grid, reluctivity, no_current(grid), refracted(0.99 * permeability)) > 1e-5);
}

TEST_CASE("the operator is symmetric, has zero row sums and gives twice the field's energy") {
  mesh::Section section;
  section.parts = {steel(mesh::Tube{{0.3, 0.1}, 3.0, 0.4}),
                   {"bar", mesh::Part::Kind::bar, {mesh::Round{{0.1, 0.2}, 1.0}}, false, false}};
  const auto grid = make_grid(section, outline_of(section), {3, 3.0, {}, 1e6});
  std::vector<double> reluctivity = ones(grid);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part == 0) reluctivity[static_cast<std::size_t>(t)] = 0.01;
  }
  const auto stencil = solver::assemble_operator(grid, reluctivity);
  const auto times = [&](const Eigen::VectorXd& v) {
    Eigen::VectorXd result(v.size());
    apply(stencil, v, result);
    return result;
  };
  const Eigen::Index size = grid.node_count();
  CHECK(times(Eigen::VectorXd::Ones(size)).cwiseAbs().maxCoeff() < 1e-13);
  Eigen::VectorXd a(size);
  Eigen::VectorXd b(size);
  for (Eigen::Index n = 0; n < size; ++n) {
    a[n] = std::sin(1.3 * static_cast<double>(n));
    b[n] = std::cos(0.7 * static_cast<double>(n * n % 101));
  }
  CHECK(a.dot(times(b)) == Approx(b.dot(times(a))));
  double energy = 0.0;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const Point field = solver::cell_flux_density(grid, t, a);
    energy += 0.5 * reluctivity[static_cast<std::size_t>(t)] * dot(field, field) *
              triangle_area(grid.corners(t));
  }
  CHECK(a.dot(times(a)) == Approx(2.0 * energy));
}

TEST_CASE("given boundary values are kept, and refused for currents that alternate") {
  auto problem = std::make_shared<solver::Problem>();
  problem->section = slanting_steel();
  problem->outline = outline_of(problem->section);
  const auto grid = std::make_shared<mesh::FittedGrid>(grid_within(problem->section));
  problem->grid = grid;
  problem->materials.resize(3);
  problem->excitation.current = {0.0, 0.0, 0.0};
  const auto slope = [](Point p) { return 4.0 + 2.0 * p.x - p.y; };
  const auto solution = solver::solve(problem, {1e-12, slope});
  double worst = 0.0;
  for (int n = 0; n < grid->node_count(); ++n) {
    const double given = slope(grid->nodes[static_cast<std::size_t>(n)]);
    worst = std::max(worst, std::abs(solution.potential(n, 0) - given));
  }
  CHECK(worst < 1e-11);
  problem->excitation.frequency_hz = 50.0;
  CHECK_THROWS_AS(solver::solve(problem, {1e-12, slope}), std::invalid_argument);
}
