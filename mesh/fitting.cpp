#include "mesh/fitting.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <unordered_map>

#include "mesh/spacing.hpp"

namespace barwall::mesh {
namespace {

/// Closer to a node than this share of an edge, an outline passes through the node.
constexpr double on_node = 1e-6;
/// Where two outlines touch, a node already fixed on one stands for the other too when it lies
/// within this share of an edge: the cusp between them is closed there.
constexpr double cusp = 0.12;
/// A cell's triangles keep at least this share of the plain cell's area.
constexpr double least_area = 0.02;

struct Crossing {
  int a;     ///< lower or left node
  int b;     ///< upper or right node
  double t;  ///< from a to b
  int piece;
};

class Fitter {
public:
  Fitter(const Section& section, const Outline& outline, std::vector<double> x,
         std::vector<double> y)
      : section_(section), outline_(outline) {
    grid_.columns = static_cast<int>(x.size());
    grid_.rows = static_cast<int>(y.size());
    grid_.x_lines = std::move(x);
    grid_.y_lines = std::move(y);
    grid_.nodes.reserve(static_cast<std::size_t>(grid_.node_count()));
    for (double v : grid_.y_lines) {
      for (double u : grid_.x_lines) grid_.nodes.push_back({u, v});
    }
    moved_.assign(grid_.nodes.size(), 0);
  }

  FitResult run() {
    place_vertices();
    find_crossings();
    resolve_crossings();
    split_and_label();
    std::sort(faulty_.begin(), faulty_.end());
    faulty_.erase(std::unique(faulty_.begin(), faulty_.end()), faulty_.end());
    return {std::move(grid_), std::move(faulty_)};
  }

private:
  Point& node(int n) { return grid_.nodes[static_cast<std::size_t>(n)]; }
  const Point& node(int n) const { return grid_.nodes[static_cast<std::size_t>(n)]; }
  const Curve& curve(int piece) const {
    return outline_.pieces[static_cast<std::size_t>(piece)].curve;
  }
  bool fixed(int n) const { return on_.contains(n); }
  bool on(int n, int piece) const {
    const auto found = on_.find(n);
    return found != on_.end() &&
           std::find(found->second.begin(), found->second.end(), piece) != found->second.end();
  }
  bool curved(int piece) const { return std::holds_alternative<Arc>(curve(piece)); }
  bool on_curved(int n) const {
    const auto& pieces = on_.at(n);
    return std::any_of(pieces.begin(), pieces.end(), [this](int k) { return curved(k); });
  }
  void put_on(int n, int piece) {
    auto& pieces = on_[n];
    if (std::find(pieces.begin(), pieces.end(), piece) == pieces.end()) pieces.push_back(piece);
  }

  /// Cells round a node, as (i, j) of their lower left corners.
  template <class Visit>
  void each_cell_at(int n, Visit visit) const {
    const int i = n % grid_.columns;
    const int j = n / grid_.columns;
    for (int q = j - 1; q <= j; ++q) {
      for (int p = i - 1; p <= i; ++p) {
        if (p >= 0 && q >= 0 && p < grid_.columns - 1 && q < grid_.rows - 1) visit(p, q);
      }
    }
  }

  std::array<int, 4> cell_nodes(int i, int j) const {
    const int a = grid_.node(i, j);
    return {a, a + 1, a + grid_.columns, a + grid_.columns + 1};
  }
  double plain_area(int i, int j) const {
    const auto p = static_cast<std::size_t>(i);
    const auto q = static_cast<std::size_t>(j);
    return (grid_.x_lines[p + 1] - grid_.x_lines[p]) * (grid_.y_lines[q + 1] - grid_.y_lines[q]);
  }
  /// Smallest triangle of a cell, as a share of half the plain cell, for one diagonal.
  double smallest_share(int i, int j, bool falling) const {
    const auto [a, b, c, d] = cell_nodes(i, j);
    const double first = falling ? triangle_area({node(a), node(b), node(c)})
                                 : triangle_area({node(a), node(b), node(d)});
    const double second = falling ? triangle_area({node(b), node(d), node(c)})
                                  : triangle_area({node(a), node(d), node(c)});
    return 2.0 * std::min(first, second) / plain_area(i, j);
  }
  bool may_move(int n, Point to, double share) {
    const Point back = node(n);
    node(n) = to;
    bool fine = true;
    each_cell_at(n, [&](int i, int j) {
      if (std::max(smallest_share(i, j, false), smallest_share(i, j, true)) < share) fine = false;
    });
    node(n) = back;
    return fine;
  }

