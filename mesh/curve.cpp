#include "mesh/curve.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace barwall::mesh {
namespace {

constexpr double two_pi = 2.0 * std::numbers::pi;

Point on_circle(const Arc& arc, double angle) {
  return arc.centre + arc.radius * Point{std::cos(angle), std::sin(angle)};
}

/// Parameter on the arc of the direction `angle`; outside [0, 1] when the arc does not reach it.
/// Of the two representations beyond the ends the one nearer to [0, 1] is given.
double parameter_of_angle(const Arc& arc, double angle) {
  double turn = std::remainder(angle - arc.start - 0.5 * arc.sweep, two_pi);
  return 0.5 + turn / arc.sweep;
}

void add_if_on(std::vector<double>& found, double t, double slack) {
  if (t >= -slack && t <= 1.0 + slack) found.push_back(std::clamp(t, 0.0, 1.0));
}

/// Roots of |p + t d|^2 = r^2, none when the line misses the circle by more than `tolerance`.
std::vector<double> line_circle(Point p, Point d, double r, double tolerance) {
  const double dd = dot(d, d);
  if (dd == 0.0) return {};
  const double foot = -dot(p, d) / dd;
  const double height = std::abs(cross(p, d)) / std::sqrt(dd);
  if (height > r + tolerance) return {};
  const double half = std::sqrt(std::max(0.0, (r - height) * (r + height)) / dd);
  if (half * std::sqrt(dd) <= tolerance) return {foot};
  return {foot - half, foot + half};
}

std::vector<double> meet(const Segment& first, const Segment& second, double tolerance) {
  const Point d = first.to - first.from;
  const Point e = second.to - second.from;
  const double size = norm(d);
  if (size == 0.0) return {};
  const double slack = tolerance / size;
  std::vector<double> found;
  // Ends of the second on the first: contact, and both ends of a stretch in common.
  for (Point p : {second.from, second.to}) {
    const double t = dot(p - first.from, d) / (size * size);
    if (std::abs(cross(d, p - first.from)) <= tolerance * size) add_if_on(found, t, slack);
  }
  // Ends of the first on the second.
  const double other = norm(e);
  if (other > 0.0) {
    for (int end = 0; end < 2; ++end) {
      const Point p = end == 0 ? first.from : first.to;
      const double s = dot(p - second.from, e) / (other * other);
      if (std::abs(cross(e, p - second.from)) <= tolerance * other && s >= -tolerance / other &&
          s <= 1.0 + tolerance / other) {
        found.push_back(end);
      }
    }
  }
  const double area = cross(d, e);
  if (std::abs(area) > 1e-12 * size * other) {
    const double t = cross(second.from - first.from, e) / area;
    const double s = cross(second.from - first.from, d) / area;
    if (s >= 0.0 && s <= 1.0 && t >= 0.0 && t <= 1.0) found.push_back(t);
  }
  return found;
}

std::vector<double> meet(const Segment& first, const Arc& second, double tolerance) {
  const Point d = first.to - first.from;
  std::vector<double> found;
  const double size = norm(d);
  if (size == 0.0) return {};
  for (double t : line_circle(first.from - second.centre, d, second.radius, tolerance)) {
    const Point p = first.from + t * d;
    if (distance(second, p) <= 2.0 * tolerance) add_if_on(found, t, tolerance / size);
  }
  for (double end : {0.0, 1.0}) {
    const Point p = at(second, end);
    const double t = dot(p - first.from, d) / (size * size);
    if (std::abs(cross(d, p - first.from)) <= tolerance * size)
      add_if_on(found, t, tolerance / size);
  }
  return found;
}

std::vector<double> meet(const Arc& first, const Segment& second, double tolerance) {
  std::vector<double> found;
  for (double s : meet(second, first, tolerance)) {
    found.push_back(nearest_parameter(first, at(second, s)));
  }
  for (double end : {0.0, 1.0}) {
    if (distance(second, at(first, end)) <= tolerance) found.push_back(end);
  }
  return found;
}

std::vector<double> meet(const Arc& first, const Arc& second, double tolerance) {
  std::vector<double> found;
  const Point link = second.centre - first.centre;
  const double gap = norm(link);
  for (double end : {0.0, 1.0}) {
    if (distance(second, at(first, end)) <= tolerance) found.push_back(end);
    const Point p = at(second, end);
    if (distance(first, p) <= tolerance) found.push_back(nearest_parameter(first, p));
  }
  const double r = first.radius;
  const double q = second.radius;
  if (gap <= tolerance || gap > r + q + tolerance || gap < std::abs(r - q) - tolerance) {
    return found;
  }
  const double along = (gap * gap + (r - q) * (r + q)) / (2.0 * gap);
  const double up = std::sqrt(std::max(0.0, (r - along) * (r + along)));
  const Point e = (1.0 / gap) * link;
  for (double side : {-1.0, 1.0}) {
    const Point p = first.centre + along * e + (side * up) * quarter_turn(e);
    const bool on_both = distance(first, p) <= 2.0 * tolerance + 1e-9 * r &&
                         distance(second, p) <= 2.0 * tolerance + 1e-9 * q;
    if (on_both) found.push_back(nearest_parameter(first, p));
  }
  return found;
}

}  // namespace

