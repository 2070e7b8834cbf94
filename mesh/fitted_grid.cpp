#include "mesh/fitted_grid.hpp"

#include <algorithm>
#include <cmath>
#include <set>
#include <string>

#include "mesh/features.hpp"
#include "mesh/fitting.hpp"

namespace barwall::mesh {
namespace {

constexpr double growth = 0.1133;    // ln 1.12
constexpr double far_growth = 0.35;  // beyond every place where the field is asked for
constexpr double merge_fraction = 0.3;
constexpr int most_attempts = 12;

std::vector<double> lines_along(const AxisFeatures& features, int cells_across, double fine_low,
                                double fine_high, double low, double high) {
  const SpacingFunction spacing(features.sources, growth, far_growth, fine_low, fine_high);
  std::vector<double> fixed = thinned_lines(features.lines, spacing, merge_fraction);
  fixed.insert(fixed.begin(), low);
  fixed.push_back(high);
  return graded_lines(fixed, spacing, cells_across);
}

/// Halves the spacing at faulty cells: they are too coarse for what lies in them.
void refine_at(Features& features, const FitResult& result, int cells_across) {
  const auto& grid = result.grid;
  const double to_reference = 0.5 * cells_across / 4.0;
  std::set<int> columns;
  std::set<int> rows;
  for (int cell : result.faulty_cells) {
    columns.insert(cell % (grid.columns - 1));
    rows.insert(cell / (grid.columns - 1));
  }
  const auto halve = [to_reference](AxisFeatures& axis, const std::vector<double>& lines, int k) {
    const double from = lines[static_cast<std::size_t>(k)];
    const double to = lines[static_cast<std::size_t>(k) + 1];
    axis.sources.push_back({from, to, to_reference * (to - from)});
  };
  for (int i : columns) halve(features.x, grid.x_lines, i);
  for (int j : rows) halve(features.y, grid.y_lines, j);
}

std::string names_at(const Section& section, const Outline& outline, const FitResult& result) {
  std::set<int> parts;
  Point place;
  for (int cell : result.faulty_cells) {
    const auto corners = result.grid.corners(2 * cell);
    place = corners[0];
    const double near = 2.0 * distance(corners[0], corners[1]) + 2.0 * distance(corners[1], corners[2]);
    for (const OutlinePiece& piece : outline.pieces) {
      if (distance(piece.curve, place) > near) continue;
      for (Occupant side : {piece.left, piece.right}) {
        if (side.part >= 0) parts.insert(side.part);
      }
    }
  }
  std::string names;
  for (int part : parts) {
    names += (names.empty() ? "\"" : ", \"") + section.parts[static_cast<std::size_t>(part)].name + "\"";
  }
  return names + " near (" + std::to_string(1e3 * place.x) + ", " + std::to_string(1e3 * place.y) +
         ") mm";
}

}  // namespace

FittedGrid make_grid(const Section& section, const Outline& outline, const GridOptions& options) {
  const Box box = bounds(section);
  const Point centre = box.centre();
  const double half = half_size(section);
  Box fine = options.fine;
  // The checks look at the field up to three section sizes out.
  fine.include(centre - Point{6.0 * half, 6.0 * half});
  fine.include(centre + Point{6.0 * half, 6.0 * half});
  double farthest = 0.0;
  if (!options.fine.empty()) {
    for (double x : {options.fine.low.x, options.fine.high.x}) {
      for (double y : {options.fine.low.y, options.fine.high.y}) {
        farthest = std::max(farthest, distance(centre, {x, y}));
      }
    }
  }
  const double outer = std::max(options.reach * half, 100.0 * farthest);
  Features features = features_of(section, outline);
  FitResult result;
  for (int attempt = 0; attempt < most_attempts; ++attempt) {
    auto x = lines_along(features.x, options.cells_across, fine.low.x, fine.high.x,
                         centre.x - outer, centre.x + outer);
    auto y = lines_along(features.y, options.cells_across, fine.low.y, fine.high.y,
                         centre.y - outer, centre.y + outer);
    const double nodes = static_cast<double>(x.size()) * static_cast<double>(y.size());
    if (nodes > options.max_nodes) {
      throw GridError("the grid would have " + std::to_string(x.size()) + " x " +
                      std::to_string(y.size()) + " nodes; at most " +
                      std::to_string(static_cast<long long>(options.max_nodes)) + " fit");
    }
    result = fit(section, outline, std::move(x), std::move(y));
    if (result.faulty_cells.empty()) return std::move(result.grid);
    refine_at(features, result, options.cells_across);
  }
  throw GridError("no grid fits the outlines of " + names_at(section, outline, result));
}

}  // namespace barwall::mesh
