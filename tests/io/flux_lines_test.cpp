#include "io/flux_lines.hpp"

#include <catch2/catch.hpp>
#include <numbers>
#include <set>

#include "mesh/sampling.hpp"
#include "solver/constants.hpp"
#include "solver/energy.hpp"
#include "tests/io/case_support.hpp"

namespace barwall {
namespace {

constexpr double two_pi = 2.0 * std::numbers::pi;

const std::string round_bar = R"([[bar]]
name = "A"
current_a = 1000
round_mm = { centre = [5, -3], diameter = 20 }
[[probe]]
name = "p"
at_mm = [50, 50]
[grid]
cells_across = 16
reach = 20
)";

const std::string three_bars = R"(frequency_hz = 50
[[bar]]
name = "L1"
rectangle_mm = { centre = [-30, 0], size = [8, 40] }
[[bar]]
name = "L2"
rectangle_mm = { centre = [0, 0], size = [8, 40] }
[[bar]]
name = "L3"
rectangle_mm = { centre = [30, 0], size = [8, 40] }
[[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = 1000
[[probe]]
name = "p"
at_mm = [50, 50]
[grid]
cells_across = 2
reach = 20
)";

io::Results results_of(const std::string& text) {
  return io::run_case(test::read_text(text));
}

mesh::Box box(mesh::Point low, mesh::Point high) {
  return {low, high};
}

double enclosed_area(const io::FluxLine& line) {
  double twice = 0.0;
  for (std::size_t k = 0; k < line.points.size(); ++k) {
    twice += cross(line.points[k], line.points[(k + 1) % line.points.size()]);
  }
  return 0.5 * twice;
}

/// A of the grid, linear in the triangle at a point.
double potential_at(const io::Results& results, mesh::Point point, int pattern) {
  const auto& grid = results.solution->grid();
  const auto at = locate(grid, results.problem->section, point);
  const auto n = grid.triangle(at.triangle);
  double a = 0.0;
  for (std::size_t k = 0; k < 3; ++k) {
    a += at.weight[k] * results.solution->potential(n[k], pattern);
  }
  return a;
}

TEST_CASE("The flux lines of a round bar are circles about it, along B", "[flux lines]") {
  const io::Results results = results_of(round_bar);
  const mesh::Point centre{0.005, -0.003};
  const double side = 0.04;
  const auto lines = flux_lines(
      results, box(centre - mesh::Point{side, side}, centre + mesh::Point{side, side}), 24);
  int whole = 0;
  for (const io::FluxLine& line : lines) {
    double least = HUGE_VAL;
    double most = 0.0;
    for (const mesh::Point p : line.points) {
      least = std::min(least, distance(p, centre));
      most = std::max(most, distance(p, centre));
    }
    INFO("A " << line.potential << ", radius " << least << " to " << most);
    CHECK(most - least < 0.01 * side);
    CHECK(line.closed == (most < side));
    if (!line.closed) continue;
    ++whole;
    // The current comes out of the page: B runs counter-clockwise.
    CHECK(enclosed_area(line) == Approx(std::numbers::pi * least * most).epsilon(0.02));
  }
  CHECK(whole > 10);
}

TEST_CASE("The same flux passes between any two neighbouring flux lines", "[flux lines]") {
  const io::Results results = results_of(round_bar);
  const mesh::Point centre{0.005, -0.003};
  const mesh::Point side{0.04, 0.04};
  const int count = 24;
  const auto lines = flux_lines(results, box(centre - side, centre + side), count);
  std::set<double> levels;
  std::vector<double> radii;
  for (const io::FluxLine& line : lines) {
    levels.insert(line.potential);
    if (!line.closed) continue;
    const double r = std::sqrt(enclosed_area(line) / std::numbers::pi);
    if (r > 0.011) radii.push_back(r);
  }
  REQUIRE(levels.size() == static_cast<std::size_t>(count));
  const double step = (*levels.rbegin() - *levels.begin()) / (count - 1);
  double before = *levels.begin() - step;
  for (const double level : levels) {
    CHECK(level - before == Approx(step).epsilon(1e-9));
    before = level;
  }
  // Outside the bar the flux between radii r and s is mu_0 I / (2 pi) ln(s / r).
  std::sort(radii.begin(), radii.end());
  REQUIRE(radii.size() > 5);
  for (std::size_t k = 1; k < radii.size(); ++k) {
    const double flux = solver::mu_0 * 1000.0 / two_pi * std::log(radii[k] / radii[k - 1]);
    CHECK(flux == Approx(step).epsilon(0.03));
  }
}

TEST_CASE("Flux lines stay in their window and end on its sides alone", "[flux lines]") {
  const io::Results results = results_of(round_bar);
  const mesh::Box window = box({0.0, 0.004}, {0.021, 0.03});
  const auto lines = flux_lines(results, window, 15);
  REQUIRE(lines.size() >= 15);
  const auto on_side = [&](mesh::Point p) {
    const double off = std::min(
        {p.x - window.low.x, window.high.x - p.x, p.y - window.low.y, window.high.y - p.y});
    return std::abs(off) < 1e-12;
  };
  for (const io::FluxLine& line : lines) {
    REQUIRE(line.points.size() >= 2);
    for (const mesh::Point p : line.points) {
      CHECK(p.x >= window.low.x - 1e-12);
      CHECK(p.x <= window.high.x + 1e-12);
      CHECK(p.y >= window.low.y - 1e-12);
      CHECK(p.y <= window.high.y + 1e-12);
      CHECK(potential_at(results, p, 0) == Approx(line.potential).epsilon(1e-9));
    }
    if (line.closed) continue;
    CHECK(on_side(line.points.front()));
    CHECK(on_side(line.points.back()));
  }
}

/// Results whose potential is replaced by a function of place.
template <class Function>
io::Results with_potential(io::Results results, Function f) {
  auto solution = std::make_shared<solver::Solution>(*results.solution);
  for (int n = 0; n < solution->grid().node_count(); ++n) {
    solution->potential(n, 0) = f(solution->grid().nodes[static_cast<std::size_t>(n)]);
  }
  results.solution = solution;
  return results;
}

TEST_CASE("A flux line through nodes, and along whole grid edges, neither breaks nor branches",
          "[flux lines]") {
  const io::Results plain = results_of(round_bar);
  const mesh::Box window = box({-0.02, -0.02}, {0.02, 0.02});
  SECTION("levels on the grid's own lines") {
    // A = x - c with c on a grid line: the middle of three levels runs along that line.
    const auto& lines_of_grid = plain.solution->grid().x_lines;
    const double c = *std::lower_bound(lines_of_grid.begin(), lines_of_grid.end(), 0.018);
    const mesh::Box about{{c - 0.03, -0.02}, {c + 0.03, 0.02}};
    const auto results = with_potential(plain, [&](mesh::Point p) { return p.x - c; });
    const auto lines = flux_lines(results, about, 3);
    REQUIRE(lines.size() == 3);
    for (const auto& line : lines) {
      CHECK(!line.closed);
      CHECK(std::abs(line.points.front().y - line.points.back().y) == Approx(0.04));
      // B = (0, -1): downwards.
      CHECK(line.points.front().y > line.points.back().y);
      for (const mesh::Point p : line.points) {
        CHECK(p.x - c == Approx(line.potential).margin(1e-12));
      }
    }
  }
  SECTION("a level that whole terraces of nodes lie on") {
    // Rounded to whole steps, A takes the level's own value on wide areas.
    const double step = 1e-3;
    const auto results =
        with_potential(plain, [&](mesh::Point p) { return std::round(p.x / step); });
    for (const int count : {1, 3, 5, 20}) {
      const auto lines = flux_lines(results, window, count);
      CHECK(lines.size() == static_cast<std::size_t>(count));
      for (const auto& line : lines) {
        CHECK(std::abs(line.points.front().y - line.points.back().y) == Approx(0.04));
      }
    }
  }
  SECTION("a field that is constant has none") {
    const auto results = with_potential(plain, [](mesh::Point) { return 1.5; });
    CHECK(flux_lines(results, window, 10).empty());
  }
}

TEST_CASE("With a frequency the flux lines belong to the instant of largest energy",
          "[flux lines]") {
  const io::Results results = results_of(three_bars);
  const double wt = flux_line_instant(results);
  CHECK(wt >= 0.0);
  CHECK(wt < std::numbers::pi);
  const solver::Pulsation energy = solver::field_energy(*results.solution);
  REQUIRE(energy.largest() - energy.smallest() > 0.01 * energy.mean);
  CHECK(energy.at(wt) == Approx(energy.largest()).epsilon(1e-12));
  CHECK(energy.at(wt + 0.1) < energy.at(wt));

  const auto lines = flux_lines(results, box({-0.08, -0.06}, {0.08, 0.06}), 20);
  REQUIRE(lines.size() >= 20);
  double largest = 0.0;
  for (const auto& line : lines) largest = std::max(largest, std::abs(line.potential));
  for (const auto& line : lines) {
    for (const mesh::Point p : line.points) {
      const double a = std::numbers::sqrt2 * (std::cos(wt) * potential_at(results, p, 0) -
                                              std::sin(wt) * potential_at(results, p, 1));
      CHECK(a == Approx(line.potential).margin(1e-9 * largest));
    }
  }
}

}  // namespace
}  // namespace barwall
