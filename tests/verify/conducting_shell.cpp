#include "verify/conducting_shell.hpp"

#include <catch2/catch.hpp>
#include <complex>

#include "solver/constants.hpp"
#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using support::bar;
using support::mm;
using support::steel_wall;

namespace {

std::vector<solver::Notice> notices(const Shape& wall, const solver::Material& material,
                                    double frequency = 50.0) {
  solver::Problem problem;
  problem.section.parts = {bar("L1", {Rectangle{{0, 0}, 5 * mm, 40 * mm, 0.0}}),
                           steel_wall("cover", {wall})};
  problem.materials = {{"copper", 1.0}, material};
  problem.outline = outline_of(problem.section);
  problem.excitation = {frequency, {100.0, 0.0}};
  return conducting_shells(problem);
}

const Tube tube{{0, 0}, 306 * mm, 3 * mm};

}  // namespace

TEST_CASE("A thin tube holds back what its own eddy currents do") {
  // The shell's equation: of an alternating field H across it exp(j wt), a current sheet
  // K sin(angle) adds -K / 2 within; K = sigma t E, and E = -j w mu_0 (H - K / 2) R. So within
  // stands H / (1 + j w mu_0 sigma t R / 2).
  const double w = 2.0 * 3.14159265358979 * 50.0;
  const double radius = 0.15;
  const double thickness = 3e-3;
  const double resistivity = 2.8264e-8;
  const std::complex<double> within =
      1.0 / (1.0 + std::complex(0.0, w * solver::mu_0 * radius * thickness / (2.0 * resistivity)));
  CHECK(share_held_back(radius, thickness, resistivity, 50.0) == Approx(1.0 - std::abs(within)));
  CHECK(share_held_back(radius, thickness, resistivity, 1e-6) == Approx(0.0).margin(1e-9));
}

TEST_CASE("A thin aluminium enclosure raises a notice with how much it would hold back") {
  const auto found = notices(tube, {"aluminium", 1.0});
  REQUIRE(found.size() == 1);
  CHECK(found[0].name == "conducting shell");
  CHECK(found[0].indicative);
  CHECK_THAT(found[0].detail, Catch::StartsWith("\"cover\" at 50 Hz: ") &&
                                  Catch::Contains("70 % of a field across a tube of its size, "
                                                  "3 mm of aluminium"));
}

TEST_CASE("Steady currents, small or poorly conducting shells, steel and thick walls raise none") {
  CHECK(notices(tube, {"aluminium", 1.0}, 0.0).empty());
  CHECK(notices(Tube{{0, 0}, 60 * mm, 1 * mm}, {"aluminium", 1.0}).empty());
  CHECK(notices(tube, {"stainless", 1.0}).empty());
  CHECK(notices(tube, {"steel", 500.0}).empty());
  CHECK(notices(tube, {"resin", 1.0}).empty());
  // Thicker than its skin depth: that has its own notice.
  CHECK(notices(Tube{{0, 0}, 306 * mm, 14 * mm}, {"aluminium", 1.0}).empty());
}
