#include "verify/force_end_effect.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::verify;
using mesh::Point;

namespace {

/// Thin round bars, one at each place [m].
mesh::Section wires(const std::vector<Point>& places) {
  mesh::Section section;
  for (std::size_t k = 0; k < places.size(); ++k) {
    section.parts.push_back(support::bar(std::string("L").append(std::to_string(k + 1)),
                                         {mesh::Round{places[k], 1e-3}}));
  }
  return section;
}

solver::Excitation steady(const std::vector<double>& currents) {
  return {0.0, {currents.begin(), currents.end()}};
}

}  // namespace

// sqrt(1 + (d/L)^2) - d/L is 0.950125 at d/L = 0.05 and 0.8198 at 0.2 (by calculator).
TEST_CASE("A pair loses of its force what two wires of the run's length do") {
  const auto near = force_end_effect(wires({{}, {0.05, 0.0}}), steady({100, -100}), 1.0);
  REQUIRE(near.size() == 1);
  CHECK(near[0].name == "end effect");
  CHECK_FALSE(near[0].indicative);
  CHECK_THAT(near[0].detail, Catch::Contains("run of 1 m") && Catch::Contains("within 4.9 %") &&
                                 Catch::Contains("worst on \"L1\""));
  const auto far = force_end_effect(wires({{}, {0.2, 0.0}}), steady({100, 100}), 1.0);
  REQUIRE(far.size() == 1);
  CHECK(far[0].indicative);
  CHECK_THAT(far[0].detail, Catch::Contains("within 18 %") && Catch::Contains("more than 5 %"));
}

TEST_CASE("With a frequency the peaks are compared, on the bar that loses most") {
  // L3 stands apart: what it loses counts, not what the close pair does.
  const double third = 2.0 * std::numbers::pi / 3.0;
  const auto found = force_end_effect(
      wires({{}, {0.02, 0.0}, {0.2, 0.0}}),
      {50.0, {1000.0, std::polar(1000.0, -third), std::polar(1000.0, third)}}, 1.0);
  REQUIRE(found.size() == 1);
  CHECK(found[0].indicative);
  CHECK_THAT(found[0].detail, Catch::Contains("worst on \"L3\""));
  // A pair in phase opposition loses what the steady one does.
  const auto pair = force_end_effect(wires({{}, {0.05, 0.0}}), {50.0, {100.0, -100.0}}, 1.0);
  REQUIRE(pair.size() == 1);
  CHECK_THAT(pair[0].detail, Catch::Contains("within 4.9 %"));
}

TEST_CASE("A force that cancels between two neighbours does not count, nor does a lone bar") {
  const auto found = force_end_effect(wires({{-0.04, 0.0}, {0.06, 0.0}, {0.01, 0.0}}),
                                      steady({-500, -500, 1000}), 1.0);
  REQUIRE(found.size() == 1);
  CHECK(found[0].detail.find("\"L3\"") == std::string::npos);
  CHECK(force_end_effect(wires({{}}), steady({1000}), 1.0).empty());
  CHECK(force_end_effect(wires({{}, {0.05, 0.0}}), steady({1000, 0}), 1.0).empty());
}

TEST_CASE("Pieces share their bar's current, and a tube round its core is left out") {
  mesh::Section section = wires({{}, {0.2, 0.0}});
  section.parts[1].pieces = {mesh::Round{{0.2, 0.0}, 1e-3}, mesh::Round{{-0.2, 0.0}, 1e-3},
                             mesh::Round{{0.0, 0.05}, std::sqrt(2.0) * 1e-3}};
  // On the first bar the pieces left and right cancel, the one above with half the current stays.
  const auto found = force_end_effect(section, steady({100, -100}), 1.0);
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].detail, Catch::Contains("within 4.9 %"));

  mesh::Section coaxial = wires({{}, {}});
  coaxial.parts[1].pieces = {mesh::Tube{{}, 0.1, 0.01}};
  CHECK(force_end_effect(coaxial, steady({100, -100}), 1.0).empty());
}
