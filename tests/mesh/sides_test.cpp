// The sides of shapes and their names.

#include <catch2/catch.hpp>
#include <numbers>

#include "mesh/sides.hpp"

namespace barwall::mesh {
namespace {

std::vector<std::string> names_of(const std::vector<Side>& sides) {
  std::vector<std::string> names;
  for (const Side& side : sides) names.push_back(side.name);
  return names;
}

TEST_CASE("A rectangle's and a frame's sides are named by where they faced before turning") {
  const double turn = GENERATE(0.0, 0.3, 0.5 * std::numbers::pi, -2.0);
  const std::vector<Shape> shapes{Rectangle{{1.0, 2.0}, 0.4, 0.2, turn},
                                  Frame{{1.0, 2.0}, 0.4, 0.2, 0.01, turn}};
  const std::vector<Point> faced{{-1, 0}, {1, 0}, {0, 1}, {0, -1}};
  for (const Shape& shape : shapes) {
    const auto found = sides(shape);
    REQUIRE(names_of(found) == std::vector<std::string>{"left", "right", "top", "bottom"});
    for (std::size_t k = 0; k < 4; ++k) {
      CHECK(distance(found[k].normal, turned(faced[k], turn)) < 1e-14);
      const double out = k < 2 ? 0.2 : 0.1;
      const Point middle = between(found[k].edge.from, found[k].edge.to, 0.5);
      CHECK(distance(middle, Point{1.0, 2.0} + out * found[k].normal) < 1e-14);
      CHECK(length(Curve{found[k].edge}) == Approx(k < 2 ? 0.2 : 0.4));
    }
  }
}

TEST_CASE("A polygon's sides follow its corners, whichever way they run") {
  std::vector<Point> corners{{0, 0}, {3, 0}, {3, 1}, {1, 1}, {1, 2}, {0, 2}};
  if (GENERATE(true, false)) std::reverse(corners.begin(), corners.end());
  const Shape polygon = Polygon{corners};
  const auto found = sides(polygon);
  REQUIRE(found.size() == 6);
  for (std::size_t k = 0; k < 6; ++k) {
    CHECK(found[k].name == "side " + std::to_string(k + 1));
    CHECK(found[k].edge.from == corners[k]);
    CHECK(found[k].edge.to == corners[(k + 1) % 6]);
    const Point middle = between(found[k].edge.from, found[k].edge.to, 0.5);
    CHECK(norm(found[k].normal) == Approx(1.0));
    CHECK_FALSE(contains(polygon, middle + 0.01 * found[k].normal));
    CHECK(contains(polygon, middle - 0.01 * found[k].normal));
  }
}

TEST_CASE("A corner where a polygon goes straight on ends no side") {
  const auto found = sides(Polygon{{{1, 0}, {2, 0}, {2, 1}, {2, 2}, {0, 2}, {0, 0}}});
  CHECK(names_of(found) == std::vector<std::string>{"side 2", "side 4", "side 5", "side 6"});
  CHECK(found[0].edge.to == Point{2, 2});
  CHECK(found[3].edge.from == Point{0, 0});
  CHECK(found[3].edge.to == Point{2, 0});
}

TEST_CASE("Rounds and tubes have no sides") {
  CHECK(sides(Round{{0, 0}, 1.0}).empty());
  CHECK(sides(Tube{{0, 0}, 1.0, 0.1}).empty());
}

TEST_CASE("Every point of a frame is nearest to the side whose mitres it lies between") {
  const auto found = sides(Frame{{0, 0}, 4.0, 2.0, 0.1, 0.0});
  const auto nearest = [&](Point p) { return found[nearest_side(found, p)].name; };
  CHECK(nearest({1.9, 0.85}) == "right");
  CHECK(nearest({1.85, 0.9}) == "top");
  CHECK(nearest({-1.9, 0.0}) == "left");
  CHECK(nearest({1.0, -0.95}) == "bottom");
  CHECK(nearest({1.95, 0.95}) == "right");  // on the mitre: the first of equals
}

}  // namespace
}  // namespace barwall::mesh
