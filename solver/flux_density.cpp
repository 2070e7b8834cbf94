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
  field_.assign(static_cast<std::size_t>(solution.pattern_count()),
                std::vector<Local>(node_of_place_.size()));
  const mesh::FittedGrid& grid = solution.grid();
  // mu J of each occupant, a row of load patterns: minus div grad A there.
  const auto permeability = permeability_by_region(*solution.problem);
  std::vector<std::vector<double>> source(permeability.size());
  for (const CurrentPattern& pattern : solution.patterns) {
    const auto density = density_by_region(*solution.problem, pattern.part_current);
    for (std::size_t r = 0; r < source.size(); ++r) {
      source[r].push_back(mu_0 * permeability[r] * density[r]);
    }
  }
#pragma omp parallel
  {
    std::vector<int> nodes;
#pragma omp for schedule(static)
    for (int place = 0; place < place_count(); ++place) {
      const int part = grid.occupants[static_cast<std::size_t>(region_of_place(place))].part;
      const bool curved =
          part >= 0 && solution.problem->materials[static_cast<std::size_t>(part)].saturable();
      fit_place(place, nodes, source[static_cast<std::size_t>(region_of_place(place))], curved);
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

/// The nodes within two cells of a node, when all cells there belong to one occupant.
bool RecoveredField::gather_window(int node, int region, std::vector<int>& nodes) const {
  const mesh::FittedGrid& grid = solution_->grid();
  const int i = node % grid.columns;
  const int j = node / grid.columns;
  if (i < 2 || j < 2 || i > grid.columns - 3 || j > grid.rows - 3) return false;
  for (int q = j - 2; q < j + 2; ++q) {
    const auto t = 2 * static_cast<std::size_t>(q * (grid.columns - 1) + i - 2);
    for (std::size_t k = t; k < t + 8; ++k) {
      if (grid.region[k] != region) return false;
    }
  }
  nodes.clear();
  for (int q = j - 2; q <= j + 2; ++q) {
    for (int p = i - 2; p <= i + 2; ++p) nodes.push_back(grid.node(p, q));
  }
  return true;
}

/// The nodes that can be reached from a node over at most `layers` triangles of one occupant.
void RecoveredField::gather_layers(int node, int region, int layers,
                                   std::vector<int>& nodes) const {
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
                               const std::vector<double>& source, bool saturable) {
  constexpr int terms = 7;
  constexpr std::size_t enough = 20;  // well more nodes than terms
  using Row = Eigen::Matrix<double, terms, 1>;
  const mesh::FittedGrid& grid = solution_->grid();
  const int node = node_of_place(place);
  const int region = region_of_place(place);
  const mesh::Point origin = grid.nodes[static_cast<std::size_t>(node)];
  if (!gather_window(node, region, nodes)) {
    int layers = 1;
    do {
      gather_layers(node, region, ++layers, nodes);
    } while (nodes.size() < enough && layers < 4);
  }
  // Beside curved and inclined outlines A carries a ripple from node to node: there every node of
  // the patch counts more alike.
  const bool moved = std::any_of(nodes.begin(), nodes.end(), [&](int n) { return grid.moved(n); });
  double sx = 0.0;
  double sy = 0.0;
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - origin;
    sx = std::max(sx, std::abs(d.x));
    sy = std::max(sy, std::abs(d.y));
  }
  const double s = std::max(sx, sy);
  // A = a0 + gx x + gy y + p (x2 - y2)/2 + q xy + c Re z3 + d Im z3 - mu J (x2 + y2)/4, each term
  // scaled to the patch, which may be long and narrow. In saturable steel the plain quadratic
  // a0 + gx x + gy y + p x2/2 + q xy + c y2/2, the last term left out.
  const double narrow = std::min(sx, sy) / s;
  const double re_scale = sx > sy ? 1.0 : narrow;
  const double im_scale = sx > sy ? narrow : 1.0;
  const auto patterns = static_cast<std::size_t>(solution_->potential.cols());
  Eigen::Matrix<double, terms, terms> normal = Eigen::Matrix<double, terms, terms>::Zero();
  std::array<Row, 2> right{Row::Zero(), Row::Zero()};
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - origin;
    const double u = d.x / sx;
    const double v = d.y / sy;
    const double x = d.x / s;
    const double y = d.y / s;
    const double near = 1.0 / (0.1 + u * u + v * v);
    const double weight = moved ? near : near * near;
    Row row;
    if (saturable) {
      row << 1.0, u, v, 0.5 * u * u, u * v, 0.5 * v * v, 0.0;
    } else {
      row << 1.0, u, v, 0.5 * (x * x - y * y), u * v, (x * x * x - 3.0 * x * y * y) / re_scale,
          (3.0 * x * x * y - y * y * y) / im_scale;
    }
    const Row weighted = weight * row;
    normal.noalias() += weighted * row.transpose();
    for (std::size_t c = 0; c < patterns; ++c) {
      const auto column = static_cast<Eigen::Index>(c);
      const double value = solution_->potential(n, column) - solution_->potential(node, column) +
                           (saturable ? 0.0 : 0.25 * source[c] * dot(d, d));
      right[c] += value * weighted;
    }
  }
  if (saturable) normal(terms - 1, terms - 1) = 1.0;
  // In the narrow ends of a part a patch may not tell all terms apart: least-norm then.
  const Eigen::LDLT<Eigen::Matrix<double, terms, terms>> direct(normal);
  const auto pivots = direct.vectorD().cwiseAbs();
  const bool regular = pivots.minCoeff() > 1e-10 * pivots.maxCoeff();
  for (std::size_t c = 0; c < patterns; ++c) {
    const Row a = regular ? Row(direct.solve(right[c]))
                          : Row(normal.completeOrthogonalDecomposition().solve(right[c]));
    const double half_source = 0.5 * source[c];
    const double a_xx = saturable ? a[3] / (sx * sx) : a[3] / (s * s) - half_source;
    const double a_yy = saturable ? a[5] / (sy * sy) : -a[3] / (s * s) - half_source;
    const double a_xy = a[4] / (sx * sy);
    Local& local = field_[c][static_cast<std::size_t>(place)];
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
    const mesh::Point d = point - grid.nodes[static_cast<std::size_t>(node_of_place(corner[k]))];
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
