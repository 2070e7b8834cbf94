#include <catch2/catch.hpp>

#include <cmath>
#include <numbers>

#include "io/overlay.hpp"

using namespace barwall;
using io::Effort;
using mesh::Frame;
using mesh::Point;
using mesh::Polygon;
using mesh::Rectangle;
using mesh::Round;
using mesh::Shape;
using mesh::Tube;

namespace {

bool overlapping(const Shape& a, const Shape& b) {
  Effort effort;
  const auto first = overlap(io::outline_of(a), io::outline_of(b), effort);
  const auto second = overlap(io::outline_of(b), io::outline_of(a), effort);
  REQUIRE(first.has_value() == second.has_value());
  if (first) {
    CHECK(contains(a, *first));
    CHECK(contains(b, *first));
  }
  return first.has_value();
}

constexpr double degree = std::numbers::pi / 180.0;

}  // namespace

TEST_CASE("Shapes apart do not overlap") {
  CHECK_FALSE(overlapping(Rectangle{{0, 0}, 1, 1, 0}, Rectangle{{2, 0}, 1, 1, 0}));
  CHECK_FALSE(overlapping(Round{{0, 0}, 1}, Round{{0.8, 0.8}, 1}));
  CHECK_FALSE(overlapping(Round{{0, 0}, 1}, Tube{{0, 0}, 2, 0.4}));
  CHECK_FALSE(overlapping(Rectangle{{0, 0}, 1, 1, 30 * degree}, Frame{{0, 0}, 4, 3, 0.1, 0}));
  // Boxes along the axes overlap, boxes along the shapes do not.
  CHECK_FALSE(
      overlapping(Rectangle{{0, 0}, 10, 1, 45 * degree}, Rectangle{{2, 0}, 10, 1, 45 * degree}));
}

TEST_CASE("Shapes one inside the other, or alike, overlap") {
  CHECK(overlapping(Rectangle{{0, 0}, 1, 1, 0}, Rectangle{{0, 0}, 4, 4, 0}));
  CHECK(overlapping(Round{{0, 0}, 1}, Rectangle{{0, 0}, 4, 4, 10 * degree}));
  CHECK(overlapping(Rectangle{{0, 0}, 3, 2, 0}, Rectangle{{0, 0}, 3, 2, 0}));
  CHECK(overlapping(Rectangle{{0, 0}, 3, 2, 1}, Rectangle{{0, 0}, 3, 2, 1}));
  CHECK(overlapping(Round{{1, 2}, 3}, Round{{1, 2}, 3}));
  CHECK(overlapping(Tube{{1, 2}, 3, 0.5}, Tube{{1, 2}, 3, 0.5}));
  CHECK(overlapping(Tube{{0, 0}, 3, 0.5}, Round{{0, 0}, 3}));
  const Polygon ell{{{0, 0}, {2, 0}, {2, 1}, {1, 1}, {1, 2}, {0, 2}}};
  CHECK(overlapping(ell, ell));
}

TEST_CASE("Contact along an edge or at a point is no overlap") {
  const Rectangle square{{0, 0}, 1, 1, 0};
  CHECK_FALSE(overlapping(square, Rectangle{{1, 0}, 1, 1, 0}));
  CHECK_FALSE(overlapping(square, Rectangle{{1, 0.3}, 1, 2, 0}));
  CHECK_FALSE(overlapping(square, Rectangle{{1, 1}, 1, 1, 0}));
  CHECK_FALSE(overlapping(square, Round{{1, 0}, 1}));
  CHECK_FALSE(overlapping(Round{{0, 0}, 1}, Round{{1, 0}, 1}));
  CHECK_FALSE(overlapping(Round{{0, 0}, 1}, Round{{0.6, 0.8}, 1}));
  CHECK_FALSE(overlapping(Round{{0, 0}, 2}, Tube{{0, 0}, 4, 1}));
  CHECK_FALSE(overlapping(Round{{0.5, 0}, 1}, Tube{{0, 0}, 4, 1}));
  CHECK_FALSE(overlapping(Rectangle{{0, 0}, 2, 1, 0}, Frame{{0, 0}, 3, 2, 0.5, 0}));
  // Turned neighbours meet to rounding only.
  for (int k = 1; k < 90; ++k) {
    const double turn = k * degree;
    const Point shift = mesh::turned({0.7, 0.0}, turn);
    CHECK_FALSE(overlapping(Rectangle{{0.1, 0.2}, 0.7, 3.0, turn},
                            Rectangle{Point{0.1, 0.2} + shift, 0.7, 3.0, turn}));
    CHECK_FALSE(overlapping(Round{{0.1, 0.2}, 0.7}, Round{Point{0.1, 0.2} + shift, 0.7}));
    CHECK_FALSE(
        overlapping(Rectangle{{0.1, 0.2}, 0.7, 3.0, turn}, Round{Point{0.1, 0.2} + shift, 0.7}));
  }
}

