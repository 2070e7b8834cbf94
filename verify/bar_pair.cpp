#include "verify/bar_pair.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <vector>

namespace barwall::verify {

using mesh::Point;
using mesh::Rectangle;
using mesh::Shape;

namespace {

constexpr double pi = std::numbers::pi;
constexpr double slack = 1e-4;  // of the distance, and of a radian

/// The rectangle as it lies turned by `turn`: the same corners, sides perhaps swapped. None
/// where its sides do not run that way.
std::optional<Rectangle> along_axes(Rectangle r, double turn) {
  const double difference = std::remainder(r.turn - turn, pi);
  if (std::abs(difference) > slack) {
    if (std::abs(std::abs(difference) - 0.5 * pi) > slack) return {};
    std::swap(r.width, r.height);
  }
  r.turn = turn;
  return r;
}

/// Points that span the shape's convex hull, of a circle closely.
std::vector<Point> hull_points(const Shape& shape) {
  std::vector<Point> points;
  const auto outer = boundary(shape).front();
  for (const mesh::Curve& curve : outer) {
    const auto* arc = std::get_if<mesh::Arc>(&curve);
    const int count = arc == nullptr ? 1 : 90;
    for (int k = 0; k < count; ++k) {
      points.push_back(mesh::at(curve, static_cast<double>(k) / count));
    }
  }
  return points;
}

}  // namespace

std::optional<BarPair> bar_pair(const Shape& first, const Shape& second) {
  const auto* a = std::get_if<Rectangle>(&first);
  const auto* other = std::get_if<Rectangle>(&second);
  if (a == nullptr || other == nullptr) return {};
  const auto b = along_axes(*other, a->turn);
  if (!b) return {};
  const double distance = mesh::distance(a->centre, b->centre);
  const double room = slack * distance;
  if (!(std::abs(a->width - b->width) <= room && std::abs(a->height - b->height) <= room)) {
    return {};
  }
  const Point line = turned(b->centre - a->centre, -a->turn);
  if (std::abs(line.y) <= room) return BarPair{a->width, a->height, distance};
  if (std::abs(line.x) <= room) return BarPair{a->height, a->width, distance};
  return {};
}

bool reaches_round(const Shape& shape, Point point) {
  // Outside the hull all of it is seen within less than half a turn.
  std::vector<double> angles;
  for (const Point p : hull_points(shape)) {
    const Point seen = p - point;
    if (norm(seen) == 0.0) return true;
    angles.push_back(std::atan2(seen.y, seen.x));
  }
  std::sort(angles.begin(), angles.end());
  double gap = angles.front() + 2.0 * pi - angles.back();
  for (std::size_t k = 1; k < angles.size(); ++k) gap = std::max(gap, angles[k] - angles[k - 1]);
  return gap <= pi;
}

std::optional<Rectangle> hull_of_rectangles(const mesh::Part& bar) {
  const auto* first = std::get_if<Rectangle>(&bar.pieces.front());
  if (first == nullptr) return {};
  if (bar.pieces.size() == 1) return *first;
  mesh::Box box;
  for (const Shape& piece : bar.pieces) {
    const auto* any = std::get_if<Rectangle>(&piece);
    if (any == nullptr) return {};
    const auto r = along_axes(*any, first->turn);
    if (!r) return {};
    const Point centre = turned(r->centre - first->centre, -first->turn);
    const Point half{0.5 * r->width, 0.5 * r->height};
    box.include(centre - half);
    box.include(centre + half);
  }
  return Rectangle{first->centre + turned(box.centre(), first->turn), box.width(), box.height(),
                   first->turn};
}

}  // namespace barwall::verify
