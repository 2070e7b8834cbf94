#include "solver/fault_series.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

namespace barwall::solver {
namespace {

/// A force that is the square of the first bar's current, times 1e-6 [N/m]: where it is known at
/// `intervals` + 1 instants alone, how far the series is off, relative to its largest.
double worst_error(const FaultCurrent& fault, double closing, double end, int intervals) {
  std::vector<PartForces<PulsatingVector>> instants;
  for (int k = 0; k <= intervals; ++k) {
    const double current = fault_currents(fault, end * k / intervals, closing)[0];
    PartForces<PulsatingVector> forces;
    forces.part = {PulsatingVector{{1e-6 * current * current}, {-2e-6 * current * current}}};
    instants.push_back(forces);
  }
  const FaultSeries series =
      fault_series(fault, closing, std::span<const PartForces<PulsatingVector>>(instants));
  CHECK(series.seconds.back() == Approx(end).epsilon(1e-12));
  double largest = 0.0;
  double error = 0.0;
  for (std::size_t k = 0; k < series.seconds.size(); ++k) {
    const double current = fault_currents(fault, series.seconds[k], closing)[0];
    CHECK(series.current[0][k] == current);
    const double force = 1e-6 * current * current;
    largest = std::max(largest, std::abs(force));
    error = std::max({error, std::abs((*series.force.part[0])[k].x - force),
                      std::abs(0.5 * (*series.force.part[0])[k].y + force)});
  }
  return error / largest;
}

}  // namespace

TEST_CASE("The series between solved instants is the curve they lie on, up to its very end") {
  const double cycle = 1.0 / 50.0;
  for (const double closing : {0.0, 0.9, 1.6, 2.7}) {
    const FaultCurrent fault{{0, 1}, AlternatingFault{50.0, 1e4, 0.2, closing}};
    INFO(closing);
    CHECK(worst_error(fault, closing, cycle, 24) < 1e-3);
    CHECK(worst_error(fault, closing, cycle, 48) < 3e-5);
  }
  const FaultCurrent rise{{0, 1}, DirectRise{1e4, 0.02}};
  CHECK(worst_error(rise, 0.0, 5 * 0.02, 24) < 2e-4);
}

}  // namespace barwall::solver
