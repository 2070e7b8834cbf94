#include "verify/mean_distance.hpp"

#include <catch2/catch.hpp>
#include <cmath>

#include "verify/bar_force.hpp"
#include "verify/filled_bar.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;

TEST_CASE("the mutual mean distance is the mean potential of one bar over the other") {
  const Sides first{0.01, 0.1};
  const Sides second{0.03, 0.02};
  const double dx = 0.05;
  const double dy = 0.04;
  double mean = 0.0;
  for (const Filament& filament : filaments_of(Rectangle{{dx, dy}, 0.03, 0.02, 0.0}, 1.0, 12)) {
    mean += filament.current * potential_of(Rectangle{{}, 0.01, 0.1, 0.0}, 1.0, filament.at);
  }
  CHECK(mutual_distance(first, second, dx, dy) == Approx(std::exp(-mean / 2e-7)).epsilon(1e-12));
  CHECK(mutual_distance(second, first, -dx, dy) ==
        Approx(mutual_distance(first, second, dx, dy)).epsilon(1e-14));
}

TEST_CASE("the own mean distance of a rectangle is the mean of its own potential") {
  const Rectangle bar{{}, 0.02, 0.05, 0.0};
  double mean = 0.0;
  for (const Filament& filament : filaments_of(bar, 1.0, 24)) {
    mean += filament.current * potential_of(bar, 1.0, filament.at);
  }
  CHECK(own_distance_of_rectangle(0.02, 0.05) == Approx(std::exp(-mean / 2e-7)).epsilon(1e-7));
  CHECK(own_distance_of_rectangle(0.05, 0.02) == own_distance_of_rectangle(0.02, 0.05));
}

TEST_CASE("thin and far bars keep the accuracy of their mean distance and force") {
  // Far away ln R = ln s + (height^2 - width^2) / 12 s^2 + ..., both bars together twice half that.
  for (const double width : {1e-6, 1e-4, 1e-2}) {
    const double s = 50.0;
    const double quadrupole = (0.01 - width * width) / (12.0 * s * s);
    const double mutual = mutual_distance({width, 0.1}, {width, 0.1}, s, 0.0);
    CHECK(std::log(mutual / s) == Approx(quadrupole).epsilon(1e-5));
    const double factor = bar_force_factor(width, 0.1, s);
    CHECK(1.0 - factor == Approx(2.0 * quadrupole).epsilon(1e-5));
  }
  CHECK(bar_force_factor(0.0, 0.1, 0.02) ==
        Approx(bar_force_factor(1e-9, 0.1, 0.02)).epsilon(1e-9));
}

TEST_CASE("the force factor of bars is the slope of their mutual mean distance") {
  const double h = 1e-6;
  for (const double s : {0.02, 0.05, 0.3}) {
    const auto logarithm = [&](double d) {
      return std::log(mutual_distance({0.01, 0.1}, {0.01, 0.1}, d, 0.0));
    };
    const double slope = (logarithm(s + h) - logarithm(s - h)) / (2 * h);
    CHECK(s * slope == Approx(bar_force_factor(0.01, 0.1, s)).epsilon(1e-7));
  }
}

TEST_CASE("the own mean distance of a ring runs from that of a disc to the radius") {
  CHECK(own_distance_of_ring(1e-9, 1.0) == Approx(own_distance_of_disc(1.0)).epsilon(1e-12));
  CHECK(own_distance_of_ring(1.0, 1.0) == 1.0);
  // Both sides of the switch to the thin wall's series.
  const double below = own_distance_of_ring(1.0 - 5.1e-6, 1.0);
  const double above = own_distance_of_ring(1.0 - 4.9e-6, 1.0);
  CHECK(above - below == Approx(0.2e-6 / 3.0).margin(1e-9));
}

TEST_CASE("bars that overlap are refused") {
  CHECK_THROWS_AS(mutual_distance({0.1, 0.1}, {0.1, 0.1}, 0.05, 0.0), std::invalid_argument);
  CHECK_THROWS_AS(bar_force_factor(0.03, 0.1, 0.02), std::invalid_argument);
  CHECK_NOTHROW(mutual_distance({0.1, 0.1}, {0.1, 0.1}, 0.1, 0.0));
}
