#include "mesh/offset_line.hpp"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/geometries/linestring.hpp>
#include <boost/geometry/geometries/multi_linestring.hpp>
#include <boost/geometry/geometries/multi_polygon.hpp>
#include <boost/geometry/geometries/point_xy.hpp>
#include <boost/geometry/geometries/polygon.hpp>
#include <map>
#include <set>
#include <utility>

namespace barwall::mesh {
namespace {

namespace bg = boost::geometry;
using Vertex = bg::model::d2::point_xy<double>;
using Line = bg::model::linestring<Vertex>;
using Ring = bg::model::polygon<Vertex, false>;  // counter-clockwise
using Rings = bg::model::multi_polygon<Ring>;

constexpr int points_per_circle = 144;  // chords within 1/4000 of the radius

/// Holes filled: what runs round a part in the hollow of another is not outermost.
void keep_outer(Rings& rings) {
  for (Ring& ring : rings) ring.inners().clear();
}

/// Everything within 1 of lines first to last. The edges of that many lines meet each other
/// everywhere: beyond a few dozen they are grown by halves, whose few outer edges are then joined.
Rings grown_by_one(const std::vector<Line>& lines, std::size_t first, std::size_t last) {
  constexpr std::size_t few = 48;
  Rings grown;
  if (last - first <= few) {
    bg::model::multi_linestring<Line> some;
    for (std::size_t k = first; k < last; ++k) some.push_back(lines[k]);
    bg::buffer(some, grown, bg::strategy::buffer::distance_symmetric<double>(1.0),
               bg::strategy::buffer::side_straight(),
               bg::strategy::buffer::join_round(points_per_circle),
               bg::strategy::buffer::end_round(points_per_circle),
               bg::strategy::buffer::point_circle(points_per_circle));
  } else {
    const std::size_t middle = first + (last - first) / 2;
    bg::union_(grown_by_one(lines, first, middle), grown_by_one(lines, middle, last), grown);
  }
  keep_outer(grown);
  return grown;
}

/// Lines joined end to start as far as they go. Growing many short lines that share their ends, the
/// library has been seen to leave parts of one region apart, or out.
std::vector<Line> joined(const std::vector<Line>& lines) {
  const auto key = [](const Vertex& v) { return std::pair(v.x(), v.y()); };
  std::multimap<std::pair<double, double>, std::size_t> starting_at;
  std::multiset<std::pair<double, double>> ends;
  for (std::size_t k = 0; k < lines.size(); ++k) {
    starting_at.emplace(key(lines[k].front()), k);
    ends.insert(key(lines[k].back()));
  }
  std::vector<Line> result;
  std::vector<bool> used(lines.size(), false);
  const auto follow_from = [&](std::size_t k) {
    if (used[k]) return;
    used[k] = true;
    Line line = lines[k];
    for (auto next = starting_at.find(key(line.back())); next != starting_at.end();
         next = starting_at.find(key(line.back()))) {
      const Line& more = lines[next->second];
      const bool taken = used[next->second];
      used[next->second] = true;
      starting_at.erase(next);
      if (!taken) line.insert(line.end(), more.begin() + 1, more.end());
    }
    result.push_back(std::move(line));
  };
  // First from where no other line ends, then what is left: closed ones.
  for (std::size_t k = 0; k < lines.size(); ++k) {
    if (!ends.contains(key(lines[k].front()))) follow_from(k);
  }
  for (std::size_t k = 0; k < lines.size(); ++k) follow_from(k);
  return result;
}

}  // namespace

std::vector<std::vector<Point>> offset_lines(const Outline& outline, const std::vector<int>& parts,
                                             double clearance) {
  const std::set<int> wanted(parts.begin(), parts.end());
  const auto ours = [&](Occupant side) { return wanted.contains(side.part); };
  // In units of the clearance about the outline's own place, for the library's tolerances.
  Box box;
  for (const OutlinePiece& piece : outline.pieces) {
    if (ours(piece.left) != ours(piece.right)) box.include(bounds(piece.curve));
  }
  const Point origin = box.centre();
  std::vector<Line> lines;
  for (const OutlinePiece& piece : outline.pieces) {
    if (ours(piece.left) == ours(piece.right)) continue;
    Line line;
    for (Point p : polyline(piece.curve, clearance / 4000.0)) {
      const Point q = (1.0 / clearance) * (p - origin);
      line.emplace_back(q.x, q.y);
    }
    lines.push_back(std::move(line));
  }
  std::vector<std::pair<double, std::vector<Point>>> found;
  lines = joined(lines);
  for (const Ring& ring : grown_by_one(lines, 0, lines.size())) {
    std::vector<Point> line;
    for (const Vertex& v : ring.outer()) {
      line.push_back(origin + clearance * Point{v.x(), v.y()});
    }
    line.pop_back();  // the library repeats the first point
    found.emplace_back(bg::area(ring), std::move(line));
  }
  std::sort(found.begin(), found.end(),
            [](const auto& a, const auto& b) { return a.first > b.first; });
  std::vector<std::vector<Point>> result;
  result.reserve(found.size());
  for (auto& [area, line] : found) result.push_back(std::move(line));
  return result;
}

std::vector<Point> spread_along(const std::vector<Point>& closed_line, int count) {
  const std::size_t n = closed_line.size();
  const auto first =
      static_cast<std::size_t>(std::max_element(closed_line.begin(), closed_line.end(),
                                                [](Point a, Point b) { return a.x < b.x; }) -
                               closed_line.begin());
  std::vector<double> along{0.0};
  for (std::size_t k = 0; k < n; ++k) {
    along.push_back(along.back() +
                    distance(closed_line[(first + k) % n], closed_line[(first + k + 1) % n]));
  }
  std::vector<Point> result;
  for (int i = 0; i < count; ++i) {
    const double s = along.back() * i / count;
    const auto above = std::upper_bound(along.begin(), along.end(), s);
    const auto k = std::min(static_cast<std::size_t>(above - along.begin()) - 1, n - 1);
    const double share = (s - along[k]) / (along[k + 1] - along[k]);
    result.push_back(
        between(closed_line[(first + k) % n], closed_line[(first + k + 1) % n], share));
  }
  return result;
}

}  // namespace barwall::mesh
