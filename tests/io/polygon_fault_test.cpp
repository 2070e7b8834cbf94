#include <catch2/catch.hpp>

#include <algorithm>
#include <cmath>

#include "io/polygon_fault.hpp"

using barwall::io::polygon_fault;
using barwall::mesh::Point;

namespace {

constexpr double nearest = 1e-9;

}  // namespace

TEST_CASE("A simple polygon of either orientation has no fault") {
  std::vector<Point> ell = {{0, 0}, {2, 0}, {2, 1}, {1, 1}, {1, 2}, {0, 2}};
  CHECK(polygon_fault(ell, nearest).empty());
  std::reverse(ell.begin(), ell.end());
  CHECK(polygon_fault(ell, nearest).empty());
  // A corner in the middle of a straight side is no fault.
  CHECK(polygon_fault({{0, 0}, {1, 0}, {2, 0}, {2, 1}, {0, 1}}, nearest).empty());
  CHECK(polygon_fault({{0, 0}, {1, 0}, {0, 1}}, nearest).empty());
  // A long blade, thin but far thicker than the tolerance.
  CHECK(polygon_fault({{0, 0}, {1, 0}, {1, 1e-6}}, nearest).empty());
}

TEST_CASE("A polygon that crosses or touches itself is refused") {
  using Catch::Contains;
  CHECK_THAT(polygon_fault({{0, 0}, {1, 1}, {1, 0}, {0, 1}}, nearest),
             Contains("edge 1 meets edge 3"));
  // A corner on another side.
  CHECK_THAT(polygon_fault({{0, 0}, {4, 0}, {4, 2}, {2, 0}, {0, 2}}, nearest),
             Contains("crosses or touches itself"));
  // The same corner twice, not next to each other.
  CHECK_THAT(polygon_fault({{0, 0}, {1, -1}, {2, -1}, {0, 0}, {-2, 1}, {-2, -1}}, nearest),
             Contains("crosses or touches itself"));
  // A spike of no width, at a corner and where the polygon closes.
  CHECK_THAT(polygon_fault({{0, 0}, {2, 0}, {1, 0}, {1, 1}}, nearest),
             Contains("edge 1 meets edge 2"));
  CHECK_THAT(polygon_fault({{1, 0}, {1, 1}, {0, 1}, {0, 0}, {2, 0}}, nearest),
             Contains("crosses or touches itself"));
}

TEST_CASE("A polygon with coincident corners or without area is refused") {
  using Catch::Contains;
  CHECK_THAT(polygon_fault({{0, 0}, {1, 0}, {1, 0}, {0, 1}}, nearest),
             Contains("coincident corners: 2 and 3"));
  CHECK_THAT(polygon_fault({{0, 0}, {1, 0}, {0, 1}, {0, 0}}, nearest),
             Contains("coincident corners: 4 and 1"));
  CHECK_THAT(polygon_fault({{0, 0}, {1, 1}, {2, 2}}, nearest), Contains("no area"));
  CHECK_THAT(polygon_fault({{0, 0}, {1, 0}, {0, 0}, {1, 0}}, nearest), Contains("no area"));
}

TEST_CASE("A polygon of ten thousand corners is checked whole") {
  std::vector<Point> star;
  for (int k = 0; k < 10000; ++k) {
    const double angle = 2.0 * std::acos(-1.0) * k / 10000;
    const double radius = k % 2 == 0 ? 1.0 : 0.5;
    star.push_back({radius * std::cos(angle), radius * std::sin(angle)});
  }
  CHECK(polygon_fault(star, nearest).empty());
  std::swap(star[7000], star[7002]);
  CHECK_THAT(polygon_fault(star, nearest), Catch::Contains("crosses or touches itself"));
}
