#include "solver/surface_force.hpp"

#include <algorithm>
#include <cmath>
#include <map>

#include "mesh/grid_window.hpp"
#include "mesh/triangle_edges.hpp"
#include "solver/force.hpp"

namespace barwall::solver {
namespace {

/// Share of the way to the next surface beyond the corners that a displacement reaches.
constexpr double reach_of_gap = 0.9;
/// Share of a surface's own length that it reaches at most, so that its two corners keep apart.
constexpr double reach_of_length = 1.0 / 3.0;
/// Surfaces that meet under a flatter angle (its sine) have no corner to speak of.
constexpr double flat = 0.2;

bool faces_air(const mesh::OutlinePiece& piece) {
  return (piece.left.part < 0) != (piece.right.part < 0);
}

/// Unit normal of a piece into the air.
mesh::Point into_air(const mesh::OutlinePiece& piece, double t) {
  const mesh::Point left = left_normal(piece.curve, t);
  return piece.left.part < 0 ? left : -left;
}

}  // namespace

/// A straight surface moved outward by one: full on the surface, falling to nothing within `width`
/// of it. Near a corner it runs along the surface that meets there.
class SurfaceForces::Displacement {
public:
  Displacement(const Problem& problem, std::size_t piece)
      : curve_(problem.outline.pieces[piece].curve),
        normal_(into_air(problem.outline.pieces[piece], 0.5)),
        tangent_(quarter_turn(normal_)),
        contact_(problem.outline.contact) {
    const auto& pieces = problem.outline.pieces;
    double gap = HUGE_VAL;
    for (std::size_t other = 0; other < pieces.size(); ++other) {
      if (other == piece) continue;
      bool meets = false;
      for (double here : {0.0, 1.0}) {
        for (double there : {0.0, 1.0}) {
          const mesh::Point corner = at(curve_, here);
          if (distance(corner, at(pieces[other].curve, there)) > contact_) continue;
          meets = true;
          if (!faces_air(pieces[other])) continue;
          if (neighbours_.empty() || neighbours_.back() != other) neighbours_.push_back(other);
          add_corner(corner, into_air(pieces[other], there));
        }
      }
      if (!meets) gap = std::min(gap, gap_between(curve_, pieces[other].curve).width);
    }
    width_ = std::min(reach_of_gap * gap, reach_of_length * length(curve_));
  }

  mesh::Point operator()(mesh::Point p) const {
    const double away = distance(curve_, p);
    const double weight = away < contact_ ? 1.0 : 1.0 - away / width_;
    if (weight <= 0.0) return {};
    mesh::Point v = normal_;
    for (const Corner& corner : corners_) {
      const double near = std::clamp(2.0 - distance(corner.at, p) / width_, 0.0, 1.0);
      v += (near * corner.along) * tangent_;
    }
    return weight * v;
  }

  const mesh::Curve& curve() const { return curve_; }
  mesh::Point normal() const { return normal_; }
  double width() const { return width_; }
  /// Pieces that meet the surface at its ends and face air.
  const std::vector<std::size_t>& neighbours() const { return neighbours_; }

private:
  struct Corner {
    mesh::Point at;
    double along;  ///< displacement along the surface there
  };

  /// Chooses the displacement along the surface for which the other one slides in itself.
  void add_corner(mesh::Point corner, mesh::Point other_normal) {
    const double sine = dot(tangent_, other_normal);
    const bool known = std::any_of(corners_.begin(), corners_.end(), [&](const Corner& c) {
      return distance(c.at, corner) <= contact_;
    });
    if (known || std::abs(sine) < flat) return;
    corners_.push_back({corner, -dot(normal_, other_normal) / sine});
  }

