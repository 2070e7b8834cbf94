#include "verify/net_current.hpp"

#include <catch2/catch.hpp>
#include <numbers>

using namespace barwall;
using namespace barwall::verify;

TEST_CASE("Currents that do not sum to zero raise a notice with their sum") {
  const auto steady = net_current({0.0, {4000.0, -500.0}});
  REQUIRE(steady.size() == 1);
  CHECK(steady[0].name == "net current");
  CHECK_FALSE(steady[0].indicative);
  CHECK_THAT(steady[0].detail, Catch::Contains("sum to 3500 A;"));
  // 300 A and 400 A a quarter cycle apart.
  const auto alternating = net_current({50.0, {300.0, {0.0, -400.0}}});
  REQUIRE(alternating.size() == 1);
  CHECK_THAT(alternating[0].detail, Catch::Contains("sum to 500 A r.m.s.;"));
}

TEST_CASE("Currents that balance but for rounding raise none, a billionth's tenfold does") {
  const double third = 2.0 * std::numbers::pi / 3.0;
  CHECK(net_current({50.0, {900.0, std::polar(900.0, -third), std::polar(900.0, third)}}).empty());
  CHECK(net_current({0.0, {0.1, 0.2, -0.3}}).empty());
  CHECK(net_current({0.0, {}}).empty());
  CHECK(net_current({0.0, {0.0, 0.0}}).empty());
  CHECK(net_current({0.0, {1000.0, -1000.00002}}).size() == 1);
}
