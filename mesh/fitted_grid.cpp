#include "mesh/fitted_grid.hpp"

#include <algorithm>
#include <cmath>
#include <set>
#include <string>

#include "mesh/features.hpp"
#include "mesh/fitting.hpp"

namespace barwall::mesh {
namespace {

// Bounds on the spacing's slope; with slope g neighbouring intervals differ by a factor exp(g).
constexpr double sharp_slope = 0.113;  // away from sharp corners: below ln 1.12
constexpr double near_slope = 0.1;     // otherwise in the square round the section
constexpr double open_slope = 0.1;     // in the open: the far field's error goes with its square
// Without sharp corners no error of theirs hides what a finer grid is good for.
constexpr double smooth_near_slope = 0.05;
constexpr double smooth_open_slope = 0.07;
constexpr double wide_slope = 0.15;  // where the net current's field is looked at
constexpr double far_slope = 0.35;   // beyond every place where the field is asked for
constexpr double merge_fraction = 0.3;
constexpr int most_attempts = 12;
constexpr double most_lines = 1e6;

/// Stretches of one axis, each within the next.
struct Extents {
  double near_low, near_high;    ///< the square round the section
  double fine_low, fine_high;    ///< where the field is asked for
  double wide_low, wide_high;    ///< where a net current's field is looked at
  double outer_low, outer_high;  ///< the boundary
};

std::vector<double> lines_along(const AxisFeatures& features, int cells_across,
                                const Extents& extents) {
  const auto [near_low, near_high, fine_low, fine_high, wide_low, wide_high, low, high] = extents;
  const bool smooth = features.sharp.empty();
  SpacingFunction spacing(features.smooth,
                          {{{near_low, near_high, smooth ? smooth_near_slope : near_slope},
                            {fine_low, fine_high, smooth ? smooth_open_slope : open_slope},
                            {wide_low, wide_high, wide_slope}},
                           far_slope});
  if (!smooth) {
    spacing =
        smaller_of(spacing, SpacingFunction(features.sharp, {{{fine_low, fine_high, sharp_slope},
                                                              {wide_low, wide_high, wide_slope}},
                                                             far_slope}));
  }
  const double wanted = spacing.intervals(low, high) * cells_across / 4.0;
  if (!(wanted < most_lines)) {
    throw GridError(
        "the grid would have " + std::to_string(static_cast<long long>(wanted)) +
        " lines along one axis: the section holds gaps or widths far too small for its size");
  }
  std::vector<double> fixed = thinned_lines(features.lines, spacing, merge_fraction);
  // A section may reach the boundary (at a reach of 1, with its own lines there) or beyond it.
  const double clear = 1e-9 * (high - low);
  std::erase_if(fixed, [least = low + clear, most = high - clear](double v) {
    return v < least || v > most;
  });
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
    axis.smooth.push_back({from, to, to_reference * (to - from)});
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
    const double near =
        2.0 * distance(corners[0], corners[1]) + 2.0 * distance(corners[1], corners[2]);
    for (const OutlinePiece& piece : outline.pieces) {
      if (distance(piece.curve, place) > near) continue;
      for (Occupant side : {piece.left, piece.right}) {
        if (side.part >= 0) parts.insert(side.part);
      }
    }
  }
  std::string names;
  for (int part : parts) {
    names +=
        (names.empty() ? "\"" : ", \"") + section.parts[static_cast<std::size_t>(part)].name + "\"";
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
  Box wide = fine;
  wide.include(centre - Point{options.wide * half, options.wide * half});
  wide.include(centre + Point{options.wide * half, options.wide * half});
  // Beside a row of bars their fields fall off over the row's length, not over its height.
  const Extents along_x{centre.x - half, centre.x + half, fine.low.x,       fine.high.x,
                        wide.low.x,      wide.high.x,     centre.x - outer, centre.x + outer};
  const Extents along_y{centre.y - half, centre.y + half, fine.low.y,       fine.high.y,
                        wide.low.y,      wide.high.y,     centre.y - outer, centre.y + outer};
  Features features = features_of(section, outline);
  FitResult result;
  for (int attempt = 0; attempt < most_attempts; ++attempt) {
    auto x = lines_along(features.x, options.cells_across, along_x);
    auto y = lines_along(features.y, options.cells_across, along_y);
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