Point at(const Curve& curve, double t) {
  if (const auto* s = std::get_if<Segment>(&curve)) {
    return t == 1.0 ? s->to : between(s->from, s->to, t);
  }
  const auto& arc = std::get<Arc>(curve);
  return on_circle(arc, arc.start + t * arc.sweep);
}

Point tangent(const Curve& curve, double t) {
  if (const auto* s = std::get_if<Segment>(&curve)) {
    const Point d = s->to - s->from;
    return (1.0 / norm(d)) * d;
  }
  const auto& arc = std::get<Arc>(curve);
  const double angle = arc.start + t * arc.sweep;
  const double sign = arc.sweep > 0.0 ? 1.0 : -1.0;
  return sign * Point{-std::sin(angle), std::cos(angle)};
}

Point left_normal(const Curve& curve, double t) {
  return quarter_turn(tangent(curve, t));
}

double length(const Curve& curve) {
  if (const auto* s = std::get_if<Segment>(&curve)) return distance(s->from, s->to);
  const auto& arc = std::get<Arc>(curve);
  return std::abs(arc.sweep) * arc.radius;
}

Box bounds(const Curve& curve) {
  Box box;
  box.include(at(curve, 0.0));
  box.include(at(curve, 1.0));
  if (const auto* arc = std::get_if<Arc>(&curve)) {
    for (int quarter = 0; quarter < 4; ++quarter) {
      const double angle = quarter * 0.5 * std::numbers::pi;
      const double t = parameter_of_angle(*arc, angle);
      if (t < 0.0 || t > 1.0) continue;
      // Exact extremes, free of the rounding of sine and cosine.
      const Point e = quarter % 2 == 0 ? Point{quarter == 0 ? 1.0 : -1.0, 0.0}
                                       : Point{0.0, quarter == 1 ? 1.0 : -1.0};
      box.include(arc->centre + arc->radius * e);
    }
  }
  return box;
}

Curve reversed(const Curve& curve) {
  if (const auto* s = std::get_if<Segment>(&curve)) return Segment{s->to, s->from};
  const auto& arc = std::get<Arc>(curve);
  return Arc{arc.centre, arc.radius, arc.start + arc.sweep, -arc.sweep};
}

Curve part(const Curve& curve, double t0, double t1) {
  if (std::holds_alternative<Segment>(curve)) return Segment{at(curve, t0), at(curve, t1)};
  const auto& arc = std::get<Arc>(curve);
  return Arc{arc.centre, arc.radius, arc.start + t0 * arc.sweep, (t1 - t0) * arc.sweep};
}

double nearest_parameter(const Curve& curve, Point point) {
  if (const auto* s = std::get_if<Segment>(&curve)) {
    const Point d = s->to - s->from;
    const double dd = dot(d, d);
    return dd == 0.0 ? 0.0 : std::clamp(dot(point - s->from, d) / dd, 0.0, 1.0);
  }
  const auto& arc = std::get<Arc>(curve);
  const Point r = point - arc.centre;
  const double t = parameter_of_angle(arc, std::atan2(r.y, r.x));
  if (t >= 0.0 && t <= 1.0) return t;
  return distance(point, at(curve, 0.0)) <= distance(point, at(curve, 1.0)) ? 0.0 : 1.0;
}

