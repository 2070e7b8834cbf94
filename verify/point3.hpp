#pragma once

#include <cmath>

namespace barwall::verify {

/// A point, or a vector, in space [m]: x and y as in the section, z out of the page along the
/// run.
struct Point3 {
  double x = 0.0;
  double y = 0.0;
  double z = 0.0;

  friend bool operator==(const Point3&, const Point3&) = default;
};

constexpr Point3 operator+(Point3 a, Point3 b) {
  return {a.x + b.x, a.y + b.y, a.z + b.z};
}
constexpr Point3 operator-(Point3 a, Point3 b) {
  return {a.x - b.x, a.y - b.y, a.z - b.z};
}
constexpr Point3 operator*(double s, Point3 a) {
  return {s * a.x, s * a.y, s * a.z};
}
constexpr Point3& operator+=(Point3& a, Point3 b) {
  return a = a + b;
}

constexpr double dot(Point3 a, Point3 b) {
  return a.x * b.x + a.y * b.y + a.z * b.z;
}
constexpr Point3 cross(Point3 a, Point3 b) {
  return {a.y * b.z - a.z * b.y, a.z * b.x - a.x * b.z, a.x * b.y - a.y * b.x};
}
inline double norm(Point3 a) {
  return std::hypot(a.x, a.y, a.z);
}

}  // namespace barwall::verify