  void place_vertices() {
    for (const Point& vertex : outline_.vertices) {
      const int i = interval_of(grid_.x_lines, vertex.x);
      const int j = interval_of(grid_.y_lines, vertex.y);
      std::array<int, 4> candidates = cell_nodes(i, j);
      const double dx = grid_.x_lines[static_cast<std::size_t>(i) + 1] -
                        grid_.x_lines[static_cast<std::size_t>(i)];
      const double dy = grid_.y_lines[static_cast<std::size_t>(j) + 1] -
                        grid_.y_lines[static_cast<std::size_t>(j)];
      const auto reach = [&](int n) {
        return std::hypot((node(n).x - vertex.x) / dx, (node(n).y - vertex.y) / dy);
      };
      std::sort(candidates.begin(), candidates.end(),
                [&](int p, int q) { return reach(p) < reach(q); });
      int chosen = -1;
      for (int n : candidates) {
        if (fixed(n)) continue;
        if (reach(n) > 1e-9 && !may_move(n, vertex, least_area)) continue;
        chosen = n;
        break;
      }
      if (chosen < 0) {
        faulty_.push_back(j * (grid_.columns - 1) + i);
        continue;
      }
      node(chosen) = vertex;
      for (std::size_t k = 0; k < outline_.pieces.size(); ++k) {
        for (double end : {0.0, 1.0}) {
          if (distance(at(outline_.pieces[k].curve, end), vertex) <= outline_.contact) {
            put_on(chosen, static_cast<int>(k));
          }
        }
      }
      on_[chosen];  // fixed even if no piece ends here
    }
  }

  void add_crossing(int a, int b, double t, int piece) {
    if (t < on_node || t > 1.0 - on_node) {
      const int n = t < 0.5 ? a : b;
      if (moved_[static_cast<std::size_t>(n)] == 0) put_on(n, piece);
      return;
    }
    crossings_.push_back({a, b, t, piece});
  }

  void find_crossings() {
    const auto& x = grid_.x_lines;
    const auto& y = grid_.y_lines;
    for (std::size_t k = 0; k < outline_.pieces.size(); ++k) {
      const int piece = static_cast<int>(k);
      const Box box = bounds(curve(piece));
      const double slack = outline_.contact;
      const Point low = box.low - Point{slack, slack};
      const Point high = box.high + Point{slack, slack};
      const auto first_x = std::lower_bound(x.begin(), x.end(), low.x);
      for (auto line = first_x; line != x.end() && *line <= high.x; ++line) {
        const int i = static_cast<int>(line - x.begin());
        for (double s : mesh::crossings(curve(piece), {*line, low.y}, {*line, high.y})) {
          const double v = low.y + s * (high.y - low.y);
          const int j = interval_of(y, v);
          const auto q = static_cast<std::size_t>(j);
          add_crossing(grid_.node(i, j), grid_.node(i, j + 1), (v - y[q]) / (y[q + 1] - y[q]),
                       piece);
        }
      }
      const auto first_y = std::lower_bound(y.begin(), y.end(), low.y);
      for (auto line = first_y; line != y.end() && *line <= high.y; ++line) {
        const int j = static_cast<int>(line - y.begin());
        for (double s : mesh::crossings(curve(piece), {low.x, *line}, {high.x, *line})) {
          const double u = low.x + s * (high.x - low.x);
          const int i = interval_of(x, u);
          const auto p = static_cast<std::size_t>(i);
          add_crossing(grid_.node(i, j), grid_.node(i + 1, j), (u - x[p]) / (x[p + 1] - x[p]),
                       piece);
        }
      }
    }
    // Nodes found to lie on a curve to rounding are put exactly on it.
    for (auto& [n, pieces] : on_) {
      if (pieces.size() != 1) continue;
      const Curve& c = curve(pieces.front());
      if (std::holds_alternative<Segment>(c)) continue;
      node(n) = at(c, nearest_parameter(c, node(n)));
    }
  }

  /// Where the edge from a to b, as it now lies, crosses a piece strictly between its ends.
  std::vector<double> strict_crossings(int a, int b, int piece) const {
    std::vector<double> inside;
    for (double t : mesh::crossings(curve(piece), node(a), node(b))) {
      if (t > on_node && t < 1.0 - on_node) inside.push_back(t);
    }
    return inside;
  }

