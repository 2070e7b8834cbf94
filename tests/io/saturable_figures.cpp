// What the files say of alternating currents and short circuits in saturable steel.

#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>
#include <numbers>

#include "io/results_json.hpp"
#include "io/run_json.hpp"
#include "tests/io/program_support.hpp"
#include "tests/io/saturable_case.hpp"

using namespace barwall;
using Json = nlohmann::json;

namespace {

const Json& figures() {
  static const Json json = Json::parse(io::figures_json(test::saturable_results()));
  return json;
}

double value(const Json& entry, const char* key) {
  INFO(key);
  REQUIRE(entry.contains(key));
  REQUIRE(entry[key]["value"].is_number());
  return entry[key]["value"].get<double>();
}

std::string unit(const Json& entry, const char* key) {
  return entry.at(key).at("unit").get<std::string>();
}

/// Lengths of the plate's sides [m].
double length_of(const std::string& side) {
  return side == "top" || side == "bottom" ? 0.12 : 0.01;
}

void check_solves(const Json& instants, std::size_t count) {
  CHECK(instants["count"] == count);
  REQUIRE(instants["at"].size() == count);
  CHECK(instants["surprise"].get<double>() >= 0.0);
  for (const Json& instant : instants["at"]) {
    REQUIRE(!instant["newton"].empty());
    for (const Json& solve : instant["newton"]) {
      CHECK(solve["converged"] == true);
      CHECK(solve["residuals"].size() == solve["iterations"].get<std::size_t>() + 1);
      CHECK(solve["steps"].size() == solve["iterations"].get<std::size_t>());
    }
  }
}

Json run_of(const io::Results& results) {
  return Json::parse(io::run_json(results, "."));
}

}  // namespace

TEST_CASE("Saturable walls have field, share and pushes on their faces, in cycle and fault") {
  const Json& wall_under_load = figures()["walls"][0];
  const Json& wall_in_fault = figures()["fault"]["walls"][0];
  for (const Json* wall : {&wall_under_load, &wall_in_fault}) {
    CHECK(value(*wall, "saturated_share") > 0.5);
    CHECK(value(*wall, "b_high") >= value(*wall, "b_mean"));
    CHECK(value(*wall, "b_mean") > 1.5);
  }
  CHECK(value(wall_in_fault, "b_mean") > value(wall_under_load, "b_mean"));
  const Json& load = wall_under_load["faces"];
  const Json& fault = wall_in_fault["faces"];
  REQUIRE(load.size() == 4);
  REQUIRE(fault.size() == 4);
  for (std::size_t k = 0; k < 4; ++k) {
    const auto side = load[k]["side"].get<std::string>();
    CAPTURE(side);
    CHECK(fault[k]["side"] == side);
    const double most = value(load[k], "push_max");
    const double least = value(load[k], "push_min");
    CHECK(most > value(load[k], "push_mean"));
    CHECK(value(load[k], "push_mean") > least);
    CHECK(value(load[k], "pressure_mean_max") == Approx(most / length_of(side)));
    CHECK(value(load[k], "pressure_mean_min") == Approx(least / length_of(side)));
    CHECK(unit(load[k], "push_max") == "N/m");
    CHECK(unit(load[k], "pressure_mean") == "Pa");
    const double most_in_fault = value(fault[k], "push_max");
    CHECK(most_in_fault > 0.0);
    CHECK(value(fault[k], "push_min") <= 0.0);  // nothing flows before closing
    CHECK(value(fault[k], "pressure_mean_max") == Approx(most_in_fault / length_of(side)));
    CHECK(unit(fault[k], "pressure_mean_max") == "Pa");
    // The load's crest is 85 kA, the fault's 110 kA.
    CHECK(most_in_fault > most);
  }
}