  mesh::Curve curve_;
  mesh::Point normal_;
  mesh::Point tangent_;
  double contact_;
  double width_ = 0.0;
  std::vector<Corner> corners_;
  std::vector<std::size_t> neighbours_;
};

SurfaceForces::SurfaceForces(const Problem& problem, const std::vector<std::size_t>& pieces) {
  const mesh::FittedGrid& grid = *problem.grid;
  const auto edges = edges_of_pieces(problem);
  for (std::size_t piece : pieces) {
    Surface surface;
    surface.edges = edges[piece];
    surface.straight = std::holds_alternative<mesh::Segment>(problem.outline.pieces[piece].curve);
    if (surface.straight) {
      const Displacement displacement(problem, piece);
      surface.normal = displacement.normal();
      surface.moved = band_of(problem, displacement);
      const auto take_off = [&](const std::vector<Edge>& slid, mesh::Point meant) {
        for (Edge edge : slid) {
          edge.slip = displacement(between(grid.nodes[static_cast<std::size_t>(edge.from)],
                                           grid.nodes[static_cast<std::size_t>(edge.to)], 0.5)) -
                      meant;
          if (edge.slip != mesh::Point{}) surface.slid.push_back(edge);
        }
      };
      take_off(surface.edges, surface.normal);
      for (std::size_t other : displacement.neighbours()) take_off(edges[other], {});
    }
    surfaces_.push_back(std::move(surface));
  }
}

/// The grid's edges on every piece of the outline that faces air.
std::vector<std::vector<SurfaceForces::Edge>> SurfaceForces::edges_of_pieces(
    const Problem& problem) {
  const mesh::FittedGrid& grid = *problem.grid;
  const auto& pieces = problem.outline.pieces;
  std::map<mesh::Occupant, std::vector<std::size_t>> pieces_of;
  for (std::size_t k = 0; k < pieces.size(); ++k) {
    if (faces_air(pieces[k])) pieces_of[std::max(pieces[k].left, pieces[k].right)].push_back(k);
  }
  std::vector<std::vector<Edge>> edges(pieces.size());
  mesh::each_inner_edge(grid, [&](int from, int to, int left, int right) {
    const int region_left = grid.region[static_cast<std::size_t>(left)];
    const int region_right = grid.region[static_cast<std::size_t>(right)];
    if ((region_left == 0) == (region_right == 0)) return;
    const mesh::Point a = grid.nodes[static_cast<std::size_t>(from)];
    const mesh::Point b = grid.nodes[static_cast<std::size_t>(to)];
    const mesh::Point middle = between(a, b, 0.5);
    const int region = std::max(region_left, region_right);
    std::size_t nearest = 0;
    double least = HUGE_VAL;
    for (std::size_t k : pieces_of[grid.occupants[static_cast<std::size_t>(region)]]) {
      const double away = distance(pieces[k].curve, middle);
      if (away >= least) continue;
      nearest = k;
      least = away;
    }
    const double size = distance(a, b);
    const mesh::Point normal = (1.0 / size) * quarter_turn(b - a);
    edges[nearest].push_back({from, to, region, region_left == 0 ? normal : -normal, size, {}});
  });
  return edges;
}

/// The triangles of air that a displacement reaches.
std::vector<SurfaceForces::Moved> SurfaceForces::band_of(const Problem& problem,
                                                         const Displacement& displacement) {
  std::vector<Moved> band;
  const mesh::FittedGrid& grid = *problem.grid;
  const mesh::GridWindow cells =
      window_covering(grid, grown(bounds(displacement.curve()), displacement.width()));
  for (int j = cells.first_row; j < cells.last_row; ++j) {
    for (int i = cells.first_column; i < cells.last_column; ++i) {
      const int cell = j * (grid.columns - 1) + i;
      for (int t = 2 * cell; t <= 2 * cell + 1; ++t) {
        if (grid.region[static_cast<std::size_t>(t)] != 0) continue;
        const auto p = grid.corners(t);
        const Moved moved{t, {displacement(p[0]), displacement(p[1]), displacement(p[2])}};
        if (moved.by != std::array<mesh::Point, 3>{}) band.push_back(moved);
      }
    }
  }
  return band;
}

PulsatingVector SurfaceForces::force(const Solution& solution, const RecoveredField& field,
                                     std::size_t k) const {
  const mesh::FittedGrid& grid = solution.grid();
  const Surface& surface = surfaces_[k];
  const auto on_edge = [&](const Edge& edge, int pattern) {
    const mesh::Point along = -quarter_turn(edge.normal);
    const mesh::Point step = grid.nodes[static_cast<std::size_t>(edge.to)] -
                             grid.nodes[static_cast<std::size_t>(edge.from)];
    // B's component to the right of a direction is A's slope along it.
    const double rise =
        solution.potential(edge.to, pattern) - solution.potential(edge.from, pattern);
    const double across = -(dot(step, along) > 0.0 ? rise : -rise) / edge.length;
    mesh::Point h;
    for (int node : {edge.from, edge.to}) {
      const int place = field.place(node, edge.region);
      h += 0.5 * field_strength(*solution.problem, edge.region, field.flux_density(place, pattern));
    }
    return across * edge.normal + (mu_0 * dot(h, along)) * along;
  };
  const auto on_edges = [&](const std::vector<Edge>& edges, int f, int g, auto take) {
    for (const Edge& edge : edges) {
      take(edge, edge.length * maxwell_stress(on_edge(edge, f), on_edge(edge, g), edge.normal));
    }
  };
  return over_cycle(solution.pattern_count(), [&](int f, int g) {
    mesh::Point on_surface;
    on_edges(surface.edges, f, g, [&](const Edge&, mesh::Point pull) { on_surface += pull; });
    if (!surface.straight) return on_surface;
    double push = 0.0;
    for (const Moved& moved : surface.moved) {
      const auto p = grid.corners(moved.triangle);
      const mesh::Point b = cell_flux_density(grid, moved.triangle, solution.potential.col(f));
      const mesh::Point c = cell_flux_density(grid, moved.triangle, solution.potential.col(g));
      for (std::size_t n = 0; n < 3; ++n) {
        // Area times the slope of the corner's own linear function.
        const mesh::Point slope = 0.5 * quarter_turn(p[(n + 2) % 3] - p[(n + 1) % 3]);
        push -= dot(moved.by[n], maxwell_stress(b, c, slope));
      }
    }
    on_edges(surface.slid, f, g,
             [&](const Edge& edge, mesh::Point pull) { push -= dot(edge.slip, pull); });
    const mesh::Point tangent = quarter_turn(surface.normal);
    return push * surface.normal + dot(on_surface, tangent) * tangent;
  });
}

}  // namespace barwall::solver
