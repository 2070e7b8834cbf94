#include "verify/end_effect.hpp"

#include <catch2/catch.hpp>

#include "tests/support/sections.hpp"

namespace barwall::verify {
namespace {

/// A thin round bar with one probe at a distance from it; no grid is needed.
std::vector<solver::Notice> notices_at(double distance, double run_length) {
  solver::Problem problem;
  problem.section.parts.push_back(support::bar("bar", {mesh::Round{{0.0, 0.0}, 1e-3}}));
  problem.excitation.current = {1000.0};
  solver::Figures figures;
  solver::ProbeFigures probe;
  probe.probe = {"place", {{distance, 0.0}}, false, {}, ""};
  figures.probes.push_back(probe);
  return end_effect(problem, figures, run_length);
}

}  // namespace

// Relative deficit of a finite straight wire at mid-span, (L/2) / sqrt(rho^2 + L^2/4) against 1:
// 7.152e-2 at L/rho = 5, 1.942e-2 at 10 (Biot-Savart law, any text; recomputed).
TEST_CASE("A run of five distances makes the validity indicative and says by how much") {
  const auto notices = notices_at(0.2, 1.0);
  REQUIRE(notices.size() == 1);
  CHECK(notices[0].indicative);
  CHECK(notices[0].detail.find("7.2 %") != std::string::npos);
  CHECK(notices[0].detail.find("\"place\"") != std::string::npos);
}

TEST_CASE("A run of ten distances is within five per cent and leaves the validity full") {
  const auto notices = notices_at(0.1, 1.0);
  REQUIRE(notices.size() == 1);
  CHECK_FALSE(notices[0].indicative);
  CHECK(notices[0].detail.find("1.9 %") != std::string::npos);
}

TEST_CASE("Without a probe there is nothing to say of the ends") {
  solver::Problem problem;
  CHECK(end_effect(problem, {}, 3.0).empty());
}

}  // namespace barwall::verify
