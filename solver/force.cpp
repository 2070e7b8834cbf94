#include "solver/force.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>

#include "mesh/grid_window.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {
namespace {

/// Beyond this share of the way to the next body no band has any weight.
constexpr double farthest_share = 0.9;
/// The distance from a body there, over the distance to the next.
constexpr double farthest_ratio = farthest_share / (1.0 - farthest_share);

/// A body's outlines, the box round them, and what stands for the next body in open air.
struct Body {
  std::vector<const mesh::Curve*> curves;
  mesh::Box box;
  double cap = 0.0;  ///< the next body is never taken to be farther than this [m]
};

double distance_to(const Body& body, mesh::Point p, double contact) {
  double nearest = HUGE_VAL;
  for (const mesh::Curve* curve : body.curves) nearest = std::min(nearest, distance(*curve, p));
  return nearest < contact ? 0.0 : nearest;  // nodes put on a curve lie on it to rounding
}

std::vector<Body> outlined(const Problem& problem, const std::vector<std::vector<int>>& groups) {
  std::vector<Body> bodies(groups.size());
  std::vector<std::size_t> body_of_part(problem.section.parts.size(), groups.size());
  for (std::size_t b = 0; b < groups.size(); ++b) {
    for (int part : groups[b]) body_of_part[static_cast<std::size_t>(part)] = b;
  }
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    std::size_t added = groups.size();
    for (mesh::Occupant side : {piece.left, piece.right}) {
      if (side.part < 0) continue;
      const std::size_t b = body_of_part[static_cast<std::size_t>(side.part)];
      if (b == groups.size() || b == added) continue;
      bodies[b].curves.push_back(&piece.curve);
      bodies[b].box.include(bounds(piece.curve));
      added = b;
    }
  }
  // In open air the next body is taken to be at most the body's own size away, half a section
  // size, or what keeps the band off the boundary.
  const double half = half_size(problem.section);
  const auto& x = problem.grid->x_lines;
  const double room = 0.5 * (x.back() - x.front()) - half;
  for (Body& body : bodies) {
    const mesh::Point size = body.box.high - body.box.low;
    body.cap = std::min({std::max(size.x, size.y), half, room / (farthest_ratio + 1.0)});
  }
  return bodies;
}

/// The two bodies nearest to a node.
struct Nearest {
  double first = HUGE_VAL;   ///< [m]
  double second = HUGE_VAL;  ///< [m]
  int body = -1;             ///< the first one

  void add(int b, double d) {
    if (d < first) {
      second = first;
      first = d;
      body = b;
    } else {
      second = std::min(second, d);
    }
  }
  /// Distance to the nearest body but one.
  double other_than(int b) const { return b == body ? second : first; }
};

std::vector<Nearest> nearest_bodies(const Problem& problem, const std::vector<Body>& bodies) {
  const mesh::FittedGrid& grid = *problem.grid;
  double farthest = 0.0;  // beyond the largest cap it makes no difference
  for (const Body& body : bodies) farthest = std::max(farthest, body.cap);
  std::vector<Nearest> nearest(grid.nodes.size(), {farthest, farthest, -1});
#pragma omp parallel
  {
    std::vector<int> order(bodies.size());
    std::vector<double> below(bodies.size());
#pragma omp for schedule(dynamic)
    for (int j = 0; j < grid.rows; ++j) {
      // Bodies in the order of their least distance from any node of the row: most need no look.
      double low = HUGE_VAL;
      double high = -HUGE_VAL;
      for (int i = 0; i < grid.columns; ++i) {
        const double y = grid.nodes[static_cast<std::size_t>(grid.node(i, j))].y;
        low = std::min(low, y);
        high = std::max(high, y);
      }
      for (std::size_t b = 0; b < bodies.size(); ++b) {
        const mesh::Box& box = bodies[b].box;
        below[b] = std::max({box.low.y - high, 0.0, low - box.high.y});
      }
      std::iota(order.begin(), order.end(), 0);
      std::stable_sort(order.begin(), order.end(), [&](int a, int b) {
        return below[static_cast<std::size_t>(a)] < below[static_cast<std::size_t>(b)];
      });
      for (int i = 0; i < grid.columns; ++i) {
        const auto n = static_cast<std::size_t>(grid.node(i, j));
        for (int b : order) {
          const auto k = static_cast<std::size_t>(b);
          if (below[k] >= nearest[n].second) break;
          if (distance(bodies[k].box, grid.nodes[n]) >= nearest[n].second) continue;
          nearest[n].add(b, distance_to(bodies[k], grid.nodes[n], problem.outline.contact));
        }
      }
    }
  }
  return nearest;
}

}  // namespace

PulsatingVector lorentz_force(const PartIntegrals& integrals, int part, int piece) {
  return over_cycle(integrals.solution().pattern_count(), [&](int current, int field) {
    return integrals.lorentz_force(part, piece, current, field);
  });
}

