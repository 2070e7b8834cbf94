#include "mesh/offset_line.hpp"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/geometries/linestring.hpp>
#include <boost/geometry/geometries/multi_linestring.hpp>
#include <boost/geometry/geometries/multi_polygon.hpp>
#include <boost/geometry/geometries/point_xy.hpp>
#include <boost/geometry/geometries/polygon.hpp>
#include <numbers>

namespace barwall::mesh {

std::vector<std::vector<Point>> offset_lines(const Outline& outline, const std::vector<int>& parts,
                                             double clearance) {
  namespace bg = boost::geometry;
  using Vertex = bg::model::d2::point_xy<double>;
  using Ring = bg::model::polygon<Vertex, false>;  // counter-clockwise
  const auto ours = [&](Occupant side) {
    return std::find(parts.begin(), parts.end(), side.part) != parts.end();
  };
  // In units of the clearance about the outline's own place, for the library's tolerances.
  Box box;
  for (const OutlinePiece& piece : outline.pieces) {
    if (ours(piece.left) != ours(piece.right)) box.include(bounds(piece.curve));
  }
  const Point origin = box.centre();
  bg::model::multi_linestring<bg::model::linestring<Vertex>> lines;
  for (const OutlinePiece& piece : outline.pieces) {
    if (ours(piece.left) == ours(piece.right)) continue;
    bg::model::linestring<Vertex> line;
    for (Point p : polyline(piece.curve, clearance / 4000.0)) {
      const Point q = (1.0 / clearance) * (p - origin);
      line.emplace_back(q.x, q.y);
    }
    lines.push_back(std::move(line));
  }
  constexpr int points_per_circle = 144;  // chords within 1/4000 of the radius
  bg::model::multi_polygon<Ring> grown;
  bg::buffer(lines, grown, bg::strategy::buffer::distance_symmetric<double>(1.0),
             bg::strategy::buffer::side_straight(),
             bg::strategy::buffer::join_round(points_per_circle),
             bg::strategy::buffer::end_round(points_per_circle),
             bg::strategy::buffer::point_circle(points_per_circle));
  std::vector<std::pair<double, std::vector<Point>>> found;
  for (const Ring& ring : grown) {
    std::vector<Point> line;
    for (const Vertex& v : ring.outer()) {
      line.push_back(origin + clearance * Point{v.x(), v.y()});
    }
    line.pop_back();  // the library repeats the first point
    bg::model::polygon<Vertex, false> outer;
    outer.outer() = ring.outer();
    found.emplace_back(bg::area(outer), std::move(line));
  }
  std::sort(found.begin(), found.end(),
            [](const auto& a, const auto& b) { return a.first > b.first; });
  std::vector<std::vector<Point>> result;
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
