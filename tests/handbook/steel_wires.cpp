// Two steel wires, go and return. Digits computed outside the code by multipoles and once more by
// sums of images.
#include <catch2/catch.hpp>

#include "verify/round_conductor.hpp"
#include "verify/steel_wires.hpp"

using namespace barwall::verify;

TEST_CASE("two steel wires have the exact inductance and force of their mutual magnetisation") {
  struct Row {
    double distance, radius, permeability, textbook, exact, force;
  };
  const Row rows[] = {{0.05, 0.005, 10, 1.921034, 1.924296142, 3.93497},
                      {0.05, 0.005, 100, 10.921034, 10.924935739, 3.92235},
                      {0.02, 0.005, 100, 10.554518, 10.578222326, 8.85806},
                      {0.012, 0.005, 100, 10.350187, 10.411248717, 12.25291},
                      {3.0, 0.01, 100, 12.281513, 12.281517346, 0.06666521}};
  for (const Row& row : rows) {
    CAPTURE(row.distance, row.permeability);
    const SteelWires wires{row.distance, row.radius, row.permeability};
    CHECK(1e6 * inductance_of_two_wires(row.distance, row.radius, row.permeability) ==
          Approx(row.textbook).epsilon(5e-7));
    CHECK(1e6 * loop_inductance(wires) == Approx(row.exact).epsilon(1e-9));
    CHECK(repulsion(wires, 1000.0) == Approx(row.force).epsilon(1.5e-6));
  }
}

TEST_CASE("two copper wires keep the textbook's inductance and the filaments' force") {
  const SteelWires copper{0.012, 0.005, 1.0};
  CHECK(loop_inductance(copper) ==
        Approx(inductance_of_two_wires(0.012, 0.005, 1.0)).epsilon(1e-14));
  CHECK(repulsion(copper, 1000.0) == Approx(0.2 / 0.012).epsilon(1e-13));
}

TEST_CASE("the force between steel wires is the slope of half their loop inductance") {
  const double h = 1e-6;
  const double slope =
      (loop_inductance({0.012 + h, 0.005, 100.0}) - loop_inductance({0.012 - h, 0.005, 100.0})) /
      (2.0 * h);
  CHECK(0.5 * 1e6 * slope == Approx(repulsion({0.012, 0.005, 100.0}, 1000.0)).epsilon(1e-6));
  CHECK_THROWS_AS(loop_inductance({0.01, 0.005, 100.0}), std::invalid_argument);
}