double distance(const Curve& curve, Point point) {
  if (const auto* arc = std::get_if<Arc>(&curve)) {
    if (std::abs(arc->sweep) >= two_pi) {
      return std::abs(norm(point - arc->centre) - arc->radius);
    }
  }
  return distance(point, at(curve, nearest_parameter(curve, point)));
}

std::vector<double> meeting_parameters(const Curve& first, const Curve& second, double tolerance) {
  auto found = std::visit([&](const auto& a, const auto& b) { return meet(a, b, tolerance); },
                          first, second);
  std::sort(found.begin(), found.end());
  const double slack = tolerance / std::max(length(first), tolerance);
  found.erase(std::unique(found.begin(), found.end(),
                          [slack](double a, double b) { return b - a <= slack; }),
              found.end());
  return found;
}

std::vector<double> crossings(const Curve& curve, Point a, Point b) {
  const Point d = b - a;
  std::vector<double> found;
  if (const auto* s = std::get_if<Segment>(&curve)) {
    const Point e = s->to - s->from;
    const double area = cross(d, e);
    if (area == 0.0) return found;
    const double t = cross(s->from - a, e) / area;
    const double u = cross(s->from - a, d) / area;
    const double slack = 1e-12;
    if (t >= 0.0 && t <= 1.0 && u >= -slack && u <= 1.0 + slack) found.push_back(t);
    return found;
  }
  const auto& arc = std::get<Arc>(curve);
  for (double t : line_circle(a - arc.centre, d, arc.radius, 0.0)) {
    if (t < 0.0 || t > 1.0) continue;
    const Point r = a + t * d - arc.centre;
    const double u = parameter_of_angle(arc, std::atan2(r.y, r.x));
    if (u >= -1e-12 && u <= 1.0 + 1e-12) found.push_back(t);
  }
  return found;
}

double swept_angle(const Curve& curve, Point point) {
  const auto turn = [point](Point a, Point b) {
    return std::atan2(cross(a - point, b - point), dot(a - point, b - point));
  };
  if (const auto* s = std::get_if<Segment>(&curve)) return turn(s->from, s->to);
  // The chord sweeps less than half a turn; the arc adds a whole turn when the point lies
  // between chord and arc. Quarter arcs keep that rule simple.
  const auto& arc = std::get<Arc>(curve);
  const int quarters = std::max(1, static_cast<int>(std::ceil(std::abs(arc.sweep) / 1.6)));
  const bool in_circle = norm(point - arc.centre) < arc.radius;
  double sum = 0.0;
  for (int k = 0; k < quarters; ++k) {
    const Point a = at(curve, static_cast<double>(k) / quarters);
    const Point b = at(curve, static_cast<double>(k + 1) / quarters);
    double angle = turn(a, b);
    const double outward = cross(b - a, point - a);  // < 0 right of the chord
    if (in_circle && arc.sweep > 0.0 && outward < 0.0) angle += two_pi;
    if (in_circle && arc.sweep < 0.0 && outward > 0.0) angle -= two_pi;
    sum += angle;
  }
  return sum;
}

double area_term(const Curve& curve) {
  if (const auto* s = std::get_if<Segment>(&curve)) return 0.5 * cross(s->from, s->to);
  const auto& arc = std::get<Arc>(curve);
  const Point a = at(curve, 0.0);
  const Point b = at(curve, 1.0);
  return 0.5 * (arc.radius * arc.radius * arc.sweep + cross(arc.centre, b - a));
}

std::vector<Point> polyline(const Curve& curve, double sagitta) {
  if (const auto* s = std::get_if<Segment>(&curve)) return {s->from, s->to};
  const auto& arc = std::get<Arc>(curve);
  const double ratio = std::clamp(1.0 - sagitta / arc.radius, 0.0, 1.0);
  const double step = std::clamp(2.0 * std::acos(ratio), 1e-3, 0.5);
  const int pieces = std::max(1, static_cast<int>(std::ceil(std::abs(arc.sweep) / step)));
  std::vector<Point> points;
  points.reserve(static_cast<std::size_t>(pieces) + 1);
  for (int k = 0; k <= pieces; ++k) points.push_back(at(curve, static_cast<double>(k) / pieces));
  return points;
}

}  // namespace barwall::mesh
