#include "verify/air_samples.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/components.hpp"
#include "mesh/triangle_edges.hpp"

namespace barwall::verify {
namespace {

/// Connected stretches of air: per triangle its number, -1 in parts; stretch 0 is the open air.
std::vector<int> air_stretches(const mesh::FittedGrid& grid) {
  const auto n = static_cast<std::size_t>(grid.triangle_count());
  mesh::Components components(grid.triangle_count());
  const auto air = [&](int t) { return grid.region[static_cast<std::size_t>(t)] == 0; };
  each_inner_edge(grid, [&](int, int, int left, int right) {
    if (air(left) && air(right)) components.join(left, right);
  });
  // Triangle 0 lies at the outer boundary, in the open air.
  std::vector<int> number(n, -1);
  std::vector<int> of_component(n, -1);
  of_component[static_cast<std::size_t>(components.of(0))] = 0;
  int next = 1;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (!air(t)) continue;
    int& stretch = of_component[static_cast<std::size_t>(components.of(t))];
    if (stretch < 0) stretch = next++;
    number[static_cast<std::size_t>(t)] = stretch;
  }
  return number;
}

double local_spacing(const mesh::FittedGrid& grid, int triangle) {
  const auto p = grid.corners(triangle);
  return std::max({distance(p[0], p[1]), distance(p[1], p[2]), distance(p[2], p[0])});
}

bool clear_of_outlines(const mesh::Outline& outline, mesh::Point point, double clearance) {
  return std::none_of(outline.pieces.begin(), outline.pieces.end(),
                      [&](const auto& piece) { return distance(piece.curve, point) < clearance; });
}

constexpr int most_tries = 20000;
constexpr std::size_t least_in_group = 20;

/// Takes points of the sequence, placed by `place`, until the group is full.
template <class Place>
void fill(AirGroup& group, std::size_t count, const solver::Problem& problem,
          const std::vector<int>& stretch, int wanted, Place place) {
  for (int k = 0; k < most_tries && group.samples.size() < count; ++k) {
    const mesh::Point at = place(mesh::low_discrepancy_point(k));
    const mesh::Location location = locate(*problem.grid, problem.section, at);
    if (location.triangle < 0) continue;
    if (stretch[static_cast<std::size_t>(location.triangle)] != wanted) continue;
    const double clearance = 3.0 * local_spacing(*problem.grid, location.triangle);
    if (clear_of_outlines(problem.outline, at, clearance)) group.samples.push_back({at, location});
  }
}

}  // namespace

AirSamples air_samples(const solver::Problem& problem) {
  const mesh::FittedGrid& grid = *problem.grid;
  const auto stretch = air_stretches(grid);
  const int pockets = *std::max_element(stretch.begin(), stretch.end());
  std::vector<mesh::Box> box(static_cast<std::size_t>(pockets) + 1);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const int number = stretch[static_cast<std::size_t>(t)];
    if (number <= 0) continue;
    for (mesh::Point p : grid.corners(t)) box[static_cast<std::size_t>(number)].include(p);
  }
  const mesh::Point centre = bounds(problem.section).centre();
  const double half = half_size(problem.section);
  // Shells in half-sizes; the outermost ends three section sizes out.
  const std::vector<std::pair<double, double>> shells{
      {0.0, 1.0}, {1.0, 2.0}, {2.0, 4.0}, {4.0, 6.0}};
  const std::size_t count =
      std::max<std::size_t>(60, 200 / (shells.size() + static_cast<std::size_t>(pockets)) + 1);

  AirSamples result;
  const auto keep = [&](AirGroup group) {
    if (group.samples.size() >= least_in_group) {
      result.groups.push_back(std::move(group));
    } else {
      result.left_out.push_back(group.name);
    }
  };
  for (int pocket = 1; pocket <= pockets; ++pocket) {
    const mesh::Box& b = box[static_cast<std::size_t>(pocket)];
    AirGroup group{
        fmt::format("pocket round ({:.4g}, {:.4g}) mm", 1e3 * b.centre().x, 1e3 * b.centre().y),
        {}};
    fill(group, count, problem, stretch, pocket, [&b](mesh::Point unit) {
      return b.low + mesh::Point{unit.x * b.width(), unit.y * b.height()};
    });
    keep(std::move(group));
  }
  for (const auto& [from, to] : shells) {
    AirGroup group{fmt::format("open air, {:g} to {:g} half-sizes from the centre", from, to), {}};
    fill(group, count, problem, stretch, 0, [&, a = from, b = to](mesh::Point unit) {
      const double r = half * std::sqrt(a * a + (b * b - a * a) * unit.x);
      const double angle = 2.0 * std::numbers::pi * unit.y;
      return centre + r * mesh::Point{std::cos(angle), std::sin(angle)};
    });
    keep(std::move(group));
  }
  return result;
}

}  // namespace barwall::verify
