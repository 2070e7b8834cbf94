#include "solver/flux_density.hpp"

#include <algorithm>
#include <cmath>

#include "solver/constants.hpp"
#include "solver/cycle.hpp"

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

/// The nodes round a place: half their extents along the axes [m], and whether fitting moved one.
struct Patch {
  mesh::Point origin;
  double sx = 0.0;
  double sy = 0.0;
  bool uneven = false;
};

/// Of A at a place: gradient [T], second derivatives [T/m].
struct Derivatives {
  mesh::Point gradient;
  double xx = 0.0;
  double xy = 0.0;
  double yy = 0.0;
};

/// Coefficients of the combination of terms that fits values at nodes best, nearer ones weighing
/// more.
/// \param value_at of a node
/// \param row_at the terms at an offset d from the patch's origin
template <int terms, class Value, class Row>
Eigen::Matrix<double, terms, 1> least_squares(const Patch& patch, const mesh::FittedGrid& grid,
                                              const std::vector<int>& nodes, Value value_at,
                                              Row row_at) {
  using Column = Eigen::Matrix<double, terms, 1>;
  using Square = Eigen::Matrix<double, terms, terms>;
  Square normal = Square::Zero();
  Column right = Column::Zero();
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - patch.origin;
    const double u = d.x / patch.sx;
    const double v = d.y / patch.sy;
    const double near = 1.0 / (0.1 + u * u + v * v);
    const Column row = row_at(d);
    const Column weighted = (patch.uneven ? near : near * near) * row;
    normal.noalias() += weighted * row.transpose();
    right += value_at(n, d) * weighted;
  }
  // In the narrow ends of a part a patch may not tell all terms apart: least-norm then.
  const Eigen::LDLT<Square> direct(normal);
  const auto pivots = direct.vectorD().cwiseAbs();
  if (pivots.minCoeff() > 1e-10 * pivots.maxCoeff()) return direct.solve(right);
  return normal.completeOrthogonalDecomposition().solve(right);
}

/// A = a0 + gx x + gy y + p (x2 - y2)/2 + q xy + c Re z3 + d Im z3 - mu J (x2 + y2)/4, each term
/// scaled to the patch, which may be long and narrow: the gradient and the second derivatives.
/// \param value A at a node less that at the patch's own
/// \param source mu J [T/m]
template <class Value>
Derivatives harmonic_fit(const Patch& patch, const mesh::FittedGrid& grid,
                         const std::vector<int>& nodes, Value value, double source) {
  const double sx = patch.sx;
  const double sy = patch.sy;
  const double s = std::max(sx, sy);
  const double narrow = std::min(sx, sy) / s;
  const double re_scale = sx > sy ? 1.0 : narrow;
  const double im_scale = sx > sy ? narrow : 1.0;
  const auto a = least_squares<7>(
      patch, grid, nodes,
      [&](int n, mesh::Point d) { return value(n) + 0.25 * source * dot(d, d); },
      [&](mesh::Point d) {
        const double x = d.x / s;
        const double y = d.y / s;
        Eigen::Matrix<double, 7, 1> row;
        row << 1.0, d.x / sx, d.y / sy, 0.5 * (x * x - y * y), (d.x / sx) * (d.y / sy),
            (x * x * x - 3.0 * x * y * y) / re_scale, (3.0 * x * x * y - y * y * y) / im_scale;
        return row;
      });
  return {{a[1] / sx, a[2] / sy},
          a[3] / (s * s) - 0.5 * source,
          a[4] / (sx * sy),
          -a[3] / (s * s) - 0.5 * source};
}