TEST_CASE("Loops have two inductances at an instant; energy and coenergy have mean and peak") {
  const io::Results& results = test::saturable_results();
  const double at = results.instants->wt[results.instants->strongest] * 180.0 / std::numbers::pi;
  REQUIRE(figures()["loops"].size() == 3);
  for (const Json& loop : figures()["loops"]) {
    CAPTURE(loop["name"]);
    CHECK_FALSE(loop.contains("inductance"));
    CHECK(value(loop, "inductance_secant") > 1e-7);
    CHECK(value(loop, "inductance_differential") > 1e-7);
    CHECK(value(loop, "inductance_at") == Approx(at).margin(1e-9));
    CHECK(unit(loop, "inductance_secant") == "H/m");
    CHECK(unit(loop, "inductance_differential") == "H/m");
    CHECK(unit(loop, "inductance_at") == "deg");
  }
  const double mean = value(figures(), "energy_mean");
  const double peak = value(figures(), "energy_peak");
  CHECK(peak > mean);
  CHECK(mean > 0.0);
  // Above the knee of its curve the integral of B dH outgrows that of H dB.
  CHECK(value(figures(), "coenergy_mean") > 1.01 * mean);
  CHECK(value(figures(), "coenergy_peak") > 1.01 * peak);
  for (const char* key : {"energy_mean", "energy_peak", "coenergy_mean", "coenergy_peak"}) {
    CHECK(unit(figures(), key) == "J/m");
  }
  CHECK_FALSE(figures().contains("energy"));
}

TEST_CASE("Every notice of figures.json says whether it makes the case indicative") {
  REQUIRE(!figures()["notices"].empty());
  bool any = false;
  for (const Json& notice : figures()["notices"]) {
    REQUIRE(notice["indicative"].is_boolean());
    any = any || notice["indicative"].get<bool>();
  }
  // Bars of 20 mm at 50 Hz are thicker than the skin depth of copper.
  CHECK(any);
  CHECK(figures()["validity"] == "indicative");
}

TEST_CASE("run.json tells every instant of the cycle and of the fault with its solves") {
  const io::Results& results = test::saturable_results();
  const Json run = run_of(results);
  const std::size_t count = results.instants->size();
  CHECK(count == 12);
  check_solves(run["instants"], count);
  for (std::size_t k = 0; k < count; ++k) {
    CHECK(run["instants"]["at"][k]["wt_deg"] ==
          Approx(180.0 * static_cast<double>(k) / static_cast<double>(count)));
  }
  check_solves(run["fault"]["course"], 25);
  CHECK(run["fault"]["course"]["at"][24]["wt_deg"] == Approx(360.0));
  // Half a turn of the currents at their largest.
  REQUIRE(run["fault"]["newton"].size() >= 12);
  for (const Json& solves : run["fault"]["newton"]) {
    for (const Json& solve : solves) CHECK(solve["converged"] == true);
  }
  CHECK_FALSE(run.contains("newton"));
}

TEST_CASE("run.json tells the solve of a direct peak current, which has no course") {
  const io::Results results = io::run_case(test::read_text(test::direct_saturable_case() + R"(
[fault]
between = ["L1", "L3"]
direct_ka = 60
peak_ka = 80
)"));
  const Json run = run_of(results);
  CHECK_FALSE(run["newton"].empty());
  CHECK_FALSE(run.contains("instants"));
  CHECK_FALSE(run["fault"].contains("course"));
  REQUIRE(run["fault"]["newton"].size() == 1);
  for (const Json& solve : run["fault"]["newton"][0]) CHECK(solve["converged"] == true);
}

TEST_CASE("The number of threads changes no byte of a saturated cycle and fault") {
  const test::ScratchFolder scratch;
  scratch.write("plate.toml", test::saturable_case + test::fault_beside_plate);
  for (const char* threads : {"1", "2"}) {
    const std::string count = threads;
    const auto run = test::run_barwall(
        scratch.path(), "solve plate.toml --quiet --out out" + count + " --threads " + count);
    CHECK(run.code == 1);  // the grid is too coarse to be sound
  }
  for (const char* name : {"figures.json", "figures.csv", "probes.csv", "cycle.pvd", "fault.pvd",
                           "cycle_05.vtu", "fault_17.vtu", "field.vtu"}) {
    INFO(name);
    const std::string one = test::text_of_file(scratch.path() / "out1" / name);
    CHECK(!one.empty());
    CHECK(one == test::text_of_file(scratch.path() / "out2" / name));
  }
}
