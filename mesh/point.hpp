#pragma once

#include <algorithm>
#include <cmath>
#include <span>
#include <utility>
#include <vector>

namespace barwall::mesh {

/// A point, or a vector, of the cross-section's plane: x to the right, y up [m].
struct Point {
  double x = 0.0;
  double y = 0.0;

  friend bool operator==(const Point&, const Point&) = default;
};

constexpr Point operator+(Point a, Point b) {
  return {a.x + b.x, a.y + b.y};
}
constexpr Point operator-(Point a, Point b) {
  return {a.x - b.x, a.y - b.y};
}
constexpr Point operator-(Point a) {
  return {-a.x, -a.y};
}
constexpr Point operator*(double s, Point a) {
  return {s * a.x, s * a.y};
}
constexpr Point operator*(Point a, double s) {
  return {s * a.x, s * a.y};
}
constexpr Point& operator+=(Point& a, Point b) {
  return a = a + b;
}

constexpr double dot(Point a, Point b) {
  return a.x * b.x + a.y * b.y;
}

/// The out-of-plane component of a x b; positive when b lies counter-clockwise of a.
constexpr double cross(Point a, Point b) {
  return a.x * b.y - a.y * b.x;
}

inline double norm(Point a) {
  return std::sqrt(dot(a, a));  // not hypot: it is slow, and guards magnitudes that none has here
}
inline double distance(Point a, Point b) {
  return norm(b - a);
}

/// `a` turned by a quarter counter-clockwise.
constexpr Point quarter_turn(Point a) {
  return {-a.y, a.x};
}

/// `a` turned by `angle` [rad], counter-clockwise, about the origin.
inline Point turned(Point a, double angle) {
  const double c = std::cos(angle);
  const double s = std::sin(angle);
  return {c * a.x - s * a.y, s * a.x + c * a.y};
}

/// Point at fraction t of the way from a to b.
constexpr Point between(Point a, Point b, double t) {
  return a + t * (b - a);
}

/// All x, and all y, of points or vectors.
inline std::pair<std::vector<double>, std::vector<double>> components(
    std::span<const Point> points) {
  std::pair<std::vector<double>, std::vector<double>> result;
  for (const Point p : points) {
    result.first.push_back(p.x);
    result.second.push_back(p.y);
  }
  return result;
}

/// An axis-parallel box [m]; empty while low > high.
struct Box {
  Point low{HUGE_VAL, HUGE_VAL};
  Point high{-HUGE_VAL, -HUGE_VAL};

  void include(Point p) {
    low = {std::fmin(low.x, p.x), std::fmin(low.y, p.y)};
    high = {std::fmax(high.x, p.x), std::fmax(high.y, p.y)};
  }
  void include(const Box& other) {
    low = {std::fmin(low.x, other.low.x), std::fmin(low.y, other.low.y)};
    high = {std::fmax(high.x, other.high.x), std::fmax(high.y, other.high.y)};
  }
  bool empty() const { return low.x > high.x || low.y > high.y; }
  bool contains(Point p) const {
    return p.x >= low.x && p.x <= high.x && p.y >= low.y && p.y <= high.y;
  }
  double width() const { return high.x - low.x; }
  double height() const { return high.y - low.y; }
  Point centre() const { return between(low, high, 0.5); }
};

/// A box with so much more on every side.
inline Box grown(const Box& box, double margin) {
  const Point more{margin, margin};
  return {box.low - more, box.high + more};
}

/// Shortest way between two boxes [m], 0 where they meet.
inline double distance(const Box& a, const Box& b) {
  const double dx = std::max({a.low.x - b.high.x, b.low.x - a.high.x, 0.0});
  const double dy = std::max({a.low.y - b.high.y, b.low.y - a.high.y, 0.0});
  return std::sqrt(dx * dx + dy * dy);
}
inline double distance(const Box& box, Point p) {
  return distance(box, Box{p, p});
}

}  // namespace barwall::mesh
