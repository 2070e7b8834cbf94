#include "io/polygon_fault.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numeric>

#include "mesh/curve.hpp"

namespace barwall::io {

namespace {

using mesh::Point;
using mesh::Segment;

/// Largest distance of any corner from the line through the two corners farthest apart along
/// it: a polygon without area has none.
double width_across(const std::vector<Point>& corners) {
  const Point start = corners.front();
  const Point far = *std::max_element(corners.begin(), corners.end(), [&](Point a, Point b) {
    return distance(start, a) < distance(start, b);
  });
  const double length = distance(start, far);
  double width = 0.0;
  for (const Point corner : corners) {
    width = std::max(width, std::abs(cross(far - start, corner - start)) / length);
  }
  return width;
}

double segment_distance(const Segment& a, const Segment& b) {
  const double side_a = cross(a.to - a.from, b.from - a.from);
  const double other_a = cross(a.to - a.from, b.to - a.from);
  const double side_b = cross(b.to - b.from, a.from - b.from);
  const double other_b = cross(b.to - b.from, a.to - b.from);
  const bool cross_each_other =
      (side_a > 0.0) != (other_a > 0.0) && (side_b > 0.0) != (other_b > 0.0);
  if (cross_each_other && side_a != other_a && side_b != other_b) return 0.0;
  return std::min({mesh::distance(mesh::Curve(a), b.from), mesh::distance(mesh::Curve(a), b.to),
                   mesh::distance(mesh::Curve(b), a.from), mesh::distance(mesh::Curve(b), a.to)});
}

/// Neighbouring edges a, b where b turns back onto a.
bool folds_back(const Segment& a, const Segment& b, double nearest) {
  const Point d = a.to - a.from;
  const Point e = b.to - b.from;
  if (dot(d, e) >= 0.0) return false;
  const bool shorter_first = norm(d) < norm(e);
  const double off = std::abs(cross(d, e)) / (shorter_first ? norm(e) : norm(d));
  return off <= nearest;
}

std::string crossing_fault(const std::vector<Point>& corners, double nearest) {
  const std::size_t n = corners.size();
  std::vector<Segment> edges;
  for (std::size_t k = 0; k < n; ++k) edges.push_back({corners[k], corners[(k + 1) % n]});
  const auto left = [&](std::size_t k) { return std::min(edges[k].from.x, edges[k].to.x); };
  const auto right = [&](std::size_t k) { return std::max(edges[k].from.x, edges[k].to.x); };
  const auto low = [&](std::size_t k) { return std::min(edges[k].from.y, edges[k].to.y); };
  const auto high = [&](std::size_t k) { return std::max(edges[k].from.y, edges[k].to.y); };

  std::vector<std::size_t> order(n);
  std::iota(order.begin(), order.end(), std::size_t{0});
  std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
    return left(a) != left(b) ? left(a) < left(b) : a < b;
  });
  for (std::size_t i = 0; i < n; ++i) {
    const double reach = right(order[i]) + nearest;
    for (std::size_t j = i + 1; j < n && left(order[j]) <= reach; ++j) {
      const std::size_t first = std::min(order[i], order[j]);
      const std::size_t second = std::max(order[i], order[j]);
      if (low(first) > high(second) + nearest || low(second) > high(first) + nearest) continue;
      const bool follows = second == first + 1;
      const bool closes = first == 0 && second == n - 1;
      const bool fault = follows  ? folds_back(edges[first], edges[second], nearest)
                         : closes ? folds_back(edges[second], edges[first], nearest)
                                  : segment_distance(edges[first], edges[second]) <= nearest;
      if (fault) {
        return fmt::format("crosses or touches itself: edge {} meets edge {}", first + 1,
                           second + 1);
      }
    }
  }
  return {};
}

}  // namespace

std::string polygon_fault(const std::vector<Point>& corners, double nearest) {
  for (std::size_t k = 0; k < corners.size(); ++k) {
    const std::size_t next = (k + 1) % corners.size();
    if (distance(corners[k], corners[next]) <= nearest) {
      return fmt::format("has coincident corners: {} and {}", k + 1, next + 1);
    }
  }
  if (width_across(corners) <= nearest) return "has no area: all its corners lie on one line";
  return crossing_fault(corners, nearest);
}

}  // namespace barwall::io
