#pragma once

#include <variant>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::mesh {

/// A straight piece of an outline, directed [m].
struct Segment {
  Point from;
  Point to;
};

/// A circular piece of an outline, directed: from angle `start` [rad] through `sweep` [rad],
/// counter-clockwise when positive; |sweep| = 2 pi is the whole circle.
struct Arc {
  Point centre;
  double radius = 0.0;  ///< [m]
  double start = 0.0;   ///< [rad]
  double sweep = 0.0;   ///< [rad]
};

using Curve = std::variant<Segment, Arc>;

/// Point at parameter t in [0, 1], proportional to arc length.
Point at(const Curve& curve, double t);
/// Unit vector of travel at t.
Point tangent(const Curve& curve, double t);
/// Unit normal at t, to the left of the direction of travel.
Point left_normal(const Curve& curve, double t);
double length(const Curve& curve);
Box bounds(const Curve& curve);
Curve reversed(const Curve& curve);
/// The part between parameters t0 < t1.
Curve part(const Curve& curve, double t0, double t1);

/// Parameter in [0, 1] of the point of the curve nearest to `point`.
double nearest_parameter(const Curve& curve, Point point);
/// Distance from `point` to the curve [m].
double distance(const Curve& curve, Point point);

/// Parameters in [0, 1] on `first` where it meets `second`, ascending; contact within
/// `tolerance` [m] counts, and of a stretch in common the two ends are given.
std::vector<double> meeting_parameters(const Curve& first, const Curve& second, double tolerance);

/// Parameters in [0, 1] along the straight line from a to b where the curve crosses it.
std::vector<double> crossings(const Curve& curve, Point a, Point b);

/// Winding contribution: the angle [rad] that the curve sweeps as seen from `point`.
double swept_angle(const Curve& curve, Point point);

/// Contribution of the curve to the area on its left [m2] (Green's theorem: sum over a closed,
/// counter-clockwise chain gives the enclosed area).
double area_term(const Curve& curve);

/// Points along the curve with chords no further than `sagitta` [m] from it; both ends included.
std::vector<Point> polyline(const Curve& curve, double sagitta);

}  // namespace barwall::mesh