bool lorentz_alone(const Problem& problem, int part) {
  const auto k = static_cast<std::size_t>(part);
  return problem.section.parts[k].kind == mesh::Part::Kind::bar && !problem.materials[k].magnetic();
}

StressBands::StressBands(const Problem& problem, std::vector<std::vector<int>> groups)
    : bodies_(std::move(groups)), around_(bodies_.size()) {
  const mesh::FittedGrid& grid = *problem.grid;
  const std::vector<Body> outlines = outlined(problem, bodies_);
  const std::vector<Nearest> nearest = nearest_bodies(problem, outlines);
#pragma omp parallel for schedule(dynamic)
  for (std::size_t b = 0; b < outlines.size(); ++b) {
    const Body& body = outlines[b];
    const double margin = farthest_ratio * body.cap;
    const mesh::GridWindow cells = window_covering(grid, grown(body.box, margin));
    // First the nodes that any band reaches, then the smallest window that holds them and the
    // ring of triangles about them.
    struct Reached {
      int i, j;
      double share;
    };
    std::vector<Reached> reached;
    Surroundings& around = around_[b];
    around = {cells.last_column, cells.first_column, cells.last_row, cells.first_row, {}};
    for (int j = cells.first_row; j <= cells.last_row; ++j) {
      for (int i = cells.first_column; i <= cells.last_column; ++i) {
        const auto n = static_cast<std::size_t>(grid.node(i, j));
        const double other = std::min(body.cap, nearest[n].other_than(static_cast<int>(b)));
        const double limit = farthest_ratio * other;
        if (distance(body.box, grid.nodes[n]) > limit) continue;
        const double own = distance_to(body, grid.nodes[n], problem.outline.contact);
        if (own > limit) continue;
        reached.push_back({i, j, own == 0.0 ? 0.0 : own / (own + other)});
        around.first_column = std::min(around.first_column, i);
        around.last_column = std::max(around.last_column, i);
        around.first_row = std::min(around.first_row, j);
        around.last_row = std::max(around.last_row, j);
      }
    }
    around.first_column = std::max(0, around.first_column - 1);
    around.first_row = std::max(0, around.first_row - 1);
    around.last_column = std::min(grid.columns - 1, around.last_column + 1);
    around.last_row = std::min(grid.rows - 1, around.last_row + 1);
    const int columns = around.last_column - around.first_column + 1;
    const int rows = around.last_row - around.first_row + 1;
    around.share.assign(static_cast<std::size_t>(columns * rows), 1.0);
    for (const Reached& node : reached) {
      around.share[static_cast<std::size_t>((node.j - around.first_row) * columns + node.i -
                                            around.first_column)] = node.share;
    }
  }
}

PulsatingVector StressBands::force(const Solution& solution, int body, const Band& band) const {
  const mesh::FittedGrid& grid = solution.grid();
  const int patterns = solution.pattern_count();
  const Surroundings& around = around_[static_cast<std::size_t>(body)];
  const auto weight = [&](int node) {
    const double share = around.at(node % grid.columns, node / grid.columns);
    return std::clamp((band.to - share) / (band.to - band.from), 0.0, 1.0);
  };
  const auto outside_band = [&](int i, int j) {
    const auto [least, most] = std::minmax(
        {around.at(i, j), around.at(i + 1, j), around.at(i, j + 1), around.at(i + 1, j + 1)});
    return least >= band.to || most <= band.from;
  };
  // Sums of T grad w for the pattern pairs (0,0), (1,1), (0,1); T is symmetric in the pair.
  std::array<mesh::Point, 3> sum{};
  for (int j = around.first_row; j < around.last_row; ++j) {
    for (int i = around.first_column; i < around.last_column; ++i) {
      if (outside_band(i, j)) continue;
      const int cell = j * (grid.columns - 1) + i;
      for (int t = 2 * cell; t <= 2 * cell + 1; ++t) {
        if (grid.region[static_cast<std::size_t>(t)] != 0) continue;
        const auto n = grid.triangle(t);
        const std::array<double, 3> w{weight(n[0]), weight(n[1]), weight(n[2])};
        if (w[0] == w[1] && w[1] == w[2]) continue;
        const auto p = grid.corners(t);
        // Area times grad w.
        const mesh::Point slope =
            0.5 * quarter_turn(w[0] * (p[2] - p[1]) + w[1] * (p[0] - p[2]) + w[2] * (p[1] - p[0]));
        std::array<mesh::Point, 2> b{};
        for (int k = 0; k < patterns; ++k) {
          b[static_cast<std::size_t>(k)] = cell_flux_density(grid, t, solution.potential.col(k));
        }
        const auto add = [&](mesh::Point& total, mesh::Point f, mesh::Point g) {
          total += maxwell_stress(f, g, slope);
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