/// The same in saturable steel. There A satisfies nu A_ss + nu_d A_nn = 0 at every place, s along B
/// and n across it, nu_d = dH/dB: harmonic polynomials of s and n sqrt(nu / nu_d).
/// \param along unit vector of B near the place
/// \param stretch sqrt(nu / nu_d) there
template <class Value>
Derivatives saturable_fit(const Patch& patch, const mesh::FittedGrid& grid,
                          const std::vector<int>& nodes, Value value, mesh::Point along,
                          double stretch) {
  double scale_s = 0.0;
  double scale_n = 0.0;
  const auto turned = [&](mesh::Point d) {
    return mesh::Point{dot(d, along), stretch * cross(along, d)};
  };
  for (int n : nodes) {
    const mesh::Point q = turned(grid.nodes[static_cast<std::size_t>(n)] - patch.origin);
    scale_s = std::max(scale_s, std::abs(q.x));
    scale_n = std::max(scale_n, std::abs(q.y));
  }
  const double scale = std::max(scale_s, scale_n);
  const double narrow = std::min(scale_s, scale_n) / scale;
  const double re_scale = scale_s > scale_n ? 1.0 : narrow;
  const double im_scale = scale_s > scale_n ? narrow : 1.0;
  const auto a = least_squares<7>(
      patch, grid, nodes, [&](int n, mesh::Point) { return value(n); },
      [&](mesh::Point d) {
        const mesh::Point q = turned(d);
        const double x = q.x / scale;
        const double y = q.y / scale;
        Eigen::Matrix<double, 7, 1> row;
        row << 1.0, q.x / scale_s, q.y / scale_n, 0.5 * (x * x - y * y),
            (q.x / scale_s) * (q.y / scale_n), (x * x * x - 3.0 * x * y * y) / re_scale,
            (3.0 * x * x * y - y * y * y) / im_scale;
        return row;
      });
  // Back from (s, stretched n) to (x, y).
  const double g_s = a[1] / scale_s;
  const double g_n = stretch * a[2] / scale_n;
  const double a_ss = a[3] / (scale * scale);
  const double a_sn = stretch * a[4] / (scale_s * scale_n);
  const double a_nn = -stretch * stretch * a[3] / (scale * scale);
  const mesh::Point t = along;
  const mesh::Point n = quarter_turn(along);
  return {g_s * t + g_n * n, a_ss * t.x * t.x + 2.0 * a_sn * t.x * n.x + a_nn * n.x * n.x,
          a_ss * t.x * t.y + a_sn * (t.x * n.y + t.y * n.x) + a_nn * n.x * n.y,
          a_ss * t.y * t.y + 2.0 * a_sn * t.y * n.y + a_nn * n.y * n.y};
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
      fit_place(place, nodes, source[static_cast<std::size_t>(region_of_place(place))],
                part < 0 ? nullptr
                         : solution.problem->materials[static_cast<std::size_t>(part)].curve.get());
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
                               const std::vector<double>& source, const BhCurve* curve) {
  const mesh::FittedGrid& grid = solution_->grid();
  const int node = node_of_place(place);
  const int region = region_of_place(place);
  constexpr std::size_t enough = 20;  // well more nodes than terms
  if (!gather_window(node, region, nodes)) {
    int layers = 1;
    do {
      gather_layers(node, region, ++layers, nodes);
    } while (nodes.size() < enough && layers < 4);
  }
  Patch patch;
  patch.origin = grid.nodes[static_cast<std::size_t>(node)];
  for (int n : nodes) {
    const mesh::Point d = grid.nodes[static_cast<std::size_t>(n)] - patch.origin;
    patch.sx = std::max(patch.sx, std::abs(d.x));
    patch.sy = std::max(patch.sy, std::abs(d.y));
    // Beside curved and inclined outlines A carries a ripple from node to node: there every node
    // of the patch counts more alike.
    patch.uneven = patch.uneven || grid.moved(n);
  }
  for (int c = 0; c < solution_->pattern_count(); ++c) {
    const auto value = [&](int n) {
      return solution_->potential(n, c) - solution_->potential(node, c);
    };
    Derivatives a;
    if (curve == nullptr) {
      a = harmonic_fit(patch, grid, nodes, value, source[static_cast<std::size_t>(c)]);
    } else {
      // The direction and the size of B that the fit needs: of the cells round the place first,
      // then of the fit itself.
      double area = 0.0;
      each_triangle_at(grid, node, [&](int t, const std::array<int, 3>&) {
        if (grid.region[static_cast<std::size_t>(t)] != region) return;
        const double share = triangle_area(grid.corners(t));
        const mesh::Point b = cell_flux_density(grid, t, solution_->potential.col(c));
        a.gradient += share * mesh::Point{-b.y, b.x};
        area += share;
      });
      a.gradient = (1.0 / area) * a.gradient;
      for (int pass = 0; pass < 2; ++pass) {
        const mesh::Point b{a.gradient.y, -a.gradient.x};
        const double size = norm(b);
        const mesh::Point along = size > 0.0 ? (1.0 / size) * b : mesh::Point{1.0, 0.0};
        const double stretch = std::sqrt(curve->reluctivity(size) / curve->slope(size));
        a = saturable_fit(patch, grid, nodes, value, along, stretch);
      }
    }
    field_[static_cast<std::size_t>(c)][static_cast<std::size_t>(place)] = {
        {a.gradient.y, -a.gradient.x}, {a.xy, -a.xx}, {a.yy, -a.xy}};
  }
}

mesh::Point RecoveredField::field_strength(int place, int pattern) const {
  if (!strength_.empty()) {
    return strength_[static_cast<std::size_t>(pattern)][static_cast<std::size_t>(place)];
  }
  return solver::field_strength(*solution_->problem, region_of_place(place),
                                flux_density(place, pattern));
}

double RecoveredField::rms(int place) const {
  if (!rms_.empty()) return rms_[static_cast<std::size_t>(place)];
  const double b = norm(flux_density(place, 0));
  return field_.size() == 1 ? b : std::hypot(b, norm(flux_density(place, 1)));
}

double RecoveredField::peak(int place) const {
  if (!peak_.empty()) return peak_[static_cast<std::size_t>(place)];
  if (field_.size() == 1) return norm(flux_density(place, 0));
  return peak_magnitude(flux_density(place, 0), flux_density(place, 1));
}

double RecoveredField::rms(const mesh::Location& at, mesh::Point point) const {
  if (!rms_.empty()) {
    const auto corner = places(at.triangle);
    double sum = 0.0;
    for (std::size_t k = 0; k < 3; ++k) sum += at.weight[k] * rms(corner[k]);
    return sum;
  }
  const double b = norm(flux_density(at, point, 0));
  return field_.size() == 1 ? b : std::hypot(b, norm(flux_density(at, point, 1)));
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
