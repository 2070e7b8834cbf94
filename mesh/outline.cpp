#include "mesh/outline.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <numeric>
#include <set>

namespace barwall::mesh {
namespace {

struct Tolerance {
  double contact;  ///< points closer than this are one [m]
  double aside;    ///< how far beside a curve its two sides are probed [m]
};

Tolerance tolerance_of(const Section& section) {
  double least = HUGE_VAL;
  Box box;
  const auto take = [&](const std::vector<Shape>& pieces) {
    for (const Shape& piece : pieces) {
      least = std::min(least, thickness(piece));
      box.include(bounds(piece));
    }
  };
  for (const Part& part : section.parts) take(part.pieces);
  for (const Opening& opening : section.openings) take(opening.pieces);
  const double extent = std::max(
      {std::abs(box.low.x), std::abs(box.low.y), std::abs(box.high.x), std::abs(box.high.y)});
  const double aside = std::max(1e-5 * least, 1e-11 * extent);
  return {0.1 * aside, aside};
}

std::vector<Curve> all_curves(const Section& section) {
  std::vector<Curve> curves;
  const auto take = [&](const std::vector<Shape>& pieces) {
    for (const Shape& piece : pieces) {
      for (const auto& chain : boundary(piece)) {
        curves.insert(curves.end(), chain.begin(), chain.end());
      }
    }
  };
  for (const Part& part : section.parts) take(part.pieces);
  for (const Opening& opening : section.openings) take(opening.pieces);
  return curves;
}

bool boxes_meet(const Box& a, const Box& b, double slack) {
  return a.low.x <= b.high.x + slack && b.low.x <= a.high.x + slack &&
         a.low.y <= b.high.y + slack && b.low.y <= a.high.y + slack;
}

/// Every curve cut at every point where another one meets it.
std::vector<Curve> cut_at_meetings(const std::vector<Curve>& curves, double tolerance) {
  const std::size_t n = curves.size();
  std::vector<Box> boxes(n);
  std::vector<std::size_t> by_x(n);
  std::iota(by_x.begin(), by_x.end(), 0u);
  for (std::size_t k = 0; k < n; ++k) boxes[k] = bounds(curves[k]);
  std::sort(by_x.begin(), by_x.end(),
            [&](auto a, auto b) { return boxes[a].low.x < boxes[b].low.x; });
  std::vector<std::vector<double>> cuts(n);
  for (std::size_t a = 0; a < n; ++a) {
    for (std::size_t b = a + 1; b < n; ++b) {
      const std::size_t k = by_x[a];
      const std::size_t m = by_x[b];
      if (boxes[m].low.x > boxes[k].high.x + tolerance) break;
      if (!boxes_meet(boxes[k], boxes[m], tolerance)) continue;
      for (double t : meeting_parameters(curves[k], curves[m], tolerance)) cuts[k].push_back(t);
      for (double t : meeting_parameters(curves[m], curves[k], tolerance)) cuts[m].push_back(t);
    }
  }
  std::vector<Curve> result;
  for (std::size_t k = 0; k < n; ++k) {
    auto& t = cuts[k];
    if (t.empty()) {
      result.push_back(curves[k]);
      continue;
    }
    t.push_back(0.0);
    t.push_back(1.0);
    std::sort(t.begin(), t.end());
    const double slack = tolerance / length(curves[k]);
    double last = t.front();
    for (double next : t) {
      if (next - last <= slack) continue;
      if (1.0 - next <= slack) next = 1.0;
      result.push_back(part(curves[k], last, next));
      last = next;
    }
  }
  return result;
}

/// Points closer than the tolerance get one number.
class PointNumbers {
public:
  explicit PointNumbers(double tolerance) : size_(4.0 * tolerance), tolerance_(tolerance) {}

