#include "solver/assembly.hpp"

namespace barwall::solver {

Stencil<double> assemble_operator(const mesh::FittedGrid& grid,
                                  const std::vector<double>& reluctivity) {
  Stencil<double> stencil(grid.columns, grid.rows);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto n = grid.triangle(t);
    const auto p = grid.corners(t);
    const double factor = reluctivity[static_cast<std::size_t>(t)] / (4.0 * triangle_area(p));
    // Opposite edge of each corner; grad of its hat function is the edge turned, over 2 area.
    const mesh::Point e[3] = {p[2] - p[1], p[0] - p[2], p[1] - p[0]};
    for (int a = 0; a < 3; ++a) {
      const int b = (a + 1) % 3;
      const double coupling = factor * dot(e[a], e[b]);
      stencil.add(n[static_cast<std::size_t>(a)], n[static_cast<std::size_t>(b)], coupling);
      // Diagonals as minus the sum of couplings, so that rows sum to zero to rounding.
      stencil.diagonal[static_cast<std::size_t>(n[static_cast<std::size_t>(a)])] -= coupling;
      stencil.diagonal[static_cast<std::size_t>(n[static_cast<std::size_t>(b)])] -= coupling;
    }
  }
  return stencil;
}

std::array<double, 3> control_areas(const std::array<mesh::Point, 3>& corners) {
  const double area = triangle_area(corners);
  const auto edge = [&](std::size_t from, std::size_t to) { return corners[to] - corners[from]; };
  std::array<double, 3> slant{};  // dot of the two edges at a corner: its cotangent times 2 area
  for (std::size_t k = 0; k < 3; ++k) {
    slant[k] = dot(edge(k, (k + 1) % 3), edge(k, (k + 2) % 3));
  }
  std::array<double, 3> share{};
  for (std::size_t k = 0; k < 3; ++k) {
    if (slant[k] > 0.0) continue;
    share.fill(0.25 * area);
    share[k] = 0.5 * area;
    return share;
  }
  for (std::size_t k = 0; k < 3; ++k) {
    const std::size_t a = (k + 1) % 3;
    const std::size_t b = (k + 2) % 3;
    share[k] = (dot(edge(k, a), edge(k, a)) * slant[b] + dot(edge(k, b), edge(k, b)) * slant[a]) /
               (16.0 * area);
  }
  return share;
}

Eigen::VectorXd assemble_current(const mesh::FittedGrid& grid, const std::vector<double>& density) {
  Eigen::VectorXd current = Eigen::VectorXd::Zero(grid.node_count());
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const double j = density[static_cast<std::size_t>(grid.region[static_cast<std::size_t>(t)])];
    if (j == 0.0) continue;
    const auto n = grid.triangle(t);
    const auto area = control_areas(grid.corners(t));
    for (std::size_t k = 0; k < 3; ++k) current[n[k]] += j * area[k];
  }
  return current;
}

std::vector<double> by_triangle(const mesh::FittedGrid& grid,
                                const std::vector<double>& by_region) {
  std::vector<double> result(grid.region.size());
  for (std::size_t t = 0; t < result.size(); ++t) {
    result[t] = by_region[static_cast<std::size_t>(grid.region[t])];
  }
  return result;
}

}  // namespace barwall::solver