  void resolve_crossings() {
    std::stable_sort(crossings_.begin(), crossings_.end(), [](const auto& p, const auto& q) {
      return std::min(p.t, 1.0 - p.t) < std::min(q.t, 1.0 - q.t);
    });
    for (const Crossing& crossing : crossings_) {
      const auto [a, b, planned, piece] = crossing;
      if (on(a, piece) || on(b, piece)) continue;
      const auto now = strict_crossings(a, b, piece);
      if (now.empty()) continue;
      const double t = *std::min_element(now.begin(), now.end(), [p = planned](double u, double v) {
        return std::abs(u - p) < std::abs(v - p);
      });
      const Point target = between(node(a), node(b), t);
      const int near = t <= 0.5 ? a : b;
      const int far = t <= 0.5 ? b : a;
      const double share = std::min(t, 1.0 - t);
      if (fixed(near) && share < cusp && (curved(piece) || on_curved(near))) {
        put_on(near, piece);
      } else if (!fixed(near) && may_move(near, target, least_area)) {
        move(near, target, piece);
      } else if (!fixed(far) && may_move(far, target, least_area)) {
        move(far, target, piece);
      } else if (fixed(near) && share < cusp) {
        put_on(near, piece);
      } else {
        fault_beside(a, b);
      }
    }
  }

  void move(int n, Point to, int piece) {
    node(n) = to;
    moved_[static_cast<std::size_t>(n)] = 1;
    put_on(n, piece);
  }

  void fault_beside(int a, int b) {
    each_cell_at(a, [&](int i, int j) {
      const auto corners = cell_nodes(i, j);
      if (std::find(corners.begin(), corners.end(), b) != corners.end()) {
        faulty_.push_back(j * (grid_.columns - 1) + i);
      }
    });
  }

  /// Pieces that pass through or touch each cell.
  std::unordered_map<int, std::vector<int>> pieces_by_cell() const {
    std::unordered_map<int, std::vector<int>> result;
    const auto add = [&](int n, int piece) {
      each_cell_at(n, [&](int i, int j) {
        auto& list = result[j * (grid_.columns - 1) + i];
        if (std::find(list.begin(), list.end(), piece) == list.end()) list.push_back(piece);
      });
    };
    for (const auto& [n, pieces] : on_) {
      for (int piece : pieces) add(n, piece);
    }
    for (const Crossing& c : crossings_) {
      add(c.a, c.piece);
      add(c.b, c.piece);
    }
    return result;
  }

  /// An edge is clean when no piece passes through it; of a curved piece on which one end lies,
  /// the slight bulge beside its chord is none.
  bool clean(int p, int q, const std::vector<int>& pieces) const {
    for (int piece : pieces) {
      const bool from = on(p, piece);
      const bool to = on(q, piece);
      if (from && to) continue;
      if ((from || to) && std::holds_alternative<Segment>(curve(piece))) continue;
      for (double t : strict_crossings(p, q, piece)) {
        if (!from && !to) return false;
        const double depth =
            distance(curve(piece), between(node(p), node(q), 0.5 * (from ? t : 1.0 + t)));
        if (depth > 0.1 * distance(node(p), node(q))) return false;
      }
    }
    return true;
  }

  Occupant strict_occupant(int n) {
    const auto found = occupant_of_node_.find(n);
    if (found != occupant_of_node_.end()) return found->second;
    return occupant_of_node_[n] = occupant_at(section_, node(n));
  }

  struct Side {
    bool pure = true;
    Occupant occupant;
  };
  Side side_of(const std::array<int, 3>& corners) {
    Side side;
    bool known = false;
    for (int n : corners) {
      if (fixed(n)) continue;
      const Occupant occupant = strict_occupant(n);
      if (known && occupant != side.occupant) side.pure = false;
      side.occupant = occupant;
      known = true;
    }
    if (!known) {
      const Point centre = (1.0 / 3.0) * (node(corners[0]) + node(corners[1]) + node(corners[2]));
      side.occupant = occupant_at(section_, centre);
    }
    return side;
  }

  static double shape_quality(Point p, Point q, Point r) {
    const double edges = dot(q - p, q - p) + dot(r - q, r - q) + dot(p - r, p - r);
    return triangle_area({p, q, r}) / edges;
  }

