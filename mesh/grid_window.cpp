#include "mesh/grid_window.hpp"

#include <algorithm>

namespace barwall::mesh {
namespace {

/// Cells [first, last) along one direction.
std::pair<int, int> intervals(const std::vector<double>& lines, double low, double high) {
  // A node moves by half an edge at most, so one more cell covers; the second is for rounding.
  constexpr int margin = 2;
  const int cells = static_cast<int>(lines.size()) - 1;
  const auto below = std::upper_bound(lines.begin(), lines.end(), low) - lines.begin();
  const auto above = std::lower_bound(lines.begin(), lines.end(), high) - lines.begin();
  return {std::clamp(static_cast<int>(below) - 1 - margin, 0, cells),
          std::clamp(static_cast<int>(above) + margin, 0, cells)};
}

}  // namespace

GridWindow window_covering(const FittedGrid& grid, const Box& box) {
  if (box.empty()) return {};
  const auto [left, right] = intervals(grid.x_lines, box.low.x, box.high.x);
  const auto [bottom, top] = intervals(grid.y_lines, box.low.y, box.high.y);
  return {left, right, bottom, top};
}

}  // namespace barwall::mesh
