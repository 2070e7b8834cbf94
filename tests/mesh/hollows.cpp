#include "mesh/hollows.hpp"

#include <catch2/catch.hpp>
#include <numbers>

#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::mesh;
using support::bar;
using support::mm;
using support::steel_wall;

namespace {

/// The hollows that the walls of a section enclose.
std::vector<Hollow> hollows_of(const Section& section) {
  GridOptions options;
  options.cells_across = 2;
  options.reach = 5.0;
  const FittedGrid grid = make_grid(section, outline_of(section), options);
  std::vector<bool> walls;
  for (const Part& part : section.parts) walls.push_back(part.kind == Part::Kind::wall);
  return hollows(grid, walls);
}

/// A round bar of 10 mm.
Part core(const std::string& name, Point centre) {
  return bar(name, {Round{centre, 10 * mm}});
}

/// Two L of 5 mm, 100 mm by 80 mm outside, that make a rectangle; the second one shifted.
Section two_angles(double turn, Point shift) {
  const auto angle = [&](std::vector<Point> corners, Point by) {
    for (Point& corner : corners) corner = turned(mm * corner + by, turn);
    return Polygon{corners};
  };
  Section section;
  section.parts.push_back(core("core", turned({50 * mm, 40 * mm}, turn)));
  section.parts.push_back(
      steel_wall("first", {angle({{0, 0}, {100, 0}, {100, 5}, {5, 5}, {5, 80}, {0, 80}}, {})}));
  section.parts.push_back(steel_wall(
      "second", {angle({{100, 80}, {5, 80}, {5, 75}, {95, 75}, {95, 5}, {100, 5}}, shift)}));
  return section;
}

}  // namespace

TEST_CASE("A frame has one hollow that holds what lies in it, a U has none") {
  Section section;
  section.parts = {core("in", {}), core("out", {100 * mm, 0.0}),
                   steel_wall("frame", {Frame{{}, 80 * mm, 60 * mm, 4 * mm, 0.0}})};
  const auto found = hollows_of(section);
  REQUIRE(found.size() == 1);
  CHECK(found[0].ring == std::vector<int>{2});
  CHECK(found[0].within == std::vector<Occupant>{{0, 0}});
  section.openings.push_back({"slot", {2}, {Rectangle{{0.0, 28 * mm}, 10 * mm, 10 * mm, 0.0}}});
  CHECK(hollows_of(section).empty());
}

TEST_CASE("A hollow within a hollow counts for both") {
  Section section;
  section.parts = {steel_wall("pipe", {Tube{{}, 200 * mm, 5 * mm}}), core("core", {}),
                   steel_wall("sleeve", {Tube{{}, 40 * mm, 5 * mm}}),
                   core("beside", {60 * mm, 0.0})};
  const auto found = hollows_of(section);
  REQUIRE(found.size() == 2);
  CHECK(found[0].ring == std::vector<int>{0});
  CHECK(found[0].within == std::vector<Occupant>{{1, 0}, {3, 0}});
  CHECK(found[1].ring == std::vector<int>{2});
  CHECK(found[1].within == std::vector<Occupant>{{1, 0}});
}

TEST_CASE(
    "Two walls in contact close a ring together, also turned; with a hairline gap they do not") {
  for (const double turn : {0.0, 0.3, std::numbers::pi / 4.0}) {
    INFO("turned by " << turn);
    const auto found = hollows_of(two_angles(turn, {}));
    REQUIRE(found.size() == 1);
    CHECK(found[0].ring == std::vector<int>{1, 2});
    CHECK(found[0].within == std::vector<Occupant>{{0, 0}});
    // A hundredth of the thickness apart.
    CHECK(hollows_of(two_angles(turn, {0.05 * mm, 0.05 * mm})).empty());
  }
}

TEST_CASE("Walls that touch in one point close a ring") {
  // Four squares as on a chessboard, round the empty fifth.
  Section section;
  section.parts.push_back(core("core", {}));
  for (const Point at : {Point{-1, 0}, Point{1, 0}, Point{0, -1}, Point{0, 1}}) {
    section.parts.push_back(steel_wall("square", {Rectangle{40 * mm * at, 40 * mm, 40 * mm, 0.0}}));
  }
  const auto found = hollows_of(section);
  REQUIRE(found.size() == 1);
  CHECK(found[0].ring == std::vector<int>{1, 2, 3, 4});
}

TEST_CASE("What something covers or fills is judged as it remains") {
  Section section;
  section.parts = {bar("fill", {Rectangle{{}, 30 * mm, 30 * mm, 0.0}}),
                   steel_wall("ring", {Frame{{}, 40 * mm, 40 * mm, 5 * mm, 0.0}})};
  auto found = hollows_of(section);
  REQUIRE(found.size() == 1);
  CHECK(found[0].within == std::vector<Occupant>{{0, 0}});

  // A wall over one side of the frame: both together close.
  section.parts.push_back(steel_wall("cover", {Rectangle{{0.0, 18 * mm}, 60 * mm, 6 * mm, 0.0}}));
  found = hollows_of(section);
  REQUIRE(found.size() == 1);
  CHECK(found[0].ring == std::vector<int>{1, 2});

  // Painted with air there, the frame is open.
  section.parts.back().empty = true;
  CHECK(hollows_of(section).empty());
}

TEST_CASE("A partition makes two hollows of one, a groove none less") {
  Section section;
  section.parts = {core("left", {-30 * mm, 0.0}), core("right", {30 * mm, 0.0}),
                   steel_wall("frame", {Frame{{}, 140 * mm, 80 * mm, 5 * mm, 0.0}}),
                   steel_wall("partition", {Rectangle{{}, 5 * mm, 70 * mm, 0.0}})};
  section.openings.push_back({"groove", {2}, {Rectangle{{0.0, 39 * mm}, 20 * mm, 4 * mm, 0.0}}});
  const auto found = hollows_of(section);
  REQUIRE(found.size() == 2);
  for (const Hollow& hollow : found) {
    CHECK(hollow.ring == std::vector<int>{2, 3});
    CHECK(hollow.within.size() == 1);
  }
  CHECK(found[0].within != found[1].within);
}
