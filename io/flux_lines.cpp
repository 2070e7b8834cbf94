#include "io/flux_lines.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <numbers>
#include <optional>

#include "mesh/grid_window.hpp"
#include "mesh/sampling.hpp"
#include "solver/energy.hpp"

namespace barwall::io {
namespace {

using mesh::Point;

/// A grid edge that a line crosses, by its two nodes in ascending order.
struct Crossing {
  int low = -1;
  int high = -1;

  friend auto operator<=>(const Crossing&, const Crossing&) = default;
};

Crossing crossing_of(int a, int b) {
  return {std::min(a, b), std::max(a, b)};
}

/// A line's way through one triangle, the larger A on its left: from one edge to another.
struct Step {
  Crossing from;
  Crossing to;
};

/// A at the instant of the flux lines.
Eigen::VectorXd potential_of(const Results& results) {
  if (const auto& instants = results.instants) {
    return instants->solution[instants->strongest]->potential.col(0);
  }
  const Eigen::MatrixXd& a = results.solution->potential;
  if (!results.alternating()) return a.col(0);
  const double wt = flux_line_instant(results);
  return std::numbers::sqrt2 * (std::cos(wt) * a.col(0) - std::sin(wt) * a.col(1));
}

/// Smallest and largest A in a window: at its nodes and its four corners.
std::pair<double, double> range_of(const Results& results, const Eigen::VectorXd& a,
                                   const mesh::Box& window, const mesh::GridWindow& cells) {
  const mesh::FittedGrid& grid = results.solution->grid();
  double low = HUGE_VAL;
  double high = -HUGE_VAL;
  const auto include = [&](double value) {
    low = std::min(low, value);
    high = std::max(high, value);
  };
  for (int j = cells.first_row; j <= cells.last_row; ++j) {
    for (int i = cells.first_column; i <= cells.last_column; ++i) {
      const int n = grid.node(i, j);
      if (window.contains(grid.nodes[static_cast<std::size_t>(n)])) include(a[n]);
    }
  }
  for (const double x : {window.low.x, window.high.x}) {
    for (const double y : {window.low.y, window.high.y}) {
      const mesh::Location at = locate(grid, results.problem->section, {x, y});
      if (at.triangle < 0) continue;
      const auto n = grid.triangle(at.triangle);
      include(at.weight[0] * a[n[0]] + at.weight[1] * a[n[1]] + at.weight[2] * a[n[2]]);
    }
  }
  return {low, high};
}

/// The line at one level through one triangle. A node exactly on the level counts as above it, so
/// that every triangle is crossed by way of two edges or not at all, and lines never branch.
std::optional<Step> step_through(const std::array<int, 3>& node, const Eigen::VectorXd& a,
                                 double level) {
  const std::array<bool, 3> above{a[node[0]] >= level, a[node[1]] >= level, a[node[2]] >= level};
  for (std::size_t k = 0; k < 3; ++k) {
    const std::size_t next = (k + 1) % 3;
    const std::size_t last = (k + 2) % 3;
    if (above[k] == above[next] || above[k] == above[last]) continue;
    const Crossing towards_next = crossing_of(node[k], node[next]);
    const Crossing towards_last = crossing_of(node[k], node[last]);
    // Corners run counter-clockwise: k stays on the left on the way from its edge behind.
    return above[k] ? Step{towards_next, towards_last} : Step{towards_last, towards_next};
  }
  return std::nullopt;
}

Point place_of(const Crossing& edge, const mesh::FittedGrid& grid, const Eigen::VectorXd& a,
               double level) {
  const double t = (level - a[edge.low]) / (a[edge.high] - a[edge.low]);
  return between(grid.nodes[static_cast<std::size_t>(edge.low)],
                 grid.nodes[static_cast<std::size_t>(edge.high)], std::clamp(t, 0.0, 1.0));
}

/// Chains of crossings: an edge is entered once and left once at most. Closed chains end with the
/// crossing they began with.
std::vector<std::vector<Crossing>> joined(std::vector<Step> steps) {
  std::sort(steps.begin(), steps.end(),
            [](const Step& p, const Step& q) { return p.from < q.from; });
  std::vector<Crossing> ends;
  for (const Step& step : steps) ends.push_back(step.to);
  std::sort(ends.begin(), ends.end());
  std::vector<std::uint8_t> used(steps.size(), 0);
  std::vector<std::vector<Crossing>> chains;
  const auto follow = [&](std::size_t k) {
    std::vector<Crossing> chain{steps[k].from};
    while (k < steps.size() && used[k] == 0) {
      used[k] = 1;
      chain.push_back(steps[k].to);
      const auto next =
          std::lower_bound(steps.begin(), steps.end(), steps[k].to,
                           [](const Step& step, const Crossing& c) { return step.from < c; });
      if (next == steps.end() || next->from != steps[k].to) break;
      k = static_cast<std::size_t>(next - steps.begin());
    }
    chains.push_back(std::move(chain));
  };
  for (std::size_t k = 0; k < steps.size(); ++k) {
    if (!std::binary_search(ends.begin(), ends.end(), steps[k].from)) follow(k);
  }
  for (std::size_t k = 0; k < steps.size(); ++k) {
    if (used[k] == 0) follow(k);
  }
  return chains;
}

/// The share [t0, t1] of the way from a to b that lies in the window (Liang and Barsky, ACM Trans.
/// Graphics 3, 1984; from memory).
std::optional<std::pair<double, double>> share_inside(Point a, Point b, const mesh::Box& window) {
  double t0 = 0.0;
  double t1 = 1.0;
  const auto cut = [&](double rate, double room) {
    // Inside where rate t <= room.
    if (rate == 0.0) return room >= 0.0;
    if (rate < 0.0) t0 = std::max(t0, room / rate);
    if (rate > 0.0) t1 = std::min(t1, room / rate);
    return t0 <= t1;
  };
  const Point d = b - a;
  if (!cut(-d.x, a.x - window.low.x) || !cut(d.x, window.high.x - a.x) ||
      !cut(-d.y, a.y - window.low.y) || !cut(d.y, window.high.y - a.y)) {
    return std::nullopt;
  }
  return std::pair{t0, t1};
}

void add_distinct(std::vector<Point>& points, Point point) {
  if (points.empty() || points.back() != point) points.push_back(point);
}

/// Adds the parts of a line that lie in the window. `points` of a closed line end with the first.
void add_clipped(std::vector<FluxLine>& lines, double level, std::vector<Point> points, bool closed,
                 const mesh::Box& window) {
  const auto outside =
      std::find_if(points.begin(), points.end(), [&](Point p) { return !window.contains(p); });
  if (outside == points.end()) {
    if (closed) points.pop_back();
    if (points.size() > (closed ? 2U : 1U)) lines.push_back({level, closed, std::move(points)});
    return;
  }
  if (closed) {
    points.pop_back();
    std::rotate(points.begin(), outside, points.end());
    points.push_back(points.front());
  }
  FluxLine run{level, false, {}};
  const auto finish = [&] {
    if (run.points.size() > 1) lines.push_back(run);
    run.points.clear();
  };
  for (std::size_t k = 0; k + 1 < points.size(); ++k) {
    const Point a = points[k];
    const Point b = points[k + 1];
    const auto share = share_inside(a, b, window);
    if (!share) {
      finish();
      continue;
    }
    if (share->first > 0.0) finish();
    add_distinct(run.points, share->first > 0.0 ? between(a, b, share->first) : a);
    add_distinct(run.points, share->second < 1.0 ? between(a, b, share->second) : b);
    if (share->second < 1.0) finish();
  }
  finish();
}

}  // namespace

std::vector<FluxLine> flux_lines(const Results& results, const mesh::Box& window, int count) {
  const mesh::FittedGrid& grid = results.solution->grid();
  const Eigen::VectorXd a = potential_of(results);
  const mesh::GridWindow cells = window_covering(grid, window);
  const auto [low, high] = range_of(results, a, window, cells);
  if (count < 1 || !(high > low)) return {};
  // Half a step from either end: the same flux between neighbours, none shrunk to a point.
  const double step = (high - low) / count;
  const auto level = [&, smallest = low](int k) { return smallest + (k + 0.5) * step; };

  std::vector<std::vector<Step>> steps(static_cast<std::size_t>(count));
  for (int j = cells.first_row; j < cells.last_row; ++j) {
    for (int i = cells.first_column; i < cells.last_column; ++i) {
      const int cell = j * (grid.columns - 1) + i;
      for (int t = 2 * cell; t <= 2 * cell + 1; ++t) {
        const auto n = grid.triangle(t);
        const auto [least, most] = std::minmax({a[n[0]], a[n[1]], a[n[2]]});
        const double first = std::floor((least - low) / step - 0.5);
        const double last = std::ceil((most - low) / step - 0.5);
        for (int k = static_cast<int>(std::clamp(first, 0.0, count - 1.0));
             k <= static_cast<int>(std::clamp(last, -1.0, count - 1.0)); ++k) {
          if (const auto s = step_through(n, a, level(k))) {
            steps[static_cast<std::size_t>(k)].push_back(*s);
          }
        }
      }
    }
  }

  std::vector<FluxLine> lines;
  for (int k = 0; k < count; ++k) {
    for (const auto& chain : joined(std::move(steps[static_cast<std::size_t>(k)]))) {
      std::vector<Point> points;
      for (const Crossing& edge : chain) {
        add_distinct(points, place_of(edge, grid, a, level(k)));
      }
      add_clipped(lines, level(k), std::move(points), chain.front() == chain.back(), window);
    }
  }
  return lines;
}

double flux_line_instant(const Results& results) {
  if (!results.alternating()) return 0.0;
  if (results.instants) return results.instants->wt[results.instants->strongest];
  const solver::Pulsation energy = solver::field_energy(*results.solution);
  // Where the energy keeps still over the cycle the start stands for all of it.
  return energy.swing() <= 1e-9 * energy.mean ? 0.0 : energy.largest_at().wt;
}

}  // namespace barwall::io
