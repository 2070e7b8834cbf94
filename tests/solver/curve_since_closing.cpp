#include "solver/curve_since_closing.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

namespace barwall::solver {
namespace {

constexpr double pi = std::numbers::pi;
constexpr int intervals = 24;

/// The square of a fault's current, R/X 0.1, that starts from nothing at wt = 0.
double squared_current(double wt, double angle) {
  const double i = std::cos(wt + angle) - std::cos(angle) * std::exp(-0.1 * wt);
  return i * i;
}

}  // namespace

TEST_CASE("A curve since closing goes through its values and follows the square of a current") {
  const double step = 2.0 * pi / intervals;
  for (const double angle : {0.0, 0.8, 1.6, 2.4}) {
    std::vector<double> values;
    for (int k = 0; k <= intervals; ++k) values.push_back(squared_current(k * step, angle));
    const CurveSinceClosing curve = curve_since_closing(values, step);
    CHECK(curve.prime(0.0) == Approx(0.0).margin(1e-12));
    double worst = 0.0;
    for (int k = 0; k <= 50 * intervals; ++k) {
      const double wt = k * step / 50;
      const double error = std::abs(curve(wt) - squared_current(wt, angle));
      if (k % 50 == 0) REQUIRE(error < 1e-12);
      worst = std::max(worst, error);
    }
    // A cubic spline's own error, 5/384 step^4 of the fourth slope: of the alternating part's
    // cos(2 wt) / 2 that is 8, of its product with the offset at most 2.
    INFO("angle " << angle << ", worst " << worst);
    CHECK(worst < 5.0 / 384.0 * std::pow(step, 4) * 10.0);
  }
}

}  // namespace barwall::solver
