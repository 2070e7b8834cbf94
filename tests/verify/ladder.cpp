#include "verify/ladder.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <numbers>

#include "solver/constants.hpp"
#include "verify/arrangements.hpp"
#include "verify/gauss_legendre.hpp"
#include "verify/manufactured.hpp"
#include "verify/round_conductor.hpp"

using namespace barwall;
using namespace barwall::verify;
using mesh::Point;

namespace {

LadderProblem problem_named(const std::string& part_of_name) {
  for (LadderProblem& problem : ladder_problems()) {
    if (problem.name.find(part_of_name) != std::string::npos) return problem;
  }
  throw std::invalid_argument(part_of_name);
}

const LadderRow& row_named(const std::vector<LadderRow>& rows, const std::string& name) {
  return *std::find_if(rows.begin(), rows.end(),
                       [&](const LadderRow& row) { return row.quantity.name == name; });
}

/// Solves another arrangement in the place of a problem's own: its errors are still taken
/// against what that arrangement says is exact.
void set_arrangement(LadderProblem& problem, Arrangement arrangement) {
  problem.errors = [arrangement](auto grid) { return errors_of(arrangement, std::move(grid)); };
}

/// Hands the problem a grid that was tampered with.
void set_fault(LadderProblem& problem, const std::function<void(mesh::FittedGrid&)>& fault) {
  problem.errors = [fault, sound = problem.errors](auto grid) {
    auto faulty = std::make_shared<mesh::FittedGrid>(*grid);
    fault(*faulty);
    return sound(faulty);
  };
}

/// Takes every node back to its lines and gives each triangle to what lies at its centroid: the
/// outlines become staircases.
void make_staircases(mesh::FittedGrid& grid, const mesh::Section& section) {
  for (int n = 0; n < grid.node_count(); ++n) {
    grid.nodes[static_cast<std::size_t>(n)] = {
        grid.x_lines[static_cast<std::size_t>(n % grid.columns)],
        grid.y_lines[static_cast<std::size_t>(n / grid.columns)]};
  }
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto p = grid.corners(t);
    const auto occupant = occupant_at(section, (1.0 / 3.0) * (p[0] + p[1] + p[2]));
    const auto found = std::find(grid.occupants.begin(), grid.occupants.end(), occupant);
    grid.region[static_cast<std::size_t>(t)] =
        static_cast<std::int32_t>(found - grid.occupants.begin());
  }
}

}  // namespace

TEST_CASE("every error of the ladder is in its band and falls with its order") {
  std::size_t count = 0;
  for (const LadderProblem& problem : ladder_problems()) {
    const auto rows = climb(problem);
    CHECK(rows.size() == problem.quantities.size());
    for (const LadderRow& row : rows) {
      INFO(row.problem << ", " << row.quantity.name << ": " << row.error[0] << ", " << row.error[1]
                       << ", " << row.error[2] << ", order " << row.order());
      CHECK(row.in_band());
      ++count;
    }
  }
  CHECK(count >= 20);
}

TEST_CASE("a row is out of band when its error or its order is, or is no number") {
  LadderRow row{"problem", {"B", error_band(1e-3)}, {4e-3, 1e-3, 2.5e-4}};
  CHECK(row.order() == Approx(2.0));
  CHECK(row.in_band());
  for (const auto& error : {std::array{8e-3, 2.1e-3, 5.25e-4}, std::array{8e-4, 2e-4, 5e-5},
                            std::array{2e-3, 1e-3, 5e-4}, std::array{8e-3, 1e-3, 1.2e-4},
                            std::array{4e-3, 1e-3, 0.0}}) {
    row.error = error;
    CHECK_FALSE(row.in_band());
  }
  const double none = std::numeric_limits<double>::quiet_NaN();
  row.error = {4e-3, none, 2.5e-4};
  CHECK_FALSE(row.in_band());
  row.error = {4e-3, 1e-3, none};
  CHECK_FALSE(row.in_band());
}

TEST_CASE("the ladder's grids halve every interval") {
  const auto problem = problem_named("rod");
  for (std::size_t step = 1; step < ladder_cells.size(); ++step) {
    const auto coarse = grid_of(problem, ladder_cells[step - 1]);
    const auto fine = grid_of(problem, ladder_cells[step]);
    CHECK(fine->columns == 2 * coarse->columns - 1);
    REQUIRE(fine->rows == 2 * coarse->rows - 1);
    for (int j = 0; j < coarse->rows; ++j) {
      CHECK(fine->y_lines[static_cast<std::size_t>(2 * j)] ==
            Approx(coarse->y_lines[static_cast<std::size_t>(j)]).margin(1e-9));
    }
  }
}

