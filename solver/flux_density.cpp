#include "solver/flux_density.hpp"

#include <algorithm>
#include <cmath>

#include "solver/constants.hpp"

namespace barwall::solver {
namespace {

/// Visits the triangles that have a node as a corner.
template <class Visit>
void each_triangle_at(const mesh::FittedGrid& grid, int node, Visit visit) {
  const int i = node % grid.columns;
  const int j = node / grid.columns;
  for (int q = std::max(0, j - 1); q <= std::min(j, grid.rows - 2); ++q) {
    for (int p = std::max(0, i - 1); p <= std::min(i, grid.columns - 2); ++p) {
      const int cell = q * (grid.columns - 1) + p;
      for (int t = 2 * cell; t <= 2 * cell + 1; ++t) {
        const auto n = grid.triangle(t);
        if (n[0] == node || n[1] == node || n[2] == node) visit(t, n);
      }
    }
  }
}

void add_once(std::vector<int>& list, int value) {
  if (std::find(list.begin(), list.end(), value) == list.end()) list.push_back(value);
}

}  // namespace

mesh::Point cell_flux_density(const mesh::FittedGrid& grid, int triangle,
                              const Eigen::Ref<const Eigen::VectorXd>& potential) {
  const auto n = grid.triangle(triangle);
  const auto p = grid.corners(triangle);
  const double factor = 1.0 / (2.0 * triangle_area(p));
  // B = sum of A_k times the edge opposite corner k, over twice the area.
  mesh::Point b;
  b += (factor * potential[n[0]]) * (p[2] - p[1]);
  b += (factor * potential[n[1]]) * (p[0] - p[2]);
  b += (factor * potential[n[2]]) * (p[1] - p[0]);
  return b;
}

RecoveredField::RecoveredField(const Solution& solution) : solution_(&solution) {
  number_places();
  const auto patterns = static_cast<std::size_t>(solution.pattern_count());
  field_.assign(patterns, std::vector<Local>(node_of_place_.size()));
  std::vector<std::vector<double>> density;
  for (const CurrentPattern& pattern : solution.patterns) {
    density.push_back(density_by_region(*solution.problem, pattern.part_current));
  }
  const int regions = static_cast<int>(solution.grid().occupants.size());
  // Per region, the load patterns' current densities in one row.
  std::vector<std::vector<double>> by_region(static_cast<std::size_t>(regions));
  for (std::size_t r = 0; r < by_region.size(); ++r) {
    for (const auto& d : density) by_region[r].push_back(d[r]);
  }
#pragma omp parallel
  {
    std::vector<int> nodes;
#pragma omp for schedule(static)
    for (int place = 0; place < place_count(); ++place) {
      fit_place(place, nodes, by_region[static_cast<std::size_t>(region_of_place(place))]);
    }
  }
}

void RecoveredField::number_places() {
  const mesh::FittedGrid& grid = solution_->grid();
  const auto regions = static_cast<std::int64_t>(grid.occupants.size());
  node_of_place_.resize(static_cast<std::size_t>(grid.node_count()));
  first_region_.assign(node_of_place_.size(), -1);
  for (int n = 0; n < grid.node_count(); ++n) node_of_place_[static_cast<std::size_t>(n)] = n;
  std::vector<std::int64_t> extra;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto region = grid.region[static_cast<std::size_t>(t)];
    for (int n : grid.triangle(t)) {
      auto& first = first_region_[static_cast<std::size_t>(n)];
      if (first < 0) first = region;
      if (first != region) extra.push_back(n * regions + region);
    }
  }
  std::sort(extra.begin(), extra.end());
  extra.erase(std::unique(extra.begin(), extra.end()), extra.end());
  region_of_place_ = first_region_;
  for (std::int64_t key : extra) {
    further_.emplace_back(key, static_cast<int>(node_of_place_.size()));
    node_of_place_.push_back(static_cast<int>(key / regions));
    region_of_place_.push_back(static_cast<std::int32_t>(key % regions));
  }
}

int RecoveredField::place(int node, int region) const {
  if (first_region_[static_cast<std::size_t>(node)] == region) return node;
  const auto regions = static_cast<std::int64_t>(solution_->grid().occupants.size());
  const std::int64_t key = node * regions + region;
  const auto found = std::lower_bound(further_.begin(), further_.end(), std::pair{key, 0});
  return found->second;
}

std::array<int, 3> RecoveredField::places(int triangle) const {
  const auto n = solution_->grid().triangle(triangle);
  const int region = solution_->grid().region[static_cast<std::size_t>(triangle)];
  return {place(n[0], region), place(n[1], region), place(n[2], region)};
}

void RecoveredField::gather(int node, int region, int layers, std::vector<int>& nodes) const {
  const mesh::FittedGrid& grid = solution_->grid();
  nodes.assign(1, node);
  std::size_t from = 0;
  for (int layer = 0; layer < layers; ++layer) {
    const std::size_t to = nodes.size();
    for (std::size_t k = from; k < to; ++k) {
      each_triangle_at(grid, nodes[k], [&](int t, const std::array<int, 3>& corners) {
        if (grid.region[static_cast<std::size_t>(t)] != region) return;
        for (int n : corners) add_once(nodes, n);
      });
    }
    from = to;
  }
}

