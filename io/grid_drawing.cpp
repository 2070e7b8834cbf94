#include "io/grid_drawing.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/grid_window.hpp"
#include "mesh/spacing.hpp"

namespace barwall::io {
namespace {

constexpr double least_gap = 2.5;        ///< between drawn lines [pixels]
constexpr double least_diagonal = 14.0;  ///< shorter diagonals are not drawn [pixels]
constexpr Colour grid_ink{0.25, 0.3, 0.38, 0.55};

/// Lines of an axis that show between two places and are not too close together.
std::vector<int> drawn_lines(const std::vector<double>& lines, double low, double high,
                             double gap) {
  std::vector<int> result;
  double last = -HUGE_VAL;
  for (std::size_t k = 0; k < lines.size(); ++k) {
    if (lines[k] < low || lines[k] > high || lines[k] - last < gap) continue;
    last = lines[k];
    result.push_back(static_cast<int>(k));
  }
  return result;
}

/// Points of a polyline without those on the straight way between their neighbours.
std::vector<PagePoint> without_straight_points(const std::vector<PagePoint>& points) {
  constexpr double aside = 0.05;  // pixels
  std::vector<PagePoint> kept;
  for (const PagePoint& p : points) {
    if (kept.size() >= 2) {
      const PagePoint chord = p - kept[kept.size() - 2];
      const PagePoint step = kept.back() - kept[kept.size() - 2];
      if (std::abs(cross(chord, step)) <= aside * norm(chord)) kept.pop_back();
    }
    kept.push_back(p);
  }
  return kept;
}

}  // namespace

void draw_grid(Canvas& canvas, const mesh::FittedGrid& grid, const Frame& frame, bool diagonals) {
  const Pen pen{grid_ink, 0.6, {}};
  const double gap = least_gap / frame.scale();
  const mesh::Box& w = frame.window;
  const mesh::GridWindow cells = window_covering(grid, w);
  const auto node = [&](int i, int j) {
    return frame.page(grid.nodes[static_cast<std::size_t>(grid.node(i, j))]);
  };
  canvas.begin_clip(frame.box);
  for (int i : drawn_lines(grid.x_lines, w.low.x, w.high.x, gap)) {
    std::vector<PagePoint> line;
    for (int j = cells.first_row; j <= cells.last_row; ++j) line.push_back(node(i, j));
    canvas.line(without_straight_points(line), pen);
  }
  for (int j : drawn_lines(grid.y_lines, w.low.y, w.high.y, gap)) {
    std::vector<PagePoint> line;
    for (int i = cells.first_column; i <= cells.last_column; ++i) line.push_back(node(i, j));
    canvas.line(without_straight_points(line), pen);
  }
  const Pen thin{with_alpha(grid_ink, 0.35), 0.5, {}};
  for (int j = cells.first_row; diagonals && j < cells.last_row; ++j) {
    for (int i = cells.first_column; i < cells.last_column; ++i) {
      const auto cell = static_cast<std::size_t>(j * (grid.columns - 1) + i);
      const bool falling = grid.falling[cell] != 0;
      const PagePoint from = falling ? node(i, j + 1) : node(i, j);
      const PagePoint to = falling ? node(i + 1, j) : node(i + 1, j + 1);
      const PagePoint across = to - from;
      if (norm(across) < least_diagonal ||
          std::min(std::abs(across.x), std::abs(across.y)) < 2.0 * least_gap) {
        continue;
      }
      canvas.line({from, to}, thin);
    }
  }
  canvas.end_clip();
}

Frame finest_detail(const solver::Problem& problem, const PageBox& box) {
  const mesh::FittedGrid& grid = *problem.grid;
  const auto spacing_at = [](const std::vector<double>& lines, double v) {
    const auto k = static_cast<std::size_t>(mesh::interval_of(lines, v));
    return lines[k + 1] - lines[k];
  };
  std::vector<mesh::Point> places = problem.outline.vertices;
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    if (std::holds_alternative<mesh::Arc>(piece.curve)) places.push_back(at(piece.curve, 0.125));
  }
  // Of equally fine places the one farthest to the upper right, where it is easily found.
  const auto coarseness = [&](mesh::Point p) {
    return spacing_at(grid.x_lines, p.x) * spacing_at(grid.y_lines, p.y);
  };
  mesh::Point finest;
  double least = HUGE_VAL;
  for (mesh::Point p : places) {
    const double here = coarseness(p);
    const bool finer = here < 0.98 * least;
    if (finer || (here < 1.02 * least && p.x + p.y > finest.x + finest.y)) {
      if (finer) least = here;
      finest = p;
    }
  }
  // High enough for the thickness of the part there and some of its surroundings, but not for
  // so many cells that they cannot be told apart.
  double thin = HUGE_VAL;
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    if (distance(piece.curve, finest) > problem.outline.contact) continue;
    for (mesh::Occupant side : {piece.left, piece.right}) {
      if (side.part < 0) continue;
      const mesh::Part& part = problem.section.parts[static_cast<std::size_t>(side.part)];
      thin = std::min(thin, thickness(part.pieces[static_cast<std::size_t>(side.piece)]));
    }
  }
  const double spacing = std::sqrt(least);
  if (!std::isfinite(thin)) thin = 20.0 * spacing;
  const double height = std::min(3.0 * thin, std::max(1.8 * thin, 30.0 * spacing));
  const double metres = height / box.height();  // per pixel
  const mesh::Point half{0.5 * metres * box.width(), 0.5 * metres * box.height()};
  return {{finest - half, finest + half}, box};
}

}  // namespace barwall::io
