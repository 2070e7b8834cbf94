#include "verify/skin_depth.hpp"

#include <catch2/catch.hpp>

#include "solver/constants.hpp"
#include "solver/resistivity.hpp"
#include "tests/support/bh_tables.hpp"
#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::mesh;
using namespace barwall::verify;
using support::bar;
using support::mm;
using support::steel_wall;

namespace {

const solver::Material copper{"copper", 1.0};
const solver::Material aluminium{"aluminium", 1.0};

/// Notices of parts with materials; no grid is needed.
std::vector<solver::Notice> notices(const std::vector<std::pair<Part, solver::Material>>& parts,
                                    double frequency = 50.0) {
  solver::Problem problem;
  for (const auto& [part, material] : parts) {
    problem.section.parts.push_back(part);
    problem.materials.push_back(material);
  }
  problem.outline = outline_of(problem.section);
  problem.excitation = {frequency, std::vector<std::complex<double>>(parts.size(), 100.0)};
  return skin_depth_notices(problem);
}

Part flat(const std::string& name, double x, double thickness) {
  return bar(name, {Rectangle{{x, 0.0}, thickness, 80 * mm, 0.0}});
}

}  // namespace

TEST_CASE("The skin depth is that of the tables") {
  // Copper at 20 degrees: 9.35 mm at 50 Hz, 8.53 mm at 60 Hz, 66 um at 1 MHz (common textbook
  // values, from memory).
  CHECK(skin_depth(1.7241e-8, 1.0, 50.0) == Approx(9.35e-3).epsilon(2e-3));
  CHECK(skin_depth(1.7241e-8, 1.0, 60.0) == Approx(8.53e-3).epsilon(2e-3));
  CHECK(skin_depth(1.7241e-8, 1.0, 1e6) == Approx(66e-6).epsilon(5e-3));
  CHECK(skin_depth(1.5e-7, 100.0, 50.0) == Approx(0.1 * skin_depth(1.5e-7, 1.0, 50.0)));
}

TEST_CASE("Copper 10 mm thick at 50 Hz raises a notice, 8 mm does not, nor does a steady current") {
  const auto found = notices({{flat("L1", 0.0, 10 * mm), copper},
                              {flat("L2", 0.05, 10 * mm), copper},
                              {flat("N", 0.1, 8 * mm), copper}});
  REQUIRE(found.size() == 1);
  CHECK(found[0].name == "skin depth");
  CHECK(found[0].indicative);
  CHECK_THAT(found[0].detail,
             Catch::StartsWith("\"L1\" and \"L2\" are thicker than the skin depth at 50 Hz: 10 mm "
                               "against 9.35 mm in copper; ") &&
                 Catch::Contains("inductances are usually smaller"));
  CHECK(notices({{flat("L1", 0.0, 8 * mm), copper}}).empty());
  CHECK(notices({{flat("L1", 0.0, 8 * mm), copper}}, 400.0).size() == 1);
  CHECK(notices({{flat("L1", 0.0, 10 * mm), copper}}, 0.0).empty());
}

TEST_CASE("Of parts unlike one another the worst is named") {
  const auto found =
      notices({{flat("L1", 0.0, 10 * mm), copper}, {flat("earth", 0.1, 15 * mm), aluminium}});
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].detail,
             Catch::StartsWith("\"L1\" and \"earth\" are thicker") &&
                 Catch::Contains("most of all \"earth\": 15 mm against 12 mm in aluminium"));
}

TEST_CASE("Bars, non-magnetic and steel walls have a notice each, and each errs its own way") {
  const auto found =
      notices({{flat("L1", 0.0, 10 * mm), copper},
               {steel_wall("cover", {Rectangle{{0.2, 0.0}, 15 * mm, 0.3, 0.0}}), aluminium},
               {steel_wall("plate", {Rectangle{{-0.2, 0.0}, 3 * mm, 0.3, 0.0}}), {"mild", 600.0}}});
  REQUIRE(found.size() == 3);
  CHECK_THAT(found[0].detail, Catch::StartsWith("\"L1\" is thicker"));
  CHECK_THAT(found[1].detail, Catch::StartsWith("\"cover\" is thicker") &&
                                  Catch::Contains("outside is usually smaller"));
  CHECK_THAT(found[2].detail, Catch::StartsWith("\"plate\" is thicker") &&
                                  Catch::Contains("3 mm against 1.13 mm in steel of mu_r 600;") &&
                                  Catch::Contains("keeps to a skin"));
}