  int operator()(Point p) {
    const auto cx = static_cast<long long>(std::floor(p.x / size_));
    const auto cy = static_cast<long long>(std::floor(p.y / size_));
    for (long long i = cx - 1; i <= cx + 1; ++i) {
      for (long long j = cy - 1; j <= cy + 1; ++j) {
        const auto found = cells_.find({i, j});
        if (found == cells_.end()) continue;
        for (int k : found->second) {
          if (distance(points_[static_cast<std::size_t>(k)], p) <= 2.0 * tolerance_) return k;
        }
      }
    }
    const int number = static_cast<int>(points_.size());
    points_.push_back(p);
    cells_[{cx, cy}].push_back(number);
    return number;
  }
  const std::vector<Point>& points() const { return points_; }

private:
  double size_;
  double tolerance_;
  std::vector<Point> points_;
  std::map<std::pair<long long, long long>, std::vector<int>> cells_;
};

bool whole_circle(const Curve& curve) {
  const auto* arc = std::get_if<Arc>(&curve);
  return arc != nullptr && std::abs(arc->sweep) >= 6.283185;
}

/// True when `next` goes on where `last` ends as the same line or circle.
bool continues(const Curve& last, const Curve& next, double tolerance) {
  if (last.index() != next.index()) return false;
  if (const auto* a = std::get_if<Arc>(&last)) {
    const auto& b = std::get<Arc>(next);
    return distance(a->centre, b.centre) <= tolerance &&
           std::abs(a->radius - b.radius) <= tolerance && a->sweep * b.sweep > 0.0;
  }
  const auto& a = std::get<Segment>(last);
  const auto& b = std::get<Segment>(next);
  const Point chord = b.to - a.from;
  return dot(tangent(last, 1.0), tangent(next, 0.0)) > 0.0 &&
         std::abs(cross(chord, a.to - a.from)) <= tolerance * norm(chord);
}

Curve joined(const Curve& last, const Curve& next) {
  if (const auto* a = std::get_if<Arc>(&last)) {
    const double sweep = a->sweep + std::get<Arc>(next).sweep;
    return Arc{a->centre, a->radius, a->start, sweep};
  }
  return Segment{std::get<Segment>(last).from, std::get<Segment>(next).to};
}

OutlinePiece reversed(const OutlinePiece& piece) {
  return {reversed(piece.curve), piece.right, piece.left};
}

/// Joins pieces across points where nothing else meets and the curve goes straight on.
void join_pieces(std::vector<OutlinePiece>& pieces, double tolerance) {
  bool changed = true;
  while (changed) {
    changed = false;
    PointNumbers number(tolerance);
    std::map<int, std::vector<std::size_t>> at_point;
    for (std::size_t k = 0; k < pieces.size(); ++k) {
      if (whole_circle(pieces[k].curve)) continue;
      at_point[number(at(pieces[k].curve, 0.0))].push_back(k);
      at_point[number(at(pieces[k].curve, 1.0))].push_back(k);
    }
    std::vector<bool> gone(pieces.size(), false);
    std::vector<bool> touched(pieces.size(), false);
    for (const auto& [point, ends] : at_point) {
      if (ends.size() != 2 || ends[0] == ends[1]) continue;
      const auto [i, j] = std::pair{ends[0], ends[1]};
      if (touched[i] || touched[j]) continue;
      const Point p = number.points()[static_cast<std::size_t>(point)];
      OutlinePiece a = pieces[i];
      OutlinePiece b = pieces[j];
      if (distance(at(a.curve, 1.0), p) > 4.0 * tolerance) a = reversed(a);
      if (distance(at(b.curve, 0.0), p) > 4.0 * tolerance) b = reversed(b);
      if (a.left != b.left || a.right != b.right) continue;
      if (!continues(a.curve, b.curve, tolerance)) continue;
      pieces[i] = {joined(a.curve, b.curve), a.left, a.right};
      gone[j] = touched[i] = touched[j] = changed = true;
    }
    std::size_t kept = 0;
    for (std::size_t k = 0; k < pieces.size(); ++k) {
      if (!gone[k]) pieces[kept++] = pieces[k];
    }
    pieces.resize(kept);
  }
}

}  // namespace

Outline outline_of(const Section& section) {
  Outline outline;
  if (section.parts.empty()) return outline;
  const Tolerance tolerance = tolerance_of(section);
  outline.contact = tolerance.aside;
  PointNumbers middle_number(tolerance.contact);
  std::set<std::pair<int, long long>> seen;
  for (const Curve& curve : cut_at_meetings(all_curves(section), tolerance.contact)) {
    const Point middle = at(curve, 0.5);
    const Point normal = left_normal(curve, 0.5);
    const Occupant left = occupant_at(section, middle + tolerance.aside * normal);
    const Occupant right = occupant_at(section, middle - tolerance.aside * normal);
    if (left == right) continue;
    // Coincident curves of two shapes give the same piece twice: same middle, same length.
    const auto size = std::llround(length(curve) / (8.0 * tolerance.contact));
    const int number = middle_number(middle);
    const bool twice = seen.contains({number, size}) || seen.contains({number, size - 1}) ||
                       seen.contains({number, size + 1});
    if (twice) continue;
    seen.insert({number, size});
    outline.pieces.push_back({curve, left, right});
  }
  join_pieces(outline.pieces, tolerance.contact);
  PointNumbers vertex_number(tolerance.contact);
  for (const OutlinePiece& piece : outline.pieces) {
    if (whole_circle(piece.curve)) continue;
    vertex_number(at(piece.curve, 0.0));
    vertex_number(at(piece.curve, 1.0));
  }
  outline.vertices = vertex_number.points();
  return outline;
}

Gap gap_between(const Curve& first, const Curve& second) {
  Gap best;
  const auto try_pair = [&best](Point p, Point q) {
    const double d = distance(p, q);
    if (d < best.width) best = {d, p, q};
  };
  const auto from_first = [&](double t) {
    const Point p = at(first, t);
    try_pair(p, at(second, nearest_parameter(second, p)));
  };
  const auto from_second = [&](double t) {
    const Point q = at(second, t);
    try_pair(at(first, nearest_parameter(first, q)), q);
  };
  for (double end : {0.0, 1.0}) {
    from_first(end);
    from_second(end);
  }
  // With a circle the shortest way leads through its centre, or, between two, along the line
  // of their centres; a crossing gives zero.
  if (const auto* arc = std::get_if<Arc>(&first))
    from_second(nearest_parameter(second, arc->centre));
  if (const auto* arc = std::get_if<Arc>(&second))
    from_first(nearest_parameter(first, arc->centre));
  if (const auto* a = std::get_if<Arc>(&first)) {
    if (const auto* b = std::get_if<Arc>(&second)) {
      const Point link = b->centre - a->centre;
      const double d = norm(link);
      if (d > 0.0) {
        for (double side : {-1.0, 1.0}) {
          from_first(nearest_parameter(first, a->centre + (side * a->radius / d) * link));
          from_second(nearest_parameter(second, b->centre + (side * b->radius / d) * link));
        }
      }
    }
  }
  for (double t : meeting_parameters(first, second, 0.0)) from_first(t);
  return best;
}

std::vector<PartGap> gaps(const Outline& outline) {
  std::map<int, std::vector<std::pair<Box, const Curve*>>> curves;
  for (const OutlinePiece& piece : outline.pieces) {
    for (int part : std::set{piece.left.part, piece.right.part}) {
      if (part < 0) continue;
      curves[part].emplace_back(bounds(piece.curve), &piece.curve);
    }
  }
  std::vector<PartGap> result;
  for (auto a = curves.begin(); a != curves.end(); ++a) {
    for (auto b = std::next(a); b != curves.end(); ++b) {
      Gap best;
      for (const auto& [first_box, first] : a->second) {
        for (const auto& [second_box, second] : b->second) {
          if (distance(first_box, second_box) >= best.width) continue;
          const Gap gap = gap_between(*first, *second);
          if (gap.width < best.width) best = gap;
        }
      }
      if (best.width <= outline.contact) best.width = 0.0;
      result.push_back({a->first, b->first, best});
    }
  }
  return result;
}

std::vector<int> visible_parts(const Outline& outline) {
  std::set<int> parts;
  for (const OutlinePiece& piece : outline.pieces) {
    parts.insert(piece.left.part);
    parts.insert(piece.right.part);
  }
  parts.erase(-1);
  return {parts.begin(), parts.end()};
}

std::vector<std::vector<int>> bodies(const Outline& outline) {
  const std::vector<int> parts = visible_parts(outline);
  std::map<int, int> root;
  for (int part : parts) root[part] = part;
  const auto find = [&root](int part) {
    while (root[part] != part) part = root[part];
    return part;
  };
  // Pieces from left to right: one can only touch those that begin before it ends.
  std::vector<std::pair<Box, const OutlinePiece*>> pieces;
  for (const OutlinePiece& piece : outline.pieces) pieces.emplace_back(bounds(piece.curve), &piece);
  std::stable_sort(pieces.begin(), pieces.end(),
                   [](const auto& a, const auto& b) { return a.first.low.x < b.first.low.x; });
  const auto join = [&](int first, int second) {
    if (first < 0 || second < 0) return;
    const int a = find(first);
    const int b = find(second);
    root[std::max(a, b)] = std::min(a, b);
  };
  for (std::size_t a = 0; a < pieces.size(); ++a) {
    const OutlinePiece& piece = *pieces[a].second;
    join(piece.left.part, piece.right.part);
    for (std::size_t b = a + 1; b < pieces.size(); ++b) {
      if (pieces[b].first.low.x > pieces[a].first.high.x + outline.contact) break;
      if (distance(pieces[a].first, pieces[b].first) > outline.contact) continue;
      const OutlinePiece& other = *pieces[b].second;
      if (gap_between(piece.curve, other.curve).width > outline.contact) continue;
      const int part = std::max(piece.left.part, piece.right.part);
      join(part, other.left.part);
      join(part, other.right.part);
    }
  }
  std::map<int, std::vector<int>> groups;
  for (int part : parts) groups[find(part)].push_back(part);
  std::vector<std::vector<int>> result;
  for (auto& [first, members] : groups) result.push_back(members);
  return result;
}

}  // namespace barwall::mesh