TEST_CASE("a wrong permeability drops out of the ladder") {
  auto problem = problem_named("rod");
  auto wrong = bars_beside_rod();
  wrong.materials.back().relative_permeability = 95.0;
  set_arrangement(problem, wrong);
  const auto rows = climb(problem);
  CHECK_FALSE(row_named(rows, "B off outlines").in_band());
  CHECK_FALSE(row_named(rows, "inductance").in_band());
}

TEST_CASE("an outer boundary too near drops out of the ladder") {
  auto problem = problem_named("pair of flat bars");
  problem.grid.reach = 10.0;
  const auto rows = climb(problem);
  CHECK_FALSE(row_named(rows, "inductance").in_band());
}

TEST_CASE("a face a hundredth of the bar's thickness out of place drops out of the ladder") {
  auto problem = problem_named("flat bar in open air");
  set_fault(problem, [](mesh::FittedGrid& grid) {
    for (Point& node : grid.nodes) {
      if (std::abs(node.x - 5e-3) < 1e-9 && std::abs(node.y) < 31e-3) node.x += 0.1e-3;
    }
  });
  for (const LadderRow& row : climb(problem)) CHECK_FALSE(row.in_band());
}

TEST_CASE("staircases in place of fitted outlines drop out of the ladder") {
  auto problem = problem_named("rod");
  set_fault(problem, [section = problem.section](mesh::FittedGrid& grid) {
    make_staircases(grid, section);
  });
  const auto rows = climb(problem);
  CHECK_FALSE(row_named(rows, "B off outlines").in_band());
  CHECK_FALSE(row_named(rows, "B near outlines").in_band());
  CHECK_FALSE(row_named(rows, "force by stress").in_band());
}

TEST_CASE("staircases drop the made-up potential out of the ladder") {
  auto problem = problem_named("made-up");
  set_fault(problem, [section = problem.section](mesh::FittedGrid& grid) {
    make_staircases(grid, section);
  });
  CHECK_FALSE(climb(problem).front().in_band());
}

TEST_CASE("the made-up potential meets its equation on both sides and matches at the rim") {
  const ManufacturedField field{{3e-3, -2e-3}, 0.02, 30.0, 10.0, 1e-3};
  const double h = 1e-5;
  for (bool in_disc : {true, false}) {
    const double nu = solver::nu_0 / (in_disc ? 30.0 : 1.0);
    double scale = 0.0;
    double worst = 0.0;
    for (int k = 0; k < 40; ++k) {
      const Point p{1e-3 * (k % 8) * 5.0 - 0.02, 1e-3 * (k / 8) * 7.0 - 0.02};
      const auto a = [&](double x, double y) { return field.potential(p + Point{x, y}, in_disc); };
      const double laplacian = (a(h, 0) + a(-h, 0) + a(0, h) + a(0, -h) - 4.0 * a(0, 0)) / (h * h);
      const double density = field.current_density(p, in_disc);
      scale = std::max(scale, std::abs(density));
      worst = std::max(worst, std::abs(density + nu * laplacian));
    }
    CHECK(worst < 1e-5 * scale);
  }
  for (double angle : {0.1, 1.0, 2.5, 4.0}) {
    const Point out{std::cos(angle), std::sin(angle)};
    const Point rim = field.centre + field.radius * out;
    CHECK(field.potential(rim, true) == Approx(field.potential(rim, false)));
    const auto slope = [&](bool in_disc) {
      return (field.potential(rim + h * out, in_disc) - field.potential(rim - h * out, in_disc)) /
             (2.0 * h);
    };
    CHECK(slope(true) / 30.0 == Approx(slope(false)).epsilon(1e-5));
    CHECK(std::abs(slope(false)) > 1e-3);
  }
}

TEST_CASE("the coaxial tubes' inductance is twice their field's energy at 1 A") {
  const auto arrangement = coaxial_line();
  const auto rule = gauss_legendre(20);
  double energy = 0.0;
  const double radii[] = {10e-3, 15e-3, 35e-3, 40e-3};
  for (int k = 0; k < 3; ++k) {
    const double half = 0.5 * (radii[k + 1] - radii[k]);
    for (std::size_t q = 0; q < rule.nodes.size(); ++q) {
      const double r = radii[k] + half * (1.0 + rule.nodes[q]);
      const double b = 1e-3 * norm(arrangement.flux_density({r, 0.0}));  // per ampere
      energy += half * rule.weights[q] * std::numbers::pi * r * b * b / solver::mu_0;
    }
  }
  CHECK(arrangement.inductances.front().exact == Approx(2.0 * energy).epsilon(1e-10));
}