TEST_CASE("An overlap of a few millionths of the thickness is found, less is contact") {
  const auto pair = [](const Shape& a, const Shape& b, Point direction) {
    // b touches a; moved against the direction by a part of the thickness 1 it overlaps.
    CHECK_FALSE(overlapping(a, moved(b, 1e-8 * direction)));
    CHECK_FALSE(overlapping(a, b));
    CHECK_FALSE(overlapping(a, moved(b, -1e-8 * direction)));
    CHECK(overlapping(a, moved(b, -2e-6 * direction)));
    CHECK(overlapping(a, moved(b, -1e-3 * direction)));
    CHECK(overlapping(a, moved(b, -0.3 * direction)));
  };
  pair(Rectangle{{0, 0}, 1, 1, 0}, Rectangle{{1, 0}, 1, 1, 0}, {1, 0});
  pair(Rectangle{{0, 0}, 1, 40, 0}, Rectangle{{1, 5}, 1, 1, 0}, {1, 0});
  pair(Rectangle{{0, 0}, 1, 1, 0}, Round{{1, 0}, 1}, {1, 0});
  pair(Round{{0, 0}, 1}, Round{{0.6, 0.8}, 1}, {0.6, 0.8});
  pair(Tube{{0, 0}, 6, 1}, Round{{1.5, 0}, 1}, {-1, 0});
  pair(Frame{{0, 0}, 6, 6, 1, 0}, Rectangle{{1.5, 0}, 1, 2, 0}, {-1, 0});
  pair(Rectangle{{0, 0}, 1, 1, 0}, Polygon{{{0.5, 0}, {1.5, -1}, {2, 0}, {1.5, 1}}}, {1, 0});
  pair(Rectangle{{0, 0}, 1, 1, 45 * degree}, Rectangle{{std::sqrt(2.0), 0}, 1, 1, 45 * degree},
       {1, 0});
}

TEST_CASE("An overlap away from all corners is found") {
  CHECK(overlapping(Rectangle{{0, 0}, 10, 1, 0}, Rectangle{{0, 0}, 1, 10, 0}));
  CHECK(overlapping(Rectangle{{0, 0}, 10, 1, 0.3}, Round{{0, 0}, 2}));
  CHECK(overlapping(Tube{{0, 0}, 4, 0.1}, Tube{{1, 0}, 4, 0.1}));
  CHECK(overlapping(Tube{{0, 0}, 4, 0.1}, Frame{{0, 0}, 3.8, 6, 0.1, 0}));
  // Between the teeth of a comb.
  const Polygon comb{{{0, 0},
                      {5, 0},
                      {5, 3},
                      {4, 3},
                      {4, 1},
                      {3, 1},
                      {3, 3},
                      {2, 3},
                      {2, 1},
                      {1, 1},
                      {1, 3},
                      {0, 3}}};
  CHECK_FALSE(overlapping(comb, Rectangle{{1.5, 2}, 1, 2, 0}));
  CHECK(overlapping(comb, Rectangle{{1.5, 2}, 1.1, 2, 0}));
}

TEST_CASE("Effort that is spent ends the search") {
  Effort effort;
  effort.left = 10;
  const auto a = io::outline_of(Round{{0, 0}, 1});
  const auto b = io::outline_of(Round{{0.5, 0}, 1});
  overlap(a, b, effort);
  CHECK(effort.spent());
}
