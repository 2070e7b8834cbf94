#include "verify/closed_steel_loop.hpp"

#include <catch2/catch.hpp>
#include <numbers>

#include "tests/support/problems.hpp"
#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using support::bar;
using support::mm;
using support::steel_wall;
using Phasors = std::vector<std::complex<double>>;

namespace {

const double pi = std::numbers::pi;
const Phasors three_phases = {1000.0, std::polar(1000.0, -2.0 * pi / 3.0),
                              std::polar(1000.0, 2.0 * pi / 3.0)};

/// Every wall has the permeability.
std::vector<solver::Notice> notices(Section section, Phasors current, double frequency = 50.0,
                                    double permeability = 600.0) {
  std::vector<double> of_parts;
  for (const Part& part : section.parts) {
    of_parts.push_back(part.kind == Part::Kind::wall ? permeability : 1.0);
  }
  current.resize(section.parts.size());
  return closed_steel_loops(
      *support::problem_of(std::move(section), of_parts, current, {2, 5.0}, frequency));
}

/// Three round bars of 20 mm at 60 mm pitch, L1 at the left.
Section three_bars() {
  Section section;
  for (int k = 0; k < 3; ++k) {
    section.parts.push_back(bar(std::string("L").append(std::to_string(k + 1)),
                                {Round{{(k - 1) * 60 * mm, 0.0}, 20 * mm}}));
  }
  return section;
}

Part frame_round(const std::string& name, double x, double width) {
  return steel_wall(name, {Frame{{x, 0.0}, width, 60 * mm, 4 * mm, 0.0}});
}

}  // namespace

TEST_CASE("A steel frame round one phase of three is a closed loop that heats, indicative") {
  Section section = three_bars();
  section.parts.push_back(frame_round("frame", 60 * mm, 50 * mm));
  const auto found = notices(section, three_phases);
  REQUIRE(found.size() == 1);
  CHECK(found[0].name == "closed steel loop");
  CHECK(found[0].indicative);
  CHECK_THAT(found[0].detail,
             Catch::StartsWith("\"frame\" closes round \"L3\" (net 1000 A r.m.s.): ") &&
                 Catch::Contains("heats") && Catch::Contains("do not say"));
  // No watts, no unit of any heat.
  CHECK(found[0].detail.find(" W") == std::string::npos);
}

TEST_CASE("Round three balanced phases, or round one in aluminium, there is no such notice") {
  Section section = three_bars();
  section.parts.push_back(frame_round("frame", 0.0, 200 * mm));
  CHECK(notices(section, three_phases).empty());
  // What is left of a slight unbalance shows.
  CHECK(notices(section, {1000.0, three_phases[1], 1.00001 * three_phases[2]}).size() == 1);
  CHECK(notices(section, {1000.0, three_phases[1], (1.0 + 1e-9) * three_phases[2]}).empty());

  section = three_bars();
  section.parts.push_back(frame_round("frame", 60 * mm, 50 * mm));
  CHECK(notices(section, three_phases, 50.0, 1.0).empty());
}

TEST_CASE("With steady currents the loop is magnetised, and the validity stays full") {
  Section section;
  section.parts = {bar("plus", {Round{{}, 20 * mm}}),
                   steel_wall("pipe", {Tube{{}, 60 * mm, 4 * mm}})};
  const auto found = notices(section, {-4000.0}, 0.0);
  REQUIRE(found.size() == 1);
  CHECK_FALSE(found[0].indicative);
  CHECK(found[0].detail ==
        "\"pipe\" closes round \"plus\" (net 4000 A): the whole loop is magnetised, all the way "
        "round");
}

TEST_CASE("A slot through the thickness, or an open channel, is no closed loop") {
  Section section = three_bars();
  section.parts.push_back(frame_round("frame", 60 * mm, 50 * mm));
  section.openings.push_back({"slot", {3}, {Rectangle{{60 * mm, 28 * mm}, 4 * mm, 10 * mm, 0.0}}});
  CHECK(notices(section, three_phases).empty());

  Section channel = three_bars();
  channel.parts.push_back(
      steel_wall("channel", {Polygon{{mm * Point{30, -40}, mm * Point{90, -40}, mm * Point{90, 40},
                                      mm * Point{86, 40}, mm * Point{86, -36}, mm * Point{34, -36},
                                      mm * Point{34, 40}, mm * Point{30, 40}}}}));
  CHECK(notices(channel, three_phases).empty());
}

TEST_CASE(
    "Each hole of a gland plate closes round its bar, all in one notice; one slot opens all") {
  Section section = three_bars();
  section.parts.push_back(steel_wall("plate", {Rectangle{{}, 240 * mm, 100 * mm, 0.0}}));
  section.openings.push_back(
      {"holes",
       {3},
       {Round{{-60 * mm, 0.0}, 40 * mm}, Round{{}, 40 * mm}, Round{{60 * mm, 0.0}, 40 * mm}}});
  const auto found = notices(section, three_phases);
  REQUIRE(found.size() == 1);
  for (const char* name : {"\"plate\"", "\"L1\"", "\"L2\"", "\"L3\""}) {
    CHECK_THAT(found[0].detail, Catch::Contains(name));
  }
  section.openings.push_back({"slot", {3}, {Rectangle{{}, 120 * mm, 5 * mm, 0.0}}});
  CHECK(notices(section, three_phases).empty());
}

TEST_CASE("Two walls in contact close a loop together, both are named; a hairline gap opens it") {
  for (const double gap : {0.0, 0.05 * mm}) {
    Section section = three_bars();
    for (const double side : {-1.0, 1.0}) {
      const double x = 60 * mm;
      const auto at = [&](double u, double v) { return Point{x + side * (u + 0.5 * gap), v}; };
      section.parts.push_back(
          steel_wall(side < 0 ? "left" : "right",
                     {Polygon{{at(0, -30 * mm), at(25 * mm, -30 * mm), at(25 * mm, 30 * mm),
                               at(0, 30 * mm), at(0, 26 * mm), at(21 * mm, 26 * mm),
                               at(21 * mm, -26 * mm), at(0, -26 * mm)}}}));
    }
    const auto found = notices(section, three_phases);
    INFO("gap " << gap);
    if (gap > 0.0) {
      CHECK(found.empty());
    } else {
      REQUIRE(found.size() == 1);
      CHECK_THAT(found[0].detail,
                 Catch::StartsWith("\"left\" and \"right\" together close round \"L3\" "));
    }
  }
}

TEST_CASE("A bar that touches the steel round it lies within, and its pieces count by area") {
  Section section;
  section.parts = {bar("in", {Rectangle{{}, 20 * mm, 52 * mm, 0.0}}),
                   bar("both", {Round{{15 * mm, 0.0}, 8 * mm}, Round{{80 * mm, 0.0}, 8 * mm}}),
                   frame_round("frame", 0.0, 80 * mm)};
  const auto found = notices(section, {1000.0, -1500.0});
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].detail, Catch::Contains("\"in\" and \"both\" (net 250 A r.m.s.)"));
  CHECK(notices(section, {1000.0, -2000.0}).empty());
}

TEST_CASE("A steel bar is no loop, nor is steel without current within") {
  Section section;
  section.parts = {bar("steel", {Round{{}, 20 * mm}}), frame_round("beside", 100 * mm, 50 * mm)};
  section.parts[0].sharp_corners = true;
  CHECK(closed_steel_loops(
            *support::problem_of(section, {600.0, 600.0}, {1000.0, 0.0}, {2, 5.0}, 50.0))
            .empty());
}
