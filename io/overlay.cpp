#include "io/overlay.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>

namespace barwall::io {

namespace {

using mesh::Box;
using mesh::Curve;
using mesh::Point;

// Cost of one step of each kind, in units of Effort.
constexpr std::int64_t box_cost = 1;
constexpr std::int64_t meeting_cost = 40;
constexpr std::int64_t distance_cost = 10;

bool apart(const Box& a, const Box& b, double slack) {
  return a.low.x > b.high.x + slack || b.low.x > a.high.x + slack || a.low.y > b.high.y + slack ||
         b.low.y > a.high.y + slack;
}

struct BoxedCurve {
  Curve curve;
  Box box;
};

/// Parameters that cut curve k at the others, with both ends.
std::vector<double> cuts(const std::vector<BoxedCurve>& curves, std::size_t k, double tolerance,
                         Effort& effort) {
  std::vector<double> found = {0.0, 1.0};
  for (std::size_t j = 0; j < curves.size() && !effort.spent(); ++j) {
    effort.left -= box_cost;
    if (j == k || apart(curves[k].box, curves[j].box, tolerance)) continue;
    effort.left -= meeting_cost;
    const auto meetings = meeting_parameters(curves[k].curve, curves[j].curve, tolerance);
    found.insert(found.end(), meetings.begin(), meetings.end());
  }
  std::sort(found.begin(), found.end());
  return found;
}

/// A box along the axes of a shape, for the separating axis test.
struct TurnedBox {
  Point centre;
  std::array<Point, 2> half;  ///< half-sides as vectors
};

TurnedBox turned_box(const Outline& outline) {
  const auto with = [](Point centre, double width, double height, double turn) {
    return TurnedBox{
        centre, {mesh::turned({0.5 * width, 0.0}, turn), mesh::turned({0.0, 0.5 * height}, turn)}};
  };
  if (const auto* r = std::get_if<mesh::Rectangle>(&outline.shape)) {
    return with(r->centre, r->width, r->height, r->turn);
  }
  if (const auto* f = std::get_if<mesh::Frame>(&outline.shape)) {
    return with(f->centre, f->width, f->height, f->turn);
  }
  return with(outline.box.centre(), outline.box.width(), outline.box.height(), 0.0);
}

}  // namespace

std::optional<Point> find_region(const std::vector<Curve>& curves, const Box& window, double depth,
                                 Effort& effort, const std::function<bool(Point)>& wanted) {
  std::vector<BoxedCurve> near;
  for (const Curve& curve : curves) {
    const Box box = bounds(curve);
    if (!apart(box, window, 2.0 * depth)) near.push_back({curve, box});
  }
  // Every region has a stretch of some curve on its border: it is asked about on both sides of
  // each stretch, at three places in case another curve runs close to one of them.
  for (std::size_t k = 0; k < near.size(); ++k) {
    const std::vector<double> cut = cuts(near, k, depth, effort);
    for (std::size_t i = 0; i + 1 < cut.size() && !effort.spent(); ++i) {
      if ((cut[i + 1] - cut[i]) * length(near[k].curve) <= depth) continue;
      for (const double fraction : {0.5, 0.2, 0.8}) {
        const double t = cut[i] + fraction * (cut[i + 1] - cut[i]);
        for (const double side : {2.0, -2.0}) {
          const Point point = at(near[k].curve, t) + side * depth * left_normal(near[k].curve, t);
          effort.left -= distance_cost;
          if (!window.contains(point) || !wanted(point)) continue;
          effort.left -= distance_cost * static_cast<std::int64_t>(near.size());
          const bool clear = std::all_of(near.begin(), near.end(), [&](const BoxedCurve& other) {
            return mesh::distance(other.curve, point) >= depth;
          });
          if (clear) return point;
        }
      }
    }
  }
  return std::nullopt;
}

Outline outline_of(const mesh::Shape& shape) {
  Outline outline{shape, bounds(shape), thickness(shape), {}};
  for (const auto& chain : boundary(shape)) {
    outline.curves.insert(outline.curves.end(), chain.begin(), chain.end());
  }
  return outline;
}

double depth_that_counts(double thickness, const Box& box) {
  const double farthest = std::fmax(std::fmax(std::abs(box.low.x), std::abs(box.high.x)),
                                    std::fmax(std::abs(box.low.y), std::abs(box.high.y)));
  return std::fmax(0.3e-6 * thickness, 1e-15 * farthest);
}

bool may_overlap(const Outline& a, const Outline& b) {
  if (apart(a.box, b.box, 0.0)) return false;
  const TurnedBox first = turned_box(a);
  const TurnedBox second = turned_box(b);
  const Point link = second.centre - first.centre;
  for (const Point axis : {first.half[0], first.half[1], second.half[0], second.half[1]}) {
    double reach = 0.0;
    for (const TurnedBox* box : {&first, &second}) {
      reach += std::abs(dot(axis, box->half[0])) + std::abs(dot(axis, box->half[1]));
    }
    if (std::abs(dot(axis, link)) >= reach) return false;
  }
  return true;
}

std::optional<Point> overlap(const Outline& a, const Outline& b, Effort& effort) {
  if (!may_overlap(a, b)) return std::nullopt;
  const Box window{{std::fmax(a.box.low.x, b.box.low.x), std::fmax(a.box.low.y, b.box.low.y)},
                   {std::fmin(a.box.high.x, b.box.high.x), std::fmin(a.box.high.y, b.box.high.y)}};
  std::vector<Curve> curves = a.curves;
  curves.insert(curves.end(), b.curves.begin(), b.curves.end());
  const double depth = depth_that_counts(std::fmin(a.thickness, b.thickness), window);
  const auto asked = static_cast<std::int64_t>(curves.size());
  return find_region(curves, window, depth, effort, [&](Point point) {
    effort.left -= asked;
    return contains(a.shape, point) && contains(b.shape, point);
  });
}

}  // namespace barwall::io
