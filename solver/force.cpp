#include "solver/force.hpp"

#include <algorithm>
#include <cmath>

#include "solver/constants.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {
namespace {

template <class Bilinear>
PulsatingVector over_cycle(int patterns, Bilinear force) {
  PulsatingVector result;
  const mesh::Point first = force(0, 0);
  if (patterns == 1) {
    result.x.mean = first.x;
    result.y.mean = first.y;
    return result;
  }
  const mesh::Point second = force(1, 1);
  const mesh::Point mixed = 0.5 * (force(0, 1) + force(1, 0));
  result.x = pulsation_of(first.x, second.x, mixed.x);
  result.y = pulsation_of(first.y, second.y, mixed.y);
  return result;
}

}  // namespace

mesh::Point lorentz_force(const Solution& solution, int part, int piece, int current, int field) {
  const mesh::FittedGrid& grid = solution.grid();
  const auto density = density_by_region(
      *solution.problem, solution.patterns[static_cast<std::size_t>(current)].part_current);
  mesh::Point force;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto region = static_cast<std::size_t>(grid.region[static_cast<std::size_t>(t)]);
    if (region == 0 || grid.occupants[region].part != part) continue;
    if (piece >= 0 && grid.occupants[region].piece != piece) continue;
    const mesh::Point b = cell_flux_density(grid, t, solution.potential.col(field));
    const double through = density[region] * triangle_area(grid.corners(t));
    force += through * quarter_turn(b);  // J z x B = J (-By, Bx)
  }
  return force;
}

PulsatingVector lorentz_force(const Solution& solution, int part, int piece) {
  return over_cycle(solution.pattern_count(), [&](int current, int field) {
    return lorentz_force(solution, part, piece, current, field);
  });
}

StressBands::StressBands(const Solution& solution, std::vector<std::vector<int>> bodies)
    : solution_(&solution), bodies_(std::move(bodies)) {
  const Problem& problem = *solution.problem;
  const mesh::FittedGrid& grid = solution.grid();
  body_of_part_.assign(problem.section.parts.size(), -1);
  for (std::size_t b = 0; b < bodies_.size(); ++b) {
    for (int part : bodies_[b]) body_of_part_[static_cast<std::size_t>(part)] = static_cast<int>(b);
  }
  // Outside, the next body is taken to be half a section size away, less where the boundary is
  // so near that the band would reach it.
  const double half = half_size(problem.section);
  const double room = 0.5 * (grid.x_lines.back() - grid.x_lines.front()) - half;
  cap_ = std::min(half, room / 10.0);
  const mesh::Box box = bounds(problem.section);
  const auto window = [](const std::vector<double>& lines, double low, double high) {
    const auto first = std::lower_bound(lines.begin(), lines.end(), low);
    const auto last = std::upper_bound(lines.begin(), lines.end(), high);
    return std::pair{
        std::max(0, static_cast<int>(first - lines.begin()) - 2),
        std::min(static_cast<int>(lines.size()) - 1, static_cast<int>(last - lines.begin()) + 2)};
  };
  const double margin = 10.0 * cap_;  // weights are 0 from 9 caps on
  std::tie(first_column_, last_column_) =
      window(grid.x_lines, box.low.x - margin, box.high.x + margin);
  std::tie(first_row_, last_row_) = window(grid.y_lines, box.low.y - margin, box.high.y + margin);
  distance_.assign(bodies_.size(),
                   std::vector<double>(static_cast<std::size_t>(grid.node_count()), HUGE_VAL));
  for (std::size_t b = 0; b < bodies_.size(); ++b) {
    std::vector<const mesh::Curve*> curves;
    for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
      for (mesh::Occupant side : {piece.left, piece.right}) {
        if (side.part >= 0 &&
            body_of_part_[static_cast<std::size_t>(side.part)] == static_cast<int>(b)) {
          curves.push_back(&piece.curve);
          break;
        }
      }
    }
    auto& nearest = distance_[b];
#pragma omp parallel for schedule(static)
    for (int j = first_row_; j <= last_row_; ++j) {
      for (int i = first_column_; i <= last_column_; ++i) {
        const auto n = static_cast<std::size_t>(grid.node(i, j));
        for (const mesh::Curve* curve : curves) {
          nearest[n] = std::min(nearest[n], distance(*curve, grid.nodes[n]));
        }
        // Nodes put on a curve lie on it to rounding.
        if (nearest[n] < problem.outline.contact) nearest[n] = 0.0;
      }
    }
  }
}

double StressBands::weight(int body, int node, const Band& band) const {
  const auto n = static_cast<std::size_t>(node);
  const double own = distance_[static_cast<std::size_t>(body)][n];
  if (own == 0.0) return 1.0;
  double other = cap_;
  for (std::size_t b = 0; b < distance_.size(); ++b) {
    if (static_cast<int>(b) != body) other = std::min(other, distance_[b][n]);
  }
  const double share = own / (own + other);
  return std::clamp((band.to - share) / (band.to - band.from), 0.0, 1.0);
}

PulsatingVector StressBands::force(int body, const Band& band) const {
  const mesh::FittedGrid& grid = solution_->grid();
  const int patterns = solution_->pattern_count();
  std::vector<double> w(static_cast<std::size_t>(grid.node_count()), 0.0);
  for (int j = first_row_; j <= last_row_; ++j) {
    for (int i = first_column_; i <= last_column_; ++i) {
      w[static_cast<std::size_t>(grid.node(i, j))] = weight(body, grid.node(i, j), band);
    }
  }
  // Sums of T grad w for the pattern pairs (0,0), (1,1), (0,1); T is symmetric in the pair.
  std::array<mesh::Point, 3> sum{};
  for (int j = first_row_; j < last_row_; ++j) {
    for (int i = first_column_; i < last_column_; ++i) {
      const int cell = j * (grid.columns - 1) + i;
      for (int t = 2 * cell; t <= 2 * cell + 1; ++t) {
        if (grid.region[static_cast<std::size_t>(t)] != 0) continue;
        const auto n = grid.triangle(t);
        const std::array<double, 3> v{w[static_cast<std::size_t>(n[0])],
                                      w[static_cast<std::size_t>(n[1])],
                                      w[static_cast<std::size_t>(n[2])]};
        if (v[0] == v[1] && v[1] == v[2]) continue;
        const auto p = grid.corners(t);
        // Area times grad w.
        const mesh::Point slope =
            0.5 * quarter_turn(v[0] * (p[2] - p[1]) + v[1] * (p[0] - p[2]) + v[2] * (p[1] - p[0]));
        std::array<mesh::Point, 2> b{};
        for (int k = 0; k < patterns; ++k) {
          b[static_cast<std::size_t>(k)] = cell_flux_density(grid, t, solution_->potential.col(k));
        }
        const auto add = [&](mesh::Point& total, mesh::Point f, mesh::Point g) {
          total += (0.5 * nu_0) * (dot(g, slope) * f + dot(f, slope) * g - dot(f, g) * slope);
        };
        add(sum[0], b[0], b[0]);
        if (patterns == 2) {
          add(sum[1], b[1], b[1]);
          add(sum[2], b[0], b[1]);
        }
      }
    }
  }
  return over_cycle(patterns,
                    [&](int f, int g) { return -sum[static_cast<std::size_t>(f == g ? f : 2)]; });
}

}  // namespace barwall::solver