TEST_CASE("Each shape has its thickness: the wall of a tube or frame, the diameter of a round") {
  const double depth = skin_depth(1.7241e-8, 1.0, 50.0);
  const auto raised = [&](const Shape& shape) {
    return !notices({{bar("x", {shape}), copper}}).empty();
  };
  for (const double factor : {0.99, 1.01}) {
    const double t = factor * depth;
    INFO("thickness over skin depth " << factor);
    CHECK(raised(Rectangle{{}, 0.1, t, 0.3}) == (factor > 1.0));
    CHECK(raised(Round{{}, t}) == (factor > 1.0));
    CHECK(raised(Tube{{}, 0.1, t}) == (factor > 1.0));
    CHECK(raised(Frame{{}, 0.1, 0.1, t, 0.0}) == (factor > 1.0));
    // An angle, and a bar with a notch that leaves little.
    CHECK(raised(Polygon{{{0, 0}, {0.1, 0}, {0.1, t}, {t, t}, {t, 0.1}, {0, 0.1}}}) ==
          (factor > 1.0));
  }
  const double w = 3.0 * depth;
  CHECK(raised(
      Polygon{{{0, 0}, {0.1, 0}, {0.1, w}, {0.051, w}, {0.05, 0.1 * w}, {0.049, w}, {0, w}}}));
  // Of pieces one is enough.
  CHECK(notices({{bar("x", {Round{{}, 0.9 * depth}, Round{{0.1, 0.0}, 1.1 * depth}}), copper}})
            .size() == 1);
}

TEST_CASE("A given resistivity counts, an unknown one is not judged, a covered wall neither") {
  const Part wall = steel_wall("wall", {Rectangle{{}, 20 * mm, 0.3, 0.0}});
  const auto beside = std::pair{flat("L1", 0.1, 2 * mm), copper};
  CHECK(notices({beside, {wall, {"alloy", 1.0}}}).empty());
  solver::Material alloy{"alloy", 1.0};
  alloy.resistivity = 3e-8;  // 12.3 mm
  CHECK(notices({beside, {wall, alloy}}).size() == 1);
  alloy.resistivity = 1e-6;  // 71 mm
  CHECK(notices({beside, {wall, alloy}}).empty());
  solver::Material steel{"mild", 600.0};
  CHECK(notices({beside, {wall, steel}}).size() == 1);
  steel.resistivity = 1e-4;  // 29 mm
  CHECK(notices({beside, {wall, steel}}).empty());
  const Part over = steel_wall("over", {Rectangle{{}, 30 * mm, 0.4, 0.0}});
  CHECK(notices({beside, {wall, aluminium}, {over, {"alloy", 1.0}}}).empty());
}

TEST_CASE("Of steel with a B-H table the largest permeability counts, and the notice says so") {
  const auto curve =
      std::make_shared<const solver::BhCurve>(solver::make_bh_curve(support::cast_iron()));
  const auto found = notices({{flat("L1", 0.1, 2 * mm), copper},
                              {steel_wall("case", {Rectangle{{}, 5 * mm, 0.3, 0.0}}),
                               solver::saturable_material("cast iron", curve)}});
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].detail,
             Catch::Contains("mu_r 467.9") && Catch::Contains("the largest of its B-H table"));
}

TEST_CASE("Known materials have a typical resistivity, steel among them, others none") {
  CHECK(solver::resistivity_of(copper) == Approx(1.7241e-8));     // IEC 60028, annealed copper
  CHECK(solver::resistivity_of(aluminium) == Approx(2.8264e-8));  // IEC 60889, hard-drawn wire
  CHECK(solver::resistivity_of({"brass", 1.0}).has_value());
  CHECK(solver::resistivity_of({"stainless", 1.0}).has_value());
  CHECK(solver::resistivity_of({"any", 50.0}).has_value());
  CHECK_FALSE(solver::resistivity_of({"any", 1.0}).has_value());
  CHECK_FALSE(solver::resistivity_of({"air", 1.0}).has_value());
}