void RecoveredField::fit_place(int place, std::vector<int>& nodes,
                               const std::vector<double>& density) {
  const mesh::FittedGrid& grid = solution_->grid();
  const int node = node_of_place(place);
  const int region = region_of_place(place);
  const mesh::Point origin = grid.nodes[static_cast<std::size_t>(node)];
  const auto occupant = grid.occupants[static_cast<std::size_t>(region)];
  const double mu =
      mu_0 * (occupant.part < 0 ? 1.0
                                : solution_->problem->materials[static_cast<std::size_t>(occupant.part)]
                                      .relative_permeability);
  constexpr std::size_t enough = 8;
  gather(node, region, 1, nodes);
  for (int layers = 2; nodes.size() < enough && layers <= 4; ++layers) {
    gather(node, region, layers, nodes);
  }
  // Scales: mean square distances of the patch along each axis.
  double sx = 0.0;
  double sy = 0.0;
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - origin;
    sx = std::max(sx, std::abs(d.x));
    sy = std::max(sy, std::abs(d.y));
  }
  if (sx == 0.0 || sy == 0.0) sx = sy = std::max(sx, sy);
  const double s2 = std::max(sx * sx, sy * sy);
  // A = a0 + gx x + gy y + p (x2 - y2)/2 + q xy - mu J (x2 + y2)/4
  const auto patterns = solution_->potential.cols();
  Eigen::Matrix<double, 5, 5> normal = Eigen::Matrix<double, 5, 5>::Zero();
  Eigen::Matrix<double, 5, Eigen::Dynamic, 0, 5, 2> right =
      Eigen::Matrix<double, 5, Eigen::Dynamic, 0, 5, 2>::Zero(5, patterns);
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - origin;
    const double u = d.x / sx;
    const double v = d.y / sy;
    const double root = 1.0 / (0.1 + u * u + v * v);
    const double weight = root * root;
    Eigen::Matrix<double, 5, 1> row;
    row << 1.0, u, v, 0.5 * (d.x * d.x - d.y * d.y) / s2, u * v;
    normal.noalias() += weight * row * row.transpose();
    for (Eigen::Index c = 0; c < patterns; ++c) {
      const double curved =
          -0.25 * mu * density[static_cast<std::size_t>(c)] * dot(d, d);
      const double value =
          solution_->potential(n, c) - solution_->potential(node, c) - curved;
      right.col(c) += weight * value * row;
    }
  }
  const Eigen::CompleteOrthogonalDecomposition<Eigen::Matrix<double, 5, 5>> solver(normal);
  for (Eigen::Index c = 0; c < patterns; ++c) {
    const Eigen::Matrix<double, 5, 1> a = solver.solve(right.col(c));
    const double half_source = 0.5 * mu * density[static_cast<std::size_t>(c)];
    const double a_xx = a[3] / s2 - half_source;
    const double a_yy = -a[3] / s2 - half_source;
    const double a_xy = a[4] / (sx * sy);
    Local& local = field_[static_cast<std::size_t>(c)][static_cast<std::size_t>(place)];
    local.b = {a[2] / sy, -a[1] / sx};
    local.b_dx = {a_xy, -a_xx};
    local.b_dy = {a_yy, -a_xy};
  }
}

mesh::Point RecoveredField::flux_density(const mesh::Location& at, mesh::Point point,
                                         int pattern) const {
  const mesh::FittedGrid& grid = solution_->grid();
  const auto corner = places(at.triangle);
  mesh::Point b;
  for (std::size_t k = 0; k < 3; ++k) {
    const Local& local =
        field_[static_cast<std::size_t>(pattern)][static_cast<std::size_t>(corner[k])];
    const mesh::Point d =
        point - grid.nodes[static_cast<std::size_t>(node_of_place(corner[k]))];
    b += at.weight[k] * (local.b + 0.5 * (d.x * local.b_dx + d.y * local.b_dy));
  }
  return b;
}

double RecoveredField::potential(const mesh::Location& at, mesh::Point point, int pattern) const {
  const mesh::FittedGrid& grid = solution_->grid();
  const auto corner = places(at.triangle);
  double a = 0.0;
  for (std::size_t k = 0; k < 3; ++k) {
    const Local& local =
        field_[static_cast<std::size_t>(pattern)][static_cast<std::size_t>(corner[k])];
    const int n = node_of_place(corner[k]);
    const mesh::Point d = point - grid.nodes[static_cast<std::size_t>(n)];
    const double slope = -local.b.y * d.x + local.b.x * d.y;
    a += at.weight[k] * (solution_->potential(n, pattern) + 0.5 * slope);
  }
  return a;
}

}  // namespace barwall::solver