  struct Split {
    bool valid = false;
    double quality = 0.0;
    std::array<Occupant, 2> occupant;
  };
  Split try_split(int i, int j, bool falling, const std::vector<int>& pieces) {
    const auto [a, b, c, d] = cell_nodes(i, j);
    const std::array<std::array<int, 3>, 2> triangles =
        falling ? std::array<std::array<int, 3>, 2>{{{a, b, c}, {b, d, c}}}
                : std::array<std::array<int, 3>, 2>{{{a, b, d}, {a, d, c}}};
    Split split;
    split.valid = smallest_share(i, j, falling) > 1e-4 &&
                  (falling ? clean(b, c, pieces) : clean(a, d, pieces));
    split.quality = HUGE_VAL;
    for (std::size_t k = 0; k < 2; ++k) {
      const auto& t = triangles[k];
      const Side side = side_of(t);
      if (!side.pure) split.valid = false;
      split.occupant[k] = side.occupant;
      split.quality = std::min(split.quality, shape_quality(node(t[0]), node(t[1]), node(t[2])));
    }
    return split;
  }

  int region_of(Occupant occupant) {
    for (std::size_t k = 0; k < grid_.occupants.size(); ++k) {
      if (grid_.occupants[k] == occupant) return static_cast<int>(k);
    }
    grid_.occupants.push_back(occupant);
    return static_cast<int>(grid_.occupants.size()) - 1;
  }

  void split_and_label() {
    grid_.occupants = {Occupant{}};
    grid_.falling.assign(static_cast<std::size_t>(grid_.cell_count()), 0);
    grid_.region.assign(static_cast<std::size_t>(grid_.triangle_count()), 0);
    const auto pieces = pieces_by_cell();
    for (int j = 0; j + 1 < grid_.rows; ++j) {
      int running = -1;  // region of the untouched cell to the left, -1 when not known
      for (int i = 0; i + 1 < grid_.columns; ++i) {
        const int cell = j * (grid_.columns - 1) + i;
        const auto touched = pieces.find(cell);
        const auto t = static_cast<std::size_t>(2 * cell);
        if (touched == pieces.end()) {
          if (running < 0) running = region_of(occupant_at(section_, cell_centre(i, j)));
          grid_.region[t] = grid_.region[t + 1] = running;
          continue;
        }
        running = -1;
        split_touched(i, j, cell, touched->second);
      }
    }
  }

  Point cell_centre(int i, int j) const {
    const auto [a, b, c, d] = cell_nodes(i, j);
    return 0.25 * (node(a) + node(b) + node(c) + node(d));
  }

  void split_touched(int i, int j, int cell, const std::vector<int>& pieces) {
    const auto [a, b, c, d] = cell_nodes(i, j);
    const Split rising = try_split(i, j, false, pieces);
    const Split falling = try_split(i, j, true, pieces);
    // One diagonal direction wherever the outline does not choose, unless its triangles are bad.
    const bool take_falling =
        falling.valid && (!rising.valid || rising.quality < 0.2 * falling.quality);
    const Split& taken = take_falling ? falling : rising;
    if (!taken.valid || !clean(a, b, pieces) || !clean(c, d, pieces) || !clean(a, c, pieces) ||
        !clean(b, d, pieces)) {
      faulty_.push_back(cell);
    }
    grid_.falling[static_cast<std::size_t>(cell)] = take_falling ? 1 : 0;
    const auto t = static_cast<std::size_t>(2 * cell);
    grid_.region[t] = region_of(taken.occupant[0]);
    grid_.region[t + 1] = region_of(taken.occupant[1]);
  }

  const Section& section_;
  const Outline& outline_;
  FittedGrid grid_;
  std::vector<std::uint8_t> moved_;
  std::map<int, std::vector<int>> on_;  ///< nodes on outlines, with the pieces they lie on
  std::vector<Crossing> crossings_;
  std::vector<int> faulty_;
  std::unordered_map<int, Occupant> occupant_of_node_;
};

}  // namespace

FitResult fit(const Section& section, const Outline& outline, std::vector<double> x_lines,
              std::vector<double> y_lines) {
  return Fitter(section, outline, std::move(x_lines), std::move(y_lines)).run();
}

}  // namespace barwall::mesh
